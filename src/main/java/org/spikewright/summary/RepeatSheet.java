package org.spikewright.summary;

import java.util.List;
import java.util.Optional;
import org.spikewright.judgement.RepeatAdvice;
import org.spikewright.judgement.Verdict;
import org.spikewright.reading.Subject;

/**
 * What to prepare: each series that cannot be reported, and series for review that a new
 * preparation would settle, each with its plan.
 */
final class RepeatSheet {
  static final String NAME = "To repeat";

  private static final String PERCENT = "0.0%";

  private static final List<ColumnPlan> COLUMNS =
      List.of(
          ColumnPlan.text("Verdict", 8),
          ColumnPlan.text("Sample", 16),
          ColumnPlan.text("Analyte", 8),
          ColumnPlan.text("Line", 8),
          ColumnPlan.text("Why", 38),
          ColumnPlan.text("What to prepare", 52),
          ColumnPlan.text("Add to each flask", 22),
          ColumnPlan.text("Measure in this order", 14),
          ColumnPlan.number("U of the fit now", 9),
          ColumnPlan.number("U of the fit expected", 10),
          ColumnPlan.text("Instrument", 16),
          ColumnPlan.text("Batch", 18),
          ColumnPlan.text("Preparation", 22),
          ColumnPlan.text("Series sheet", 10));

  /** The columns that a bench needs; the others say where the series came from. */
  private static final int PRINTED = 10;

  private RepeatSheet() {}

  static SheetPlan of(Night night, Counts counts, SeriesIndex index) {
    List<List<CellPlan>> head =
        List.of(
            List.of(CellPlan.text(title(counts, index), Look.TITLE)),
            List.of(CellPlan.text(Cautions.VOLUMES, Look.STRONG)),
            List.of(CellPlan.text(Cautions.HANDLING, Look.FAINT)),
            SheetPlan.header(COLUMNS));
    return new SheetPlan(
        NAME,
        COLUMNS,
        head,
        Lazily.some(night.results(), row -> isListed(row, index), row -> cells(row, index)),
        new SheetPlan.Layout(SheetPlan.Kind.ROWS, Optional.of("ToRepeatTable"), PRINTED));
  }

  private static String title(Counts counts, SeriesIndex index) {
    int repeat = counts.verdicts().get(Verdict.REPEAT);
    int review = index.forReview();
    String first = repeat == 0 ? "Nothing to repeat" : repeat + " to repeat";
    return review == 0 ? first : first + "; " + review + " for review, with what would settle it";
  }

  private static boolean isListed(ResultRow row, SeriesIndex index) {
    if (row.verdict() == Verdict.REPEAT) {
      return true;
    }
    SeriesIndex.Entry entry = index.entries().get(row.key());
    return row.verdict() == Verdict.REVIEW
        && entry != null
        && entry.repeat().filter(advice -> !(advice instanceof RepeatAdvice.Nothing)).isPresent();
  }

  private static List<CellPlan> cells(ResultRow row, SeriesIndex index) {
    Subject subject = row.key().subject();
    RepeatWords words = RepeatWords.of(Optional.ofNullable(index.entries().get(row.key())));
    return List.of(
        CellPlan.text(row.verdict().word(), Words.look(row.verdict())),
        CellPlan.text(subject.sample().text(), Look.WRAPPED),
        CellPlan.text(subject.analyte()),
        CellPlan.text(subject.line()),
        CellPlan.text(String.join("\n", row.sentences()), Look.WRAPPED),
        CellPlan.text(String.join("\n", words.prepare()), Look.WRAPPED),
        CellPlan.text(String.join("\n", words.flasks()), Look.WRAPPED),
        CellPlan.text(words.order(), Look.WRAPPED),
        CellPlan.number(words.before(), PERCENT),
        CellPlan.number(words.after(), PERCENT),
        CellPlan.text(subject.instrument()),
        CellPlan.text(row.batch()),
        CellPlan.text(row.key().preparation()),
        ResultsSheet.link(row, index));
  }
}
