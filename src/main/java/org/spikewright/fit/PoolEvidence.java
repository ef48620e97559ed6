package org.spikewright.fit;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * What a night knows about a pool (instrument, analyte and design), or about all pools of an
 * instrument. Computed in the order of the series given, so that the same series in the same order
 * give the same bits. Series with fewer than three flasks or without a slope above 0 do not count.
 *
 * <p>Noise and priors rest on tonight's and the remembered nights' series; bend, levels,
 * sensitivities and drift on tonight's alone.
 *
 * @param options how the pool was looked at
 * @param tonight how many of tonight's series count
 * @param remembered how many of the remembered nights'
 * @param flaskNoise noise of flasks about their lines; empty without series
 * @param readingNoise noise of single readings; empty where no flask was read twice
 * @param line prior of the residual variances, on the scale of the flask noise
 * @param curve prior of the parabolas' residual variances, likewise
 * @param tested prior of the residual variances with the shared bend taken out where it was found
 * @param relativeLine prior of the residual variances over the mean square of the fitted signals
 * @param relativeCurve that of the parabolas'
 * @param bend the shared bend of tonight, found or not; empty where no series tells of it
 * @param levels tonight's levels that are off, the strongest first
 * @param sensitivity tonight's sensitivities; empty with fewer than five
 * @param drift tonight's drift, found or not; empty without times
 * @param gainFromWeights the share of its standard error that the median series would save by
 *     weights; empty without noise
 * @param history tonight's noise beside the remembered; empty with fewer than five series of either
 */
public record PoolEvidence(
    PoolOptions options,
    int tonight,
    int remembered,
    Optional<NoiseFunction> flaskNoise,
    Optional<NoiseFunction> readingNoise,
    Optional<VariancePrior> line,
    Optional<VariancePrior> curve,
    Optional<VariancePrior> tested,
    Optional<VariancePrior> relativeLine,
    Optional<VariancePrior> relativeCurve,
    Optional<SharedBend> bend,
    List<LevelBias> levels,
    Optional<SensitivitySpread> sensitivity,
    Optional<NightDrift> drift,
    OptionalDouble gainFromWeights,
    Optional<NoiseHistory> history) {

  /** A pool of fewer series lends nothing but to its instrument's pool. */
  public static final int ENOUGH = CommonEffect.ENOUGH;

  /** With the default options. */
  public static PoolEvidence of(List<PooledSeries> tonight, List<PooledSeries> remembered) {
    return of(tonight, remembered, PoolOptions.DEFAULT);
  }

  /**
   * The evidence of a pool.
   *
   * @param tonight the lab day's series, in a fixed order
   * @param remembered those of earlier lab days
   * @param options how to look at them
   */
  public static PoolEvidence of(
      List<PooledSeries> tonight, List<PooledSeries> remembered, PoolOptions options) {
    return new PoolSurvey(tonight, remembered, options).evidence();
  }

  /** How many series count. */
  public int series() {
    return tonight + remembered;
  }

  /** What the pool lends to a series of its own; empty with fewer than ten series. */
  public Optional<Lent> lent() {
    if (series() < ENOUGH || line.isEmpty()) {
      return Optional.empty();
    }
    return Optional.of(
        new Lent(
            Lent.Basis.POOL,
            series(),
            options.weighting(),
            PoolSurvey.scale(flaskNoise),
            line.get(),
            curve,
            tested.orElse(line.get()),
            sharedBend(),
            sensitivity));
  }

  /**
   * What it lends, as an instrument's pool, to the series of a small pool: the relative variance
   * alone; empty with fewer than ten series.
   */
  public Optional<Lent> lentByInstrument() {
    if (series() < ENOUGH || relativeLine.isEmpty()) {
      return Optional.empty();
    }
    return Optional.of(
        new Lent(
            Lent.Basis.INSTRUMENT,
            series(),
            Weighting.EQUAL,
            NoiseFunction.RELATIVE,
            relativeLine.get(),
            relativeCurve,
            relativeLine.get(),
            Optional.empty(),
            Optional.empty()));
  }

  /** The shared bend where it was found, so that it is taken out before other tests. */
  public Optional<SharedBend> sharedBend() {
    return series() < ENOUGH
        ? Optional.empty()
        : bend.filter(shared -> shared.isShared(options.falseAlarms()));
  }
}
