package org.spikewright.reading;

/**
 * How readings scatter of which an export gives the mean alone.
 *
 * @param sd their standard deviation, in the instrument's unit; 0 or more
 * @param readings how many, 2 or more
 */
public record Spread(double sd, int readings) {}
