package org.spikewright.analysis;

import java.util.OptionalDouble;
import org.spikewright.reading.SampleId;
import org.spikewright.series.SeriesKey;

/**
 * A duplicate beside its original.
 *
 * @param name of the laboratory's rule
 * @param series of the duplicate
 * @param batch the batch it stands for
 * @param original the sample it repeats
 * @param unit of both values
 * @param value of the duplicate
 * @param originalValue of the original; empty when the night has none
 * @param difference of the two over their mean, 0 or more; empty when it cannot be told
 * @param limit it was held against; empty when it was not judged
 * @param verdict in or out
 */
public record DuplicateResult(
    String name,
    SeriesKey series,
    String batch,
    SampleId original,
    String unit,
    double value,
    OptionalDouble originalValue,
    OptionalDouble difference,
    OptionalDouble limit,
    ControlResult.Verdict verdict) {}
