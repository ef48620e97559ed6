package org.spikewright.analysis;

import java.util.List;
import java.util.OptionalDouble;
import org.spikewright.reading.CheckReading;
import org.spikewright.reading.Subject;

/**
 * The readings of one drift check over a run.
 *
 * @param subject the check
 * @param batch by name; empty where time alone divides the run
 * @param readings those that are numbers, in their order; at least one
 * @param worst the largest relative change against the first; empty with one reading
 * @param limit for the change
 * @param verdict in or out
 */
public record CheckResult(
    Subject subject,
    String batch,
    List<CheckReading> readings,
    OptionalDouble worst,
    double limit,
    ControlResult.Verdict verdict) {}
