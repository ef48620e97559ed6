package org.spikewright.fit;

import java.util.Optional;

/**
 * One line of an uncertainty budget.
 *
 * @param name short and stable within a budget
 * @param what in words, for people
 * @param effect how far the result moves when the input rises by its standard uncertainty, in the
 *     result's unit; the sign counts only among contributions of one group
 * @param df degrees of freedom of the input's standard uncertainty, above 0, or infinite
 * @param group contributions of one group come from one and the same error (fully correlated);
 *     empty for one that stands alone
 */
public record Contribution(
    String name, String what, double effect, double df, Optional<String> group) {

  /** Refuses what is out of range or no number: {@link IllegalArgumentException}. */
  public Contribution {
    if (!(Double.isFinite(effect) && df > 0)) {
      throw new IllegalArgumentException(name + ": effect " + effect + " with " + df + " df");
    }
  }

  /** A contribution on the result's scale that stands alone. */
  public static Contribution absolute(String name, String what, double effect, double df) {
    return new Contribution(name, what, effect, df, Optional.empty());
  }

  /**
   * A contribution of a factor of the result.
   *
   * @param relative relative standard uncertainty of the factor, 0.01 for 1 %
   * @param result what the factor multiplies, in the result's unit
   */
  public static Contribution relative(
      String name, String what, double relative, double result, double df) {
    return absolute(name, what, relative * result, df);
  }

  /** The same contribution as one of those that one error makes. */
  public Contribution in(String group) {
    return new Contribution(name, what, effect, df, Optional.of(group));
  }

  /** In the result's unit, 0 or more. */
  public double standardUncertainty() {
    return Math.abs(effect);
  }

  Contribution times(double factor) {
    return new Contribution(name, what, effect * factor, df, group);
  }
}
