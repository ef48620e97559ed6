package org.spikewright.fit;

import java.util.Arrays;
import java.util.Optional;
import org.apache.commons.math3.special.Gamma;

/**
 * Estimates a variance prior by the marginal likelihood of variances that follow s_0²·F(ν, d_0),
 * but for a small share that may be anything larger. For each of a ladder of d_0 the best s_0² is
 * found; 1/d_0 is averaged over the ladder by the likelihoods, since few series with few degrees of
 * freedom say little of d_0, and the likeliest one would as often be infinite as not.
 */
final class PriorFit {
  /** The share of series that the likelihood grants to be bad. */
  static final double BAD = 0.02;

  /** A bad variance may lie anywhere over six decades above s_0², evenly in its logarithm. */
  private static final double BAD_DENSITY = BAD / (6 * Math.log(10));

  /** 1/d_0. */
  private static final double[] LADDER = {
    0, 0.01, 0.02, 0.035, 0.05, 0.07, 0.1, 0.14, 0.2, 0.28, 0.4, 0.55, 0.75, 1
  };

  private static final int FINE = 17;

  /** A smaller 1/d_0 is none. */
  private static final double LEAST = 1e-3;

  /** Near here and below, 1/d_0 is even; above, its logarithm is. Chosen by simulated coverage. */
  private static final double SOFT = 0.05;

  private static final int ROUNDS = 60;

  /** Logarithms of variances this far below the mean say nothing more. */
  private static final double FLOOR = 1e-12;

  private final double[] x;
  private final double[] logs;
  private final int[] df;

  private PriorFit(double[] x, int[] df) {
    this.x = x;
    this.df = df;
    logs = Arrays.stream(x).map(Math::log).toArray();
  }

  static Optional<VariancePrior> of(double[] variances, int[] df) {
    double largest = 0;
    for (double variance : variances) {
      largest = Math.max(largest, variance);
    }
    if (!(largest > 0)) {
      return Optional.empty();
    }
    double unit = typical(variances, df);
    double[] x = new double[variances.length];
    for (int j = 0; j < x.length; j++) {
      x[j] = Math.min(1e12, Math.max(variances[j] / unit, FLOOR));
    }
    VariancePrior prior = new PriorFit(x, df).estimate();
    double variance = Math.max(Double.MIN_NORMAL, prior.variance() * unit);
    return Optional.of(new VariancePrior(prior.df(), variance, x.length));
  }

  /** The median; the mean where more than half are as good as 0. */
  private static double typical(double[] variances, int[] df) {
    double[] sorted = variances.clone();
    Arrays.sort(sorted);
    double mean = StraightLine.mean(sorted);
    return Math.max(sorted[sorted.length / 2], 1e-6 * mean);
  }

  private VariancePrior estimate() {
    Average average = average(LADDER);
    if (average.narrow()) {
      // Many series: the likelihood has room between the rungs.
      average = average(between(average.below(), average.above()));
    }
    double d0 = average.inverse() > LEAST ? 1 / average.inverse() : Double.POSITIVE_INFINITY;
    return new VariancePrior(d0, best(d0, start(), 1e-10)[0], x.length);
  }

  /**
   * What a ladder comes to.
   *
   * @param inverse mean of 1/d_0
   * @param narrow whether the likelihood lies between the rungs below and above the likeliest one
   */
  private record Average(double inverse, boolean narrow, double below, double above) {}

  private Average average(double[] ladder) {
    double[] likelihood = likelihoods(ladder);
    double weight = 0;
    double inverse = 0;
    int best = 0;
    for (int i = 0; i < ladder.length; i++) {
      double share = likelihood[i] * step(ladder, i);
      weight += share;
      inverse += share * ladder[i];
      best = likelihood[i] > likelihood[best] ? i : best;
    }
    int below = Math.max(0, best - 1);
    int above = Math.min(ladder.length - 1, best + 1);
    double inside = 0;
    for (int i = below; i <= above; i++) {
      inside += likelihood[i] * step(ladder, i);
    }
    return new Average(inverse / weight, inside > 0.99 * weight, ladder[below], ladder[above]);
  }

  private double[] likelihoods(double[] ladder) {
    double[] likelihoods = new double[ladder.length];
    double most = Double.NEGATIVE_INFINITY;
    double s0 = start();
    for (int i = 0; i < ladder.length; i++) {
      double[] best = best(1 / ladder[i], s0, 1e-5);
      likelihoods[i] = best[1];
      most = Math.max(most, best[1]);
      s0 = best[0];
    }
    for (int i = 0; i < ladder.length; i++) {
      likelihoods[i] = Math.exp(likelihoods[i] - most);
    }
    return likelihoods;
  }

  private static double[] between(double below, double above) {
    double[] ladder = new double[FINE];
    Arrays.setAll(ladder, i -> below + (above - below) * i / (FINE - 1));
    return ladder;
  }

  /** The width of the ladder about a rung, in a measure that favours many degrees of freedom. */
  private static double step(double[] ladder, int i) {
    double below = i == 0 ? ladder[0] : ladder[i - 1];
    double above = i == ladder.length - 1 ? ladder[i] : ladder[i + 1];
    return measure((ladder[i] + above) / 2) - measure((ladder[i] + below) / 2);
  }

  private static double measure(double inverse) {
    return Math.log(inverse + SOFT);
  }

  private double start() {
    double sum = 0;
    double weight = 0;
    for (int j = 0; j < x.length; j++) {
      sum += df[j] * Math.min(x[j], 10);
      weight += df[j];
    }
    return sum / weight;
  }

  /** The likeliest s_0² for a d_0, and the logarithm of its likelihood. */
  private double[] best(double d0, double start, double settled) {
    double[] norm = norm(d0);
    double s0 = start;
    for (int round = 0; round < ROUNDS; round++) {
      double up = 0;
      double down = 0;
      for (int j = 0; j < x.length; j++) {
        double good = good(j, d0, s0, norm);
        double clean = df[j] * good / (good + bad(j, s0) + Double.MIN_NORMAL);
        up += clean * pull(j, d0, s0) * x[j];
        down += clean;
      }
      double next = down > 0 ? Math.max(up / down, FLOOR) : s0;
      boolean still = Math.abs(next - s0) < settled * s0;
      s0 = next;
      if (still) {
        break;
      }
    }
    double log = 0;
    for (int j = 0; j < x.length; j++) {
      log += Math.log(good(j, d0, s0, norm) + bad(j, s0) + Double.MIN_NORMAL);
    }
    return new double[] {s0, log};
  }

  /** How much of a variance counts: all of it when d_0 is infinite, little of one far out else. */
  private double pull(int j, double d0, double s0) {
    return d0 == Double.POSITIVE_INFINITY ? 1 : (df[j] + d0) / (d0 + df[j] * x[j] / s0);
  }

  private double bad(int j, double s0) {
    return x[j] > s0 ? BAD_DENSITY : 0;
  }

  /** Density of ln s² for a clean series, times the share of such. */
  private double good(int j, double d0, double s0, double[] norm) {
    double f = x[j] / s0;
    double shape =
        d0 == Double.POSITIVE_INFINITY
            ? f * df[j] / 2
            : (df[j] + d0) / 2 * Math.log1p(df[j] * f / d0);
    return Math.exp(norm[j] + df[j] / 2.0 * (logs[j] - Math.log(s0)) - shape);
  }

  /** What of the logarithm of the density does not depend on s_0². */
  private double[] norm(double d0) {
    double[] norm = new double[x.length];
    for (int j = 0; j < norm.length; j++) {
      if (j > 0 && df[j] == df[j - 1]) {
        norm[j] = norm[j - 1];
        continue;
      }
      double nu = df[j];
      double common = Math.log(1 - BAD) - Gamma.logGamma(nu / 2);
      norm[j] =
          d0 == Double.POSITIVE_INFINITY
              ? common + nu / 2 * Math.log(nu / 2)
              : common
                  + nu / 2 * Math.log(nu / d0)
                  + Gamma.logGamma((nu + d0) / 2)
                  - Gamma.logGamma(d0 / 2);
    }
    return norm;
  }
}
