/**
 * Applies the user's mapping to rows: readings and rejections, losing none. Start at {@link
 * org.spikewright.mapping.Mapping}, then {@link org.spikewright.mapping.RowMapper}.
 */
package org.spikewright.mapping;
