/**
 * What a file says, cell by cell, and where; and how it is to be read. Start at {@link
 * org.spikewright.table.Row}. Nothing here knows what a column means.
 */
package org.spikewright.table;
