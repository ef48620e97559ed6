package org.spikewright.table;

import java.util.List;

/**
 * One row of a table.
 *
 * @param source the table
 * @param number as a person counts, from 1
 * @param cells from the first column on; may be shorter than other rows
 */
public record Row(Source source, long number, List<Cell> cells) {

  /** The cell in a column counted from 0; {@link Cell#BLANK} beyond the row's end. */
  public Cell cell(int index) {
    return index < cells.size() ? cells.get(index) : Cell.BLANK;
  }

  /** Where the cell in a column counted from 0 stands. */
  public Position at(int index) {
    return new Position(source, number, index + 1);
  }

  /** Where the row stands. */
  public Position position() {
    return new Position(source, number, 0);
  }

  /** Whether every cell is blank. */
  public boolean isBlank() {
    for (Cell cell : cells) {
      if (!cell.isBlank()) {
        return false;
      }
    }
    return true;
  }
}
