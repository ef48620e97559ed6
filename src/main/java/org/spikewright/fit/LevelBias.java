package org.spikewright.fit;

/**
 * One addition level that lies off the lines over the night: a mis-set pipette, a wrong volume in
 * the bench sheet; at the level of nothing added, a signal of its own.
 *
 * @param addition the amount delivered, in base units
 * @param effect the share by which the delivered amount departs from what was stated; at the level
 *     of nothing added, the share by which the signal does
 * @param standardError of the effect
 * @param meanResidual mean standardised residual of the level over the series
 * @param series how many series have the level
 * @param t of the test
 * @param df its degrees of freedom
 * @param p two-sided, corrected for the number of levels (Holm)
 * @param orBend whether a bend of all series explains the night as well; then both are to be named
 */
public record LevelBias(
    double addition,
    double effect,
    double standardError,
    double meanResidual,
    int series,
    double t,
    double df,
    double p,
    boolean orBend) {

  LevelBias alsoBend() {
    return new LevelBias(addition, effect, standardError, meanResidual, series, t, df, p, true);
  }
}
