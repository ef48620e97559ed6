/**
 * The numbers: the straight line and its rivals, extrapolation, intervals, tests; and what a night
 * of series knows that one line does not. Start at {@link org.spikewright.fit.StraightLine}, then
 * {@link org.spikewright.fit.NativeEstimate}; whether the line may be believed is asked of {@link
 * org.spikewright.fit.BendTest} and {@link org.spikewright.fit.DeletedResidual}. For the night
 * start at {@link org.spikewright.fit.PoolEvidence}, made from {@link
 * org.spikewright.fit.PooledSeries}; what it lends to one series is {@link
 * org.spikewright.fit.Lent}, what that comes to {@link org.spikewright.fit.ModeratedSeries}. Every
 * public method cites its source; a record's fields are finite (degrees of freedom may be infinite
 * where it is said), and what cannot be had is empty or a {@link org.spikewright.fit.NoLine}.
 */
package org.spikewright.fit;
