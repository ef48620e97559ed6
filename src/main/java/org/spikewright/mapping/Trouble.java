package org.spikewright.mapping;

import java.util.List;
import java.util.stream.Collectors;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.table.Row;

/**
 * One thing that is wrong with a row.
 *
 * @param reason why, in short
 * @param index the column counted from 0; −1 where no single cell is to blame
 * @param column the header, or the word of the fact
 * @param found what stood there
 * @param expected what should have stood there
 */
record Trouble(Reason reason, int index, String column, String found, String expected) {

  /** From a reading that failed. */
  static Trouble of(Understood.Nothing<?> nothing, Given given) {
    return new Trouble(
        nothing.reason(),
        given.index(),
        given.column(),
        Said.quoted(nothing.found()),
        nothing.expected());
  }

  /** One rejection for the row: the first trouble, with the others mentioned. */
  static Rejection rejection(Row row, List<Trouble> troubles) {
    Trouble first = troubles.get(0);
    String others =
        troubles.stream()
            .skip(1)
            .map(trouble -> "'" + trouble.column() + "' " + trouble.found())
            .distinct()
            .collect(Collectors.joining(", "));
    return new Rejection(
        first.reason(),
        first.index() < 0 ? row.position() : row.at(first.index()),
        first.column(),
        others.isEmpty() ? first.found() : first.found() + " (also " + others + ")",
        first.expected());
  }
}
