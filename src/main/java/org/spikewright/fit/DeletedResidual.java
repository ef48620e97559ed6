package org.spikewright.fit;

import java.util.Optional;
import org.apache.commons.math3.distribution.TDistribution;

/**
 * How far a point lies from the line through the others: the externally studentised residual.
 *
 * <p>Source: Cook and Weisberg, Residuals and Influence in Regression (1982), ch. 2.
 *
 * @param t residual over its standard deviation estimated without the point
 * @param df degrees of freedom, n − 3
 * @param p two-sided probability for this one point, not corrected for the choice among n
 * @param without the line through the other points
 */
public record DeletedResidual(double t, double df, double p, StraightLine without) {

  /**
   * The deleted residual of a point.
   *
   * @param line with at least four points
   * @param i the point, from 0
   * @param floor smallest standard deviation of a flask that the readings' resolution allows to be
   *     seen, in signal units; 0 when not known
   * @return empty when the point alone holds the line (leverage 1), when fewer than four points are
   *     there, or when neither scatter nor floor gives a standard deviation
   */
  public static Optional<DeletedResidual> of(StraightLine line, int i, double floor) {
    int df = line.n() - 3;
    double rest = 1 - line.leverage(i);
    if (df < 1 || !(rest > 1e-12)) {
      return Optional.empty();
    }
    LineOutcome others = StraightLine.fit(without(line.x(), i), without(line.y(), i));
    if (!(others instanceof StraightLine without)) {
      return Optional.empty();
    }
    double sd = Math.max(floor, without.residualSd().orElse(0));
    if (!(sd > 0)) {
      return Optional.empty();
    }
    double t = line.residual(i) / (sd * Math.sqrt(rest));
    double p = 2 * new TDistribution(null, df).cumulativeProbability(-Math.abs(t));
    return Optional.of(new DeletedResidual(t, df, p, without));
  }

  private static double[] without(double[] values, int i) {
    double[] others = new double[values.length - 1];
    System.arraycopy(values, 0, others, 0, i);
    System.arraycopy(values, i + 1, others, i, others.length - i);
    return others;
  }
}
