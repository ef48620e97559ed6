package org.spikewright.fit;

import java.util.Arrays;
import java.util.Optional;
import java.util.function.DoubleUnaryOperator;

/**
 * A series fitted as its pool fits all of its series.
 *
 * @param series what was measured
 * @param line its line, with a slope above 0, through three flasks or more
 * @param scale the residual variance that the pool's noise function expects, signal units squared
 */
record PooledLine(PooledSeries series, StraightLine line, double scale) {

  /** The ordinary line; empty with fewer than three flasks or without a slope above 0. */
  static Optional<StraightLine> ordinary(PooledSeries series) {
    for (double factor : series.factor()) {
      if (!(factor > 1e-30 && factor < 1e30)) {
        return Optional.empty();
      }
    }
    if (series.flasks() > 2
        && StraightLine.fit(series.x(), series.y()) instanceof StraightLine line
        && line.slope() > 0) {
      return Optional.of(line);
    }
    return Optional.empty();
  }

  static Optional<PooledLine> of(PooledSeries series, NoiseFunction noise, Weighting weighting) {
    return ordinary(series)
        .map(line -> weighting == Weighting.EQUAL ? line : noise.weighted(line, series.factor()))
        .filter(line -> line.slope() > 0)
        .map(line -> new PooledLine(series, line, noise.scale(line, series.factor())));
  }

  /** The same flasks with their signals as read changed, and weighing the same. */
  Optional<PooledLine> changed(DoubleUnaryOperator asRead) {
    return changed(line, series.factor(), asRead)
        .map(other -> new PooledLine(series, other, scale));
  }

  static Optional<StraightLine> changed(
      StraightLine line, double[] factor, DoubleUnaryOperator asRead) {
    double[] y = new double[line.n()];
    for (int i = 0; i < y.length; i++) {
      y[i] = factor[i] * asRead.applyAsDouble(line.y()[i] / factor[i]);
    }
    return StraightLine.asWeighted(line.x(), y, line.weights()) instanceof StraightLine other
            && other.slope() > 0
        ? Optional.of(other)
        : Optional.empty();
  }

  /** Some of the flasks, weighing the same; empty where they give no line with a slope above 0. */
  Optional<PooledLine> only(int[] kept) {
    PooledSeries some =
        new PooledSeries(
            some(series.addition(), kept),
            some(line.x(), kept),
            some(line.y(), kept),
            some(series.factor(), kept),
            Arrays.stream(kept).map(i -> series.readings()[i]).toArray(),
            some(series.replicateVariance(), kept),
            some(series.minutes(), kept),
            series.sensitivity());
    return StraightLine.asWeighted(some.x(), some.y(), some(line.weights(), kept))
                instanceof StraightLine other
            && other.slope() > 0
        ? Optional.of(new PooledLine(some, other, scale))
        : Optional.empty();
  }

  private static double[] some(double[] values, int[] kept) {
    return Arrays.stream(kept).mapToDouble(i -> values[i]).toArray();
  }

  int df() {
    return line.residualDf();
  }

  /** The residual variance on the pool's scale; the last digits of the numbers at least. */
  double variance() {
    return onScale(line.residualSumOfSquares() / df());
  }

  double onScale(double variance) {
    return Math.max(variance, line.rounding() * line.rounding()) / scale;
  }

  /** The parabola's residual variance on the pool's scale; empty with fewer than four flasks. */
  Optional<Double> curveVariance() {
    return QuadraticFit.of(line)
        .filter(fit -> fit.residualDf() > 0)
        .map(fit -> onScale(fit.residualSumOfSquares() / fit.residualDf()));
  }
}
