package org.spikewright.fit;

import java.util.OptionalDouble;

/**
 * One series as its pool sees it. All arrays have one entry a flask, in the order of the series,
 * and are not to be changed.
 *
 * @param addition the amount delivered, in base units: which level a flask is of
 * @param x the addition referred to the aliquot, in axis units
 * @param y the flask's mean signal after the volume factor; the signal as read is y over factor
 * @param factor the volume factor, 1e-30 to 1e30; a series with another does not count
 * @param readings how many readings the mean is of
 * @param replicateVariance variance of single readings as read; NaN with fewer than two
 * @param minutes mean time of measurement since the lab day began; NaN where no time is known
 * @param sensitivity signal per concentration in the measured solution; empty where it cannot be
 *     compared
 */
public record PooledSeries(
    double[] addition,
    double[] x,
    double[] y,
    double[] factor,
    int[] readings,
    double[] replicateVariance,
    double[] minutes,
    OptionalDouble sensitivity) {

  /**
   * Checks that all arrays are of one length.
   *
   * @throws IllegalArgumentException when they are not
   */
  public PooledSeries {
    int n = x.length;
    if (addition.length != n
        || y.length != n
        || factor.length != n
        || readings.length != n
        || replicateVariance.length != n
        || minutes.length != n) {
      throw new IllegalArgumentException("arrays of a series differ in length; x has " + n);
    }
  }

  /** How many flasks. */
  public int flasks() {
    return x.length;
  }
}
