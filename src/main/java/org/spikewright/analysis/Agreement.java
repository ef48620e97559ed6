package org.spikewright.analysis;

import java.util.List;
import org.spikewright.fit.Combination;
import org.spikewright.series.SeriesKey;

/**
 * Several series of one sample, analyte and line on one instrument.
 *
 * @param series two or more, in order
 * @param values their results, in {@code unit}
 * @param unit of the results
 * @param combination all as one
 * @param limit for its p
 */
public record Agreement(
    List<SeriesKey> series,
    List<Double> values,
    String unit,
    Combination combination,
    double limit) {

  /** Whether the series agree. */
  public boolean agree() {
    return combination.p() >= limit;
  }
}
