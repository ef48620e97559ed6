package org.spikewright.summary;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.Collectors;
import org.spikewright.analysis.NightEvidence;
import org.spikewright.analysis.PoolKey;
import org.spikewright.fit.LevelBias;
import org.spikewright.fit.NightDrift;
import org.spikewright.fit.NoiseFunction;
import org.spikewright.fit.NoiseHistory;
import org.spikewright.fit.PoolEvidence;
import org.spikewright.fit.SharedBend;
import org.spikewright.fit.Weighting;
import org.spikewright.quantity.Numbers;

/**
 * What a pool says, in words.
 *
 * @param key whose
 * @param pool what it says
 * @param flasks some of its flasks
 */
record PoolWords(PoolKey key, PoolEvidence pool, PoolFlasks flasks) {
  /** What a bend takes where the line can no longer be trusted. */
  static final double TAKEN = 0.05;

  /** A gain by weights below this is not worth a change of the method. */
  private static final double WORTH = 0.05;

  /** Shares of the variance below and above which one side dominates. */
  private static final double LITTLE = 1.0 / 3;

  private static final double MUCH = 2.0 / 3;

  /** From here on a drift and a bend cannot be told apart. */
  private static final double ALIKE = 0.8;

  boolean isEnough() {
    return pool.series() >= PoolEvidence.ENOUGH;
  }

  /** Whether a probability counts as found. */
  private boolean isFound(double p) {
    return p < pool.options().falseAlarms();
  }

  Optional<NightDrift> foundDrift() {
    return pool.drift().filter(drift -> isFound(drift.p()));
  }

  Optional<NoiseHistory> leftHistory() {
    return pool.history().filter(history -> isFound(history.p()));
  }

  /** Whether preparation or instrument makes the flasks' noise at the usual signal. */
  String dominates() {
    OptionalDouble signal = flasks.signal(key);
    if (pool.flaskNoise().isEmpty() || signal.isEmpty()) {
      return "";
    }
    if (pool.readingNoise().isEmpty()) {
      return "cannot be told: no flask was read twice";
    }
    double flask = pool.flaskNoise().get().variance(signal.getAsDouble());
    double readings =
        pool.readingNoise().get().variance(signal.getAsDouble()) / flasks.readings(key);
    double share = flask > 0 ? Math.min(1, readings / flask) : 1;
    String what = share < LITTLE ? "preparation" : share > MUCH ? "instrument" : "both alike";
    String explained = share < 0.01 ? "hardly any" : share < 1 ? percent(share) : "all";
    return what + ": the readings' scatter explains " + explained + " of the flasks' variance";
  }

  String weights() {
    if (!isEnough()) {
      return "too few series to advise";
    }
    if (pool.gainFromWeights().isEmpty()) {
      return "";
    }
    if (!pool.levels().isEmpty()) {
      return "settle the level that is off first: here it passes for noise";
    }
    if (pool.sharedBend().isPresent()) {
      return "settle the shared bend first: here it passes for noise";
    }
    double gain = pool.gainFromWeights().getAsDouble();
    String much = percent(gain);
    if (pool.options().weighting() == Weighting.BY_NOISE) {
      return gain < WORTH
          ? "weights = \"pool\" is set; equal weights would fit as well"
          : "weights = \"pool\" is set: it narrows the usual interval by " + much;
    }
    return gain < WORTH
        ? "equal weights fit"
        : "weights = \"pool\" would narrow the usual interval by " + much;
  }

  /** What the pool does for its series. */
  String lends(NightEvidence night) {
    String provisional = night.isProvisional() ? "; provisional" : "";
    if (pool.lent().isPresent()) {
      return "lends its noise to each of its series" + provisional;
    }
    String small =
        isEnough()
            ? "its lines have no scatter to lend"
            : "too small: " + pool.series() + " of the " + PoolEvidence.ENOUGH + " series it takes";
    boolean borrows =
        Optional.ofNullable(night.instruments().get(key.instrument()))
            .flatMap(PoolEvidence::lentByInstrument)
            .isPresent();
    return small
        + (borrows
            ? "; borrows the relative noise of all of " + key.instrument()
            : "; each series stands alone")
        + provisional;
  }

  String bend() {
    if (!isEnough()) {
      return "not tested: too few series";
    }
    if (pool.bend().isEmpty()) {
      return "no series tells of it";
    }
    SharedBend bend = pool.bend().get();
    if (pool.sharedBend().isPresent()) {
      return "found: " + together(bend);
    }
    return isFound(bend.p()) ? "some series bend and others do not" : "not found";
  }

  private static String together(SharedBend bend) {
    OptionalDouble above = bend.signalWhereItTakes(TAKEN);
    String takes =
        above.isPresent() ? "; it takes over 5 % above a signal of " + n(above.getAsDouble()) : "";
    return "the lines of " + bend.series() + " series bend together" + takes;
  }

  String levels() {
    if (!isEnough()) {
      return "not tested: too few series";
    }
    return pool.levels().isEmpty()
        ? "none off"
        : pool.levels().stream().map(this::level).collect(Collectors.joining("\n"));
  }

  private String level(LevelBias level) {
    String shown = flasks.shown(key, level.addition());
    String what =
        level.addition() == 0
            ? "the unspiked flasks: signals "
            : "the level " + (shown.isEmpty() ? n(level.addition()) : shown) + ": delivered ";
    return what
        + signed(level.effect())
        + " in "
        + level.series()
        + " series ("
        + probability(level.p())
        + ")"
        + (level.orBend() ? "; a bend would explain it as well" : "");
  }

  String drift() {
    if (pool.drift().isEmpty()) {
      return "no times to tell a drift by";
    }
    if (foundDrift().isEmpty()) {
      return "no drift found";
    }
    NightDrift drift = foundDrift().get();
    return "drift found: "
        + signed(drift.perHour())
        + " an hour"
        + (Math.abs(drift.likeBend()) >= ALIKE ? "; in this order a bend looks the same" : "");
  }

  String history() {
    if (pool.history().isEmpty()) {
      return pool.remembered() == 0 ? "no history yet" : "history too short";
    }
    NoiseHistory history = pool.history().get();
    return leftHistory().isPresent()
        ? "the noise has left its history: " + n(history.ratio()) + " times"
        : "noise as in its history";
  }

  /** The findings of the night as sentences; none where nothing was found. */
  List<String> findings() {
    List<String> found = new ArrayList<>();
    if (pool.sharedBend().isPresent()) {
      found.add(key.shown() + ": " + together(pool.sharedBend().get()) + ".");
    }
    for (LevelBias level : pool.levels()) {
      found.add(key.shown() + ": " + level(level) + ".");
    }
    if (foundDrift().isPresent()) {
      found.add(key.shown() + ": " + drift() + ".");
    }
    if (leftHistory().isPresent()) {
      found.add(key.shown() + ": " + history() + ".");
    }
    return found;
  }

  /** s_0 at the usual signal as a share of it; empty without a prior. */
  OptionalDouble relativePrior() {
    OptionalDouble signal = flasks.signal(key);
    if (pool.line().isEmpty() || signal.isEmpty()) {
      return OptionalDouble.empty();
    }
    NoiseFunction noise =
        pool.flaskNoise().filter(found -> !found.isZero()).orElse(NoiseFunction.RELATIVE);
    double usual = signal.getAsDouble();
    return FlaskLine.finite(Math.sqrt(pool.line().get().variance()) * noise.sd(usual) / usual);
  }

  /** The noise of a flask at the usual signal as a share of it. */
  OptionalDouble relativeNoise() {
    OptionalDouble signal = flasks.signal(key);
    return pool.flaskNoise().isEmpty() || signal.isEmpty()
        ? OptionalDouble.empty()
        : FlaskLine.finite(pool.flaskNoise().get().sd(signal.getAsDouble()) / signal.getAsDouble());
  }

  static String n(double value) {
    return Numbers.rounded(value, 2);
  }

  private static String percent(double share) {
    return String.format(Locale.ROOT, "%.0f %%", 100 * share);
  }

  private static String probability(double p) {
    return p < 0.001 ? "p < 0.001" : "p = " + n(p);
  }

  private static String signed(double share) {
    return String.format(Locale.ROOT, "%+.1f %%", 100 * share).replace('-', '−');
  }
}
