package org.spikewright.decode;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Optional;
import org.spikewright.table.Cell;
import org.spikewright.table.Position;
import org.spikewright.table.Row;
import org.spikewright.table.RowSink;
import org.spikewright.table.Source;

/**
 * Puts the cells of a sheet into rows. A sheet whose rows or cells are not in order, or stand
 * twice, contradicts itself: two readings would claim one cell, and neither is believed.
 */
final class RowAssembly {
  private final Source source;
  private final RowSink sink;
  private List<Cell> cells = new ArrayList<>();
  private long row;

  RowAssembly(String shownName, String sheet, RowSink sink) {
    this.source = new Source(shownName, Optional.of(sheet));
    this.sink = sink;
  }

  /** The row being put together, from 1; 0 before the first. */
  long row() {
    return row;
  }

  /** The column of the last cell put, from 1; 0 in a fresh row. */
  int column() {
    return cells.size();
  }

  /** Begins a row. */
  void begin(long number) {
    if (number > Limits.SHEET_ROWS) {
      throw contradiction("row number " + number, "at most " + Limits.SHEET_ROWS);
    }
    if (number <= row) {
      throw contradiction(
          "row " + number + (number == row ? " a second time" : " below row " + row),
          "rows in rising order, each once");
    }
    row = number;
  }

  /** Puts a cell; gaps before it are blank. */
  void put(int column, Cell cell) {
    if (column > Limits.SHEET_COLUMNS) {
      throw contradiction("column number " + column, "at most " + Limits.SHEET_COLUMNS);
    }
    if (column <= cells.size()) {
      String name = Position.letters(column) + row;
      throw contradiction(
          column == cells.size()
              ? "cell " + name + " a second time"
              : "cell " + name + " behind cell " + Position.letters(cells.size()) + row,
          "cells in rising order, each once");
    }
    while (cells.size() < column - 1) {
      cells.add(Cell.BLANK);
    }
    cells.add(cell);
  }

  /** Hands the row on; false when no more are wanted. */
  boolean end() {
    if (cells.isEmpty()) {
      return true;
    }
    Row done = new Row(source, row, Collections.unmodifiableList(cells));
    cells = new ArrayList<>(cells.size());
    return sink.accept(done);
  }

  /** The fault of a sheet that contradicts itself, in the row being put together. */
  Unreadable contradiction(String found, String expected) {
    String sheet = "sheet " + source.sheet().orElse("");
    return new Unreadable(
        row > 0 ? sheet + ", row " + row : sheet,
        found,
        expected,
        "open the file in a spreadsheet program, look at that place, and save the table as a new"
            + " XLSX file");
  }
}
