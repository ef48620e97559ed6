package org.spikewright.reading;

/**
 * The batch a reading belongs to.
 *
 * @param name as mapped, or taken from the file or folder name
 * @param delimits whether it delimits its series alone: true for a batch from a column, a label or
 *     a bench sheet, and wherever no time is mapped; false where it is only a name
 */
public record Batch(String name, boolean delimits) {}
