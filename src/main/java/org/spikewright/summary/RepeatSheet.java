package org.spikewright.summary;

import java.util.List;
import org.spikewright.judgement.Verdict;
import org.spikewright.reading.Subject;

/** The series that cannot be reported: which, why, and what to do. */
final class RepeatSheet {
  static final String NAME = "To repeat";

  private static final List<ColumnPlan> COLUMNS =
      List.of(
          ColumnPlan.text("Sample", 20),
          ColumnPlan.text("Analyte", 12),
          ColumnPlan.text("Line", 10),
          ColumnPlan.text("Why", 62),
          ColumnPlan.text("What to do", 62),
          ColumnPlan.text("Instrument", 16),
          ColumnPlan.text("Batch", 18),
          ColumnPlan.text("Preparation", 22),
          ColumnPlan.text("Series sheet", 10));

  private RepeatSheet() {}

  static SheetPlan of(Night night, Counts counts, SeriesIndex index) {
    int count = counts.verdicts().get(Verdict.REPEAT);
    String title = count == 0 ? "Nothing to repeat" : count + " to repeat";
    List<List<CellPlan>> head =
        List.of(
            List.of(CellPlan.text(title, Look.TITLE)),
            List.of(CellPlan.text(Cautions.HANDLING, Look.FAINT)),
            SheetPlan.header(COLUMNS));
    return new SheetPlan(
        NAME,
        COLUMNS,
        head,
        Lazily.some(
            night.results(), row -> row.verdict() == Verdict.REPEAT, row -> cells(row, index)),
        SheetPlan.Layout.table("ToRepeatTable"));
  }

  private static List<CellPlan> cells(ResultRow row, SeriesIndex index) {
    Subject subject = row.key().subject();
    SeriesIndex.Entry entry = index.entries().get(row.key());
    List<String> advice = entry == null ? List.of() : entry.advice();
    return List.of(
        CellPlan.text(subject.sample().text(), Look.WRAPPED),
        CellPlan.text(subject.analyte()),
        CellPlan.text(subject.line()),
        CellPlan.text(String.join("\n", row.sentences()), Look.WRAPPED),
        CellPlan.text(String.join("\n", advice), Look.WRAPPED),
        CellPlan.text(subject.instrument()),
        CellPlan.text(row.batch()),
        CellPlan.text(row.key().preparation()),
        ResultsSheet.link(row, index));
  }
}
