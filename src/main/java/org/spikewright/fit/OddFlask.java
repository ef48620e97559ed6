package org.spikewright.fit;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;

/**
 * The flask, or the addition level of two flasks or more, that lies furthest from the line through
 * the others.
 *
 * <p>Source: Cook and Weisberg, Residuals and Influence in Regression (1982), ch. 2; the correction
 * is Bonferroni's. With a lent variance Smyth, Stat. Appl. Genet. Mol. Biol. 3 (2004) 3.
 *
 * @param kind whether one flask is meant or a level
 * @param flasks which flasks, from 0, in rising order; all of the level's
 * @param t distance from the line through the others over its standard deviation
 * @param df degrees of freedom
 * @param p two-sided, corrected for the number of flasks and levels that were looked at
 * @param tests that number
 * @param without the line through the others
 */
public record OddFlask(
    Kind kind, int[] flasks, double t, double df, double p, int tests, StraightLine without) {

  /** What lies off. */
  public enum Kind {
    /** One flask. */
    FLASK,
    /** All flasks of one addition. */
    LEVEL
  }

  /** Fewer levels do not tell which of them is off. */
  private static final int LEAST_LEVELS = 4;

  /** Two explanations whose squared t differ by less are alike: a likelihood ratio of e². */
  private static final double ALIKE = 4;

  private record Candidate(Kind kind, int[] flasks, double t, double df, StraightLine without) {
    double p() {
      return StudentT.twoSided(t, df);
    }
  }

  /**
   * From the series' own scatter.
   *
   * @param line with four flasks or more
   * @param addition the amount delivered to each flask: which level it is of
   * @param floor 0 or more: smallest standard deviation of a flask that the readings' resolution
   *     allows to be seen, in signal units
   * @return empty with fewer flasks, or where no deleted residual exists
   */
  public static Optional<OddFlask> of(StraightLine line, double[] addition, double floor) {
    return new Search(line, addition, floor, (variance, df) -> new Variance(variance, df)).oddest();
  }

  /**
   * With a lent prior: the variance without the flask, (d_0·s_0² + (ν − 1)·s²)/(d_0 + ν − 1), s²
   * brought down to what the prior finds credible, so that of two flasks that are off (swapped) the
   * one does not hide the other.
   *
   * @param line the line to test, a shared bend taken out
   * @param addition as above
   * @param floor as above
   * @param prior of the residual variances
   * @param scale the variance on the line's scale that is 1 on the pool's, signal units squared
   * @return empty as above
   */
  static Optional<OddFlask> of(
      StraightLine line, double[] addition, double floor, VariancePrior prior, double scale) {
    Moderation moderation =
        (variance, df) -> {
          Variance moderated = prior.moderated(prior.credible(variance / scale, df), df);
          return new Variance(moderated.value() * scale, moderated.df());
        };
    return new Search(line, addition, floor, moderation).oddest();
  }

  private interface Moderation {
    Variance of(double variance, double df);
  }

  /** One look at all flasks and levels. */
  private record Search(StraightLine line, double[] addition, double floor, Moderation moderation) {

    Optional<OddFlask> oddest() {
      if (line.n() < 4) {
        return Optional.empty();
      }
      List<Candidate> all = new ArrayList<>();
      for (int i = 0; i < line.n(); i++) {
        int[] flask = {i};
        DeletedResidual.of(line, i, floor, this::deleted)
            .map(r -> new Candidate(Kind.FLASK, flask, r.t(), r.df(), r.without()))
            .ifPresent(all::add);
      }
      List<int[]> levels = levels();
      if (levels.size() >= LEAST_LEVELS && levels.size() < line.n()) {
        levels.forEach(level -> level(level, levels).ifPresent(all::add));
      }
      return all.stream().min(ORDER).map(odd -> corrected(likelier(odd, all), all.size()));
    }

    private static OddFlask corrected(Candidate odd, int tests) {
      double p = Math.min(1, tests * odd.p());
      return new OddFlask(odd.kind, odd.flasks, odd.t, odd.df, p, tests, odd.without);
    }

    /**
     * A delivery goes wrong oftener than flasks to which nothing is delivered: these are named only
     * when they explain the data clearly better.
     */
    private Candidate likelier(Candidate odd, List<Candidate> all) {
      if (odd.kind == Kind.FLASK || addition[odd.flasks[0]] != 0) {
        return odd;
      }
      return all.stream()
          .filter(other -> other.kind == Kind.LEVEL && addition[other.flasks[0]] != 0)
          .min(ORDER)
          .filter(other -> other.t * other.t > odd.t * odd.t - ALIKE)
          .orElse(odd);
    }

    private Variance deleted(StraightLine without) {
      int df = without.residualDf();
      return moderation.of(without.residualSumOfSquares() / df, df);
    }

    /** The flasks of each level, in the order in which the levels first come. */
    private List<int[]> levels() {
      List<int[]> levels = new ArrayList<>();
      boolean[] seen = new boolean[line.n()];
      for (int i = 0; i < line.n(); i++) {
        double level = addition[i];
        if (!seen[i] && Double.isFinite(level)) {
          int[] flasks =
              IntStream.range(0, line.n())
                  .filter(k -> LevelSearch.isAt(addition[k], level))
                  .toArray();
          Arrays.stream(flasks).forEach(k -> seen[k] = true);
          levels.add(flasks);
        }
      }
      return levels;
    }

    private Optional<Candidate> level(int[] flasks, List<int[]> levels) {
      if (flasks.length < 2) {
        return Optional.empty();
      }
      int[] others =
          IntStream.range(0, line.n()).filter(i -> Arrays.binarySearch(flasks, i) < 0).toArray();
      if (!(StraightLine.asWeighted(
              part(line.x(), others), part(line.y(), others), part(line.weights(), others))
          instanceof StraightLine without)) {
        return Optional.empty();
      }
      Variance variance = within(levels);
      double sd = Math.max(Math.max(floor, variance.sd()), line.rounding());
      double[] weights = part(line.weights(), flasks);
      double x = StraightLine.mean(part(line.x(), flasks), weights);
      double y = StraightLine.mean(part(line.y(), flasks), weights);
      double u = x - without.xMean();
      double own = Arrays.stream(weights).sum();
      double spread = Math.sqrt(1 / own + 1 / without.weight() + u / without.sxx() * u);
      double t = (y - without.at(x)) / (sd * spread);
      return Double.isFinite(t)
          ? Optional.of(new Candidate(Kind.LEVEL, flasks, t, variance.df(), without))
          : Optional.empty();
    }

    /** The scatter within levels, moderated. */
    private Variance within(List<int[]> levels) {
      double squares = 0;
      int df = 0;
      for (int[] flasks : levels) {
        double[] weights = part(line.weights(), flasks);
        double[] e = Arrays.stream(flasks).mapToDouble(line::residual).toArray();
        double mean = StraightLine.mean(e, weights);
        for (int k = 0; k < e.length; k++) {
          squares += weights[k] * (e[k] - mean) * (e[k] - mean);
        }
        df += flasks.length - 1;
      }
      return moderation.of(squares / df, df);
    }
  }

  private static final Comparator<Candidate> ORDER =
      Comparator.comparingDouble(Candidate::p)
          .thenComparing(Comparator.comparingDouble(odd -> -Math.abs(odd.t)));

  private static double[] part(double[] values, int[] kept) {
    return Arrays.stream(kept).mapToDouble(i -> values[i]).toArray();
  }
}
