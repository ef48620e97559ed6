package org.spikewright.fit;

import java.util.Map;
import java.util.concurrent.ConcurrentHashMap;
import org.apache.commons.math3.distribution.NormalDistribution;
import org.apache.commons.math3.distribution.TDistribution;
import org.apache.commons.math3.special.Beta;

/**
 * Student's t, for any degrees of freedom from 0.1 to infinity: a variance that many series lend
 * may come without bound to its degrees of freedom.
 *
 * <p>Source: Abramowitz and Stegun, Handbook of Mathematical Functions (1964), 26.7.1 and 26.5.27
 * (by the incomplete beta function) and 26.7.5 (quantile for many degrees of freedom); Hill,
 * Commun. ACM 13 (1970) 617 (distribution for many degrees of freedom).
 */
final class StudentT {
  private static final NormalDistribution NORMAL = new NormalDistribution(null, 0, 1);

  /** Beyond this the expansions in 1/df are closer than the beta function. */
  private static final double MANY = 1e6;

  /** Moderated degrees of freedom are any number, so that a service would collect them for ever. */
  private static final int REMEMBERED = 4096;

  private static final Map<Asked, Double> QUANTILES = new ConcurrentHashMap<>();

  private StudentT() {}

  /** Probability of a value of {@code t} or less; precise also next to one half. */
  static double cumulative(double t, double df) {
    double square = t * t;
    if (df > MANY) {
      double distance = Math.sqrt((df - 0.5) * Math.log1p(square / df));
      double z = df < Double.POSITIVE_INFINITY ? Math.copySign(distance, t) : t;
      return NORMAL.cumulativeProbability(z);
    }
    if (square < Math.min(1, df)) {
      double middle = Beta.regularizedBeta(square / (df + square), 0.5, df / 2) / 2;
      return t < 0 ? 0.5 - middle : 0.5 + middle;
    }
    double tail = Beta.regularizedBeta(df / (df + square), df / 2, 0.5) / 2;
    return t < 0 ? tail : 1 - tail;
  }

  /** Upper tail with one degree of freedom, in closed form; precise however small. */
  private static double tailOfOne(double t) {
    return Math.atan2(1, t) / Math.PI;
  }

  /** Upper tail with two degrees of freedom, in closed form; precise however small. */
  private static double tailOfTwo(double t) {
    double root = Math.sqrt(2 + t * t);
    return 1 / (root * (root + t));
  }

  /** Probability of a value at least as far from 0 as {@code t}. */
  static double twoSided(double t, double df) {
    return 2 * cumulative(-Math.abs(t), df);
  }

  /** The value that is not exceeded with probability {@code p}. */
  static double quantile(double p, double df) {
    if (QUANTILES.size() >= REMEMBERED) {
      QUANTILES.clear();
    }
    return QUANTILES.computeIfAbsent(new Asked(p, df), asked -> computed(asked.p(), asked.df()));
  }

  private record Asked(double p, double df) {}

  private static double computed(double p, double df) {
    if (df > MANY) {
      double z = NORMAL.inverseCumulativeProbability(p);
      return z + (z * z * z + z) / (4 * df);
    }
    TDistribution student = new TDistribution(null, df);
    double t = student.inverseCumulativeProbability(p);
    // The library's root is good to 1e-9; one Newton step leaves rounding only.
    double step = (cumulative(t, df) - p) / student.density(t);
    return Double.isFinite(step) ? t - step : t;
  }
}
