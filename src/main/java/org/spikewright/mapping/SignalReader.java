package org.spikewright.mapping;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.quantity.Numbers;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.InternalStandard;
import org.spikewright.reading.Signal;
import org.spikewright.table.Cell;

/** Reads the signal of a row, and the internal standard's where the mapping names one. */
final class SignalReader {
  private static final int LONGEST = 200;

  private final Mapping mapping;
  private final RowLookup lookup;
  private final boolean standardNamed;

  SignalReader(Mapping mapping, RowLookup lookup) {
    this.mapping = mapping;
    this.lookup = lookup;
    this.standardNamed = mapping.places().isNamed(Fact.INTERNAL_STANDARD);
  }

  /**
   * What the instrument said. Where the internal standard is a declared word, so is the reading:
   * without it there is nothing to divide by.
   *
   * @param facts of the flask, where they are known
   */
  Optional<Signal> read(Optional<FlaskFacts> facts, List<Trouble> troubles) {
    Optional<Signal> signal = read(Fact.SIGNAL, troubles);
    if (!standardNamed) {
      return signal;
    }
    Optional<Signal> standard = read(Fact.INTERNAL_STANDARD, troubles);
    if (signal.isEmpty() || standard.isEmpty()) {
      return Optional.empty();
    }
    if (!(signal.get() instanceof Signal.Value analyte)) {
      return signal;
    }
    if (!(standard.get() instanceof Signal.Value divisor)) {
      return standard;
    }
    double baseline =
        facts
            .flatMap(FlaskFacts::internalStandard)
            .map(InternalStandard::baseline)
            .orElse(OptionalDouble.empty())
            .orElse(0);
    if (!(divisor.value() - baseline > 0)
        || !Double.isFinite(analyte.value() / (divisor.value() - baseline))) {
      troubles.add(useless(divisor, baseline));
      return Optional.empty();
    }
    return Optional.of(
        new Signal.Value(
            analyte.value(), analyte.text(), OptionalDouble.of(divisor.value()), analyte.spread()));
  }

  private Trouble useless(Signal.Value divisor, double baseline) {
    Optional<Given> given = lookup.find(Fact.INTERNAL_STANDARD);
    return new Trouble(
        Reason.OUT_OF_BOUNDS,
        given.map(Given::index).orElse(-1),
        given.map(Given::column).orElse(Fact.INTERNAL_STANDARD.word()),
        Said.quoted(divisor.text()),
        "an internal standard's signal above "
            + (baseline == 0 ? "0" : "its baseline of " + Numbers.plain(baseline))
            + "; the analyte's signal is divided by it");
  }

  private Optional<Signal> read(Fact fact, List<Trouble> troubles) {
    Optional<Given> given = lookup.find(fact);
    if (given.isEmpty()) {
      Optional<Signal.State> blank = mapping.words().state("");
      if (blank.isEmpty()) {
        troubles.add(
            lookup.missing(
                fact,
                "a number, or a word declared under [words] (\"\" is the blank cell)",
                false));
      }
      return blank.map(state -> new Signal.NoNumber(state, ""));
    }
    Understood<Signal> result = read(given.get().cell());
    if (result instanceof Understood.Value<Signal> value) {
      return Optional.of(value.value());
    }
    troubles.add(Trouble.of((Understood.Nothing<Signal>) result, given.get()));
    return Optional.empty();
  }

  private Understood<Signal> read(Cell cell) {
    String text = cell.shown();
    String expected =
        "a number with "
            + AmountReader.markInWords(mapping.notation())
            + ", or a word declared under [words]";
    if (text.length() > LONGEST) {
      return new Understood.Nothing<>(Reason.NOT_A_NUMBER, text, expected);
    }
    Optional<Signal.State> state = mapping.words().state(text);
    if (state.isPresent()) {
      return new Understood.Value<>(new Signal.NoNumber(state.get(), text));
    }
    if (cell instanceof Cell.Number number) {
      return new Understood.Value<>(new Signal.Value(number.value(), number.raw()));
    }
    if (!(cell instanceof Cell.Text)) {
      return new Understood.Nothing<>(Reason.UNUSABLE_CELL, text, expected);
    }
    OptionalDouble value = mapping.notation().numbers().parse(text);
    return value.isPresent()
        ? new Understood.Value<>(new Signal.Value(value.getAsDouble(), text))
        : new Understood.Nothing<>(Reason.NOT_A_NUMBER, text, expected);
  }
}
