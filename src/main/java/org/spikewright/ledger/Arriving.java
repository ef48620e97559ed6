package org.spikewright.ledger;

import java.time.Instant;
import java.time.LocalDate;

/**
 * A file about to be recorded.
 *
 * @param name relative to the watched folder
 * @param size in bytes
 * @param sha256 of its bytes, in hexadecimal
 * @param arrivedAt when it was read; kept to the millisecond
 * @param labDay the lab day of its arrival
 * @param mappingName empty when no mapping applied
 * @param mappingSha256 of the mapping's text; empty likewise
 * @param mappingText the mapping as it stood; empty likewise
 */
public record Arriving(
    String name,
    long size,
    String sha256,
    Instant arrivedAt,
    LocalDate labDay,
    String mappingName,
    String mappingSha256,
    String mappingText) {}
