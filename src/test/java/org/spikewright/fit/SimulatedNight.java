package org.spikewright.fit;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.OptionalDouble;
import java.util.SplittableRandom;
import java.util.function.DoubleUnaryOperator;

/** Makes nights of series with known truth. */
public final class SimulatedNight {
  /** Native concentration of every series; sensitivities differ by some percent. */
  public static final double TRUTH = 1;

  /** The top addition of every series. */
  public static final double TOP = 2;

  /**
   * What a night is made of.
   *
   * @param series how many
   * @param flasks of each, evenly spaced up to the top addition
   * @param noise standard deviation of a flask, a share of the unspiked signal
   * @param spread standard deviation of the logarithm of the noise between series
   * @param proportional whether the noise is a share of each flask's own signal instead
   */
  public record Plan(int series, int flasks, double noise, double spread, boolean proportional) {}

  private SimulatedNight() {}

  /** A night of straight lines. */
  public static List<PooledSeries> straight(SplittableRandom random, Plan plan) {
    return bent(random, plan, 0, 0);
  }

  /** The first {@code bent} series show L − k·L² of the linear signal L in native units. */
  public static List<PooledSeries> bent(SplittableRandom random, Plan plan, int bent, double k) {
    List<PooledSeries> night = new ArrayList<>();
    for (int j = 0; j < plan.series; j++) {
      double curvature = j < bent ? k : 0;
      night.add(series(random, plan, signal -> signal - curvature * signal * signal));
    }
    return night;
  }

  static PooledSeries series(SplittableRandom random, Plan plan, DoubleUnaryOperator response) {
    int n = plan.flasks;
    double sensitivity = 1000 * Math.exp(0.05 * random.nextGaussian());
    double noise = plan.noise * Math.exp(plan.spread * random.nextGaussian());
    double[] x = new double[n];
    double[] y = new double[n];
    for (int i = 0; i < n; i++) {
      x[i] = TOP * i / (n - 1);
      double signal = response.applyAsDouble(TRUTH + x[i]);
      double sd = noise * (plan.proportional ? signal : TRUTH);
      y[i] = sensitivity * (signal + sd * random.nextGaussian());
    }
    return pooled(x, y);
  }

  /** A series of these points, read once each, at no known time. */
  public static PooledSeries pooled(double[] x, double[] y) {
    int n = x.length;
    double[] none = new double[n];
    Arrays.fill(none, Double.NaN);
    int[] readings = new int[n];
    Arrays.fill(readings, 1);
    double slope =
        StraightLine.fit(x, y) instanceof StraightLine line ? Math.max(0, line.slope()) : 0;
    OptionalDouble sensitivity = slope > 0 ? OptionalDouble.of(slope) : OptionalDouble.empty();
    return new PooledSeries(
        x.clone(), x, y, StraightLine.ones(n), readings, none, none.clone(), sensitivity);
  }

  static StraightLine line(PooledSeries series) {
    return (StraightLine) StraightLine.fit(series.x(), series.y());
  }

  /** The curvature k for which a straight line through noise-free flasks is off by a share. */
  public static double curvatureFor(double bias, int flasks) {
    double low = 0;
    double high = 0.12;
    for (int step = 0; step < 100; step++) {
      double k = (low + high) / 2;
      double[] x = new double[flasks];
      double[] y = new double[flasks];
      for (int i = 0; i < flasks; i++) {
        x[i] = TOP * i / (flasks - 1);
        y[i] = TRUTH + x[i] - k * (TRUTH + x[i]) * (TRUTH + x[i]);
      }
      StraightLine line = (StraightLine) StraightLine.fit(x, y);
      if (line.signalIntercept() / line.slope() / TRUTH - 1 > bias) {
        high = k;
      } else {
        low = k;
      }
    }
    return low;
  }

  static boolean holds(NativeEstimate estimate) {
    return !estimate.isBounded()
        || estimate.lower95().orElseThrow() <= TRUTH && TRUTH <= estimate.upper95().orElseThrow();
  }

  static double halfWidth(NativeEstimate estimate) {
    return (estimate.upper95().orElse(1e9) - estimate.lower95().orElse(0)) / 2;
  }

  /** The middle of some values. */
  public static double median(double[] values) {
    double[] sorted = values.clone();
    Arrays.sort(sorted);
    return sorted[sorted.length / 2];
  }
}
