package org.spikewright.mapping;

import java.util.List;
import java.util.Optional;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Spread;

/** Reads how the readings scatter of which a row gives the mean alone. */
final class SpreadReader {
  private static final int MOST_READINGS = 1_000_000;

  private final Mapping mapping;
  private final RowLookup lookup;
  private final AmountReader amounts;
  private final boolean mapped;

  SpreadReader(Mapping mapping, RowLookup lookup) {
    this.mapping = mapping;
    this.lookup = lookup;
    this.amounts = new AmountReader(mapping.notation());
    this.mapped = mapping.places().isNamed(Fact.SIGNAL_SD);
  }

  /**
   * The signal with the spread that the lookup's row gives. Empty, with a trouble added, where the
   * row gives none that makes sense.
   */
  Optional<Signal> with(Signal signal, List<Trouble> troubles) {
    if (!mapped || !(signal instanceof Signal.Value mean)) {
      return Optional.of(signal);
    }
    Optional<Integer> readings = readings(troubles);
    if (readings.isEmpty()) {
      return Optional.empty();
    }
    Optional<Given> given = lookup.find(Fact.SIGNAL_SD);
    if (given.isEmpty() && readings.get() > 1) {
      troubles.add(lookup.missing(Fact.SIGNAL_SD, Fact.SIGNAL_SD.expectation(), false));
      return Optional.empty();
    }
    return given.isEmpty() ? Optional.of(signal) : spread(mean, readings.get(), troubles);
  }

  private Optional<Signal> spread(Signal.Value mean, int readings, List<Trouble> troubles) {
    Given given = lookup.find(Fact.SIGNAL_SD).orElseThrow();
    Understood<Measured> read = amounts.read(Fact.SIGNAL_SD, given.cell(), given.form().unit());
    if (read instanceof Understood.Nothing<Measured> nothing) {
      troubles.add(Trouble.of(nothing, given));
      return Optional.empty();
    }
    double sd = absolute(((Understood.Value<Measured>) read).value(), mean.value());
    if (readings > 1) {
      return Optional.of(
          new Signal.Value(
              mean.value(), mean.text(), mean.standard(), Optional.of(new Spread(sd, readings))));
    }
    if (sd == 0) {
      return Optional.of(mean);
    }
    troubles.add(
        new Trouble(
            Reason.CONTRADICTION,
            given.index(),
            given.column(),
            Said.quoted(given.text()),
            "nothing, or 0: one reading has no standard deviation"));
    return Optional.empty();
  }

  /** A standard deviation in per cent is a part of the mean. */
  private static double absolute(Measured sd, double mean) {
    double value = sd.quantity().value();
    return sd.quantity().unit().equals(Unit.ONE) ? value : sd.in(Unit.ONE) * Math.abs(mean);
  }

  private Optional<Integer> readings(List<Trouble> troubles) {
    Optional<Given> given = lookup.find(Fact.READINGS);
    Understood<Measured> read;
    if (given.isPresent()) {
      read = amounts.read(Fact.READINGS, given.get().cell(), Optional.empty());
    } else {
      PerAnalyte<Measured> fixed =
          mapping.places().fixedAmounts().getOrDefault(Fact.READINGS, PerAnalyte.none());
      if (fixed.all().isEmpty()) {
        troubles.add(lookup.missing(Fact.READINGS, Fact.READINGS.expectation(), true));
        return Optional.empty();
      }
      read = new Understood.Value<>(fixed.all().get());
    }
    Understood<Integer> whole = read.then(SpreadReader::whole);
    if (whole instanceof Understood.Value<Integer> count) {
      return Optional.of(count.value());
    }
    troubles.add(
        Trouble.of(
            (Understood.Nothing<Integer>) whole,
            given.orElse(new Given(List.of(), Form.PLAIN, -1, -1, Fact.READINGS.word()))));
    return Optional.empty();
  }

  private static Understood<Integer> whole(Measured measured) {
    double count = measured.quantity().value();
    boolean fits = measured.quantity().unit().equals(Unit.ONE) && count <= MOST_READINGS;
    return fits && count == Math.rint(count)
        ? new Understood.Value<>((int) count)
        : new Understood.Nothing<>(
            Reason.OUT_OF_BOUNDS, measured.quantity().toString(), "a whole number of readings");
  }
}
