package org.spikewright.fit;

import java.util.Map;
import java.util.concurrent.ConcurrentHashMap;
import org.apache.commons.math3.analysis.solvers.BrentSolver;
import org.apache.commons.math3.distribution.NormalDistribution;

/**
 * Critical value and detection limit of one series.
 *
 * <p>Source: Currie, Pure Appl. Chem. 67 (1995) 1699; ISO 11843-2.
 *
 * @param standardErrorAtZero standard error of a result that is truly zero
 * @param criticalValue a result above it is detected (false positives 5 %)
 * @param detectionLimit a true concentration that is detected in 95 % of series
 */
public record Detection(double standardErrorAtZero, double criticalValue, double detectionLimit) {

  private static final double ERROR_RATE = 0.05;
  private static final NormalDistribution NORMAL = new NormalDistribution(null, 0, 1);

  /** Moderated degrees of freedom are any number, so that a service would collect them for ever. */
  private static final int REMEMBERED = 4096;

  private static final Map<Double, double[]> FACTORS = new ConcurrentHashMap<>();

  /**
   * Standard error at zero of the x-intercept, (s/b)·√(1/n + x̄²/S_xx), in axis units.
   *
   * @param line one that has a {@link NativeEstimate} with this standard deviation; the result is
   *     finite then
   * @param sd standard deviation of one flask (of weight 1), in signal units
   */
  public static double standardErrorAtZero(StraightLine line, double sd) {
    return sd
        / Math.abs(line.slope())
        * Math.sqrt(1.0 / line.weight() + line.xMean() * line.xMean() / line.sxx());
  }

  /**
   * The limits that belong to a standard error at zero, in its unit.
   *
   * @param standardErrorAtZero 0 or more
   * @param df its degrees of freedom, above 0 (the factors have ten digits from 0.5 on), infinite
   *     when the standard error is known
   * @throws IllegalArgumentException when either is out of range
   */
  public static Detection of(double standardErrorAtZero, double df) {
    if (!(standardErrorAtZero >= 0 && df > 0)) {
      throw new IllegalArgumentException(
          "standard error " + standardErrorAtZero + " with " + df + " df");
    }
    double[] factors = remembered(df);
    return new Detection(
        standardErrorAtZero, factors[0] * standardErrorAtZero, factors[1] * standardErrorAtZero);
  }

  private static double[] remembered(double df) {
    if (FACTORS.size() >= REMEMBERED) {
      FACTORS.clear();
    }
    return FACTORS.computeIfAbsent(df, Detection::factors);
  }

  /** Student's t_{0.95} and the noncentrality that goes with it, both in standard errors. */
  static double[] factors(double df) {
    double t = StudentT.quantile(1 - ERROR_RATE, df);
    return new double[] {t, noncentrality(t, df)};
  }

  /** The noncentrality at which noncentral t stays at or below {@code t} with probability 5 %. */
  static double noncentrality(double t, double df) {
    NoncentralT law = new NoncentralT(t, df);
    // The square of the estimated over the true deviation has mean 1, so that it exceeds 20 in less
    // than 5 % (Markov): the root lies below t·√20 and what the normal part adds.
    double most = 5 * t + 10;
    return new BrentSolver(1e-12, 1e-12)
        .solve(200, delta -> law.cumulative(delta) - ERROR_RATE, t, most);
  }

  /** Distribution function of noncentral t. */
  static double noncentralT(double t, double df, double delta) {
    return new NoncentralT(t, df).cumulative(delta);
  }

  /**
   * Noncentral t at one point, for many noncentralities: the normal distribution averaged over the
   * estimated standard deviation s (true one 1), by the trapezoidal rule over w = ln s, where the
   * density exp(df·(w − (e^{2w} − 1)/2)) is smooth and vanishes on both sides, so that the rule
   * converges faster than any power of the step. Agrees with R's pt to 1e-10 for df ≥ 0.5.
   *
   * <p>Source: Johnson, Kotz and Balakrishnan, Continuous Univariate Distributions 2 (1995), ch.
   * 31; for the rule Trefethen and Weideman, SIAM Rev. 56 (2014) 385.
   */
  private static final class NoncentralT {
    private static final int MOST_STEPS = 20_000;
    private final double[] centre;
    private final double[] weight;

    NoncentralT(double t, double df) {
      if (df > 1e10) {
        centre = new double[] {t};
        weight = new double[] {1};
        return;
      }
      double left = df < 100 ? 42 / df + 0.5 : 10 / Math.sqrt(df);
      double right = 6.5 / Math.sqrt(df);
      double scale = Math.min(1 / Math.sqrt(2 * df + 1), 1 / (2 * Math.abs(t) + 5));
      int steps = (int) Math.min(MOST_STEPS, Math.ceil((left + right) / (scale / 2)));
      centre = new double[steps + 1];
      weight = new double[steps + 1];
      double total = 0;
      for (int i = 0; i <= steps; i++) {
        double w = -left + (left + right) * i / steps;
        centre[i] = t * Math.exp(w);
        weight[i] = Math.exp(df * (w - Math.expm1(2 * w) / 2));
        total += weight[i];
      }
      for (int i = 0; i <= steps; i++) {
        weight[i] /= total;
      }
    }

    double cumulative(double delta) {
      double sum = 0;
      for (int i = 0; i < centre.length; i++) {
        sum += weight[i] * NORMAL.cumulativeProbability(centre[i] - delta);
      }
      return sum;
    }
  }
}
