package org.spikewright.decode;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.apache.poi.hssf.record.BlankRecord;
import org.apache.poi.hssf.record.BoolErrRecord;
import org.apache.poi.hssf.record.CellValueRecordInterface;
import org.apache.poi.hssf.record.FormulaRecord;
import org.apache.poi.hssf.record.LabelRecord;
import org.apache.poi.hssf.record.LabelSSTRecord;
import org.apache.poi.hssf.record.MulBlankRecord;
import org.apache.poi.hssf.record.NumberRecord;
import org.apache.poi.hssf.record.Record;
import org.apache.poi.hssf.record.SSTRecord;
import org.apache.poi.hssf.record.StringRecord;
import org.apache.poi.ss.usermodel.FormulaError;
import org.spikewright.table.Cell;

/** Makes rows of the cell records of one XLS sheet; what is no value is never 0. */
final class XlsCells {
  private static final Cell UNSTORED = new Cell.Unusable("formula without a stored result");

  private final Book book;
  private final RowAssembly rows;

  /** Column of a formula whose text comes in a record of its own; 0 when none is open. */
  private int awaitedColumn;

  XlsCells(Book book, RowAssembly rows) {
    this.book = book;
    this.rows = rows;
  }

  /** Follows one record of the sheet; false when the sink wants no more. */
  boolean follow(Record record) {
    if (record instanceof StringRecord string) {
      if (awaitedColumn > 0) {
        rows.put(awaitedColumn, text(string.getString()));
        awaitedColumn = 0;
      }
      return true;
    }
    // A run of blank cells needs no cells: gaps are blank.
    if (record instanceof MulBlankRecord || record instanceof BlankRecord) {
      return true;
    }
    return !(record instanceof CellValueRecordInterface cell) || followCell(cell);
  }

  /** Ends the sheet; false when the sink wants no more. */
  boolean end() {
    closeAwaited();
    return rows.end();
  }

  private boolean followCell(CellValueRecordInterface record) {
    closeAwaited();
    long row = record.getRow() + 1L;
    boolean more = true;
    if (row != rows.row()) {
      more = rows.end();
      rows.begin(row);
    }
    int column = record.getColumn() + 1;
    if (record instanceof FormulaRecord formula && formula.hasCachedResultString()) {
      awaitedColumn = column;
    } else {
      rows.put(column, cell(record));
    }
    return more;
  }

  private void closeAwaited() {
    if (awaitedColumn > 0) {
      rows.put(awaitedColumn, UNSTORED);
      awaitedColumn = 0;
    }
  }

  private Cell cell(CellValueRecordInterface record) {
    if (record instanceof NumberRecord number) {
      return book.number(number.getValue(), number.getXFIndex());
    }
    if (record instanceof LabelSSTRecord label) {
      return book.string(label.getSSTIndex());
    }
    if (record instanceof LabelRecord label) {
      return text(label.getValue());
    }
    if (record instanceof BoolErrRecord value) {
      return value.isBoolean() ? logical(value.getBooleanValue()) : error(value.getErrorValue());
    }
    if (record instanceof FormulaRecord formula) {
      return result(formula);
    }
    return new Cell.Unusable("a cell of an unknown kind");
  }

  private Cell result(FormulaRecord formula) {
    return switch (formula.getCachedResultTypeEnum()) {
      case BOOLEAN -> logical(formula.getCachedBooleanValue());
      case ERROR -> error(formula.getCachedErrorValue());
      // A writer that never computed leaves 0 and asks the spreadsheet program to compute.
      case NUMERIC ->
          formula.isCalcOnLoad() && formula.getValue() == 0
              ? UNSTORED
              : book.number(formula.getValue(), formula.getXFIndex());
      // An empty text, for which no record of its own follows.
      case STRING -> Cell.BLANK;
      default -> UNSTORED;
    };
  }

  private static Cell logical(boolean value) {
    return new Cell.Unusable((value ? "TRUE" : "FALSE") + " (a logical value)");
  }

  private static Cell error(int code) {
    return new Cell.Unusable(
        "error " + (FormulaError.isValidCode(code) ? FormulaError.forInt(code).getString() : code));
  }

  private static Cell text(String text) {
    return text.isEmpty() ? Cell.BLANK : new Cell.Text(text);
  }

  /** What the records of the whole book say: texts, number formats, date system. */
  static final class Book {
    private final Map<Integer, String> formats = new HashMap<>();
    private final List<Integer> styles = new ArrayList<>();
    private final Map<Integer, Boolean> dates = new HashMap<>();
    private NumberCells numbers = new NumberCells(false);
    private Optional<SSTRecord> strings = Optional.empty();

    void dates1904(boolean yes) {
      numbers = new NumberCells(yes);
    }

    void format(int index, String code) {
      formats.put(index, code);
    }

    void style(int format) {
      styles.add(format);
    }

    void strings(SSTRecord record) {
      strings = Optional.of(record);
    }

    private Cell number(double value, int style) {
      return numbers.ofBinary(value, dates.computeIfAbsent(style, this::isDate));
    }

    private boolean isDate(int style) {
      if (style < 0 || style >= styles.size()) {
        return false;
      }
      int format = styles.get(style);
      return DateStyles.isDate(format, formats.getOrDefault(format, ""));
    }

    private Cell string(int index) {
      if (strings.isEmpty() || index < 0 || index >= strings.get().getNumUniqueStrings()) {
        return new Cell.Unusable("text number " + index + ", which the file does not hold");
      }
      return text(strings.get().getString(index).getString());
    }
  }
}
