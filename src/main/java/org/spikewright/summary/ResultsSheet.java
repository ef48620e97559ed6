package org.spikewright.summary;

import java.util.List;
import java.util.Optional;
import org.spikewright.reading.Subject;

/** Every result, those that need a person first. */
final class ResultsSheet {
  static final String NAME = "Results";

  private static final List<ColumnPlan> COLUMNS =
      List.of(
          ColumnPlan.text("Sample", 18),
          ColumnPlan.text("Analyte", 10),
          ColumnPlan.text("Line", 10),
          ColumnPlan.text("Verdict", 10),
          ColumnPlan.number("Result", 12),
          ColumnPlan.text("Unit", 9),
          ColumnPlan.text("To report", 20),
          ColumnPlan.number("Expanded uncertainty", 12),
          ColumnPlan.number("Lower 95 %", 11),
          ColumnPlan.number("Upper 95 %", 11),
          ColumnPlan.text("Interval from", 9),
          ColumnPlan.number("Largest bias by a bend", 12),
          ColumnPlan.text("Flags in words", 62),
          ColumnPlan.number("Flasks", 8),
          ColumnPlan.number("Readings", 9),
          ColumnPlan.text("Role", 10),
          ColumnPlan.text("Instrument", 14),
          ColumnPlan.text("Batch", 16),
          ColumnPlan.text("Preparation", 16),
          ColumnPlan.text("Lab day", 11),
          ColumnPlan.text("Series sheet", 10));

  private ResultsSheet() {}

  static SheetPlan of(Night night, SeriesIndex index) {
    SheetPlan.Layout layout =
        new SheetPlan.Layout(SheetPlan.Kind.SERIES_ROWS, Optional.of("ResultsTable"), 0);
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
        CellPlan.number(row.expandedUncertainty(), format),
        CellPlan.number(row.lower95(), format),
        CellPlan.number(row.upper95(), format),
        CellPlan.text(row.intervalBasis()),
        CellPlan.number(row.evidence().bendAllowance(), format),
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
