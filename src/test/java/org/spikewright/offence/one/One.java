package org.spikewright.offence.one;

import org.spikewright.offence.two.Two;

/** One half of a cycle. */
public record One(Two two) {}
