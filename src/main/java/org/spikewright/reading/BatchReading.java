package org.spikewright.reading;

import java.time.Instant;
import java.util.Comparator;
import java.util.Optional;
import org.spikewright.table.Position;

/**
 * A reading that belongs to a batch and to no sample: of a drift check or a calibration solution.
 * It holds no addition and never becomes part of a series; it tells something about those of its
 * batch.
 */
public sealed interface BatchReading permits CheckReading, CalibrationPoint {

  /** By subject, time (untimed first), batch and order. */
  Comparator<BatchReading> ORDER =
      Comparator.comparing(BatchReading::subject)
          .thenComparing(reading -> reading.measuredAt().orElse(Instant.MIN))
          .thenComparing(reading -> reading.batch().name())
          .thenComparingInt(BatchReading::ordinal);

  /** Whose signal it is; the check's or the solution's name stands for the sample. */
  Subject subject();

  /** The batch it was measured with. */
  Batch batch();

  /** When it was read, to the millisecond; empty when no time is mapped. */
  Optional<Instant> measuredAt();

  /** Its place among the readings of its file with the same subject, batch and time; from 1. */
  int ordinal();

  /** What the instrument said. */
  Signal signal();

  /** The signal's cell. */
  Position position();
}
