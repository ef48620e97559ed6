package org.spikewright.mapping;

import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.table.Cell;

/**
 * Reads quantities: {@code 20 mL}, {@code 20 mL ± 0.03 mL}, {@code 20 mL ± 0.03}, or a bare number
 * where the unit is declared. A unit that stands beside the number goes before the declared one.
 */
public final class AmountReader {
  /** A number longer than this is no number that an instrument writes. */
  private static final int LONGEST = 200;

  private final Notation notation;

  /** Reads by a notation. */
  public AmountReader(Notation notation) {
    this.notation = notation;
  }

  /** Reads a cell. A cell that the file stores as a number needs a declared unit. */
  public Understood<Measured> read(Fact fact, Cell cell, Optional<Unit> declared) {
    boolean bare = fact.isInSignalUnits() || fact.kind() == Fact.Kind.SPREAD;
    Optional<Unit> unit = declared.isEmpty() && bare ? Optional.of(Unit.ONE) : declared;
    if (cell instanceof Cell.Number number) {
      return unit.isPresent()
          ? checked(fact, number.raw(), number.value(), unit.get(), OptionalDouble.empty())
          : noUnit(fact, number.raw());
    }
    if (cell instanceof Cell.Text text) {
      return read(fact, text.text(), unit);
    }
    return new Understood.Nothing<>(Reason.UNUSABLE_CELL, cell.shown(), fact.expectation());
  }

  /** Reads a text. */
  public Understood<Measured> read(Fact fact, String text, Optional<Unit> declared) {
    String stripped = text.strip();
    if (stripped.length() > LONGEST) {
      return notANumber(fact, stripped);
    }
    int sign = stripped.indexOf('±');
    String main = sign < 0 ? stripped : stripped.substring(0, sign).strip();
    Split split = split(main);
    if (split.number().isEmpty()) {
      return notANumber(fact, stripped);
    }
    Optional<Unit> unit = split.rest().isEmpty() ? declared : notation.unit(split.rest());
    if (unit.isEmpty()) {
      return split.rest().isEmpty()
          ? noUnit(fact, stripped)
          : new Understood.Nothing<>(Reason.UNIT_DOES_NOT_FIT, stripped, fact.expectation());
    }
    double value = split.number().getAsDouble();
    if (sign < 0) {
      return checked(fact, stripped, value, unit.get(), OptionalDouble.empty());
    }
    if (!fact.keepsTolerance()) {
      return new Understood.Nothing<>(
          Reason.OUT_OF_BOUNDS, stripped, fact.expectation() + "; no tolerance is used here");
    }
    OptionalDouble tolerance = tolerance(stripped.substring(sign + 1).strip(), unit.get());
    return tolerance.isPresent()
        ? checked(fact, stripped, value, unit.get(), tolerance)
        : new Understood.Nothing<>(
            Reason.NOT_A_NUMBER,
            stripped,
            "a tolerance after ±, such as '± 0.03 " + unit.get() + "'");
  }

  private OptionalDouble tolerance(String text, Unit unit) {
    Split split = split(text);
    Optional<Unit> own = split.rest().isEmpty() ? Optional.of(unit) : notation.unit(split.rest());
    boolean fits = own.isPresent() && own.get().dimension() == unit.dimension();
    if (!fits || split.number().isEmpty() || !(split.number().getAsDouble() >= 0)) {
      return OptionalDouble.empty();
    }
    return OptionalDouble.of(split.number().getAsDouble() * own.get().to(unit));
  }

  private static Understood<Measured> checked(
      Fact fact, String found, double value, Unit unit, OptionalDouble tolerance) {
    if (!fact.fits(unit.dimension())) {
      return new Understood.Nothing<>(
          Reason.UNIT_DOES_NOT_FIT,
          found + " (" + unit + " is " + unit.dimension().words() + ")",
          fact.expectation());
    }
    // Fractions are compared and kept as fractions, so that 85 % and 0.85 are the same fact.
    boolean fraction = fact == Fact.DRY_MASS;
    double kept = fraction ? value * unit.to(Unit.ONE) : value;
    if (!fact.admits(kept)) {
      return new Understood.Nothing<>(Reason.OUT_OF_BOUNDS, found, fact.expectation());
    }
    OptionalDouble keptTolerance =
        fraction && tolerance.isPresent()
            ? OptionalDouble.of(tolerance.getAsDouble() * unit.to(Unit.ONE))
            : tolerance;
    return new Understood.Value<>(
        new Measured(new Quantity(kept, fraction ? Unit.ONE : unit), keptTolerance));
  }

  private Understood<Measured> noUnit(Fact fact, String found) {
    return new Understood.Nothing<>(
        Reason.UNIT_DOES_NOT_FIT,
        found + " without a unit",
        fact.expectation() + "; a column of bare numbers names its unit in the mapping");
  }

  private Understood<Measured> notANumber(Fact fact, String found) {
    return new Understood.Nothing<>(
        Reason.NOT_A_NUMBER, found, fact.expectation() + " (" + markInWords(notation) + ")");
  }

  /** How numbers are written, for messages. */
  static String markInWords(Notation notation) {
    return notation.numbers().decimalMark() == ',' ? "decimal comma" : "decimal point";
  }

  private record Split(OptionalDouble number, String rest) {}

  /** The longest number at the front, and what follows it. */
  private Split split(String text) {
    int end = 0;
    while (end < text.length() && isInNumber(text.charAt(end))) {
      end++;
    }
    for (int cut = end; cut > 0; cut--) {
      OptionalDouble number = notation.numbers().parse(text.substring(0, cut));
      if (number.isPresent()) {
        return new Split(number, text.substring(cut).strip());
      }
    }
    return new Split(OptionalDouble.empty(), text);
  }

  private boolean isInNumber(char c) {
    return c >= '0' && c <= '9'
        || "+-\u2212eE ".indexOf(c) >= 0
        || c == notation.numbers().decimalMark()
        || notation.numbers().thousandsMark().filter(mark -> mark == c).isPresent();
  }
}
