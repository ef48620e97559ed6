package org.spikewright.series;

/** What becomes of a subject's readings: a series, or a reason why none could be formed. */
public sealed interface Gathered permits AdditionSeries, Ungrouped {
  /** The identity, also of what could not be grouped. */
  SeriesKey key();
}
