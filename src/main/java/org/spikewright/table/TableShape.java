package org.spikewright.table;

import java.nio.charset.Charset;
import java.util.List;
import java.util.Optional;

/**
 * How a table is to be cut into rows and cells.
 *
 * @param separator between fields of a text file; empty when it is to be worked out from the header
 * @param quote the character that encloses fields
 * @param encoding of a text file without a byte-order mark; empty means strict UTF-8
 * @param sheets names of the sheets to read, in any order; empty means the first sheet only
 * @param headerWords words of which the header row holds every one; used to work out the separator
 */
public record TableShape(
    Optional<Character> separator,
    char quote,
    Optional<Charset> encoding,
    List<String> sheets,
    List<String> headerWords) {

  /** A comma-separated UTF-8 file, or the first sheet. */
  public static TableShape plain() {
    return new TableShape(Optional.of(','), '"', Optional.empty(), List.of(), List.of());
  }
}
