package org.spikewright.fit;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/**
 * A drift of the signal in the course of the night, from the residuals against the time of
 * measurement: what slope and intercept of each series leave of a signal that grows by a share an
 * hour.
 *
 * <p>Source: regression on a common covariate, Miller and Miller, Statistics and Chemometrics for
 * Analytical Chemistry, ch. 5; moderated variances after Smyth, Stat. Appl. Genet. Mol. Biol. 3
 * (2004) 3.
 *
 * @param perHour share of the signal an hour; below 0 for a falling signal
 * @param standardError likewise
 * @param t of the test
 * @param df its degrees of freedom
 * @param p two-sided
 * @param series how many series have times
 * @param likeBend how much a drift looks like a bend in the orders measured, −1 to 1; near 1 or −1
 *     (rising order) the night cannot tell one from the other
 */
public record NightDrift(
    double perHour,
    double standardError,
    double t,
    double df,
    double p,
    int series,
    double likeBend) {

  private static final double MINUTES = 60;

  static Optional<NightDrift> of(List<PooledLine> lines, Optional<VariancePrior> given) {
    List<CommonEffect.Part> parts = new ArrayList<>();
    double product = 0;
    for (PooledLine line : lines) {
      Optional<double[]> column = column(line);
      Optional<CommonEffect.Part> part = column.flatMap(c -> CommonEffect.part(line, c));
      if (part.isPresent()) {
        parts.add(part.get());
        double[] drift = CommonEffect.rest(line.line(), column.get());
        double[] bend = CommonEffect.rest(line.line(), SharedBend.column(line));
        double bendSize = Math.sqrt(dot(bend, bend)) + Double.MIN_NORMAL;
        double driftSize = Math.sqrt(dot(drift, drift)) + Double.MIN_NORMAL;
        product += dot(drift, bend) / bendSize / driftSize;
      }
    }
    double like = parts.isEmpty() ? 0 : product / parts.size();
    return CommonEffect.of(parts, given)
        .map(
            effect ->
                new NightDrift(
                    effect.coefficient(),
                    effect.standardError(),
                    effect.t(),
                    effect.df(),
                    effect.pTwoSided(),
                    effect.series(),
                    Math.max(-1, Math.min(1, like))));
  }

  /** What a drift of 1 an hour adds to each flask's signal; empty without times that differ. */
  private static Optional<double[]> column(PooledLine pooled) {
    double[] minutes = pooled.series().minutes();
    double mean = StraightLine.mean(minutes);
    if (!Double.isFinite(mean)) {
      return Optional.empty();
    }
    double[] column = new double[minutes.length];
    double size = 0;
    for (int i = 0; i < column.length; i++) {
      double hours = (minutes[i] - mean) / MINUTES;
      column[i] = pooled.line().at(pooled.line().x()[i]) * hours;
      size = Math.max(size, Math.abs(hours));
    }
    return size > 0 ? Optional.of(column) : Optional.empty();
  }

  private static double dot(double[] a, double[] b) {
    double sum = 0;
    for (int i = 0; i < a.length; i++) {
      sum += a[i] * b[i];
    }
    return sum;
  }
}
