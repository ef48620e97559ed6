package org.spikewright.fit;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * One bend common to the series of a night, in terms of the signal as read: an instrument that
 * should show L shows {@code L − coefficient·L²}. Tested with moderated variances, never by
 * averaging the t values of the series.
 *
 * <p>Source: the quadratic calibration of ISO 8466-2 with one coefficient for all series; moderated
 * variances after Smyth, Stat. Appl. Genet. Mol. Biol. 3 (2004) 3.
 *
 * @param coefficient per signal unit as read; above 0 for saturation
 * @param standardError likewise
 * @param t of the test
 * @param df its degrees of freedom
 * @param p probability of such a t on a night of straight lines, one- or two-sided as the options
 *     say
 * @param series how many series tell of it
 * @param between standard deviation of the coefficient between series beyond the noise, per signal
 *     unit; large beside the coefficient where some series bend and others do not
 * @param betweenP probability of so much scatter between series that bend alike
 */
public record SharedBend(
    double coefficient,
    double standardError,
    double t,
    double df,
    double p,
    int series,
    double between,
    double betweenP) {

  private static final int STEPS = 20;

  /** A coefficient within the noise is not worth more than the first step. */
  private static final double WORTH = 2;

  static Optional<SharedBend> of(
      List<PooledLine> lines, Optional<VariancePrior> curve, BendTest.Side side) {
    Optional<CommonEffect> first = effect(lines, curve);
    return first.map(
        effect -> {
          double coefficient =
              Math.abs(effect.t()) > WORTH
                  ? refined(lines, curve, effect.coefficient())
                  : effect.coefficient();
          double grown = coefficient / effect.coefficient();
          double ratio = Double.isFinite(grown) && grown > 0 ? grown : 1;
          return new SharedBend(
              ratio * effect.coefficient(),
              ratio * effect.standardError(),
              effect.t(),
              effect.df(),
              side == BendTest.Side.SATURATION ? effect.pUpper() : effect.pTwoSided(),
              effect.series(),
              ratio * effect.between(),
              effect.betweenP());
        });
  }

  private static Optional<CommonEffect> effect(
      List<PooledLine> lines, Optional<VariancePrior> curve) {
    List<CommonEffect.Part> parts = new ArrayList<>();
    for (PooledLine line : lines) {
      CommonEffect.part(line, column(line)).ifPresent(parts::add);
    }
    return CommonEffect.of(parts, curve);
  }

  /** What a coefficient of 1 takes from each flask's signal, after the volume factor. */
  static double[] column(PooledLine pooled) {
    StraightLine line = pooled.line();
    double[] column = new double[line.n()];
    for (int i = 0; i < column.length; i++) {
      double fitted = line.at(line.x()[i]);
      column[i] = -fitted * fitted / pooled.series().factor()[i];
    }
    return column;
  }

  /**
   * A strong bend bends the lines on which it was measured: the coefficient after which no bend is
   * left, between 0 and the first one, by false position.
   */
  private static double refined(
      List<PooledLine> lines, Optional<VariancePrior> curve, double first) {
    double low = 0;
    double lowLeft = first;
    double high = Math.signum(first) * Math.min(Math.abs(first), most(lines));
    double highLeft = left(lines, curve, high);
    for (int step = 0; step < STEPS && lowLeft * highLeft < 0; step++) {
      double next = low + (high - low) * lowLeft / (lowLeft - highLeft);
      double nextLeft = left(lines, curve, next);
      if (nextLeft * lowLeft > 0) {
        low = next;
        lowLeft = nextLeft;
        highLeft /= 2;
      } else {
        high = next;
        highLeft = nextLeft;
        lowLeft /= 2;
      }
      if (Math.abs(nextLeft) < 1e-6 * Math.abs(first)) {
        return next;
      }
    }
    return high;
  }

  private static double left(
      List<PooledLine> lines, Optional<VariancePrior> curve, double coefficient) {
    return effect(straightened(lines, coefficient), curve)
        .map(CommonEffect::coefficient)
        .orElse(0.0);
  }

  /** With more than this the largest signal would lie beyond the parabola's summit. */
  private static double most(List<PooledLine> lines) {
    double largest = 0;
    for (PooledLine pooled : lines) {
      for (int i = 0; i < pooled.line().n(); i++) {
        largest = Math.max(largest, Math.abs(pooled.line().y()[i] / pooled.series().factor()[i]));
      }
    }
    return 0.24 / Math.max(largest, 1e-150);
  }

  static List<PooledLine> straightened(List<PooledLine> lines, double coefficient) {
    return lines.stream()
        .flatMap(line -> line.changed(signal -> straight(signal, coefficient)).stream())
        .toList();
  }

  /** The signal that would have been read without the bend, from the one that was. */
  public double straight(double asRead) {
    return straight(asRead, coefficient);
  }

  private static double straight(double asRead, double coefficient) {
    double inside = 1 - 4 * coefficient * asRead;
    // Beyond its summit a parabola has no way back; the summit stands for it.
    return 2 * asRead / (1 + Math.sqrt(Math.max(0, inside)));
  }

  /** Whether it is found at a rate of false alarms, and the series agree in it. */
  public boolean isShared(double rate) {
    boolean apart = betweenP < 0.001 && between > Math.abs(coefficient) / 2;
    return p < rate && !apart;
  }

  /**
   * The signal as read above which the bend takes more than a share of the signal.
   *
   * @param share above 0
   * @return empty where the bend is not towards saturation
   */
  public OptionalDouble signalWhereItTakes(double share) {
    double signal = share / coefficient * (1 - share);
    return coefficient > 0 && signal < 1e150 ? OptionalDouble.of(signal) : OptionalDouble.empty();
  }

  /**
   * How far the bend moves a series' native concentration: straight line over straightened line,
   * less 1; above 0 where it makes the result too large.
   *
   * @param line the line as fitted, with a slope above 0
   * @param factor the volume factor of each flask
   * @return empty where the straightened signals give no line or no concentration above 0
   */
  public OptionalDouble bias(StraightLine line, double[] factor) {
    Optional<StraightLine> other = PooledLine.changed(line, factor, this::straight);
    double bent = line.signalIntercept() / line.slope();
    double straight = other.map(o -> o.signalIntercept() / o.slope()).orElse(0.0);
    double bias = bent / straight - 1;
    return straight > 0 && Double.isFinite(bias) ? OptionalDouble.of(bias) : OptionalDouble.empty();
  }
}
