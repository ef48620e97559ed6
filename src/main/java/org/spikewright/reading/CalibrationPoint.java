package org.spikewright.reading;

import java.time.Instant;
import java.util.Optional;
import org.spikewright.quantity.Quantity;
import org.spikewright.table.Position;

/**
 * A reading of a calibration solution without the sample's matrix.
 *
 * @param subject whose signal it is; the solution's name stands for the sample
 * @param batch the batch it was measured with
 * @param measuredAt when it was read, to the millisecond; empty when no time is mapped
 * @param ordinal its place among the readings of its file with the same subject, batch and time
 * @param signal what the instrument said
 * @param position the signal's cell
 * @param concentration of the solution as measured, 0 or more
 */
public record CalibrationPoint(
    Subject subject,
    Batch batch,
    Optional<Instant> measuredAt,
    int ordinal,
    Signal signal,
    Position position,
    Quantity concentration)
    implements BatchReading {}
