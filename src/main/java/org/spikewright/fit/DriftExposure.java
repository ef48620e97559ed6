package org.spikewright.fit;

import java.util.OptionalDouble;

/**
 * How far the result moves for 1 % drift: the signals are made to fall by 1 % from the first
 * measurement to the last, evenly in time, and the native concentration is computed again.
 */
public final class DriftExposure {
  private static final double FALL = 0.01;

  private DriftExposure() {}

  /**
   * The change of the native concentration that such a fall makes.
   *
   * @param line the line as fitted, with a slope above 0
   * @param moments when each flask was measured, in any unit and from any origin, or its place in
   *     the order of measurement
   * @return change over native concentration; above 0 where a falling signal makes the result too
   *     large; empty when a moment is not known, all are equal, or there is no concentration to
   *     compare with
   */
  public static OptionalDouble of(StraightLine line, double[] moments) {
    double first = Double.POSITIVE_INFINITY;
    double last = Double.NEGATIVE_INFINITY;
    for (double moment : moments) {
      first = Double.isNaN(moment) ? Double.NaN : Math.min(first, moment);
      last = Math.max(last, moment);
    }
    double run = last - first;
    if (moments.length != line.n() || !(run > 0 && run < Double.POSITIVE_INFINITY)) {
      return OptionalDouble.empty();
    }
    double[] y = new double[line.n()];
    for (int i = 0; i < y.length; i++) {
      y[i] = line.y()[i] * (1 - FALL * (moments[i] - first) / run);
    }
    if (!(StraightLine.asWeighted(line.x(), y, line.weights()) instanceof StraightLine drifted)) {
      return OptionalDouble.empty();
    }
    double without = line.signalIntercept() / line.slope();
    double change = (drifted.signalIntercept() / drifted.slope() - without) / Math.abs(without);
    return Double.isFinite(change) ? OptionalDouble.of(change) : OptionalDouble.empty();
  }
}
