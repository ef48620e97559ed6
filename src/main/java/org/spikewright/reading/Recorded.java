package org.spikewright.reading;

import java.time.Instant;

/**
 * A reading as the ledger holds it.
 *
 * @param reading the reading; the newest of its identity
 * @param arrival the number of the delivery that brought it
 * @param firstArrivedAt when the first delivery that brought a reading of this identity was read
 * @param superseded how many earlier readings of the same identity it replaces
 */
public record Recorded(Reading reading, long arrival, Instant firstArrivedAt, int superseded) {

  /** The same, replacing one reading more. */
  public Recorded replacingOneMore() {
    return new Recorded(reading, arrival, firstArrivedAt, superseded + 1);
  }
}
