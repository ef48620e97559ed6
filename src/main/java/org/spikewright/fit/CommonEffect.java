package org.spikewright.fit;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import org.apache.commons.math3.special.Gamma;

/**
 * One coefficient common to all series of a night, for a column of their own beside slope and
 * intercept: a bend, a level's wrong volume, a drift. Each series gives its coefficient with a
 * moderated variance, that is a moderated t with d_0 + ν degrees of freedom; the weighted mean of
 * such is tested with the Student's t that has its variance and its fourth moment. Series that lie
 * further than three standard errors from the others count as if they lay there.
 *
 * @param coefficient in the column's unit
 * @param standardError likewise
 * @param df degrees of freedom of the test
 * @param meanT mean of the series' own moderated t
 * @param series how many series tell of it
 * @param between standard deviation of the coefficient between series, beyond the noise
 * @param betweenP probability of so large a scatter between series without any such
 */
record CommonEffect(
    double coefficient,
    double standardError,
    double df,
    double meanT,
    int series,
    double between,
    double betweenP) {

  /** So many series give a prior of their own. */
  static final int ENOUGH = 10;

  private static final double FAR = 3;
  private static final int ROUNDS = 50;

  /** Below this a t has no fourth moment; the limit on far series then does what is needed. */
  private static final double LEAST_DF = 5;

  /** A column that slope and intercept explain up to this share says nothing. */
  private static final double LEAST_REST = 1e-9;

  /**
   * What one series says.
   *
   * @param coefficient its own
   * @param information 1/variance of it for a flask variance of 1
   * @param rest residual variance beside the column on the pool's scale; 0 without df
   * @param df its degrees of freedom, n − 3
   */
  record Part(PooledLine line, double coefficient, double information, double rest, int df) {}

  /** A part with its moderated standard error. */
  private record Told(double coefficient, double se, double df) {}

  static Optional<Part> part(PooledLine pooled, double[] column) {
    StraightLine line = pooled.line();
    double[] rest = rest(line, column);
    double up = 0;
    double down = 0;
    double size = 0;
    for (int i = 0; i < rest.length; i++) {
      up += line.weights()[i] * rest[i] * line.residual(i);
      down += line.weights()[i] * rest[i] * rest[i];
      size += line.weights()[i] * column[i] * column[i];
    }
    double coefficient = up / down;
    if (!(down > LEAST_REST * size)
        || !Double.isFinite(coefficient)
        || !Double.isFinite(1 / down)
        || !Double.isFinite(down)) {
      return Optional.empty();
    }
    int df = line.n() - 3;
    double squares = Math.max(0, line.residualSumOfSquares() - coefficient * up);
    double variance = df > 0 ? pooled.onScale(squares / df) : 0;
    return Optional.of(new Part(pooled, coefficient, down, variance, df));
  }

  /** What slope and intercept leave of a column. */
  static double[] rest(StraightLine line, double[] column) {
    double[] w = line.weights();
    double mean = StraightLine.mean(column, w);
    double along = 0;
    for (int i = 0; i < column.length; i++) {
      along += w[i] * (line.x()[i] - line.xMean()) / line.sxx() * (column[i] - mean);
    }
    double[] rest = new double[column.length];
    for (int i = 0; i < column.length; i++) {
      rest[i] = column[i] - mean - along * (line.x()[i] - line.xMean());
    }
    return rest;
  }

  /** The prior of the variances beside the column; else what is given. */
  private static Optional<VariancePrior> prior(List<Part> parts, Optional<VariancePrior> given) {
    List<Part> own = parts.stream().filter(part -> part.df() > 0).toList();
    if (own.size() < ENOUGH) {
      return given;
    }
    return VariancePrior.of(
        own.stream().mapToDouble(Part::rest).toArray(), own.stream().mapToInt(Part::df).toArray());
  }

  /**
   * The common coefficient.
   *
   * @param given the prior where the parts are too few for their own
   * @return empty without parts or prior
   */
  static Optional<CommonEffect> of(List<Part> parts, Optional<VariancePrior> given) {
    Optional<VariancePrior> prior = prior(parts, given);
    if (parts.isEmpty() || prior.isEmpty()) {
      return Optional.empty();
    }
    List<Told> told = new ArrayList<>();
    int ownDf = 0;
    for (Part part : parts) {
      Variance variance = prior.get().moderated(part.rest(), part.df());
      double se = Math.sqrt(variance.value() * part.line().scale() / part.information());
      told.add(new Told(part.coefficient(), se, Math.max(LEAST_DF, variance.df())));
      ownDf += part.df();
    }
    return of(told, ownDf, prior.get().series())
        .filter(effect -> Double.isFinite(effect.coefficient() / effect.standardError()));
  }

  private static Optional<CommonEffect> of(List<Told> told, int ownDf, int priorSeries) {
    double unit = told.stream().mapToDouble(Told::se).min().orElse(0);
    double[] share = shares(told, unit);
    if (!(unit > 0) || !Double.isFinite(share[0])) {
      return Optional.empty();
    }
    double centre = centre(told, share);
    double spread = 0;
    double fourth = 0;
    double weight = 0;
    double meanT = 0;
    for (int j = 0; j < share.length; j++) {
      Told one = told.get(j);
      double variance = one.df() == Double.POSITIVE_INFINITY ? 1 : one.df() / (one.df() - 2);
      spread += share[j] * variance;
      fourth += share[j] * share[j] * variance * variance * 6 / (Math.max(one.df(), 4.5) - 4);
      weight += unit / one.se() * (unit / one.se());
      meanT += one.coefficient() / one.se() / share.length;
    }
    double likeT = 4 + 6 * spread * spread / fourth;
    double shrink = likeT < Double.POSITIVE_INFINITY ? (likeT - 2) / likeT : 1;
    double df = 1 / (1 / likeT + 1.0 / Math.max(ownDf, priorSeries));
    if (ownDf == 0 && told.size() > 1) {
      // No series has a scatter beside the column: that between the series takes its place.
      df = told.size() - 1;
      shrink = Math.max(1, scatter(told, centre) / df / spread);
    }
    double se = unit * Math.sqrt(spread * shrink / weight);
    double between = between(told, centre, spread);
    double betweenP = betweenP(told, centre, spread);
    return Optional.of(new CommonEffect(centre, se, df, meanT, told.size(), between, betweenP));
  }

  private static double[] shares(List<Told> told, double unit) {
    double[] share = new double[told.size()];
    double sum = 0;
    for (int j = 0; j < share.length; j++) {
      double exact = unit / told.get(j).se();
      share[j] = exact * exact;
      sum += share[j];
    }
    for (int j = 0; j < share.length; j++) {
      share[j] /= sum;
    }
    return share;
  }

  /** Huber's mean with known standard errors, from the weighted median on. */
  private static double centre(List<Told> told, double[] share) {
    double centre = median(told, share);
    for (int round = 0; round < ROUNDS; round++) {
      double step = 0;
      double inside = 0;
      for (int j = 0; j < share.length; j++) {
        double r = (told.get(j).coefficient() - centre) / told.get(j).se();
        step += share[j] * told.get(j).se() * clipped(r);
        inside += Math.abs(r) < FAR ? share[j] : 0;
      }
      step /= Math.max(inside, 0.5);
      centre += step;
      if (Math.abs(step) <= 1e-12 * Math.abs(centre)) {
        break;
      }
    }
    return centre;
  }

  private static double clipped(double r) {
    return Math.max(-FAR, Math.min(FAR, r));
  }

  private static double median(List<Told> told, double[] share) {
    Integer[] order = new Integer[share.length];
    Arrays.setAll(order, j -> j);
    Arrays.sort(order, Comparator.comparingDouble((Integer j) -> told.get(j).coefficient()));
    double sum = 0;
    for (Integer j : order) {
      sum += share[j];
      if (sum >= 0.5) {
        return told.get(j).coefficient();
      }
    }
    return told.get(order[order.length - 1]).coefficient();
  }

  /** From the median distance to the centre, less the noise. */
  private static double between(List<Told> told, double centre, double spread) {
    double[] away =
        told.stream().mapToDouble(one -> Math.abs(one.coefficient() - centre)).sorted().toArray();
    double[] noise = told.stream().mapToDouble(Told::se).sorted().toArray();
    double all = 1.4826 * away[away.length / 2];
    double part = noise[noise.length / 2] * Math.sqrt(spread);
    return all > part ? Math.sqrt((all - part) * (all + part)) : 0;
  }

  private static double betweenP(List<Told> told, double centre, double spread) {
    if (told.size() < 2) {
      return 1;
    }
    double kurtosis = 0;
    for (Told one : told) {
      kurtosis += 6 / (Math.max(one.df(), 4.5) - 4) / told.size();
    }
    double df = (told.size() - 1) * 2 / (2 + kurtosis);
    double ratio = scatter(told, centre) / spread / (told.size() - 1);
    return Gamma.regularizedGammaQ(df / 2, df * ratio / 2);
  }

  private static double scatter(List<Told> told, double centre) {
    double sum = 0;
    for (Told one : told) {
      double r = clipped((one.coefficient() - centre) / one.se());
      sum += r * r;
    }
    return sum;
  }

  double t() {
    return coefficient / standardError;
  }

  /** Probability of so large a coefficient or a larger one. */
  double pUpper() {
    return StudentT.cumulative(-t(), df);
  }

  double pTwoSided() {
    return StudentT.twoSided(t(), df);
  }
}
