/**
 * Decides what the night's workbook says, sheet by sheet, as plain values. Start at {@link
 * org.spikewright.summary.Night}, what is known; then {@link org.spikewright.summary.ResultRow},
 * one line of the results.
 */
package org.spikewright.summary;
