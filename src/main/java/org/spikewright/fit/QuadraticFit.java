package org.spikewright.fit;

import java.util.Optional;
import java.util.OptionalDouble;

/**
 * The least-squares parabola {@code y = c0 + c1·x + c2·x²} through the points of a line, from
 * polynomials that are orthogonal over these points. Every number of it is finite.
 *
 * <p>Source: Forsythe, J. Soc. Ind. Appl. Math. 5 (1957) 74.
 *
 * @param c0 signal at x = 0
 * @param c1 signal per axis unit
 * @param c2 signal per axis unit squared; below 0 for saturation
 * @param c0StandardError empty without residual degrees of freedom; a residual scatter below the
 *     last digits of the numbers counts as those digits, so that points exactly on a curve show no
 *     bend that is only arithmetic
 * @param c1StandardError likewise
 * @param c2StandardError likewise
 * @param c2PerSd standard error of c2 for each unit of a flask's standard deviation, per axis unit
 *     squared
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
    double c2PerSd,
    double residualSumOfSquares,
    int residualDf) {

  /** Two distinct x leave the quadratic polynomial at rounding noise; the scaled x are near 1. */
  private static final double SPREAD = 1e-20;

  /**
   * Fits the parabola. Polynomials made orthogonal twice over keep the digits: the certified
   * coefficients of NIST StRD Pontius are met to 12.
   *
   * @return empty with fewer than three distinct x, or when a coefficient does not fit into a
   *     number
   */
  public static Optional<QuadraticFit> of(StraightLine line) {
    Basis basis = Basis.of(line);
    if (!(basis.szz > SPREAD * line.n())) {
      return Optional.empty();
    }
    double[] e = new double[line.n()];
    for (int i = 0; i < e.length; i++) {
      e[i] = line.residual(i);
    }
    double[] w = line.weights();
    double bend = dot(w, basis.z, e) / basis.szz;
    for (int i = 0; i < e.length; i++) {
      e[i] -= bend * basis.z[i];
    }
    return Optional.of(basis.natural(line, bend, dot(w, e, e))).filter(QuadraticFit::isFinite);
  }

  /**
   * The constant, {@code u = (x − x̄)/unit} and {@code z = u² − skew·u − square}, orthogonal over
   * the points; the unit is the power of two next to the largest distance from the mean.
   */
  private record Basis(
      double[] u, double[] z, double unit, double suu, double szz, double skew, double square) {

    static Basis of(StraightLine line) {
      int n = line.n();
      double[] u = new double[n];
      double reach = 0;
      for (int i = 0; i < n; i++) {
        u[i] = line.x()[i] - line.xMean();
        reach = Math.max(reach, Math.abs(u[i]));
      }
      double unit = Math.scalb(1.0, Math.getExponent(reach));
      double[] z = new double[n];
      for (int i = 0; i < n; i++) {
        u[i] /= unit;
        z[i] = u[i] * u[i];
      }
      double[] w = line.weights();
      double suu = dot(w, u, u);
      double skew = 0;
      double square = 0;
      for (int round = 0; round < 2; round++) {
        double alongU = dot(w, z, u) / suu;
        double mean = StraightLine.mean(z, w);
        for (int i = 0; i < n; i++) {
          z[i] -= mean + alongU * u[i];
        }
        skew += alongU;
        square += mean;
      }
      return new Basis(u, z, unit, suu, dot(w, z, z), skew, square);
    }

    QuadraticFit natural(StraightLine line, double bend, double sse) {
      double u0 = -line.xMean() / unit;
      double z0 = u0 * u0 - skew * u0 - square;
      double steep0 = 2 * u0 - skew;
      int df = line.n() - 3;
      double sd = df > 0 ? Math.max(Math.sqrt(sse / df), line.rounding()) : Double.NaN;
      return new QuadraticFit(
          line.signalIntercept() + bend * z0,
          line.slope() + bend * steep0 / unit,
          bend / unit / unit,
          known(sd * Math.sqrt(1.0 / line.weight() + u0 * u0 / suu + z0 * z0 / szz)),
          known(sd * Math.sqrt(1 / suu + steep0 * steep0 / szz) / unit),
          known(sd / Math.sqrt(szz) / unit / unit),
          1 / Math.sqrt(szz) / unit / unit,
          sse,
          df);
    }

    /** The parabola with a given c2 that fits best, as signal at 0 and slope at 0. */
    double[] bent(StraightLine line, double c2) {
      double u0 = -line.xMean() / unit;
      double z0 = u0 * u0 - skew * u0 - square;
      double bend = c2 * unit * unit;
      return new double[] {
        line.signalIntercept() + bend * z0, line.slope() + bend * (2 * u0 - skew) / unit
      };
    }
  }

  private static double dot(double[] w, double[] a, double[] b) {
    double sum = 0;
    for (int i = 0; i < a.length; i++) {
      sum += w[i] * a[i] * b[i];
    }
    return sum;
  }

  private static OptionalDouble known(double standardError) {
    return Double.isNaN(standardError) ? OptionalDouble.empty() : OptionalDouble.of(standardError);
  }

  private boolean isFinite() {
    return Double.isFinite(c0)
        && Double.isFinite(c1)
        && Double.isFinite(c2)
        && Double.isFinite(c2PerSd)
        && Double.isFinite(c0StandardError.orElse(0))
        && Double.isFinite(c1StandardError.orElse(0))
        && Double.isFinite(c2StandardError.orElse(0));
  }

  /**
   * The native concentration from the bent line, by the form of the root that goes over into the
   * straight line's as the bend vanishes; empty when the parabola does not reach zero signal.
   */
  public OptionalDouble nativeConcentration() {
    return root(c0, c1, c2);
  }

  /**
   * The native concentration from the parabola that has a given bend and else fits best; empty when
   * it does not reach zero signal, or with fewer than three distinct x.
   *
   * @param c2 signal per axis unit squared
   */
  static OptionalDouble nativeConcentration(StraightLine line, double c2) {
    Basis basis = Basis.of(line);
    if (!(basis.szz > SPREAD * line.n())) {
      return OptionalDouble.empty();
    }
    double[] ends = basis.bent(line, c2);
    return root(ends[0], ends[1], c2);
  }

  private static OptionalDouble root(double c0, double c1, double c2) {
    double discriminant = c1 * c1 - 4 * c0 * c2;
    if (!(discriminant >= 0) || !(c1 > 0)) {
      return OptionalDouble.empty();
    }
    double root = 2 * c0 / (c1 + Math.sqrt(discriminant));
    return Double.isFinite(discriminant) && Double.isFinite(root)
        ? OptionalDouble.of(root)
        : OptionalDouble.empty();
  }
}
