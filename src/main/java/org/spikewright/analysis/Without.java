package org.spikewright.analysis;

import org.spikewright.reading.Role;
import org.spikewright.series.SeriesKey;

/** A series whose flasks gave no result. */
record Without(SeriesKey key, BatchKey batch, Role role, String reason) {}
