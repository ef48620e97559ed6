/**
 * The numbers: the straight line and its rivals, extrapolation, intervals, tests. Start at {@link
 * org.spikewright.fit.StraightLine}, then {@link org.spikewright.fit.NativeEstimate}; whether the
 * line may be believed is asked of {@link org.spikewright.fit.BendTest} and {@link
 * org.spikewright.fit.DeletedResidual}. Every public method cites its source; a record's fields are
 * finite, and what cannot be had is empty or a {@link org.spikewright.fit.NoLine}.
 */
package org.spikewright.fit;
