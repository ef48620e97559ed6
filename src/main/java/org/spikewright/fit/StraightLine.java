package org.spikewright.fit;

import java.util.OptionalDouble;

/**
 * An ordinary least-squares line {@code y = signalIntercept + slope · x} with what is needed to go
 * on from it, so that nobody computes it again.
 *
 * <p>Source: Danzer and Currie, Pure Appl. Chem. 70 (1998) 993; Miller and Miller, Statistics and
 * Chemometrics for Analytical Chemistry, ch. 5.
 *
 * @param n number of points, 2 or more
 * @param xMean mean of x
 * @param yMean mean of y
 * @param sxx sum of squares of x about its mean, above 0
 * @param syy sum of squares of y about its mean
 * @param slope signal per axis unit
 * @param signalIntercept signal at x = 0
 * @param residualSumOfSquares signal squared
 * @param x the points, in the order given; not to be changed
 * @param y the points, in the order given; not to be changed
 */
public record StraightLine(
    int n,
    double xMean,
    double yMean,
    double sxx,
    double syy,
    double slope,
    double signalIntercept,
    double residualSumOfSquares,
    double[] x,
    double[] y)
    implements LineOutcome {

  /**
   * Fits a line. Sums are taken about the means, in the order of the points.
   *
   * @param x abscissae
   * @param y signals, as many
   * @return a line, or why there is none: fewer than two points, all x equal, or numbers so large
   *     that a sum is not finite
   */
  public static LineOutcome fit(double[] x, double[] y) {
    int n = x.length;
    if (n != y.length) {
      throw new IllegalArgumentException(n + " x but " + y.length + " y");
    }
    if (n < 2) {
      return new NoLine(n == 0 ? "no flask has a signal" : "only one flask has a signal");
    }
    double xMean = mean(x);
    double yMean = mean(y);
    double sxx = 0;
    double sxy = 0;
    double syy = 0;
    for (int i = 0; i < n; i++) {
      double u = x[i] - xMean;
      double v = y[i] - yMean;
      sxx += u * u;
      sxy += u * v;
      syy += v * v;
    }
    // Written so that NaN and infinity fail.
    if (!(sxx >= 0 && sxx <= Double.MAX_VALUE && syy >= 0 && syy <= Double.MAX_VALUE)) {
      return new NoLine("the numbers are too large to compute with");
    }
    if (!(sxx > 0)) {
      return new NoLine("all additions are equal");
    }
    double slope = sxy / sxx;
    double sse = 0;
    for (int i = 0; i < n; i++) {
      double e = (y[i] - yMean) - slope * (x[i] - xMean);
      sse += e * e;
    }
    double intercept = yMean - slope * xMean;
    if (!(Double.isFinite(slope) && Double.isFinite(intercept))) {
      return new NoLine("the numbers are too large to compute with");
    }
    return new StraightLine(n, xMean, yMean, sxx, syy, slope, intercept, sse, x.clone(), y.clone());
  }

  /** Residual degrees of freedom, n − 2. */
  public int residualDf() {
    return n - 2;
  }

  /** Residual standard deviation s_{y/x}, in signal units; empty with two points. */
  public OptionalDouble residualSd() {
    return n > 2
        ? OptionalDouble.of(Math.sqrt(residualSumOfSquares / (n - 2)))
        : OptionalDouble.empty();
  }

  /** Standard error of the slope; empty with two points. */
  public OptionalDouble slopeStandardError() {
    return scaled(Math.sqrt(1 / sxx));
  }

  /** Standard error of the signal intercept; empty with two points. */
  public OptionalDouble interceptStandardError() {
    return scaled(Math.sqrt(1.0 / n + xMean * xMean / sxx));
  }

  /** Covariance of signal intercept and slope; empty with two points. */
  public OptionalDouble covariance() {
    return n > 2
        ? OptionalDouble.of(-xMean / sxx * residualSumOfSquares / (n - 2))
        : OptionalDouble.empty();
  }

  /** Correlation coefficient; empty when all signals are equal. Shown, never used alone. */
  public OptionalDouble correlation() {
    if (!(syy > 0)) {
      return OptionalDouble.empty();
    }
    double r = slope * Math.sqrt(sxx / syy);
    return OptionalDouble.of(Math.max(-1, Math.min(1, r)));
  }

  /** The line's signal at x. */
  public double at(double x) {
    return yMean + slope * (x - xMean);
  }

  /** Signal minus line at a point, counted from 0. */
  public double residual(int i) {
    return (y[i] - yMean) - slope * (x[i] - xMean);
  }

  /** Leverage of a point, counted from 0; between 1/n and 1. */
  public double leverage(int i) {
    double u = x[i] - xMean;
    return 1.0 / n + u * u / sxx;
  }

  private OptionalDouble scaled(double factor) {
    OptionalDouble sd = residualSd();
    return sd.isPresent() ? OptionalDouble.of(sd.getAsDouble() * factor) : sd;
  }

  /** The mean, with one correction step so that a large offset costs no digits. */
  static double mean(double[] values) {
    double sum = 0;
    for (double value : values) {
      sum += value;
    }
    double mean = sum / values.length;
    double rest = 0;
    for (double value : values) {
      rest += value - mean;
    }
    return mean + rest / values.length;
  }
}
