package org.spikewright.fit;

import java.util.Map;
import java.util.concurrent.ConcurrentHashMap;
import org.apache.commons.math3.distribution.NormalDistribution;
import org.apache.commons.math3.distribution.TDistribution;
import org.apache.commons.math3.special.Gamma;

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
  private static final Map<Double, double[]> FACTORS = new ConcurrentHashMap<>();

  /**
   * Standard error at zero of the x-intercept, (s/b)·√(1/n + x̄²/S_xx), in axis units.
   *
   * @param sd standard deviation of one flask, in signal units
   */
  public static double standardErrorAtZero(StraightLine line, double sd) {
    return sd
        / Math.abs(line.slope())
        * Math.sqrt(1.0 / line.n() + line.xMean() * line.xMean() / line.sxx());
  }

  /**
   * The limits that belong to a standard error at zero, in its unit.
   *
   * @param standardErrorAtZero 0 or more
   * @param df its degrees of freedom, above 0
   */
  public static Detection of(double standardErrorAtZero, double df) {
    double[] factors = FACTORS.computeIfAbsent(df, Detection::factors);
    return new Detection(
        standardErrorAtZero, factors[0] * standardErrorAtZero, factors[1] * standardErrorAtZero);
  }

  private static double[] factors(double df) {
    double t = new TDistribution(null, df).inverseCumulativeProbability(1 - ERROR_RATE);
    return new double[] {t, noncentrality(t, df)};
  }

  /** The noncentrality at which noncentral t stays at or below {@code t} with probability 5 %. */
  static double noncentrality(double t, double df) {
    double low = t;
    double high = 4 * t + 10;
    for (int i = 0; i < 80; i++) {
      double middle = (low + high) / 2;
      if (noncentralT(t, df, middle) > ERROR_RATE) {
        low = middle;
      } else {
        high = middle;
      }
    }
    return (low + high) / 2;
  }

  /**
   * Distribution function of noncentral t, by integrating the normal over the distribution of the
   * estimated standard deviation (Simpson's rule; agrees with R's pt to 1e-9 for df ≥ 1).
   */
  static double noncentralT(double t, double df, double delta) {
    double top = 1 + 12 / Math.sqrt(df);
    int steps = 4000;
    double h = top / steps;
    double logNorm = Math.log(2) + df / 2 * Math.log(df / 2) - Gamma.logGamma(df / 2);
    double sum = 0;
    for (int i = 0; i <= steps; i++) {
      double s = i * h;
      double density = s == 0 ? atZero(df, logNorm) : density(s, df, logNorm);
      double weight = i == 0 || i == steps ? 1 : i % 2 == 1 ? 4 : 2;
      sum += weight * density * NORMAL.cumulativeProbability(t * s - delta);
    }
    return sum * h / 3;
  }

  private static double density(double s, double df, double logNorm) {
    return Math.exp(logNorm + (df - 1) * Math.log(s) - df * s * s / 2);
  }

  private static double atZero(double df, double logNorm) {
    return df == 1 ? Math.exp(logNorm) : 0;
  }
}
