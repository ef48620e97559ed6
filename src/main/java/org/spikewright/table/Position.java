package org.spikewright.table;

/**
 * A cell's place, as a person counts.
 *
 * @param source the table
 * @param row the line of a text file on which the record begins, or the row of a sheet; from 1
 * @param column from 1; 0 means the whole row
 */
public record Position(Source source, long row, int column) {

  /** The column as a spreadsheet names it: 1 is A, 27 is AA. */
  public static String letters(int column) {
    StringBuilder letters = new StringBuilder();
    for (int rest = column; rest > 0; rest = (rest - 1) / 26) {
      letters.insert(0, (char) ('A' + (rest - 1) % 26));
    }
    return letters.toString();
  }

  /** The place without the file: {@code line 12, column 3} or {@code sheet Data, cell C12}. */
  public String within() {
    if (source.sheet().isPresent()) {
      String sheet = "sheet " + source.sheet().get() + ", ";
      return sheet + (column > 0 ? "cell " + letters(column) + row : "row " + row);
    }
    return "line " + row + (column > 0 ? ", column " + column : "");
  }

  /** {@code run7.csv line 12, column 3} or {@code run7.xlsx sheet Data, cell C12}. */
  @Override
  public String toString() {
    return source.file() + " " + within();
  }
}
