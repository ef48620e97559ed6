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
          new ColumnPlan("Flask", 12),
          new ColumnPlan("Addition", 11),
          new ColumnPlan("Unit", 15),
          new ColumnPlan("x, referred to the aliquot", 12),
          new ColumnPlan("Unit of x", 11),
          new ColumnPlan("Mean signal", 12),
          new ColumnPlan("Replicates' sd", 14),
          new ColumnPlan("Readings", 11),
          new ColumnPlan("Volume factor", 11),
          new ColumnPlan("Signal used", 12),
          new ColumnPlan("Fitted", 11),
          new ColumnPlan("Residual", 11),
          new ColumnPlan("Deleted residual t", 10),
          new ColumnPlan("Used", 12),
          new ColumnPlan("Remark", 22),
          new ColumnPlan("Source file", 26),
          new ColumnPlan("Source cells", 44));

  private SeriesSheet() {}

  static SheetPlan of(Night night, SeriesIndex index) {
    List<List<CellPlan>> head =
        List.of(
            List.of(CellPlan.text("Series, flask by flask", Look.TITLE)),
            List.of(CellPlan.text(explanation(night, index), Look.FAINT)),
            SheetPlan.header(COLUMNS));
    SheetPlan.Layout layout = new SheetPlan.Layout(true, Optional.empty(), true, 0, false, false);
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
