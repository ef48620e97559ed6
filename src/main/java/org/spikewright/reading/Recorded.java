package org.spikewright.reading;

import java.time.Instant;

/**
 * A reading as the ledger holds it.
 *
 * @param reading the reading; the newest of its identity
 * @param arrival the number of the delivery that brought it
 * @param arrivedAt when that delivery was read
 * @param superseded how many earlier readings of the same identity it replaces
 */
public record Recorded(Reading reading, long arrival, Instant arrivedAt, int superseded) {}
