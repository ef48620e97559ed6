package org.spikewright.reading;

import java.time.Instant;
import java.util.Optional;
import org.spikewright.table.Position;

/**
 * One reading of one flask.
 *
 * @param subject whose signal it is
 * @param batch the batch it belongs to
 * @param flask the flask's label as mapped, or its addition where none is mapped
 * @param flaskMapped whether the export names flasks
 * @param replicate the replicate's label as mapped, or its order in the file where neither
 *     replicate nor time tells readings apart, or empty where time tells them apart
 * @param replicateMapped whether the export names replicates
 * @param measuredAt when it was read, to the millisecond; empty when no time is mapped
 * @param signal what the instrument said
 * @param facts everything known about the flask
 * @param position the signal's cell
 */
public record Reading(
    Subject subject,
    Batch batch,
    String flask,
    boolean flaskMapped,
    String replicate,
    boolean replicateMapped,
    Optional<Instant> measuredAt,
    Signal signal,
    FlaskFacts facts,
    Position position) {}
