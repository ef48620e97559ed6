package org.spikewright.summary;

import java.time.LocalDate;
import java.time.LocalDateTime;
import java.util.OptionalDouble;

/** What stands in one cell of a sheet. */
public sealed interface CellPlan {

  /** Nothing. */
  record Empty() implements CellPlan {}

  /** Text, shown as it is typed: never a formula, a number or a date. */
  record Text(String text, Look look) implements CellPlan {}

  /**
   * A number.
   *
   * @param value finite
   * @param format how it is shown, in the spreadsheet's notation: {@code 0.00}
   */
  record Number(double value, String format, Look look) implements CellPlan {
    /** Refuses what is not finite: {@link IllegalArgumentException}. */
    public Number {
      if (!Double.isFinite(value)) {
        throw new IllegalArgumentException("no cell can hold " + value);
      }
    }
  }

  /**
   * A live formula of the worksheet.
   *
   * @param formula without the equals sign
   * @param cached what it gives, shown until the sheet is computed anew
   */
  record Formula(String formula, CellPlan cached) implements CellPlan {}

  /** The result of a formula that has none to give: {@code #N/A}, which charts leave out. */
  record NotAvailable() implements CellPlan {}

  /** A local date and time. */
  record Moment(LocalDateTime value) implements CellPlan {}

  /** A date. */
  record Day(LocalDate value) implements CellPlan {}

  /**
   * A link to a cell of this workbook.
   *
   * @param sheet the sheet's name
   * @param row from 1
   * @param text what is shown
   */
  record Link(String sheet, int row, String text) implements CellPlan {}

  /** The one empty cell. */
  CellPlan EMPTY = new Empty();

  /** The one cell without a result. */
  CellPlan NOT_AVAILABLE = new NotAvailable();

  /** Plain text; empty text is an empty cell. */
  static CellPlan text(String text) {
    return text(text, Look.PLAIN);
  }

  /** Text with a look; empty text is an empty cell. */
  static CellPlan text(String text, Look look) {
    return text.isEmpty() ? EMPTY : new Text(text, look);
  }

  /** A count. */
  static CellPlan count(long value) {
    return new Number(value, "0", Look.PLAIN);
  }

  /** A number, or an empty cell where there is none or it is not finite. */
  static CellPlan number(double value, String format) {
    return Double.isFinite(value) ? new Number(value, format, Look.PLAIN) : EMPTY;
  }

  /** A number, or an empty cell where there is none. */
  static CellPlan number(OptionalDouble value, String format) {
    return value.isPresent() ? number(value.getAsDouble(), format) : EMPTY;
  }
}
