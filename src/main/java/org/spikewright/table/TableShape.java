package org.spikewright.table;

import java.nio.charset.Charset;
import java.util.List;
import java.util.Optional;

/**
 * How a table is to be cut into rows and cells.
 *
 * @param separator between fields of a text file; empty when it is to be worked out from the header
 * @param quote the character that encloses fields
 * @param encoding of a text file that has no byte-order mark and is no UTF-8; empty means that such
 *     a file is refused
 * @param sheets which sheets to read, in any order; empty means the first that is shown
 * @param header what the header holds; used to work out the separator
 * @param emptyRows what becomes of rows of a text file in which nothing stands
 */
public record TableShape(
    Optional<Character> separator,
    char quote,
    Optional<Charset> encoding,
    List<SheetRule> sheets,
    HeaderCells header,
    EmptyRows emptyRows) {

  /** What becomes of rows of a text file in which nothing stands. */
  public enum EmptyRows {
    /** They are passed over. */
    PASSED_OVER,
    /** They are handed on, since they mean something. */
    HANDED_ON
  }

  /** Sheets by name, a header of one row, and empty rows that mean nothing. */
  public TableShape(
      Optional<Character> separator,
      char quote,
      Optional<Charset> encoding,
      List<String> sheets,
      List<String> headerWords) {
    this(
        separator,
        quote,
        encoding,
        sheets.stream().<SheetRule>map(SheetRule.Named::new).toList(),
        HeaderCells.of(headerWords),
        EmptyRows.PASSED_OVER);
  }

  /** A comma-separated UTF-8 file, or the first sheet. */
  public static TableShape plain() {
    return new TableShape(Optional.of(','), '"', Optional.empty(), List.of(), List.of());
  }
}
