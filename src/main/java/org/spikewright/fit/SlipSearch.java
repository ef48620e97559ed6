package org.spikewright.fit;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;

/** The search behind {@link Slips}. */
final class SlipSearch {
  /** A true slip fails to fit so rarely; a wrong one is turned away so often. */
  private static final double FITS = 0.01;

  /** With a lent variance, the repaired series must look like the others of its pool. */
  private static final double LIKE_THE_OTHERS = 0.001;

  /** Beyond so many flasks two slips hardly point the same way. */
  private static final int FEW = 6;

  private final Slips.Suspect suspect;
  private final StraightLine line;
  private final Slips.Lent lent;
  private final double[] residuals;
  private final int df;

  SlipSearch(Slips.Suspect suspect, Slips.Lent lent) {
    this.suspect = suspect;
    this.line = suspect.line();
    this.lent = lent;
    this.df = line.residualDf();
    residuals = new double[line.n()];
    for (int i = 0; i < residuals.length; i++) {
      residuals[i] = line.residual(i);
    }
  }

  Optional<Slips> found() {
    List<Tried> tried = tried();
    boolean stock = lent.sensitivity().isPresent();
    if (tried.isEmpty() && !stock) {
      return Optional.empty();
    }
    int ways = (tried.isEmpty() ? 0 : 1) + (stock ? 1 : 0);
    List<Tried> fitting =
        tried.stream()
            .filter(Tried::fits)
            .sorted(Comparator.comparingDouble(one -> one.slip().residualSumOfSquares()))
            .toList();
    double byLine = fitting.isEmpty() ? 1 : Math.min(1, ways * chance(tried, fitting.get(0).t()));
    Optional<Slips.Slip> strength = lent.sensitivity().flatMap(this::strength);
    double byStock =
        strength.isEmpty() ? 1 : Math.min(1, ways * chance(lent.sensitivity().orElseThrow()));
    List<Slips.Slip> slips = new ArrayList<>(fitting.stream().map(Tried::slip).toList());
    strength.ifPresent(slip -> slips.add(byStock < byLine ? 0 : slips.size(), slip));
    return Optional.of(
        new Slips(
            tried.size() + (stock ? 2 : 0),
            Math.min(byLine, byStock),
            slips.stream().findFirst(),
            slips.stream().skip(1).toList()));
  }

  /** A slip with the direction it gives the residuals and how far they go that way. */
  record Tried(Slips.Slip slip, double[] direction, double t, boolean fits) {}

  /** All slips that can be told from a flawless series, none without degrees of freedom. */
  List<Tried> tried() {
    List<Tried> tried = new ArrayList<>();
    if (df >= 1 && lent.priorDf() + df - 1 > 0) {
      for (SlipHypothesis hypothesis : SlipHypothesis.all(suspect)) {
        tried(hypothesis).ifPresent(tried::add);
      }
    }
    return tried;
  }

  /** The greatest t of all, whether or not its slip fits: what {@link #chance} is about. */
  static double farthest(List<Tried> tried) {
    return tried.stream().mapToDouble(Tried::t).max().orElse(0);
  }

  private Optional<Tried> tried(SlipHypothesis hypothesis) {
    double[] by = TwoColumns.fit(hypothesis.constant(), hypothesis.x(), line.y());
    double[] model = new double[line.n()];
    double squares = 0;
    for (int i = 0; i < model.length; i++) {
      model[i] = by[0] * hypothesis.constant()[i] + by[1] * hypothesis.x()[i];
      squares += (line.y()[i] - model[i]) * (line.y()[i] - model[i]);
    }
    Optional<double[]> direction = direction(hypothesis.scaled() ? model : hypothesis.x());
    if (direction.isEmpty() || !Double.isFinite(squares)) {
      return Optional.empty();
    }
    double along = Math.max(0, TwoColumns.dot(residuals, direction.get()));
    double left = Math.max(0, line.residualSumOfSquares() - along * along);
    double least = Math.max(lent.floor(), line.rounding());
    double variance = Math.max(lent.moderated(left, df - 1), least * least);
    double value = by[0] / by[1];
    boolean fits =
        along > 0 && by[1] > 0 && Double.isFinite(value) && fits(squares, left, variance);
    Slips.Slip slip = new Slips.Slip(hypothesis.kind(), hypothesis.points(), value, squares);
    return Optional.of(new Tried(slip, direction.get(), along / Math.sqrt(variance), fits));
  }

  private boolean fits(double squares, double left, double variance) {
    double missed = Math.max(0, squares - left) / variance;
    boolean sized = FisherF.upper(missed, 1, lent.priorDf() + df - 1) >= FITS;
    return sized
        && (lent.priorDf() == 0
            || FisherF.upper(squares / df / lent.priorVariance(), df, lent.priorDf())
                >= LIKE_THE_OTHERS);
  }

  /** What of a column no straight line takes up, of length 1; empty when that is rounding. */
  private Optional<double[]> direction(double[] column) {
    if (!(StraightLine.fit(line.x(), column) instanceof StraightLine taken)) {
      return Optional.empty();
    }
    double[] direction = new double[column.length];
    for (int i = 0; i < column.length; i++) {
      direction[i] = taken.residual(i);
    }
    double length = Math.sqrt(TwoColumns.dot(direction, direction));
    if (!(length > 1e-9 * Math.sqrt(taken.syy()))) {
      return Optional.empty();
    }
    for (int i = 0; i < column.length; i++) {
      direction[i] /= length;
    }
    return Optional.of(direction);
  }

  /** The probability that a flawless series reaches this t towards any slip. */
  double chance(List<Tried> tried, double t) {
    double prior = lent.priorDf();
    double one = StudentT.cumulative(-t, prior + df - 1);
    double each = Math.min(1, directions(tried) * one);
    if (!(prior > 0)) {
      return each;
    }
    // Any direction at all goes no further than the residuals are long.
    double share = prior > 1e10 ? 1 : prior / (prior + df - 1);
    return Math.min(each, FisherF.upper(t * t * share / df, df, prior));
  }

  private int directions(List<Tried> tried) {
    if (line.n() > FEW) {
      return tried.size();
    }
    List<double[]> distinct = new ArrayList<>();
    for (Tried one : tried) {
      if (distinct.stream().noneMatch(d -> TwoColumns.dot(d, one.direction()) > 1 - 1e-12)) {
        distinct.add(one.direction());
      }
    }
    return distinct.size();
  }

  /** A stock ten times stronger or weaker than stated, where the pool's sensitivity says so. */
  private Optional<Slips.Slip> strength(Slips.Sensitivity against) {
    boolean strong = against.logRatio() > 0;
    double repaired = Math.abs(against.logRatio()) - Math.log(10);
    double factor = strong ? 10 : 0.1;
    double value = line.signalIntercept() / line.slope() * factor;
    boolean fits =
        Double.isFinite(value)
            && StudentT.twoSided(repaired / against.spread(), against.df()) >= FITS;
    return fits
        ? Optional.of(
            new Slips.Slip(
                strong ? Slips.Kind.STOCK_TENFOLD : Slips.Kind.STOCK_TENTH,
                List.of(),
                value,
                line.residualSumOfSquares()))
        : Optional.empty();
  }

  private static double chance(Slips.Sensitivity against) {
    return StudentT.twoSided(against.logRatio() / against.spread(), against.df());
  }
}
