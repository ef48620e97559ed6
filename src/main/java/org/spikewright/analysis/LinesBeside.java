package org.spikewright.analysis;

import java.util.List;
import java.util.OptionalDouble;
import org.spikewright.series.SeriesKey;

/**
 * Several lines (wavelengths, masses) of one element in the same flasks, side by side. They share
 * flasks and so are never combined.
 *
 * @param unit of the results
 * @param lines two or more, in order
 * @param spread largest less smallest over their mean; empty when the mean is not above 0
 */
public record LinesBeside(String unit, List<OfLine> lines, OptionalDouble spread) {
  /**
   * One of them.
   *
   * @param value in the unit of all
   * @param standardUncertainty of the value; empty where there is none
   */
  public record OfLine(SeriesKey series, double value, OptionalDouble standardUncertainty) {}
}
