package org.spikewright.mapping;

import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.quantity.Dimension;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;

/** Turns amounts of substance into masses and back. */
final class MolarMass {
  private static final Unit GRAM_PER_MOL = Unit.of("g/mol");

  private MolarMass() {}

  /**
   * A concentration in mass or in amount, as the result is; as it stands where it is so already.
   *
   * @param result the dimension of the result
   */
  static Measured like(Measured concentration, Dimension result, Measured molarMass) {
    Unit unit = concentration.quantity().unit();
    if (Chain.isMass(unit.dimension()) == Chain.isMass(result)) {
      return concentration;
    }
    double gramsPerMol = molarMass.in(GRAM_PER_MOL);
    boolean toMass = !Chain.isMass(unit.dimension());
    Unit other = toMass ? inMass(unit) : inAmount(unit);
    double factor = toMass ? gramsPerMol : 1 / gramsPerMol;
    double scale =
        unit.perBase() == other.perBase() ? factor : unit.perBase() * factor / other.perBase();
    return times(concentration, scale, other);
  }

  /** A value and its tolerance multiplied by the same factor. */
  static Measured times(Measured measured, double factor, Unit unit) {
    OptionalDouble tolerance =
        measured.tolerance().isPresent()
            ? OptionalDouble.of(measured.tolerance().getAsDouble() * factor)
            : OptionalDouble.empty();
    return new Measured(new Quantity(measured.quantity().value() * factor, unit), tolerance);
  }

  /** {@code mmol/L} becomes {@code mg/L}, {@code mM} likewise. */
  private static Unit inMass(Unit unit) {
    String symbol =
        unit.symbol().endsWith("M")
            ? unit.symbol().substring(0, unit.symbol().length() - 1) + "g/L"
            : unit.symbol().replace("mol", "g");
    boolean perMass = unit.dimension() == Dimension.AMOUNT_PER_MASS;
    return fitting(symbol, perMass ? Dimension.MASS_PER_MASS : Dimension.MASS_PER_VOLUME)
        .orElse(Unit.of(perMass ? "g/g" : "g/L"));
  }

  /** {@code mg/L} becomes {@code mmol/L}. */
  private static Unit inAmount(Unit unit) {
    boolean perMass = unit.dimension() == Dimension.MASS_PER_MASS;
    return fitting(
            unit.symbol().replaceFirst("g/", "mol/"),
            perMass ? Dimension.AMOUNT_PER_MASS : Dimension.AMOUNT_PER_VOLUME)
        .orElse(Unit.of(perMass ? "mol/g" : "mol/L"));
  }

  private static Optional<Unit> fitting(String symbol, Dimension dimension) {
    return Unit.find(symbol).filter(unit -> unit.dimension() == dimension);
  }
}
