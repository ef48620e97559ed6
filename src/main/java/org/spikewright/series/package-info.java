/**
 * Gathers readings into addition series on a common concentration axis. Start at {@link
 * org.spikewright.series.Gathering}, whose outcomes are {@link org.spikewright.series.Gathered}.
 */
package org.spikewright.series;
