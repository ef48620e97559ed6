package org.spikewright.summary;

import java.util.List;
import java.util.Optional;

/** Each delivery of the lab day. */
final class FilesSheet {
  static final String NAME = "Files";

  private static final List<ColumnPlan> COLUMNS =
      List.of(
          ColumnPlan.number("No.", 6),
          ColumnPlan.text("File", 34),
          ColumnPlan.text("Arrived", 19),
          ColumnPlan.text("Outcome", 10),
          ColumnPlan.number("Rows", 8),
          ColumnPlan.number("Readings", 9),
          ColumnPlan.number("Rows not used", 9),
          ColumnPlan.number("Rows skipped", 9),
          ColumnPlan.number("Checks, calibration", 12),
          ColumnPlan.number("Known already", 9),
          ColumnPlan.text("Mapping", 16),
          ColumnPlan.text("Reason or remark", 60),
          ColumnPlan.text("Lies now in", 36),
          ColumnPlan.number("Bytes", 11),
          ColumnPlan.text("SHA-256 of the file", 66),
          ColumnPlan.text("SHA-256 of the mapping", 66));

  private FilesSheet() {}

  static SheetPlan of(Night night) {
    // The hashes are for a search on screen; on paper they would make everything else small.
    SheetPlan.Layout layout =
        new SheetPlan.Layout(SheetPlan.Kind.ROWS, Optional.of("FilesTable"), 14);
    return SheetPlan.table(
        NAME, COLUMNS, Lazily.map(night.files(), file -> cells(file, night)), layout);
  }

  private static List<CellPlan> cells(FileEntry file, Night night) {
    return List.of(
        CellPlan.count(file.arrival()),
        CellPlan.text(file.name(), Look.WRAPPED),
        new CellPlan.Moment(file.arrivedAt().atZone(night.zone()).toLocalDateTime()),
        CellPlan.text(file.outcome(), file.outcome().equals("refused") ? Look.REPEAT : Look.PLAIN),
        CellPlan.count(file.rows()),
        CellPlan.count(file.readings()),
        CellPlan.count(file.rejections()),
        CellPlan.count(file.skipped()),
        CellPlan.count(file.besideSamples()),
        CellPlan.count(file.repeated()),
        CellPlan.text(file.mapping()),
        CellPlan.text(file.reason(), Look.WRAPPED),
        CellPlan.text(file.archivedAs(), Look.WRAPPED),
        CellPlan.count(file.size()),
        CellPlan.text(file.sha256()),
        CellPlan.text(file.mappingSha256()));
  }
}
