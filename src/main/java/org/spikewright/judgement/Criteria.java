package org.spikewright.judgement;

import org.spikewright.judgement.Flag.LimitSource;

/**
 * The limits of a laboratory's method.
 *
 * @param falseAlarms probability of any statistical flag on a perfect series (Holm over the family)
 * @param bendToReview relative change of the result by the bend, above which a person decides
 * @param bendToRepeat likewise, above which the series is not reportable
 * @param leastCorrelation r below it is noted
 * @param leastTopAddition top addition over native concentration below it is too small
 * @param largeTopAddition top addition over native above it is noted
 * @param largestTopAddition top addition over native above it goes to review
 * @param targetUncertainty relative expanded uncertainty to meet where the method sets none
 */
public record Criteria(
    Limit falseAlarms,
    Limit bendToReview,
    Limit bendToRepeat,
    Limit leastCorrelation,
    Limit leastTopAddition,
    Limit largeTopAddition,
    Limit largestTopAddition,
    Limit targetUncertainty) {

  /** The limits that hold where the laboratory sets none. */
  public static Criteria defaults() {
    return new Criteria(
        laboratory(0.02, "at most one false statistical flag in fifty straight series"),
        laboratory(0.05, "a bend that moves the result by more than 5 % needs a person"),
        laboratory(0.10, "a bend that moves the result by more than 10 % spoils it"),
        new Limit(
            0.995,
            true,
            LimitSource.PUBLISHED,
            "EPA SW-846 method 7000B (2007) section 9.10.3; guidance; blind to bending"),
        practice(0.5, "additions below half of what is there make the extrapolation long"),
        practice(5, "additions far above what is there leave the intercept poorly known"),
        practice(10, "the unspiked flask hardly counts beside such additions"),
        laboratory(0.25, "relative expanded uncertainty where the method sets no target"));
  }

  private static Limit laboratory(double value, String reason) {
    return new Limit(value, true, LimitSource.LABORATORY, reason);
  }

  private static Limit practice(double value, String reason) {
    return new Limit(value, true, LimitSource.COMMON_PRACTICE, reason);
  }
}
