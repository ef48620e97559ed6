package org.spikewright.fit;

import java.util.Optional;
import java.util.function.Function;

/**
 * How far a point lies from the line through the others: the externally studentised residual.
 *
 * <p>Source: Cook and Weisberg, Residuals and Influence in Regression (1982), ch. 2.
 *
 * @param t residual over its standard deviation estimated without the point
 * @param df degrees of freedom: n − 3, more with a lent variance, then infinite at most
 * @param p two-sided probability for this one point, not corrected for the choice among n
 * @param without the line through the other points, their weights as in the whole line
 */
public record DeletedResidual(double t, double df, double p, StraightLine without) {

  /**
   * The deleted residual of a point. Where the others lie exactly on a line, the last digits of the
   * numbers stand for their scatter.
   *
   * @param line with at least four points
   * @param i the point, from 0
   * @param floor 0 or more: smallest standard deviation of a flask that the readings' resolution
   *     allows to be seen, in signal units; 0 when not known
   * @return empty when the point alone holds the line (leverage 1), when fewer than four points are
   *     there, or when all signals are 0 and there is no floor
   */
  public static Optional<DeletedResidual> of(StraightLine line, int i, double floor) {
    return of(line, i, floor, DeletedResidual::own);
  }

  private static Variance own(StraightLine without) {
    int df = without.residualDf();
    return new Variance(without.residualSumOfSquares() / df, df);
  }

  /**
   * The same with a variance from elsewhere, as a pool lends it.
   *
   * @param lent the variance of a flask of weight 1 for the line through the other points, in
   *     signal units squared
   * @return empty as above
   */
  static Optional<DeletedResidual> of(
      StraightLine line, int i, double floor, Function<StraightLine, Variance> lent) {
    if (line.n() < 4) {
      return Optional.empty();
    }
    double[] weights = without(line.weights(), i);
    LineOutcome others =
        StraightLine.asWeighted(without(line.x(), i), without(line.y(), i), weights);
    if (!(others instanceof StraightLine without)) {
      return Optional.empty();
    }
    Variance variance = lent.apply(without);
    double sd = Math.max(Math.max(floor, variance.sd()), line.rounding());
    double u = line.x()[i] - without.xMean();
    // The same number as residual over s·√(1 − leverage), without the differences of near equals.
    double spread =
        Math.sqrt(1 / line.weights()[i] + 1.0 / without.weight() + u / without.sxx() * u);
    double t = (line.y()[i] - without.at(line.x()[i])) / (sd * spread);
    double df = variance.df();
    return Double.isFinite(t)
        ? Optional.of(new DeletedResidual(t, df, StudentT.twoSided(t, df), without))
        : Optional.empty();
  }

  private static double[] without(double[] values, int i) {
    double[] others = new double[values.length - 1];
    System.arraycopy(values, 0, others, 0, i);
    System.arraycopy(values, i + 1, others, i, others.length - i);
    return others;
  }
}
