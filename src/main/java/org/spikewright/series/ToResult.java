package org.spikewright.series;

import java.util.Optional;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.Preparation;
import org.spikewright.reading.Role;

/**
 * From the axis to the result: {@code result = (x · dilution − methodBlank) · perSample ·
 * unitFactor}.
 *
 * @param dilution volume after over volume taken before the aliquot, times V_t/V_x where additions
 *     are stated in flask terms
 * @param methodBlank the method blank in the axis unit, in the undiluted solution; 0 when none
 * @param methodBlankUncertainty its standard uncertainty in the axis unit; 0 when none is known
 * @param perSample digest volume over test portion, over the dry-mass fraction; 1 for liquids; in
 *     base units of the two
 * @param unitFactor from axis unit (times perSample) to {@code unit}
 * @param unit the unit of the result
 */
public record ToResult(
    double dilution,
    double methodBlank,
    double methodBlankUncertainty,
    double perSample,
    double unitFactor,
    Unit unit) {

  /** The way from an axis to the result, by the facts that all flasks of a series share. */
  static ToResult of(FlaskFacts facts, Axis axis) {
    Preparation preparation = facts.preparation();
    Unit asked = facts.method().resultUnit();
    boolean digested = preparation.testPortion().isPresent();
    double perSample =
        digested ? base(preparation.digestVolume()) / base(preparation.testPortion()) : 1;
    double dry = preparation.dryMassFraction().orElse(1);
    Unit unit =
        preparation.dryMassFraction().isPresent()
            ? new Unit(asked.symbol() + " dry", asked.dimension(), asked.perBase())
            : asked;
    Optional<Measured> blank = methodBlank(facts);
    return new ToResult(
        preparation.dilution() * axis.dilution(),
        blank.map(b -> b.in(axis.unit())).orElse(0.0),
        blank.map(b -> tolerance(b) * b.quantity().unit().to(axis.unit())).orElse(0.0),
        perSample / dry,
        digested ? axis.unit().perBase() / asked.perBase() : axis.unit().to(asked),
        unit);
  }

  /** A blank measured as a series is the blank: taking it off itself would leave nothing. */
  private static Optional<Measured> methodBlank(FlaskFacts facts) {
    return facts.role() == Role.BLANK ? Optional.empty() : facts.blanks().method();
  }

  /** In base units: grams or litres. */
  private static double base(Optional<Quantity> known) {
    return Axis.inBase(Measured.exactly(known.orElseThrow()));
  }

  /** A tolerance is the half-width of a rectangular distribution (JCGM 100:2008, 4.3.7). */
  private static double tolerance(Measured blank) {
    return blank.tolerance().orElse(0) / Math.sqrt(3);
  }

  /** The result that belongs to a concentration on the axis. */
  public double value(double x) {
    return (x * dilution - methodBlank) * perSample * unitFactor;
  }

  /** The length on the result's scale that belongs to a length on the axis. */
  public double length(double dx) {
    return dx * dilution * perSample * unitFactor;
  }
}
