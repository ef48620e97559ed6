package org.spikewright.fit;

import java.util.Optional;
import java.util.OptionalDouble;
import org.apache.commons.math3.distribution.TDistribution;

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

  /** The test with the parabola's own residual variance; empty without degrees of freedom. */
  public static Optional<BendTest> of(StraightLine line) {
    return QuadraticFit.of(line).flatMap(BendTest::of);
  }

  private static Optional<BendTest> of(QuadraticFit parabola) {
    OptionalDouble se = parabola.c2StandardError();
    if (se.isEmpty() || !(se.getAsDouble() > 0)) {
      return Optional.empty();
    }
    double t = parabola.c2() / se.getAsDouble();
    TDistribution student = new TDistribution(null, parabola.residualDf());
    return Optional.of(
        new BendTest(
            t,
            parabola.residualDf(),
            student.cumulativeProbability(t),
            2 * student.cumulativeProbability(-Math.abs(t)),
            parabola.nativeConcentration()));
  }
}
