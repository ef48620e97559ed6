package org.spikewright.summary;

import java.util.List;
import org.spikewright.table.Position;

/** Each row that was not used, with the cell that stood in the way. */
final class RefusedSheet {
  static final String NAME = "Refused rows";

  private static final List<ColumnPlan> COLUMNS =
      List.of(
          ColumnPlan.number("File no.", 8),
          ColumnPlan.text("File", 34),
          ColumnPlan.text("Sheet", 14),
          ColumnPlan.number("Row", 9),
          ColumnPlan.text("Column", 9),
          ColumnPlan.text("Header", 18),
          ColumnPlan.text("What stood there", 30),
          ColumnPlan.text("Why not used", 24),
          ColumnPlan.text("What is expected", 50));

  private RefusedSheet() {}

  static SheetPlan of(Night night) {
    return SheetPlan.table(
        NAME,
        COLUMNS,
        Lazily.map(night.refused(), RefusedSheet::cells),
        SheetPlan.Layout.table("RefusedRowsTable"));
  }

  private static List<CellPlan> cells(RefusedRow row) {
    return List.of(
        CellPlan.count(row.arrival()),
        CellPlan.text(row.file(), Look.WRAPPED),
        CellPlan.text(row.sheet()),
        CellPlan.count(row.row()),
        CellPlan.text(column(row)),
        CellPlan.text(row.header()),
        CellPlan.text(row.found(), Look.WRAPPED),
        CellPlan.text(row.reason(), Look.WRAPPED),
        CellPlan.text(row.expected(), Look.WRAPPED));
  }

  /** Letters for a sheet, letters and the number for a text file, whose columns people count. */
  private static String column(RefusedRow row) {
    if (row.column() == 0) {
      return "whole row";
    }
    String letters = Position.letters(row.column());
    return row.sheet().isEmpty() ? row.column() + " (" + letters + ")" : letters;
  }
}
