package org.spikewright.judgement;

import static org.spikewright.judgement.Flags.n;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.fit.LevelBias;
import org.spikewright.fit.NightDrift;
import org.spikewright.fit.PoolEvidence;
import org.spikewright.fit.PooledSeries;
import org.spikewright.fit.SharedBend;
import org.spikewright.fit.StraightLine;
import org.spikewright.judgement.Flag.Weight;
import org.spikewright.quantity.Numbers;

/**
 * What the night shows and one line does not: a bend of all lines, a level that is off, a drift.
 * Raised for the series whose result it moves by more than the limit.
 */
final class NightFlags {
  private static final double MINUTES = 60;

  private final SeriesResult result;
  private final Optional<PoolEvidence> evidence;
  private final Limit rate;
  private final Limit effect;

  NightFlags(SeriesResult result, PoolView pool, Criteria criteria) {
    this.result = result;
    this.evidence = pool.evidence();
    this.rate = criteria.of(Criterion.NIGHT_FALSE_ALARMS);
    this.effect = criteria.of(Criterion.NIGHT_EFFECT);
  }

  List<Flag> all() {
    List<Flag> flags = new ArrayList<>();
    if (evidence.isEmpty() || !rate.on() || !effect.on()) {
      return flags;
    }
    PoolEvidence night = evidence.get();
    night.sharedBend().flatMap(this::sharedBend).ifPresent(flags::add);
    night.levels().stream()
        .flatMap(level -> levelOff(level).stream())
        .findFirst()
        .ifPresent(flags::add);
    night
        .drift()
        .filter(drift -> drift.p() < rate.value())
        .flatMap(this::drift)
        .ifPresent(flags::add);
    return flags;
  }

  private Optional<Flag> sharedBend(SharedBend bend) {
    OptionalDouble bias = bend.bias(result.line(), result.pooled().factor());
    if (bias.isPresent() && Math.abs(bias.getAsDouble()) <= effect.value()) {
      return Optional.empty();
    }
    String moved =
        bias.isPresent()
            ? "here it moves the result by " + Flags.percent(bias.getAsDouble())
            : "here nothing is left of the result without it";
    OptionalDouble trusted = bend.signalWhereItTakes(effect.value());
    String above =
        trusted.isPresent()
            ? " Signals above "
                + n(trusted.getAsDouble())
                + " lie more than "
                + Numbers.plain(100 * effect.value())
                + " % below the line."
            : "";
    return Optional.of(
        flag(
            FlagKind.SHARED_BEND,
            bias,
            "The lines of " + bend.series() + " series bend together; " + moved + "." + above,
            "Dilute or use smaller additions, so that every signal lies in the straight range."));
  }

  private Optional<Flag> levelOff(LevelBias level) {
    PooledSeries series = result.pooled();
    double[] x = series.x().clone();
    double[] y = series.y().clone();
    boolean here = false;
    for (int i = 0; i < x.length; i++) {
      if (isAt(series.addition()[i], level.addition())) {
        here = true;
        if (level.addition() == 0) {
          y[i] /= 1 + level.effect();
        } else {
          x[i] *= 1 + level.effect();
        }
      }
    }
    OptionalDouble change = here ? change(x, y) : OptionalDouble.empty();
    if (change.isEmpty() || Math.abs(change.getAsDouble()) <= effect.value()) {
      return Optional.empty();
    }
    String what =
        level.addition() == 0
            ? "The signals of the unspiked flasks depart by "
            : "The volume delivered at the level of flask " + labelAt(level) + " departs by ";
    return Optional.of(
        flag(
            FlagKind.LEVEL_OFF,
            change,
            what
                + Flags.percent(level.effect())
                + " in "
                + level.series()
                + " series; here it moves the result by "
                + Flags.percent(-change.getAsDouble())
                + "."
                + (level.orBend() ? " A bend of all lines would explain the night as well." : ""),
            "Check this level's pipette setting and volume in the bench sheet."));
  }

  private String labelAt(LevelBias level) {
    PooledSeries series = result.pooled();
    for (int i = 0; i < series.flasks(); i++) {
      if (isAt(series.addition()[i], level.addition())) {
        return result.flasks().get(i).label();
      }
    }
    return "";
  }

  private static boolean isAt(double addition, double level) {
    return Math.abs(addition - level) <= 1e-6 * Math.max(Math.abs(addition), Math.abs(level));
  }

  private Optional<Flag> drift(NightDrift drift) {
    double[] minutes = result.pooled().minutes();
    double mean = 0;
    for (double minute : minutes) {
      mean += minute / minutes.length;
    }
    double[] y = result.pooled().y().clone();
    for (int i = 0; i < y.length; i++) {
      y[i] /= 1 + drift.perHour() * (minutes[i] - mean) / MINUTES;
    }
    OptionalDouble change =
        Double.isFinite(mean) ? change(result.pooled().x(), y) : OptionalDouble.empty();
    if (change.isEmpty() || Math.abs(change.getAsDouble()) <= effect.value()) {
      return Optional.empty();
    }
    return Optional.of(
        flag(
            FlagKind.NIGHT_DRIFT,
            change,
            "The signals drift by "
                + Flags.percent(drift.perHour())
                + " an hour over the night; here it moves the result by "
                + Flags.percent(-change.getAsDouble())
                + ".",
            "Measure in an order that does not rise with the additions, or with check readings."));
  }

  /** How the result changes when these points stand for the series' own, as a share of it. */
  private OptionalDouble change(double[] x, double[] y) {
    if (!(StraightLine.fit(x, y) instanceof StraightLine line) || !(line.slope() > 0)) {
      return OptionalDouble.empty();
    }
    double was = result.estimate().value();
    double change = (line.signalIntercept() / line.slope() - was) / Math.abs(was);
    return Double.isFinite(change) ? OptionalDouble.of(change) : OptionalDouble.empty();
  }

  private Flag flag(FlagKind kind, OptionalDouble number, String sentence, String advice) {
    return new Flag(
        kind,
        Weight.REVIEW,
        number,
        OptionalDouble.of(effect.value()),
        effect.source(),
        sentence,
        advice);
  }
}
