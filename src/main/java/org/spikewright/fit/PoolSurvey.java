package org.spikewright.fit;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;

/** The steps from a pool's series to its evidence. */
final class PoolSurvey {
  /** Below this likeness drift and bend are told apart, and the bend is taken out first. */
  private static final double UNLIKE = 0.8;

  /** Two explanations whose squared t differ by less are alike: a likelihood ratio of e². */
  private static final double ALIKE = 4;

  private final PoolOptions options;
  private final List<PooledSeries> all;
  private final Optional<NoiseFunction> flaskNoise;
  private final List<PooledLine> tonight;
  private final List<PooledLine> remembered;

  PoolSurvey(List<PooledSeries> tonight, List<PooledSeries> remembered, PoolOptions options) {
    this.options = options;
    all = joined(tonight, remembered);
    flaskNoise = NoiseFunction.ofFlasks(all, options.weighting());
    this.tonight = lines(tonight, scale(flaskNoise), options.weighting());
    this.remembered = lines(remembered, scale(flaskNoise), options.weighting());
  }

  /** What residual variances are measured by; where there is no noise at all, the signal. */
  static NoiseFunction scale(Optional<NoiseFunction> flaskNoise) {
    return flaskNoise.filter(noise -> !noise.isZero()).orElse(NoiseFunction.RELATIVE);
  }

  private static List<PooledLine> lines(
      List<PooledSeries> series, NoiseFunction noise, Weighting weighting) {
    return series.stream().flatMap(one -> PooledLine.of(one, noise, weighting).stream()).toList();
  }

  private static <T> List<T> joined(List<T> first, List<T> second) {
    List<T> joined = new ArrayList<>(first);
    joined.addAll(second);
    return joined;
  }

  PoolEvidence evidence() {
    List<PooledLine> both = joined(tonight, remembered);
    Optional<VariancePrior> line = PooledPriors.ofLines(both);
    Optional<VariancePrior> curve = curve(both);
    Optional<VariancePrior> forBend = curve.or(() -> line);
    Optional<SharedBend> bend = SharedBend.of(tonight, forBend, options.side());
    List<PooledLine> straight = straightened(tonight, bend);
    Optional<SharedBend> earlier = SharedBend.of(remembered, forBend, options.side());
    List<PooledLine> straightBefore = straightened(remembered, earlier);
    boolean asFitted = straight == tonight && straightBefore == remembered;
    Optional<VariancePrior> tested =
        asFitted ? line : PooledPriors.ofLines(joined(straight, straightBefore));
    List<PooledLine> relative = lines(all, NoiseFunction.RELATIVE, Weighting.EQUAL);
    return new PoolEvidence(
        options,
        tonight.size(),
        remembered.size(),
        flaskNoise,
        NoiseFunction.ofReadings(all),
        line,
        curve.or(() -> tested),
        tested,
        PooledPriors.ofLines(relative),
        curve(relative).or(() -> PooledPriors.ofLines(relative)),
        bend,
        levels(bend, straight, tested),
        line.flatMap(prior -> SensitivitySpread.of(tonight, prior)),
        drift(bend, straight, tested),
        WeightGain.of(tonight, scale(flaskNoise)),
        line.flatMap(prior -> NoiseHistory.of(tonight, remembered, prior)));
  }

  /** Too few parabolas say nothing. */
  private static Optional<VariancePrior> curve(List<PooledLine> lines) {
    return PooledPriors.ofCurves(lines).filter(prior -> prior.series() >= PoolEvidence.ENOUGH);
  }

  private boolean isFound(Optional<SharedBend> bend) {
    return tonight.size() + remembered.size() >= PoolEvidence.ENOUGH
        && bend.filter(shared -> shared.isShared(options.falseAlarms())).isPresent();
  }

  private List<PooledLine> straightened(List<PooledLine> lines, Optional<SharedBend> bend) {
    return isFound(bend) ? SharedBend.straightened(lines, bend.orElseThrow().coefficient()) : lines;
  }

  private List<LevelBias> levels(
      Optional<SharedBend> bend, List<PooledLine> straight, Optional<VariancePrior> tested) {
    if (tonight.size() + remembered.size() < PoolEvidence.ENOUGH) {
      return List.of();
    }
    LevelSearch search = new LevelSearch(tested, options.falseAlarms());
    List<LevelBias> off = new ArrayList<>(search.off(straight));
    if (isFound(bend)) {
      insteadOfBend(search, bend.orElseThrow(), off).ifPresent(level -> off.add(0, level));
    }
    return List.copyOf(off);
  }

  /** The top level, where without its flasks no bend is left: both then explain the night. */
  private Optional<LevelBias> insteadOfBend(
      LevelSearch search, SharedBend bend, List<LevelBias> off) {
    List<LevelBias> all = search.all(tonight);
    if (all.isEmpty()) {
      return Optional.empty();
    }
    LevelBias top = all.get(all.size() - 1);
    List<PooledLine> without = LevelSearch.without(tonight, top.addition());
    Optional<SharedBend> left =
        SharedBend.of(without, PooledPriors.ofLines(without), options.side());
    boolean explains =
        left.filter(more -> more.p() < options.falseAlarms()).isEmpty()
            && top.t() * top.t() > bend.t() * bend.t() - ALIKE;
    off.removeIf(level -> level.addition() == top.addition() && explains);
    return Optional.of(top)
        .filter(level -> explains && level.p() < options.falseAlarms())
        .map(LevelBias::alsoBend);
  }

  private Optional<NightDrift> drift(
      Optional<SharedBend> bend, List<PooledLine> straight, Optional<VariancePrior> tested) {
    Optional<NightDrift> asMeasured = NightDrift.of(tonight, tested);
    boolean toldApart = asMeasured.filter(drift -> Math.abs(drift.likeBend()) < UNLIKE).isPresent();
    return isFound(bend) && toldApart ? NightDrift.of(straight, tested) : asMeasured;
  }

  /** What weights by the noise function would save. */
  static final class WeightGain {
    private WeightGain() {}

    static OptionalDouble of(List<PooledLine> lines, NoiseFunction noise) {
      double[] gains =
          lines.stream()
              .mapToDouble(line -> gain(line, noise))
              .filter(Double::isFinite)
              .sorted()
              .toArray();
      return gains.length == 0
          ? OptionalDouble.empty()
          : OptionalDouble.of(gains[gains.length / 2]);
    }

    private static double gain(PooledLine pooled, NoiseFunction noise) {
      double[] factor = pooled.series().factor();
      StraightLine ordinary = PooledLine.ordinary(pooled.series()).orElseThrow();
      double[] weights = noise.weights(ordinary, factor);
      StraightLine weighted = noise.weighted(ordinary, factor);
      double centre = ordinary.yMean() / ordinary.slope();
      double plain = 0;
      for (int i = 0; i < weights.length; i++) {
        double pull =
            1.0 / ordinary.n() - centre * (ordinary.x()[i] - ordinary.xMean()) / ordinary.sxx();
        plain += pull * pull / weights[i];
      }
      double away = weighted.yMean() / weighted.slope();
      double best = 1 / weighted.weight() + away * away / weighted.sxx();
      return Math.max(0, 1 - Math.sqrt(best / plain));
    }
  }
}
