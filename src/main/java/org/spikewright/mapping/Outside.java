package org.spikewright.mapping;

import java.util.List;
import java.util.Optional;
import org.spikewright.table.Cell;

/**
 * What a name outside of the rows says of a fact: a column's header, a block's title, the name of a
 * sheet or file.
 *
 * @param text what it says; blank when this name says nothing
 * @param form how it is written
 * @param words which name it is, for messages
 */
record Outside(String text, Form form, String words) {
  /** A longer name is not matched: a pattern may take long on it. */
  static final int LONGEST_NAME = 256;

  Optional<Given> given(Fact fact, int place) {
    return text.isBlank()
        ? Optional.empty()
        : Optional.of(new Given(List.of(new Cell.Text(text)), form, -1, place, fact.word()));
  }
}
