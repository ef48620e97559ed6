package org.spikewright.fit;

import java.util.Optional;
import java.util.OptionalDouble;

/**
 * The test for a bend: the quadratic coefficient against its standard error, one-sided towards
 * saturation (concave). Its square is Mandel's F.
 *
 * <p>Source: Mandel, The Statistical Analysis of Experimental Data (1964); ISO 8466-1.
 *
 * @param t the quadratic coefficient over its standard error; below 0 for saturation
 * @param df degrees of freedom, above 0; infinite when the variance is known
 * @param pOneSided probability of a t this low or lower on a straight line
 * @param pTwoSided probability of a t this far from 0; Mandel's p
 * @param nativeConcentration from the bent line; empty when it does not reach zero
 */
public record BendTest(
    double t, double df, double pOneSided, double pTwoSided, OptionalDouble nativeConcentration) {

  /** Which bends are looked for. */
  public enum Side {
    /** Saturation alone: the signal falls behind. */
    SATURATION,
    /** Any bend. */
    EITHER
  }

  /** The probability that belongs to the bends looked for. */
  public double p(Side side) {
    return side == Side.SATURATION ? pOneSided : pTwoSided;
  }

  /**
   * The test with the parabola's own residual variance. A scatter below the last digits of the
   * numbers counts as those digits, so that flasks exactly on a line are not found bent by
   * arithmetic.
   *
   * @param line through at least four points, at three or more distinct x
   * @return empty without degrees of freedom, or when all signals are 0
   */
  public static Optional<BendTest> of(StraightLine line) {
    Optional<QuadraticFit> parabola = QuadraticFit.of(line).filter(fit -> fit.residualDf() > 0);
    return parabola.flatMap(fit -> of(fit, fit.c2StandardError().orElseThrow(), fit.residualDf()));
  }

  /**
   * The test with a variance from elsewhere, as a pool lends it.
   *
   * @param line through three or more distinct x
   * @param variance of a flask of weight 1 about its parabola, in signal units squared; below the
   *     last digits of the numbers it counts as those digits
   * @return empty with two distinct x, or when all signals are 0
   */
  public static Optional<BendTest> of(StraightLine line, Variance variance) {
    double sd = Math.max(variance.sd(), line.rounding());
    return QuadraticFit.of(line).flatMap(fit -> of(fit, sd * fit.c2PerSd(), variance.df()));
  }

  private static Optional<BendTest> of(QuadraticFit parabola, double se, double df) {
    double t = parabola.c2() / se;
    if (!(se > 0) || !Double.isFinite(t)) {
      return Optional.empty();
    }
    return Optional.of(
        new BendTest(
            t,
            df,
            StudentT.cumulative(t, df),
            StudentT.twoSided(t, df),
            parabola.nativeConcentration()));
  }
}
