package org.spikewright.fit;

import java.util.Optional;
import java.util.function.DoubleUnaryOperator;

/**
 * What a design would tell about the native concentration, before a flask of it is prepared.
 *
 * @param relativeStandardUncertainty delta-method standard error of the x-intercept over the native
 *     concentration, 0 or more
 * @param df degrees of freedom of the standard deviation that the interval will rest on, above 0
 * @param t two-sided 95 % quantile of Student's t with {@code df}
 * @param g Fieller's g = t²·s_b²/b²; 1 or more means that the slope would not be established
 */
public record Forecast(double relativeStandardUncertainty, double df, double t, double g) {

  /**
   * Forecasts a straight line with independent flasks. With c_i = (1/n − (C + x̄)(x_i − x̄)/S_xx),
   * the derivative of the x-intercept by the signal of flask i over the slope, the variance is Σ
   * c_i²·s_i²: for equal s the delta-method formula of Danzer and Currie, Pure Appl. Chem. 70
   * (1998) 993; for others the law of propagation of JCGM 100:2008, 5.1.2.
   *
   * @param x additions on the axis, one a flask
   * @param nativeConcentration above 0, on the same axis
   * @param sd standard deviation of a flask in axis units (signal over slope), by its concentration
   *     in axis units, native and added
   * @param borrowedDf degrees of freedom that a pool lends, 0 or more
   * @return empty with fewer than three flasks or fewer than two levels
   */
  public static Optional<Forecast> of(
      double[] x, double nativeConcentration, DoubleUnaryOperator sd, double borrowedDf) {
    double df = x.length - 2 + borrowedDf;
    double mean = StraightLine.mean(x);
    double sxx = spread(x, mean);
    if (x.length < 3 || !(sxx > 0)) {
      return Optional.empty();
    }
    double[] c = influence(x, nativeConcentration);
    double variance = 0;
    double ofSlope = 0;
    for (int i = 0; i < x.length; i++) {
      double s = sd.applyAsDouble(x[i] + nativeConcentration);
      double u = (x[i] - mean) / sxx;
      variance += c[i] * c[i] * s * s;
      ofSlope += u * u * s * s;
    }
    double t = StudentT.quantile(0.975, df);
    return Optional.of(
        new Forecast(Math.sqrt(variance) / nativeConcentration, df, t, t * t * ofSlope));
  }

  /** Relative expanded uncertainty of the fit, t times the relative standard uncertainty. */
  public double relativeUncertainty() {
    return t * relativeStandardUncertainty;
  }

  /**
   * How much the native concentration moves for a change of each flask's signal, both in axis
   * units. The numbers sum to 1 and, weighted with the concentrations, to 0: a common factor on all
   * signals moves nothing.
   *
   * @param x additions, at two levels or more
   */
  public static double[] influence(double[] x, double nativeConcentration) {
    double mean = StraightLine.mean(x);
    double sxx = spread(x, mean);
    double[] c = new double[x.length];
    for (int i = 0; i < c.length; i++) {
      c[i] = 1.0 / c.length - (nativeConcentration + mean) * (x[i] - mean) / sxx;
    }
    return c;
  }

  private static double spread(double[] x, double mean) {
    double sum = 0;
    for (double value : x) {
      sum += (value - mean) * (value - mean);
    }
    return sum;
  }
}
