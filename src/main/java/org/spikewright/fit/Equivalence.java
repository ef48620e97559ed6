package org.spikewright.fit;

import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.quantity.Estimate;

/**
 * The ratio of two sensitivities, such as that of a series over that of an external calibration,
 * and whether it is shown to be near 1: two one-sided tests, so that a poor line shows nothing.
 *
 * <p>Source: Schuirmann, J. Pharmacokinet. Biopharm. 15 (1987) 657 (two one-sided tests);
 * Sasabuchi, Biometrika 67 (1980) 429 (of a ratio); Fieller, J. R. Stat. Soc. B 16 (1954) 175
 * (interval); degrees of freedom by Welch and Satterthwaite.
 *
 * @param ratio first over second slope, finite
 * @param standardError delta method
 * @param lower95 lower end of Fieller's interval; empty when unbounded (the second slope is not
 *     established)
 * @param upper95 upper end likewise
 * @param margin that the ratio may be away from 1, between 0 and 1
 * @param p of the hypothesis that it is further away; equivalent at 5 % when 0.05 or less
 */
public record Equivalence(
    double ratio,
    double standardError,
    OptionalDouble lower95,
    OptionalDouble upper95,
    double margin,
    double p) {

  /** A common choice: sensitivities within 10 % need no standard addition. */
  public static final double COMMON_MARGIN = 0.10;

  /**
   * The comparison of two independent slopes.
   *
   * @param first slope with its standard error
   * @param second slope with its standard error, above 0
   * @param margin 0.10 for within 10 %; above 0, below 1
   * @return empty when the second slope is not above 0, when neither has a standard error, or when
   *     no number holds the ratio
   * @throws IllegalArgumentException when the margin is out of range
   */
  public static Optional<Equivalence> of(Estimate first, Estimate second, double margin) {
    if (!(margin > 0 && margin < 1)) {
      throw new IllegalArgumentException("margin " + margin);
    }
    // In units of the second slope: nothing overflows that is not absurd anyway.
    double ratio = first.value() / second.value();
    double u1 = first.standardUncertainty() / second.value();
    double u2 = second.standardUncertainty() / second.value();
    Contrast contrast =
        new Contrast(ratio, u1, first.degreesOfFreedom(), u2, second.degreesOfFreedom());
    double se = Math.hypot(u1, ratio * u2);
    if (!(second.value() > 0 && se > 0 && Math.abs(ratio) < 1e100 && se < 1e100 && u2 < 1e100)) {
      return Optional.empty();
    }
    double p = Math.max(contrast.above(1 - margin), contrast.below(1 + margin));
    double t = StudentT.quantile(0.975, contrast.df(ratio));
    double g = t * u2 * (t * u2);
    double half = t / (1 - g) * Math.sqrt((1 - g) * u1 * u1 + ratio * u2 * (ratio * u2));
    boolean bounded = g < 1 && Double.isFinite(half);
    double centre = ratio / (1 - g);
    return Optional.of(
        new Equivalence(
            ratio,
            se,
            bounded ? OptionalDouble.of(centre - half) : OptionalDouble.empty(),
            bounded ? OptionalDouble.of(centre + half) : OptionalDouble.empty(),
            margin,
            p));
  }

  /** First slope less so many times the second one, in units of the second. */
  private record Contrast(double ratio, double u1, double df1, double u2, double df2) {
    /** p of a ratio of {@code limit} or less. */
    double above(double limit) {
      return StudentT.cumulative(-t(limit), df(limit));
    }

    /** p of a ratio of {@code limit} or more. */
    double below(double limit) {
      return StudentT.cumulative(t(limit), df(limit));
    }

    private double t(double limit) {
      return (ratio - limit) / Math.hypot(u1, limit * u2);
    }

    double df(double times) {
      double all = Math.hypot(u1, times * u2);
      double one = u1 / all;
      double two = times * u2 / all;
      return 1 / (one * one * one * one / df1 + two * two * two * two / df2);
    }
  }
}
