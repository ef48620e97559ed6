package org.spikewright.mapping;

import org.spikewright.reading.BatchReading;
import org.spikewright.reading.Reading;

/** Takes what a mapping makes of rows, in file order. */
public interface MappedSink {
  /** Takes a reading. */
  void reading(Reading reading);

  /** Takes a reading of a drift check or a calibration solution. */
  void batchReading(BatchReading reading);

  /** Takes a row that was not used. */
  void rejection(Rejection rejection);
}
