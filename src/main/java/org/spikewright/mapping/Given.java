package org.spikewright.mapping;

import java.util.List;
import org.spikewright.table.Cell;

/**
 * A fact as a row gives it, not yet understood.
 *
 * @param cells what stands there, one cell or several to be joined; not all blank
 * @param form how it is written
 * @param index the first cell's column counted from 0; −1 for the file's name
 * @param place which of the fact's places this is, counted from 0
 * @param column the header, or the word of the fact
 */
record Given(List<Cell> cells, Form form, int index, int place, String column) {
  Cell cell() {
    return cells.get(0);
  }

  /** The text that a name is read from. */
  String text() {
    return cell().shown().strip();
  }
}
