package org.spikewright.fit;

import java.util.Optional;
import java.util.OptionalDouble;

/**
 * The native concentration: where the line, carried back, meets zero signal, as a positive number
 * on the axis. Every number of an estimate is finite.
 *
 * @param value signal intercept over slope, in axis units
 * @param standardError delta-method standard error, in axis units; empty without degrees of freedom
 * @param g Fieller's g = t²·s_b²/b², 0 or more; 1 or more means that the slope is not established;
 *     empty without degrees of freedom
 * @param t the two-sided 95 % quantile of Student's t that was used; empty without degrees of
 *     freedom
 * @param lower95 lower end of Fieller's interval, in axis units, at or below the value; empty when
 *     unbounded or without degrees of freedom
 * @param upper95 upper end likewise
 */
public record NativeEstimate(
    double value,
    OptionalDouble standardError,
    OptionalDouble g,
    OptionalDouble t,
    OptionalDouble lower95,
    OptionalDouble upper95) {

  /** Beyond this a native concentration says that the slope is nothing but rounding. */
  private static final double LARGEST = 1e100;

  /**
   * The estimate with the line's own residual standard deviation; without standard error and
   * interval when the line has two points.
   *
   * @return empty when the slope is 0 or so near to it that no number holds the quotient
   */
  public static Optional<NativeEstimate> of(StraightLine line) {
    OptionalDouble sd = line.residualSd();
    if (sd.isPresent()) {
      return of(line, sd.getAsDouble(), line.residualDf());
    }
    OptionalDouble none = OptionalDouble.empty();
    return Optional.of(new NativeEstimate(quotient(line), none, none, none, none, none))
        .filter(NativeEstimate::isFinite);
  }

  /**
   * The estimate with a given standard deviation.
   *
   * <p>Standard error by the delta method, (s/b)·√(1/n + ȳ²/(b²·S_xx)): Danzer and Currie, Pure
   * Appl. Chem. 70 (1998) 993. Interval: Fieller, J. R. Stat. Soc. B 16 (1954) 175, for the
   * quotient ȳ/b, whose parts are uncorrelated, less x̄. On a weighted line the sum of the weights
   * stands for n, and means and S_xx are weighted.
   *
   * @param line any line
   * @param sd standard deviation of one flask (of weight 1), in signal units, 0 or more
   * @param df its degrees of freedom, above 0, infinite when it is known
   * @return empty when the slope is 0 or so near to it that no number holds the quotient
   * @throws IllegalArgumentException when sd or df is out of range
   */
  public static Optional<NativeEstimate> of(StraightLine line, double sd, double df) {
    if (!(sd >= 0 && df > 0)) {
      throw new IllegalArgumentException("standard deviation " + sd + " with " + df + " df");
    }
    double b = line.slope();
    double centre = line.yMean() / b;
    double value = quotient(line);
    double se = sd / Math.abs(b) * Math.sqrt(1.0 / line.weight() + centre * centre / line.sxx());
    double t = StudentT.quantile(0.975, df);
    double ratio = t * sd / b;
    double g = ratio * ratio / line.sxx();
    OptionalDouble lower = OptionalDouble.empty();
    OptionalDouble upper = OptionalDouble.empty();
    if (g < 1) {
      double half =
          Math.abs(ratio) * Math.sqrt((1 - g) / line.weight() + centre * centre / line.sxx());
      // The ends hold the value also where rounding is all that parts them.
      lower = OptionalDouble.of(Math.min(value, (centre - half) / (1 - g) - line.xMean()));
      upper = OptionalDouble.of(Math.max(value, (centre + half) / (1 - g) - line.xMean()));
    }
    return Optional.of(
            new NativeEstimate(
                value,
                OptionalDouble.of(se),
                OptionalDouble.of(g),
                OptionalDouble.of(t),
                lower,
                upper))
        .filter(NativeEstimate::isFinite);
  }

  private static double quotient(StraightLine line) {
    return line.signalIntercept() / line.slope();
  }

  /** Whether the slope is established, so that the interval is bounded. */
  public boolean isBounded() {
    return lower95.isPresent();
  }

  private boolean isFinite() {
    return Math.abs(value) <= LARGEST
        && standardError.orElse(0) <= LARGEST
        && g.orElse(0) <= Double.MAX_VALUE
        && Math.abs(lower95.orElse(0)) <= Double.MAX_VALUE
        && Math.abs(upper95.orElse(0)) <= Double.MAX_VALUE;
  }
}
