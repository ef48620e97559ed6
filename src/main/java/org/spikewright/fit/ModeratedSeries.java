package org.spikewright.fit;

import java.util.Optional;

/**
 * One series with what its pool lends: the interval to report, and the tests, each with one
 * probability that is already corrected for its own choices.
 *
 * @param line the line that the method asks for
 * @param variance moderated, of a flask of weight 1 about the line, signal units squared
 * @param estimate the native concentration with the moderated interval; empty where it does not
 *     exist
 * @param bend the moderated bend test; empty with two levels or where the pool lends none
 * @param allowance the bend allowance with the same variance
 * @param odd the oddest flask or level, a shared bend taken out; empty with three flasks
 * @param noisy the scatter against the pool's, a shared bend taken out; empty with two flasks
 * @param oddSlope the sensitivity against the night's; empty where there is none to compare
 */
public record ModeratedSeries(
    StraightLine line,
    Variance variance,
    Optional<NativeEstimate> estimate,
    Optional<BendTest> bend,
    Optional<BendAllowance> allowance,
    Optional<OddFlask> odd,
    Optional<NoisyTest> noisy,
    Optional<SensitivitySpread.OddSlope> oddSlope) {

  /**
   * Moderates a series.
   *
   * @param ordinary its ordinary line, with a slope above 0
   * @param series the same flasks
   * @param lent what its pool lends
   * @param floor 0 or more: smallest standard deviation of a flask that the readings' resolution
   *     allows to be seen, in signal units
   */
  public static ModeratedSeries of(
      StraightLine ordinary, PooledSeries series, Lent lent, double floor) {
    double[] factor = series.factor();
    StraightLine line = lent.fitted(ordinary, factor);
    Variance variance = lent.variance(line, factor);
    Optional<Variance> curve = lent.curveVariance(line, factor);
    return new ModeratedSeries(
        line,
        variance,
        NativeEstimate.of(line, variance.sd(), variance.df()),
        curve.flatMap(value -> BendTest.of(line, value)),
        curve.flatMap(value -> BendAllowance.of(line, value)),
        lent.oddFlask(line, factor, series.addition(), floor),
        lent.noisy(line, factor),
        lent.oddSlope(line, factor, series.sensitivity()));
  }
}
