package org.spikewright.summary;

import java.util.List;
import java.util.Optional;

/**
 * One sheet. Its rows are made while they are written, so that a sheet may be far longer than
 * memory; where they exceed what a sheet can hold, they continue on a second sheet under the same
 * head.
 *
 * @param name at most 28 characters, none of which a spreadsheet forbids
 * @param columns from the first on
 * @param head the rows above; repeated on every printed page and continuation
 * @param rows the rows below, which can be walked more than once
 * @param layout how it lies on screen and paper
 * @param charts drawn over the cells
 * @param choices cells whose value is chosen from a list
 */
public record SheetPlan(
    String name,
    List<ColumnPlan> columns,
    List<List<CellPlan>> head,
    Iterable<List<CellPlan>> rows,
    Layout layout,
    List<ChartPlan> charts,
    List<Choice> choices) {

  /**
   * How a sheet lies on screen and paper.
   *
   * @param kind what it is
   * @param table the defined name under which other programs find header and rows; where it is
   *     present the last head row is the header and carries a filter
   * @param printColumns how many columns are printed; 0 for all
   */
  public record Layout(Kind kind, Optional<String> table, int printColumns) {

    /** A page of several parts. */
    static final Layout PAGE = new Layout(Kind.PAGE, Optional.empty(), 0);

    /** A table under a header that stays. */
    static Layout table(String name) {
      return new Layout(Kind.ROWS, Optional.of(name), 0);
    }
  }

  /** What a sheet is. */
  public enum Kind {
    /** A page of several parts. */
    PAGE,
    /** The same, printed on one sheet of paper, upright. */
    ONE_PAGE,
    /** Rows that scroll under a head that stays. */
    ROWS,
    /** The same with one row a series, by which progress is told. */
    SERIES_ROWS,
    /** Rows that are there for formulas only. */
    HIDDEN_ROWS
  }

  /**
   * A cell whose value is chosen from a list.
   *
   * @param row from 1
   * @param column from 1
   * @param list the range that holds the list, with its sheet
   */
  public record Choice(int row, int column, String list) {}

  /** A table whose header is the columns' titles. */
  static SheetPlan table(
      String name, List<ColumnPlan> columns, Iterable<List<CellPlan>> rows, Layout layout) {
    return new SheetPlan(name, columns, List.of(header(columns)), rows, layout);
  }

  SheetPlan(
      String name,
      List<ColumnPlan> columns,
      List<List<CellPlan>> head,
      Iterable<List<CellPlan>> rows,
      Layout layout) {
    this(name, columns, head, rows, layout, List.of(), List.of());
  }

  /** The columns' titles as a row. */
  static List<CellPlan> header(List<ColumnPlan> columns) {
    return columns.stream().map(SheetPlan::header).toList();
  }

  private static CellPlan header(ColumnPlan column) {
    boolean number = column.kind() == ColumnPlan.Kind.NUMBER;
    return CellPlan.text(column.title(), number ? Look.HEADER_RIGHT : Look.HEADER);
  }

  /** The same sheet with charts and cells to choose in. */
  SheetPlan with(List<ChartPlan> drawn, List<Choice> chosen) {
    return new SheetPlan(name, columns, head, rows, layout, drawn, chosen);
  }
}
