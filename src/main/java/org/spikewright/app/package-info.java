/**
 * Commands, wiring, clock, zone, threads, exit codes, shutdown. The night in one screen each:
 * {@link org.spikewright.app.Round}, which takes files in, and {@link
 * org.spikewright.app.NightlySummary}, which gives results out. {@link org.spikewright.app.Station}
 * holds what both need.
 */
package org.spikewright.app;
