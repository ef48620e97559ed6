package org.spikewright.fit;

import java.util.Optional;
import java.util.OptionalDouble;

/**
 * The least-squares parabola {@code y = c0 + c1·x + c2·x²} through the points of a line, from
 * polynomials that are orthogonal over these points.
 *
 * @param c0 signal at x = 0
 * @param c1 signal per axis unit
 * @param c2 signal per axis unit squared; below 0 for saturation
 * @param c0StandardError empty without residual degrees of freedom
 * @param c1StandardError likewise
 * @param c2StandardError likewise
 * @param residualSumOfSquares signal squared
 * @param residualDf n − 3
 */
public record QuadraticFit(
    double c0,
    double c1,
    double c2,
    OptionalDouble c0StandardError,
    OptionalDouble c1StandardError,
    OptionalDouble c2StandardError,
    double residualSumOfSquares,
    int residualDf) {

  /**
   * Fits the parabola.
   *
   * @return empty with fewer than three distinct x
   */
  public static Optional<QuadraticFit> of(StraightLine line) {
    int n = line.n();
    double[] x = line.x();
    double cubes = 0;
    double scale = 0;
    for (double value : x) {
      double u = value - line.xMean();
      cubes += u * u * u;
      scale = Math.max(scale, u * u);
    }
    double skew = cubes / line.sxx();
    double square = line.sxx() / n;
    double szz = 0;
    double szy = 0;
    for (int i = 0; i < n; i++) {
      double z = z(x[i] - line.xMean(), skew, square);
      szz += z * z;
      szy += z * line.residual(i);
    }
    // Two distinct x leave z at rounding noise.
    if (!(szz > 1e-20 * scale * scale * n)) {
      return Optional.empty();
    }
    double c2 = szy / szz;
    double sse = 0;
    for (int i = 0; i < n; i++) {
      double e = line.residual(i) - c2 * z(x[i] - line.xMean(), skew, square);
      sse += e * e;
    }
    return Optional.of(natural(line, c2, sse, new Basis(skew, square, szz)));
  }

  private record Basis(double skew, double square, double szz) {}

  private static QuadraticFit natural(StraightLine line, double c2, double sse, Basis basis) {
    double xMean = line.xMean();
    double toC1 = -(2 * xMean + basis.skew);
    double toC0 = xMean * xMean + basis.skew * xMean - basis.square;
    int df = line.n() - 3;
    double variance = df > 0 ? sse / df : Double.NaN;
    double ofSlope = 1 / line.sxx();
    double ofBend = 1 / basis.szz;
    return new QuadraticFit(
        line.yMean() - line.slope() * xMean + c2 * toC0,
        line.slope() + c2 * toC1,
        c2,
        root(variance * (1.0 / line.n() + xMean * xMean * ofSlope + toC0 * toC0 * ofBend)),
        root(variance * (ofSlope + toC1 * toC1 * ofBend)),
        root(variance * ofBend),
        sse,
        df);
  }

  private static double z(double u, double skew, double square) {
    return u * u - skew * u - square;
  }

  private static OptionalDouble root(double variance) {
    return variance >= 0 ? OptionalDouble.of(Math.sqrt(variance)) : OptionalDouble.empty();
  }

  /**
   * The native concentration from the bent line, by the form of the root that goes over into the
   * straight line's as the bend vanishes; empty when the parabola does not reach zero signal.
   */
  public OptionalDouble nativeConcentration() {
    double discriminant = c1 * c1 - 4 * c0 * c2;
    if (!(discriminant >= 0) || !(c1 > 0)) {
      return OptionalDouble.empty();
    }
    return OptionalDouble.of(2 * c0 / (c1 + Math.sqrt(discriminant)));
  }
}
