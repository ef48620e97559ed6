package org.spikewright.fit;

import java.util.Optional;
import java.util.OptionalDouble;

/**
 * What a pool lends to one series.
 *
 * @param basis whose series it rests on
 * @param series how many
 * @param weighting how the method has its lines weighted; always equal where the instrument lends
 * @param noise what the residual variances are measured by
 * @param line prior of the residual variances of lines
 * @param curve prior of those of parabolas; empty where too few series have four flasks
 * @param tested prior of those of lines with the shared bend taken out
 * @param bend the shared bend, where it is to be taken out before other tests
 * @param sensitivity the night's sensitivities; empty where the instrument lends
 */
public record Lent(
    Basis basis,
    int series,
    Weighting weighting,
    NoiseFunction noise,
    VariancePrior line,
    Optional<VariancePrior> curve,
    VariancePrior tested,
    Optional<SharedBend> bend,
    Optional<SensitivitySpread> sensitivity) {

  /** Whose series lend. */
  public enum Basis {
    /** The pool of the instrument, analyte and design. */
    POOL,
    /** All pools of the instrument: the relative variance alone. */
    INSTRUMENT
  }

  /**
   * The line that the method asks for.
   *
   * @param ordinary the ordinary line
   * @param factor the volume factor of each flask
   */
  public StraightLine fitted(StraightLine ordinary, double[] factor) {
    return weighting == Weighting.EQUAL ? ordinary : noise.weighted(ordinary, factor);
  }

  /**
   * The moderated variance of a flask of weight 1 about the line, in signal units squared, with d_0
   * + ν degrees of freedom.
   *
   * @param fitted the line that the method asks for; of two points it takes the prior alone
   * @param factor the volume factor of each flask
   */
  public Variance variance(StraightLine fitted, double[] factor) {
    double scale = noise.scale(fitted, factor);
    int df = fitted.residualDf();
    double own = df > 0 ? fitted.residualSumOfSquares() / df / scale : 0;
    return onSignal(line.moderated(own, df), scale);
  }

  /**
   * The moderated variance of a flask about the parabola, for the bend test and the bend allowance.
   *
   * @param fitted the line that the method asks for
   * @param factor the volume factor of each flask
   * @return empty with fewer than three distinct x, or where the pool has none to lend
   */
  public Optional<Variance> curveVariance(StraightLine fitted, double[] factor) {
    double scale = noise.scale(fitted, factor);
    return curve.flatMap(
        prior ->
            QuadraticFit.of(fitted)
                .map(
                    fit -> {
                      int df = fit.residualDf();
                      double own = df > 0 ? fit.residualSumOfSquares() / df / scale : 0;
                      return onSignal(prior.moderated(own, df), scale);
                    }));
  }

  private static Variance onSignal(Variance variance, double scale) {
    return new Variance(variance.value() * scale, variance.df());
  }

  /**
   * The line on which odd flask and noisy are tested: the shared bend taken out.
   *
   * @param fitted the line that the method asks for
   * @param factor the volume factor of each flask
   */
  public StraightLine straightened(StraightLine fitted, double[] factor) {
    return bend.flatMap(shared -> PooledLine.changed(fitted, factor, shared::straight))
        .orElse(fitted);
  }

  /** The oddest flask or level; see {@link OddFlask}. */
  public Optional<OddFlask> oddFlask(
      StraightLine fitted, double[] factor, double[] addition, double floor) {
    StraightLine line = straightened(fitted, factor);
    return OddFlask.of(line, addition, floor, tested, noise.scale(fitted, factor));
  }

  /** The scatter against the pool's; empty with two flasks. */
  public Optional<NoisyTest> noisy(StraightLine fitted, double[] factor) {
    StraightLine line = straightened(fitted, factor);
    return line.residualDf() > 0
        ? Optional.of(NoisyTest.of(line, tested, noise.scale(fitted, factor)))
        : Optional.empty();
  }

  /**
   * The sensitivity against the night's.
   *
   * @param value as {@link PooledSeries#sensitivity()}
   * @return empty where there is none to compare or to compare with
   */
  public Optional<SensitivitySpread.OddSlope> oddSlope(
      StraightLine fitted, double[] factor, OptionalDouble value) {
    double own = value.orElse(0);
    if (sensitivity.isEmpty() || !(own > 0 && own < Double.POSITIVE_INFINITY)) {
      return Optional.empty();
    }
    double error = SensitivitySpread.error(fitted, variance(fitted, factor).value());
    return Double.isFinite(error)
        ? Optional.of(sensitivity.get().test(own, error))
        : Optional.empty();
  }
}
