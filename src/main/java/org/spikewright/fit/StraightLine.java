package org.spikewright.fit;

import java.util.Arrays;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * A least-squares line {@code y = signalIntercept + slope · x} with what is needed to go on from
 * it, so that nobody computes it again; ordinary or weighted. Every number of a line is finite.
 *
 * <p>Of weights only the ratios count: their mean is made 1, so that the residual variance is that
 * of a flask of average weight, in signal units squared. An ordinary line has all weights 1.
 *
 * <p>Source: Danzer and Currie, Pure Appl. Chem. 70 (1998) 993; Miller and Miller, Statistics and
 * Chemometrics for Analytical Chemistry, ch. 5.
 *
 * @param n number of points, 2 or more
 * @param xMean weighted mean of x, in axis units
 * @param yMean weighted mean of y, in signal units
 * @param sxx sum of squares of x about its mean, axis units squared, above 0
 * @param syy sum of squares of y about its mean, signal units squared, 0 or more
 * @param slope signal per axis unit; may be 0
 * @param signalIntercept signal at x = 0
 * @param residualSumOfSquares signal units squared, 0 or more
 * @param x the points, in the order given; not to be changed
 * @param y the points, in the order given; not to be changed
 * @param weights of the points, in the order given, each above 0; not to be changed
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
    double[] y,
    double[] weights)
    implements LineOutcome {

  /** Within these sizes no square, product or quotient that a line needs can overflow. */
  private static final double LARGEST = 1e75;

  private static final double SMALLEST = 1e-75;

  /** A lighter point, beside the heaviest, would be none. */
  private static final double LIGHTEST = 1e-12;

  /** A spread of x this many times its last digit is still a spread. */
  private static final double LAST_DIGITS = 16;

  /**
   * Fits a line. Sums are taken about the means, in the order of the points.
   *
   * @param x abscissae, in axis units
   * @param y signals, as many
   * @return a line, or why there is none: fewer than two points, all x equal (or equal but for
   *     rounding), a number that is none, or sizes outside 1e-75 to 1e75
   * @throws IllegalArgumentException when the lengths differ
   */
  public static LineOutcome fit(double[] x, double[] y) {
    return asWeighted(x, y, ones(x.length));
  }

  /**
   * Fits a weighted line.
   *
   * @param x abscissae, in axis units
   * @param y signals, as many
   * @param weights as many, inverse to the variances of the signals; only their ratios count
   * @return a line, or why there is none, as without weights; or a weight is no positive number, or
   *     leaves nothing of its point beside the heaviest (1e-12 of it)
   * @throws IllegalArgumentException when the lengths differ
   */
  public static LineOutcome fit(double[] x, double[] y, double[] weights) {
    if (weights.length != x.length) {
      throw new IllegalArgumentException(x.length + " x but " + weights.length + " weights");
    }
    double heaviest = weights.length == 0 ? 1 : max(weights);
    double[] scaled = new double[weights.length];
    for (int i = 0; i < scaled.length; i++) {
      scaled[i] = weights[i] / heaviest;
      if (!(scaled[i] >= LIGHTEST && weights[i] > 0)) {
        return new NoLine("a weight is not a positive number, or far too small");
      }
    }
    double mean = mean(scaled);
    for (int i = 0; i < scaled.length; i++) {
      scaled[i] /= mean;
    }
    return asWeighted(x, y, scaled);
  }

  /** The line with these very weights, so that the lines through parts of one series compare. */
  static LineOutcome asWeighted(double[] x, double[] y, double[] weights) {
    int n = x.length;
    if (n != y.length) {
      throw new IllegalArgumentException(n + " x but " + y.length + " y");
    }
    if (n < 2) {
      return new NoLine(n == 0 ? "no flask has a signal" : "only one flask has a signal");
    }
    Optional<String> refusal = refusal(x, y);
    return refusal.isPresent() ? new NoLine(refusal.get()) : leastSquares(x, y, weights);
  }

  private static Optional<String> refusal(double[] x, double[] y) {
    double largestX = size(x);
    double largestY = size(y);
    double spread = max(x) - min(x);
    if (Double.isNaN(largestX) || Double.isNaN(largestY)) {
      return Optional.of("an addition or a signal is not a number");
    }
    if (largestX > LARGEST || largestY > LARGEST) {
      return Optional.of("the numbers are too large to compute with");
    }
    if (spread == 0) {
      return Optional.of("all additions are equal");
    }
    if (spread < LAST_DIGITS * Math.ulp(largestX)) {
      return Optional.of("the additions are equal but for rounding");
    }
    if (spread < SMALLEST || largestY > 0 && largestY < SMALLEST) {
      return Optional.of("the numbers are too small to compute with");
    }
    return Optional.empty();
  }

  private static StraightLine leastSquares(double[] x, double[] y, double[] weights) {
    int n = x.length;
    double xMean = mean(x, weights);
    double yMean = mean(y, weights);
    double sxx = 0;
    double sxy = 0;
    double syy = 0;
    for (int i = 0; i < n; i++) {
      double u = x[i] - xMean;
      double v = y[i] - yMean;
      sxx += weights[i] * u * u;
      sxy += weights[i] * u * v;
      syy += weights[i] * v * v;
    }
    double slope = sxy / sxx;
    double sse = 0;
    for (int i = 0; i < n; i++) {
      double e = (y[i] - yMean) - slope * (x[i] - xMean);
      sse += weights[i] * e * e;
    }
    double intercept = yMean - slope * xMean;
    return new StraightLine(
        n, xMean, yMean, sxx, syy, slope, intercept, sse, x.clone(), y.clone(), weights.clone());
  }

  /** Residual degrees of freedom, n − 2. */
  public int residualDf() {
    return n - 2;
  }

  /**
   * Residual standard deviation s_{y/x}, in signal units, of a point of weight 1; empty with two
   * points.
   */
  public OptionalDouble residualSd() {
    return n > 2
        ? OptionalDouble.of(Math.sqrt(residualSumOfSquares / (n - 2)))
        : OptionalDouble.empty();
  }

  /** Standard error of the slope, signal per axis unit; empty with two points. */
  public OptionalDouble slopeStandardError() {
    return scaled(Math.sqrt(1 / sxx));
  }

  /** Standard error of the signal intercept, in signal units; empty with two points. */
  public OptionalDouble interceptStandardError() {
    return scaled(Math.sqrt(1.0 / weight() + xMean * xMean / sxx));
  }

  /**
   * Covariance of signal intercept and slope, −x̄·s²/S_xx, signal squared per axis unit; empty with
   * two points. Leaving it out makes the standard error of the x-intercept too small: Bruce and
   * Gill, J. Chem. Educ. 76 (1999) 805.
   */
  public OptionalDouble covariance() {
    return n > 2
        ? OptionalDouble.of(-xMean / sxx * (residualSumOfSquares / (n - 2)))
        : OptionalDouble.empty();
  }

  /**
   * Correlation coefficient, −1 to 1; empty when all signals are equal. Shown, never used alone.
   */
  public OptionalDouble correlation() {
    if (!(syy > 0)) {
      return OptionalDouble.empty();
    }
    double r = slope * (Math.sqrt(sxx) / Math.sqrt(syy));
    return OptionalDouble.of(Math.max(-1, Math.min(1, r)));
  }

  /** The line's signal at x. */
  public double at(double x) {
    return yMean + slope * (x - xMean);
  }

  /** Signal minus line at a point, counted from 0; in signal units. */
  public double residual(int i) {
    return (y[i] - yMean) - slope * (x[i] - xMean);
  }

  /** Leverage of a point, counted from 0; between 1/n (unweighted) and 1. */
  public double leverage(int i) {
    double u = x[i] - xMean;
    return weights[i] * (1.0 / weight() + u * u / sxx);
  }

  /** The sum of the weights; n for an ordinary line. */
  public double weight() {
    double sum = 0;
    for (double weight : weights) {
      sum += weight;
    }
    return sum;
  }

  /** Whether all points weigh the same. */
  public boolean isUnweighted() {
    for (double weight : weights) {
      if (weight != weights[0]) {
        return false;
      }
    }
    return true;
  }

  /**
   * What the last binary digits of the numbers can do to a residual, in signal units. A scatter
   * below it is arithmetic and no evidence: flasks that lie exactly on a line have such a scatter.
   */
  double rounding() {
    return 4 * (Math.ulp(size(y)) + Math.abs(slope) * Math.ulp(size(x)));
  }

  private OptionalDouble scaled(double factor) {
    OptionalDouble sd = residualSd();
    return sd.isPresent() ? OptionalDouble.of(sd.getAsDouble() * factor) : sd;
  }

  /**
   * The mean, with one correction step so that a large offset costs no digits and the mean of equal
   * numbers is that number, not its neighbour.
   */
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

  /** The weighted mean likewise. */
  static double mean(double[] values, double[] weights) {
    double sum = 0;
    double weight = 0;
    for (int i = 0; i < values.length; i++) {
      sum += weights[i] * values[i];
      weight += weights[i];
    }
    double mean = sum / weight;
    double rest = 0;
    for (int i = 0; i < values.length; i++) {
      rest += weights[i] * (values[i] - mean);
    }
    return mean + rest / weight;
  }

  static double[] ones(int n) {
    double[] ones = new double[n];
    Arrays.fill(ones, 1);
    return ones;
  }

  private static double size(double[] values) {
    return Math.max(Math.abs(min(values)), Math.abs(max(values)));
  }

  private static double min(double[] values) {
    double min = values[0];
    for (double value : values) {
      min = Math.min(min, value);
    }
    return min;
  }

  private static double max(double[] values) {
    double max = values[0];
    for (double value : values) {
      max = Math.max(max, value);
    }
    return max;
  }
}
