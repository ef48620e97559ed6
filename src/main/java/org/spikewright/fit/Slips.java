package org.spikewright.fit;

import java.util.List;
import java.util.Optional;

/**
 * Whether a simple slip of preparation explains why a series does not lie on its line. A question
 * for the bench; the data stay as they are.
 *
 * <p>A slip is suspected when the residuals point its way (one-sided t of the residuals along the
 * change that the slip would make, with the variance of what is left, moderated) and when the
 * series as it would then have been prepared fits. The p counts only the first: it is the
 * probability that the residuals of a flawless series point so far towards any one of all slips
 * tried (the lesser of Bonferroni's and Scheffé's bound). As the repair must fit too, flawless
 * series have so small a p less often than that; with additions well above the noise hardly ever.
 *
 * <p>Source: the direction test is that of Cook and Weisberg, Residuals and Influence in Regression
 * (1982), 2.2, for a shift of the mean; Scheffé, Biometrika 40 (1953) 87; moderated variance:
 * Smyth, Stat. Appl. Genet. Mol. Biol. 3 (2004) 3.
 *
 * @param tried number of slips that could be told from a flawless series
 * @param p corrected for all slips tried and for having chosen among them; 1 when none repairs
 * @param best the slip that repairs best; empty when none repairs
 * @param alsoPossible further slips that repair, the best first; the bench must choose
 */
public record Slips(int tried, double p, Optional<Slip> best, List<Slip> alsoPossible) {

  /** What may have happened. */
  public enum Kind {
    /** The signals of two flasks belong to each other's additions. */
    SWAPPED,
    /** An addition was not made. */
    MISSED,
    /** An addition was made twice. */
    DOUBLED,
    /** Every signal belongs to the next lower level, the lowest level's to the highest. */
    SHIFTED_UP,
    /** Every signal belongs to the next higher level, the highest level's to the lowest. */
    SHIFTED_DOWN,
    /** The volume grew with each addition and the signals were not corrected for it. */
    GROWING_VOLUME,
    /** The stock was ten times as strong as stated. */
    STOCK_TENFOLD,
    /** The stock was a tenth as strong as stated. */
    STOCK_TENTH
  }

  /**
   * One slip that would explain the series.
   *
   * @param points of the line that it touches, from 0; with one vessel, the first that has the
   *     addition; empty where it touches all
   * @param nativeConcentration as it would be then, in axis units
   * @param residualSumOfSquares of the series as it would be then, signal units squared
   */
  public record Slip(
      Kind kind, List<Integer> points, double nativeConcentration, double residualSumOfSquares) {}

  /** How the flasks came about. */
  public enum Layout {
    /** Each flask has its own addition. */
    FLASKS,
    /** Each step has the additions of all steps before it. */
    ONE_VESSEL
  }

  /**
   * A series to be questioned.
   *
   * @param line with at least two points
   * @param applied one vessel: the volume factors by which the signals were multiplied, in the
   *     line's order, above 0; empty for none
   * @param growth where the volume may have grown unnoticed: the factors by which the signals would
   *     have to be multiplied then; empty to leave that out
   */
  public record Suspect(
      StraightLine line, Layout layout, List<Double> applied, List<Double> growth) {
    /** Refuses factors that are not of the line: {@link IllegalArgumentException}. */
    public Suspect {
      for (List<Double> factors : List.of(applied, growth)) {
        boolean counted = factors.isEmpty() || factors.size() == line.n();
        if (!counted || !factors.stream().allMatch(f -> f >= 1e-3 && f <= 1e3)) {
          throw new IllegalArgumentException(line.n() + " points, but factors " + factors);
        }
      }
    }
  }

  /**
   * What others know about such a series.
   *
   * @param priorDf degrees of freedom of the lent variance, 0 for none, or infinite
   * @param priorVariance of one flask, signal units squared, above 0 where lent
   * @param floor smallest standard deviation of a flask that the readings' resolution allows to be
   *     seen, in signal units, 0 or more
   * @param sensitivity against the pool's; empty to leave the stock out
   */
  public record Lent(
      double priorDf, double priorVariance, double floor, Optional<Sensitivity> sensitivity) {
    /** Refuses what is out of range or no number: {@link IllegalArgumentException}. */
    public Lent {
      if (!(priorDf >= 0 && floor >= 0 && (priorDf == 0 || priorVariance > 0))) {
        throw new IllegalArgumentException(priorDf + ", " + priorVariance + ", " + floor);
      }
    }

    /** The series alone. */
    public static Lent nothing() {
      return new Lent(0, 0, 0, Optional.empty());
    }

    /** A variance, and no more. */
    public static Lent variance(double priorDf, double priorVariance) {
      return new Lent(priorDf, priorVariance, 0, Optional.empty());
    }

    /** The mean of a variance of {@code squares/df} and the lent one. */
    double moderated(double squares, double df) {
      return priorDf > 1e10 ? priorVariance : (priorDf * priorVariance + squares) / (priorDf + df);
    }
  }

  /**
   * The series' sensitivity against its pool.
   *
   * @param logRatio natural logarithm of it over the pool's centre
   * @param spread standard deviation of a series' logarithm about the centre, above 0
   * @param df of the spread, above 0
   */
  public record Sensitivity(double logRatio, double spread, double df) {
    /** Refuses what is out of range or no number: {@link IllegalArgumentException}. */
    public Sensitivity {
      if (!(Double.isFinite(logRatio) && spread > 0 && spread < 1 / 0.0 && df > 0)) {
        throw new IllegalArgumentException(logRatio + ", " + spread + ", " + df);
      }
    }
  }

  /**
   * Tries every slip.
   *
   * @return empty when no slip can be told from a flawless series: two flasks, or three without a
   *     lent variance, and no sensitivity to compare
   */
  public static Optional<Slips> of(Suspect suspect, Lent lent) {
    return new SlipSearch(suspect, lent).found();
  }
}
