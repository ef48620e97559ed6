/**
 * The numbers: the straight line and its rivals, extrapolation, intervals, tests. Start at {@link
 * org.spikewright.fit.StraightLine}, then {@link org.spikewright.fit.NativeEstimate}. Every public
 * method cites its source.
 */
package org.spikewright.fit;
