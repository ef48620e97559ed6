package org.spikewright.fit;

import java.util.OptionalDouble;
import org.apache.commons.math3.distribution.TDistribution;

/**
 * The native concentration: where the line, carried back, meets zero signal, as a positive number
 * on the axis.
 *
 * @param value signal intercept over slope, in axis units
 * @param standardError delta-method standard error, in axis units; empty without degrees of freedom
 * @param g Fieller's g = t²·s_b²/b²; 1 or more means that the slope is not established; empty
 *     without degrees of freedom
 * @param t the two-sided 95 % quantile of Student's t that was used; empty without degrees of
 *     freedom
 * @param lower95 lower end of Fieller's interval; empty when unbounded or without degrees of
 *     freedom
 * @param upper95 upper end likewise
 */
public record NativeEstimate(
    double value,
    OptionalDouble standardError,
    OptionalDouble g,
    OptionalDouble t,
    OptionalDouble lower95,
    OptionalDouble upper95) {

  /** The estimate with the line's own residual standard deviation. */
  public static NativeEstimate of(StraightLine line) {
    OptionalDouble sd = line.residualSd();
    return sd.isPresent()
        ? of(line, sd.getAsDouble(), line.residualDf())
        : new NativeEstimate(
            line.signalIntercept() / line.slope(),
            OptionalDouble.empty(),
            OptionalDouble.empty(),
            OptionalDouble.empty(),
            OptionalDouble.empty(),
            OptionalDouble.empty());
  }

  /**
   * The estimate with a given standard deviation.
   *
   * <p>Standard error by the delta method, (s/b)·√(1/n + ȳ²/(b²·S_xx)): Danzer and Currie, Pure
   * Appl. Chem. 70 (1998) 993. Interval: Fieller, J. R. Stat. Soc. B 16 (1954) 175.
   *
   * @param line with a slope other than 0
   * @param sd standard deviation of one flask, in signal units, 0 or more
   * @param df its degrees of freedom, above 0
   */
  public static NativeEstimate of(StraightLine line, double sd, double df) {
    double b = line.slope();
    double centre = line.yMean() / b;
    double se = sd / Math.abs(b) * Math.sqrt(1.0 / line.n() + centre * centre / line.sxx());
    double t = new TDistribution(null, df).inverseCumulativeProbability(0.975);
    double ratio = t * sd / b;
    double g = ratio * ratio / line.sxx();
    OptionalDouble lower = OptionalDouble.empty();
    OptionalDouble upper = OptionalDouble.empty();
    if (g < 1) {
      double half = Math.abs(ratio) * Math.sqrt((1 - g) / line.n() + centre * centre / line.sxx());
      lower = OptionalDouble.of((centre - half) / (1 - g) - line.xMean());
      upper = OptionalDouble.of((centre + half) / (1 - g) - line.xMean());
    }
    return new NativeEstimate(
        line.signalIntercept() / b,
        OptionalDouble.of(se),
        OptionalDouble.of(g),
        OptionalDouble.of(t),
        lower,
        upper);
  }

  /** Whether the slope is established, so that the interval is bounded. */
  public boolean isBounded() {
    return lower95.isPresent();
  }
}
