package org.spikewright.summary;

import java.util.List;
import java.util.Optional;
import org.spikewright.reading.Subject;

/** Every result, those that need a person first. */
final class ResultsSheet {
  static final String NAME = "Results";

  private static final List<ColumnPlan> COLUMNS =
      List.of(
          new ColumnPlan("Sample", 18),
          new ColumnPlan("Analyte", 10),
          new ColumnPlan("Line", 10),
          new ColumnPlan("Verdict", 10),
          new ColumnPlan("Result", 12),
          new ColumnPlan("Unit", 9),
          new ColumnPlan("To report", 20),
          new ColumnPlan("Lower 95 %", 11),
          new ColumnPlan("Upper 95 %", 11),
          new ColumnPlan("Standard error of the fit", 12),
          new ColumnPlan("Flags in words", 62),
          new ColumnPlan("Flasks", 8),
          new ColumnPlan("Readings", 9),
          new ColumnPlan("Role", 10),
          new ColumnPlan("Instrument", 14),
          new ColumnPlan("Batch", 16),
          new ColumnPlan("Preparation", 22),
          new ColumnPlan("Lab day", 11),
          new ColumnPlan("Series sheet", 10));

  private ResultsSheet() {}

  static SheetPlan of(Night night, SeriesIndex index) {
    SheetPlan.Layout layout =
        new SheetPlan.Layout(true, Optional.of("ResultsTable"), true, 0, false, true);
    return SheetPlan.table(
        NAME, COLUMNS, Lazily.map(night.results(), row -> cells(row, index)), layout);
  }

  private static List<CellPlan> cells(ResultRow row, SeriesIndex index) {
    Subject subject = row.key().subject();
    String format = Formats.ofResult(row);
    return List.of(
        CellPlan.text(subject.sample().text()),
        CellPlan.text(subject.analyte()),
        CellPlan.text(subject.line()),
        CellPlan.text(row.verdict().word(), Words.look(row.verdict())),
        CellPlan.number(row.value(), format),
        CellPlan.text(row.unit()),
        CellPlan.text(row.reported()),
        CellPlan.number(row.lower95(), format),
        CellPlan.number(row.upper95(), format),
        CellPlan.number(row.ownStandardError(), Formats.significant(row.ownStandardError(), 2)),
        CellPlan.text(String.join("\n", row.sentences()), Look.WRAPPED),
        CellPlan.count(row.flasks()),
        CellPlan.count(row.readings()),
        CellPlan.text(row.role()),
        CellPlan.text(subject.instrument()),
        CellPlan.text(row.batch()),
        CellPlan.text(row.key().preparation()),
        new CellPlan.Day(row.key().labDay()),
        link(row, index));
  }

  /** A link to the series' block; empty where the Series sheet does not hold it. */
  static CellPlan link(ResultRow row, SeriesIndex index) {
    SeriesIndex.Entry entry = index.entries().get(row.key());
    return entry == null
        ? CellPlan.EMPTY
        : new CellPlan.Link(SeriesSheet.NAME, entry.firstRow(), "row " + entry.firstRow());
  }
}
