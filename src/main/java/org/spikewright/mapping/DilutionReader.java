package org.spikewright.mapping;

import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.NumberGrammar;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.table.Cell;

/**
 * Reads a dilution: a factor {@code 10}, {@code 1 + 9}, {@code 1 mL to 10 mL}, or {@code 1:10}
 * where the mapping says what that means. The result is volume after over volume taken, 1 or more,
 * in unit 1.
 */
public final class DilutionReader {
  private static final String EXPECTED =
      "a factor of 1 or more, such as 10, 1 + 9 or 1 mL to 10 mL";
  private static final int LONGEST = 100;

  private final Notation notation;

  /** Reads by a notation. */
  public DilutionReader(Notation notation) {
    this.notation = notation;
  }

  /** Reads a cell. */
  public Understood<Measured> read(Cell cell) {
    if (cell instanceof Cell.Number number) {
      return factor(number.raw(), OptionalDouble.of(number.value()));
    }
    if (cell instanceof Cell.Text text) {
      return read(text.text());
    }
    return new Understood.Nothing<>(Reason.UNUSABLE_CELL, cell.shown(), EXPECTED);
  }

  /** Reads a text. */
  public Understood<Measured> read(String text) {
    String stripped = text.strip();
    if (stripped.length() > LONGEST) {
      return new Understood.Nothing<>(Reason.NOT_A_NUMBER, stripped, EXPECTED);
    }
    int plus = stripped.indexOf('+', 1);
    int to = stripped.indexOf(" to ");
    int colon = stripped.indexOf(':');
    if (colon > 0) {
      return ratio(stripped, colon);
    }
    if (to > 0) {
      return volumes(stripped, stripped.substring(0, to), stripped.substring(to + 4));
    }
    if (plus > 0 && Character.toLowerCase(stripped.charAt(plus - 1)) != 'e') {
      return factor(stripped, parts(stripped, plus));
    }
    return factor(stripped, notation.numbers().parse(stripped));
  }

  private Understood<Measured> ratio(String text, int colon) {
    if (notation.ratio().isEmpty()) {
      return new Understood.Nothing<>(
          Reason.NOT_A_NUMBER,
          text,
          EXPECTED
              + "; what "
              + text
              + " means the mapping has to say: ratio = \"part in total\" or \"part plus part\""
              + " under [units]");
    }
    if (notation.ratio().get() == Notation.Ratio.PART_PLUS_PART) {
      return factor(text, parts(text, colon));
    }
    NumberGrammar numbers = notation.numbers();
    OptionalDouble part = numbers.parse(text.substring(0, colon));
    OptionalDouble total = numbers.parse(text.substring(colon + 1));
    return factor(text, quotient(total, part));
  }

  private OptionalDouble parts(String text, int between) {
    OptionalDouble part = notation.numbers().parse(text.substring(0, between));
    OptionalDouble other = notation.numbers().parse(text.substring(between + 1));
    if (part.isEmpty() || other.isEmpty() || !(other.getAsDouble() >= 0)) {
      return OptionalDouble.empty();
    }
    return quotient(OptionalDouble.of(part.getAsDouble() + other.getAsDouble()), part);
  }

  private Understood<Measured> volumes(String text, String taken, String after) {
    AmountReader amounts = new AmountReader(notation);
    Understood<Measured> from = amounts.read(Fact.ALIQUOT_VOLUME, taken, Optional.empty());
    Understood<Measured> into = amounts.read(Fact.ALIQUOT_VOLUME, after, Optional.empty());
    if (from instanceof Understood.Value<Measured> a
        && into instanceof Understood.Value<Measured> b) {
      Unit unit = a.value().quantity().unit();
      double factor = b.value().in(unit) / a.value().in(unit);
      return factor(text, OptionalDouble.of(factor))
          .then(value -> new Understood.Value<>(with(value, a.value(), b.value())));
    }
    return factor(text, OptionalDouble.empty());
  }

  /**
   * The factor with the half-width whose rectangular standard uncertainty is that of the quotient
   * of two volumes with rectangular tolerances.
   */
  private static Measured with(Measured factor, Measured taken, Measured after) {
    if (taken.tolerance().isEmpty() && after.tolerance().isEmpty()) {
      return factor;
    }
    double relative = Math.hypot(relative(taken), relative(after));
    return new Measured(factor.quantity(), OptionalDouble.of(relative * factor.quantity().value()));
  }

  private static double relative(Measured volume) {
    return volume.tolerance().orElse(0) / volume.quantity().value();
  }

  private static OptionalDouble quotient(OptionalDouble above, OptionalDouble below) {
    if (above.isEmpty() || below.isEmpty() || !(below.getAsDouble() > 0)) {
      return OptionalDouble.empty();
    }
    return OptionalDouble.of(above.getAsDouble() / below.getAsDouble());
  }

  private static Understood<Measured> factor(String found, OptionalDouble value) {
    if (value.isEmpty()) {
      return new Understood.Nothing<>(Reason.NOT_A_NUMBER, found, EXPECTED);
    }
    double factor = value.getAsDouble();
    if (!(factor >= 1 && Double.isFinite(factor))) {
      return new Understood.Nothing<>(Reason.OUT_OF_BOUNDS, found, EXPECTED);
    }
    return new Understood.Value<>(Measured.exactly(new Quantity(factor, Unit.ONE)));
  }
}
