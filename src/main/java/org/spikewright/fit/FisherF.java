package org.spikewright.fit;

import org.apache.commons.math3.distribution.FDistribution;
import org.apache.commons.math3.special.Beta;
import org.apache.commons.math3.special.Gamma;

/**
 * The ratio of two variances (Fisher's F) and, with a known variance below, chi-square.
 *
 * <p>Source: Abramowitz and Stegun, Handbook of Mathematical Functions (1964), 26.6.2 (by the
 * incomplete beta function) and 26.4.19 (chi-square by the incomplete gamma function).
 */
final class FisherF {
  /** Beyond this the lower variance is as good as known. */
  private static final double MANY = 1e7;

  private FisherF() {}

  /** Probability of a ratio of {@code f} or more; {@code below} may be infinite. */
  static double upper(double f, double above, double below) {
    if (!(f > 0)) {
      return 1;
    }
    if (f == Double.POSITIVE_INFINITY) {
      return 0;
    }
    if (below > MANY) {
      return chiSquareUpper(above * f, above);
    }
    double a = below / 2;
    double b = above / 2;
    double x = below / (below + above * f);
    // On its own side of the mean the library's fraction keeps the digits of a small tail.
    return x <= (a + 1) / (a + b + 2)
        ? Beta.regularizedBeta(x, a, b)
        : 1 - Beta.regularizedBeta(above * f / (below + above * f), b, a);
  }

  /** Probability of a chi-square of this or more. */
  static double chiSquareUpper(double chiSquare, double df) {
    return chiSquare > 0 ? Gamma.regularizedGammaQ(df / 2, chiSquare / 2) : 1;
  }

  /** The ratio that is reached with probability {@code p}. */
  static double upperQuantile(double p, double above, double below) {
    return new FDistribution(null, above, below).inverseCumulativeProbability(1 - p);
  }
}
