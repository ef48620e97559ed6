package org.spikewright.mapping;

import org.spikewright.reading.Reading;

/** Takes what a mapping makes of rows, in file order. */
public interface MappedSink {
  /** Takes a reading. */
  void reading(Reading reading);

  /** Takes a row that was not used. */
  void rejection(Rejection rejection);
}
