package org.spikewright.analysis;

import org.spikewright.reading.Subject;
import org.spikewright.series.AdditionSeries;

/** What evidence of a batch speaks of: all its series of one analyte and line on one instrument. */
record BatchKey(String instrument, String batch, String analyte, String line) {
  static BatchKey of(AdditionSeries series) {
    Subject subject = series.key().subject();
    return new BatchKey(
        subject.instrument(), series.batchName(), subject.analyte(), subject.line());
  }
}
