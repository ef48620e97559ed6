package org.spikewright.fit;

import java.util.Optional;
import java.util.OptionalDouble;

/**
 * The limits of a chart of single control results, and what they say of the latest one.
 *
 * <p>The spread is taken from the mean moving range of neighbours, not from the standard deviation
 * of all points: a shift or a trend in the history widens the standard deviation and so hides
 * itself, while it touches few of the ranges.
 *
 * <p>Source: ISO 7870-2:2013 (Shewhart charts; individual values and moving ranges, d_2 = 1.128).
 *
 * @param centre the target, or the mean of the history; in the control's unit
 * @param sd standard deviation, above 0
 * @param points of the history
 * @param provisional fewer than 20 points
 */
public record ControlLimits(double centre, double sd, int points, boolean provisional) {
  /** Points that make limits more than provisional. */
  public static final int ENOUGH = 20;

  /** Mean range of two normal values, 2/√π, in standard deviations: the d_2 of the tables. */
  private static final double D2 = 2 / Math.sqrt(Math.PI);

  /** What the chart says of the latest result, from good to bad. */
  public enum Standing {
    /** Within the warning limits. */
    WITHIN,
    /** Beyond a warning limit, alone. */
    WARNING,
    /** Two of three results in a row, this one among them, are beyond the same warning limit. */
    TWO_OF_THREE,
    /** Beyond an action limit. */
    ACTION
  }

  /**
   * Limits about the mean of the history.
   *
   * @param history past results in their order, finite
   * @return empty with fewer than two results or when neighbours never differ
   */
  public static Optional<ControlLimits> of(double[] history) {
    return history.length < 2 ? Optional.empty() : of(history, StraightLine.mean(history));
  }

  /**
   * Limits about a given target, such as a certified value.
   *
   * @param history past results in their order, finite
   * @return empty with fewer than two results or when neighbours never differ
   */
  public static Optional<ControlLimits> of(double[] history, double target) {
    int n = history.length;
    double ranges = 0;
    for (int i = 1; i < n; i++) {
      ranges += Math.abs(history[i] - history[i - 1]) / (n - 1);
    }
    double sd = ranges / D2;
    return n >= 2 && sd > 0 && Double.isFinite(sd) && Double.isFinite(target)
        ? Optional.of(new ControlLimits(target, sd, n, n < ENOUGH))
        : Optional.empty();
  }

  /** Lower warning limit, two standard deviations off. */
  public double lowerWarning() {
    return centre - 2 * sd;
  }

  /** Upper warning limit. */
  public double upperWarning() {
    return centre + 2 * sd;
  }

  /** Lower action limit, three standard deviations off. */
  public double lowerAction() {
    return centre - 3 * sd;
  }

  /** Upper action limit. */
  public double upperAction() {
    return centre + 3 * sd;
  }

  /**
   * What the chart says of the last of these results.
   *
   * @param latest in their order, at least one; only the last three count
   */
  public Standing standing(double... latest) {
    int last = latest.length - 1;
    double z = (latest[last] - centre) / sd;
    if (!(Math.abs(z) <= 3)) {
      return Standing.ACTION;
    }
    if (Math.abs(z) <= 2) {
      return Standing.WITHIN;
    }
    for (int i = Math.max(0, last - 2); i < last; i++) {
      if ((latest[i] - centre) / sd * Math.signum(z) > 2) {
        return Standing.TWO_OF_THREE;
      }
    }
    return Standing.WARNING;
  }

  /**
   * The z score, distance from an assigned value in standard deviations (ISO 13528, 9.4): beyond 2
   * a warning, beyond 3 action.
   *
   * @return empty without a standard deviation
   */
  public static OptionalDouble z(double result, double assigned, double sd) {
    return finite((result - assigned) / sd, sd > 0);
  }

  /**
   * The E_n score, distance from a reference value over both expanded uncertainties (ISO 13528,
   * 9.7): satisfactory up to 1.
   *
   * @param expanded of the result, 95 %
   * @param referenceExpanded of the reference value, 95 %
   * @return empty when neither has an uncertainty
   */
  public static OptionalDouble en(
      double result, double expanded, double reference, double referenceExpanded) {
    double both = Math.hypot(expanded, referenceExpanded);
    return finite((result - reference) / both, both > 0);
  }

  private static OptionalDouble finite(double score, boolean defined) {
    return defined && Double.isFinite(score) ? OptionalDouble.of(score) : OptionalDouble.empty();
  }
}
