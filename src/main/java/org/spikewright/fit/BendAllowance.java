package org.spikewright.fit;

import java.util.Optional;
import java.util.OptionalDouble;

/**
 * The largest bias from saturation that the flasks cannot exclude: the quadratic coefficient is set
 * to its one-sided 95 % bound towards saturation, slope and intercept are fitted again, and the
 * straight line's native concentration less the bent line's is the allowance.
 *
 * <p>Source: the confidence bound of a regression coefficient, Miller and Miller, Statistics and
 * Chemometrics for Analytical Chemistry, ch. 5, carried to the x-intercept.
 *
 * @param c2Bound the quadratic coefficient that the data just cannot exclude, signal per axis unit
 *     squared
 * @param bias straight less bent native concentration, in axis units, 0 or more; empty when that
 *     bent line does not reach zero signal: not bounded
 */
public record BendAllowance(double c2Bound, OptionalDouble bias) {

  private static final double CONFIDENCE = 0.95;

  /**
   * The allowance of a line.
   *
   * @param line with a slope above 0
   * @param variance that of the bend test which is reported, a flask's about its parabola, in
   *     signal units squared
   * @return empty with fewer than three distinct x, or where the numbers are too large
   */
  public static Optional<BendAllowance> of(StraightLine line, Variance variance) {
    double sd = Math.max(variance.sd(), line.rounding());
    double reach = sd * StudentT.quantile(CONFIDENCE, variance.df());
    return QuadraticFit.of(line)
        .map(fit -> fit.c2() - reach * fit.c2PerSd())
        .filter(Double::isFinite)
        .filter(bound -> Double.isFinite(line.signalIntercept() / line.slope()))
        .map(bound -> of(line, bound));
  }

  private static BendAllowance of(StraightLine line, double bound) {
    OptionalDouble bent = QuadraticFit.nativeConcentration(line, bound);
    if (bent.isEmpty()) {
      return new BendAllowance(bound, bent);
    }
    double bias = line.signalIntercept() / line.slope() - bent.getAsDouble();
    return new BendAllowance(bound, OptionalDouble.of(Math.max(0, bias)));
  }

  /** Whether the data set any bound at all. */
  public boolean isBounded() {
    return bias.isPresent();
  }
}
