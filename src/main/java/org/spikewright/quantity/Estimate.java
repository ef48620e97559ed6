package org.spikewright.quantity;

/**
 * A value with its standard uncertainty and the degrees of freedom behind it (JCGM 100:2008, G.3).
 *
 * @param value in the unit the context names
 * @param standardUncertainty same unit, 0 or more
 * @param degreesOfFreedom above 0; {@link Double#POSITIVE_INFINITY} when known exactly
 */
public record Estimate(double value, double standardUncertainty, double degreesOfFreedom) {}
