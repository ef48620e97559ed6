package org.spikewright.fit;

import java.util.Optional;
import java.util.OptionalDouble;

/**
 * The least-squares line through the origin, {@code y = slope·x}, of an external calibration whose
 * blank is subtracted.
 *
 * <p>Source: Draper and Smith, Applied Regression Analysis (1998), 2.6 and exercises; certified
 * values NIST StRD NoInt1 and NoInt2.
 *
 * @param n number of points, 1 or more
 * @param slope signal per concentration, finite
 * @param slopeStandardError finite; empty with one point
 * @param residualSd in signal units; empty with one point
 * @param rSquared part of Σy² that the line explains (not about the mean), 0 to 1; empty when all
 *     signals are 0
 */
public record OriginLine(
    int n,
    double slope,
    OptionalDouble slopeStandardError,
    OptionalDouble residualSd,
    OptionalDouble rSquared) {

  /**
   * Fits the line. Sums are scaled by the largest numbers and corrected once, so that they keep
   * their digits.
   *
   * @param x concentrations
   * @param y signals, as many
   * @return empty without points, when all x are 0, and when a number is none or does not fit
   * @throws IllegalArgumentException when the lengths differ
   */
  public static Optional<OriginLine> fit(double[] x, double[] y) {
    if (x.length != y.length) {
      throw new IllegalArgumentException(x.length + " x but " + y.length + " y");
    }
    double unitX = size(x);
    double unitY = size(y);
    if (!(unitX > 0 && unitX <= Double.MAX_VALUE && unitY <= Double.MAX_VALUE)) {
      return Optional.empty();
    }
    return scaled(x, y, unitX, unitY > 0 ? unitY : 1)
        .filter(line -> Double.isFinite(line.slope) && line.isFinite());
  }

  private static Optional<OriginLine> scaled(double[] x, double[] y, double unitX, double unitY) {
    int n = x.length;
    double sxx = 0;
    double sxy = 0;
    double syy = 0;
    for (int i = 0; i < n; i++) {
      double u = x[i] / unitX;
      double v = y[i] / unitY;
      sxx += u * u;
      sxy += u * v;
      syy += v * v;
    }
    double slope = sxy / sxx;
    double rest = 0;
    for (int i = 0; i < n; i++) {
      rest += x[i] / unitX * (y[i] / unitY - slope * (x[i] / unitX));
    }
    slope += rest / sxx;
    double squares = 0;
    for (int i = 0; i < n; i++) {
      double e = y[i] / unitY - slope * (x[i] / unitX);
      squares += e * e;
    }
    double sd = Math.sqrt(squares / (n - 1));
    double toSlope = unitY / unitX;
    return Optional.of(
        new OriginLine(
            n,
            slope * toSlope,
            n > 1 ? OptionalDouble.of(sd / Math.sqrt(sxx) * toSlope) : OptionalDouble.empty(),
            n > 1 ? OptionalDouble.of(sd * unitY) : OptionalDouble.empty(),
            syy > 0 ? OptionalDouble.of(Math.max(0, 1 - squares / syy)) : OptionalDouble.empty()));
  }

  private boolean isFinite() {
    return Double.isFinite(slopeStandardError.orElse(0)) && Double.isFinite(residualSd.orElse(0));
  }

  /** The largest size; not a number where one of them is none. */
  private static double size(double[] values) {
    double size = 0;
    for (double value : values) {
      size = Math.max(size, Math.abs(value));
    }
    return size;
  }

  /** Degrees of freedom of the slope, n − 1. */
  public int residualDf() {
    return n - 1;
  }
}
