package org.spikewright.summary;

import java.util.List;

/** Each delivery of the lab day. */
final class FilesSheet {
  static final String NAME = "Files";

  private static final List<ColumnPlan> COLUMNS =
      List.of(
          new ColumnPlan("No.", 6),
          new ColumnPlan("File", 34),
          new ColumnPlan("Arrived", 19),
          new ColumnPlan("Outcome", 10),
          new ColumnPlan("Rows", 8),
          new ColumnPlan("Readings", 9),
          new ColumnPlan("Rows not used", 9),
          new ColumnPlan("Rows skipped", 9),
          new ColumnPlan("Known already", 9),
          new ColumnPlan("Mapping", 16),
          new ColumnPlan("Reason or remark", 60),
          new ColumnPlan("Lies now in", 36),
          new ColumnPlan("Bytes", 11),
          new ColumnPlan("SHA-256 of the file", 66),
          new ColumnPlan("SHA-256 of the mapping", 66));

  private FilesSheet() {}

  static SheetPlan of(Night night) {
    // The hashes are for a search on screen; on paper they would make everything else small.
    SheetPlan.Layout layout =
        new SheetPlan.Layout(true, java.util.Optional.of("FilesTable"), true, 13, false, false);
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
        CellPlan.count(file.repeated()),
        CellPlan.text(file.mapping()),
        CellPlan.text(file.reason(), Look.WRAPPED),
        CellPlan.text(file.archivedAs(), Look.WRAPPED),
        CellPlan.count(file.size()),
        CellPlan.text(file.sha256()),
        CellPlan.text(file.mappingSha256()));
  }
}
