package org.spikewright.reading;

import java.time.Instant;
import java.util.Optional;
import org.spikewright.table.Position;

/**
 * A reading of a solution that is measured again and again to see the instrument drift.
 *
 * @param subject whose signal it is; the check's name stands for the sample
 * @param batch the batch it was measured with
 * @param measuredAt when it was read, to the millisecond; empty when no time is mapped
 * @param ordinal its place among the readings of its file with the same subject, batch and time
 * @param signal what the instrument said
 * @param position the signal's cell
 */
public record CheckReading(
    Subject subject,
    Batch batch,
    Optional<Instant> measuredAt,
    int ordinal,
    Signal signal,
    Position position)
    implements BatchReading {}
