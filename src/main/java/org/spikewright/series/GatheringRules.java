package org.spikewright.series;

import java.time.Duration;
import org.spikewright.reading.LabCalendar;

/**
 * How readings are divided into series.
 *
 * @param calendar the laboratory's days
 * @param longestPause readings of one subject belong together while no pause between them is longer
 */
public record GatheringRules(LabCalendar calendar, Duration longestPause) {}
