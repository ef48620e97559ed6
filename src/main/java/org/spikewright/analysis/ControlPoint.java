package org.spikewright.analysis;

import java.time.LocalDate;
import java.util.OptionalDouble;

/**
 * What a control came to on a lab day: a point of its chart.
 *
 * @param labDay the lab day
 * @param key whose point it is
 * @param unit of the other numbers; {@code 1} for recoveries and relative differences
 * @param value finite
 * @param reference the known value on the same scale, where there is one
 * @param lower limit of that day, where there was one
 * @param upper likewise
 */
public record ControlPoint(
    LocalDate labDay,
    ControlKey key,
    String unit,
    double value,
    OptionalDouble reference,
    OptionalDouble lower,
    OptionalDouble upper) {}
