package org.spikewright.summary;

import java.util.List;
import java.util.Optional;
import org.spikewright.judgement.Outcome;
import org.spikewright.series.SeriesKey;

/** Every flask of a series, and its numbers computed a second time by live formulas. */
final class SeriesSheet {
  static final String NAME = "Series";

  /** Rows above the first series. */
  static final int HEAD_ROWS = 3;

  private static final List<ColumnPlan> COLUMNS =
      List.of(
          ColumnPlan.text("Flask", 14),
          ColumnPlan.number("Addition", 11),
          ColumnPlan.text("Unit", 15),
          ColumnPlan.number("x, referred to the aliquot", 12),
          ColumnPlan.text("Unit of x", 11),
          ColumnPlan.number("Mean signal", 12),
          ColumnPlan.number("Replicates' sd", 14),
          ColumnPlan.number("Readings", 11),
          ColumnPlan.number("Volume factor", 11),
          ColumnPlan.number("Signal used", 12),
          ColumnPlan.number("Fitted", 11),
          ColumnPlan.number("Residual", 11),
          ColumnPlan.number("Deleted residual t", 11),
          ColumnPlan.text("Used", 13),
          ColumnPlan.text("Remark", 32),
          ColumnPlan.number("Weight", 10),
          ColumnPlan.text("Source file", 26),
          ColumnPlan.text("Source cells", 44));

  private SeriesSheet() {}

  static SheetPlan of(Night night, SeriesIndex index) {
    List<List<CellPlan>> head =
        List.of(
            List.of(CellPlan.text("Series, flask by flask", Look.TITLE)),
            List.of(CellPlan.text(explanation(night, index), Look.FAINT)),
            SheetPlan.header(COLUMNS));
    SheetPlan.Layout layout = new SheetPlan.Layout(SheetPlan.Kind.ROWS, Optional.empty(), 0);
    return new SheetPlan(
        NAME, COLUMNS, head, Lazily.flatMap(night.outcomes(), o -> rows(o, index)), layout);
  }

  private static List<List<CellPlan>> rows(Outcome outcome, SeriesIndex index) {
    SeriesKey key = outcome.gathered().key();
    SeriesIndex.Entry entry = index.entries().get(key);
    return entry == null ? List.of() : SeriesBlock.of(outcome, entry.firstRow()).rows();
  }

  private static String explanation(Night night, SeriesIndex index) {
    String how =
        "Under the flasks: what is stored, the same by live formulas from the cells above, and"
            + " whether they agree to 9 digits.";
    int held = index.entries().size();
    return held == night.seriesCount()
        ? how
        : how
            + " This sheet holds the "
            + held
            + " series that need a person; every flask of all "
            + night.seriesCount()
            + " series stands in flasks-"
            + night.labDay()
            + "-r"
            + night.revision()
            + ".csv.";
  }
}
