package org.spikewright.fit;

import org.apache.commons.math3.special.Beta;
import org.apache.commons.math3.special.Gamma;

/**
 * Upper tail of Fisher's F, for any degrees of freedom.
 *
 * <p>Source: Abramowitz and Stegun, Handbook of Mathematical Functions (1964), 26.6.2 and 26.4.19.
 */
final class FisherF {
  /** Beyond this a variance counts as known; the tail then is within 1e-6 of chi-squared's. */
  private static final double MANY = 1e7;

  private FisherF() {}

  /** Probability of {@code f} or more with {@code df1} over {@code df2} degrees of freedom. */
  static double tail(double f, double df1, double df2) {
    if (!(f > 0)) {
      return 1;
    }
    if (f == Double.POSITIVE_INFINITY) {
      return 0;
    }
    if (df2 > MANY) {
      return Gamma.regularizedGammaQ(df1 / 2, df1 * f / 2);
    }
    double a = df2 / 2;
    double b = df1 / 2;
    double x = df2 / (df2 + df1 * f);
    // On its own side of the mean the library's fraction keeps the digits of a small tail.
    return x <= (a + 1) / (a + b + 2)
        ? Beta.regularizedBeta(x, a, b)
        : 1 - Beta.regularizedBeta(df1 * f / (df2 + df1 * f), b, a);
  }
}
