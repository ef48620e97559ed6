package org.spikewright.fit;

import java.util.Arrays;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.DoubleStream;

/**
 * A line that close to half of the points cannot move far: the slope is the median over the points
 * of each one's median slope to the others, the signal intercept the median of what the slope
 * leaves. Shown beside the least-squares line, never instead of it.
 *
 * <p>Source: Siegel, Biometrika 69 (1982) 242.
 *
 * @param slope signal per axis unit, finite
 * @param signalIntercept signal at x = 0, finite
 */
public record RepeatedMedian(double slope, double signalIntercept) {

  /**
   * The line through these points.
   *
   * @param line for its points; two of one x have no slope between them
   * @return empty when a number does not fit
   */
  public static Optional<RepeatedMedian> of(StraightLine line) {
    double[] x = line.x();
    double[] y = line.y();
    double[] slopes = new double[x.length];
    for (int i = 0; i < x.length; i++) {
      slopes[i] = medianSlope(x, y, i);
    }
    double slope = median(slopes);
    double[] rest = new double[x.length];
    for (int i = 0; i < x.length; i++) {
      rest[i] = y[i] - slope * x[i];
    }
    double intercept = median(rest);
    return Double.isFinite(slope) && Double.isFinite(intercept)
        ? Optional.of(new RepeatedMedian(slope, intercept))
        : Optional.empty();
  }

  /** Signal intercept over slope, in axis units; empty when the slope is not above 0. */
  public OptionalDouble nativeConcentration() {
    double quotient = signalIntercept / slope;
    return slope > 0 && Double.isFinite(quotient)
        ? OptionalDouble.of(quotient)
        : OptionalDouble.empty();
  }

  private static double medianSlope(double[] x, double[] y, int i) {
    double[] slopes = new double[x.length];
    int count = 0;
    for (int j = 0; j < x.length; j++) {
      if (x[j] != x[i]) {
        slopes[count++] = (y[j] - y[i]) / (x[j] - x[i]);
      }
    }
    return median(Arrays.copyOf(slopes, count));
  }

  /** Of an even number the mean of the middle two. */
  private static double median(double[] values) {
    double[] sorted = DoubleStream.of(values).sorted().toArray();
    int middle = sorted.length / 2;
    return sorted.length % 2 == 1
        ? sorted[middle]
        : sorted[middle - 1] + (sorted[middle] - sorted[middle - 1]) / 2;
  }
}
