package org.spikewright.table;

import java.util.List;
import java.util.Map;

/**
 * One row of a table.
 *
 * @param source the table
 * @param number as a person counts, from 1
 * @param cells from the first column on; may be shorter than other rows
 * @param borrowed where cells stand that were taken over from another row, by column counted from
 *     0; empty for a row as it is in the file
 */
public record Row(Source source, long number, List<Cell> cells, Map<Integer, Position> borrowed) {

  /** A row as it is in the file. */
  public Row(Source source, long number, List<Cell> cells) {
    this(source, number, cells, Map.of());
  }

  /** The cell in a column counted from 0; {@link Cell#BLANK} beyond the row's end. */
  public Cell cell(int index) {
    return index < cells.size() ? cells.get(index) : Cell.BLANK;
  }

  /** Where the cell in a column counted from 0 stands. */
  public Position at(int index) {
    Position elsewhere = borrowed.isEmpty() ? null : borrowed.get(index);
    return elsewhere == null ? new Position(source, number, index + 1) : elsewhere;
  }

  /** Where the row stands. */
  public Position position() {
    return new Position(source, number, 0);
  }

  /** Whether every cell is blank. */
  public boolean isBlank() {
    for (int i = 0; i < cells.size(); i++) {
      if (!cells.get(i).isBlank()) {
        return false;
      }
    }
    return true;
  }
}
