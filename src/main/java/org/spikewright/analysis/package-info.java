/**
 * The whole functional core as one call: a lab day's series in, their outcomes out. Start at {@link
 * org.spikewright.analysis.Analysis}.
 */
package org.spikewright.analysis;
