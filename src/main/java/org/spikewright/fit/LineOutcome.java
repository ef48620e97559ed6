package org.spikewright.fit;

/** What least squares makes of a set of points: a line, or the reason why there is none. */
public sealed interface LineOutcome permits StraightLine, NoLine {}
