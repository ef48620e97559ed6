package org.spikewright.series;

import java.util.List;
import org.spikewright.reading.Recorded;

/**
 * Readings that form no series.
 *
 * @param key their identity
 * @param batchName the batch to show
 * @param found what stood in the way, with the facts
 * @param expected what a series needs
 * @param readings the readings, all of them
 */
public record Ungrouped(
    SeriesKey key, String batchName, String found, String expected, List<Recorded> readings)
    implements Gathered {}
