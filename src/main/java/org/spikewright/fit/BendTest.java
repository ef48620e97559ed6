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
 * @param df degrees of freedom, above 0
 * @param pOneSided probability of a t this low or lower on a straight line
 * @param pTwoSided probability of a t this far from 0; Mandel's p
 * @param nativeConcentration from the bent line, in axis units; empty when it does not reach zero
 */
public record BendTest(
    double t, double df, double pOneSided, double pTwoSided, OptionalDouble nativeConcentration) {

  /**
   * The test with the parabola's own residual variance. A scatter below the last digits of the
   * numbers counts as those digits, so that flasks exactly on a line are not found bent by
   * arithmetic.
   *
   * @param line through at least four points, at three or more distinct x
   * @return empty without degrees of freedom, or when all signals are 0
   */
  public static Optional<BendTest> of(StraightLine line) {
    return QuadraticFit.of(line).flatMap(BendTest::of);
  }

  private static Optional<BendTest> of(QuadraticFit parabola) {
    double se = parabola.c2StandardError().orElse(0);
    double t = parabola.c2() / se;
    if (!(se > 0) || !Double.isFinite(t)) {
      return Optional.empty();
    }
    int df = parabola.residualDf();
    return Optional.of(
        new BendTest(
            t,
            df,
            StudentT.cumulative(t, df),
            StudentT.twoSided(t, df),
            parabola.nativeConcentration()));
  }
}
