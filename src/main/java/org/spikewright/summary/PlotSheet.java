package org.spikewright.summary;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.spikewright.series.SeriesKey;

/**
 * One series as a chart, chosen from a list. The chart is fed by helper cells beside it, which look
 * up the chosen series on the sheets Plot data and Series.
 */
final class PlotSheet {
  static final String NAME = "Plot";

  private static final int MOST_FLASKS = 200;

  /** Columns that are printed: the choice and the charts. */
  private static final int PRINTED = 2;

  /** Row of the cell to choose in, from 1. */
  private static final int CHOICE_ROW = 3;

  private static final List<ColumnPlan> COLUMNS =
      List.of(
          ColumnPlan.text("", 14),
          ColumnPlan.text("", 98),
          ColumnPlan.text("", 4),
          ColumnPlan.text("", 4),
          ColumnPlan.text("", 18),
          ColumnPlan.text("", 12),
          ColumnPlan.text("", 4),
          ColumnPlan.text("", 8),
          ColumnPlan.text("", 12),
          ColumnPlan.text("", 12),
          ColumnPlan.text("", 12),
          ColumnPlan.text("", 12),
          ColumnPlan.text("", 12),
          ColumnPlan.text("", 12),
          ColumnPlan.text("", 12));

  private PlotSheet() {}

  static SheetPlan of(Night night, Counts counts, SeriesIndex index) {
    SheetPlan.Layout layout =
        new SheetPlan.Layout(SheetPlan.Kind.ONE_PAGE, Optional.empty(), PRINTED);
    Optional<Chosen> chosen =
        counts.plotted().flatMap(key -> chosen(night, key, index)).filter(c -> !c.isEmpty());
    if (chosen.isEmpty()) {
      List<CellPlan> title = List.of(CellPlan.text("No series to plot", Look.TITLE));
      return new SheetPlan(NAME, COLUMNS, List.of(), List.of(title), layout);
    }
    int flasks = Math.min(MOST_FLASKS, Math.max(12, index.mostFlasks()));
    PlotCells cells = new PlotCells(chosen.get(), index, flasks);
    SheetPlan.Choice choice =
        new SheetPlan.Choice(CHOICE_ROW, 2, PlotCells.list('A', index.entries().size()));
    return new SheetPlan(NAME, COLUMNS, List.of(), cells.rows(), layout)
        .with(charts(cells), List.of(choice));
  }

  /**
   * The series that is shown until another is chosen.
   *
   * @param number its place in the list, from 1
   */
  record Chosen(int number, ResultRow row, SeriesIndex.Entry entry, List<FlaskLine> flasks) {
    boolean isEmpty() {
      return flasks.isEmpty();
    }
  }

  private static Optional<Chosen> chosen(Night night, SeriesKey key, SeriesIndex index) {
    int number = 0;
    for (ResultRow row : night.results()) {
      SeriesIndex.Entry entry = index.entries().get(row.key());
      number += entry == null ? 0 : 1;
      if (entry != null && row.key().equals(key)) {
        return Optional.of(new Chosen(number, row, entry, index.plotted()));
      }
    }
    return Optional.empty();
  }

  private static List<ChartPlan> charts(PlotCells cells) {
    List<ChartPlan.Trace> signals = new ArrayList<>();
    ChartPlan.Cells x = cells.flasks('I');
    signals.add(
        trace(
            "line, carried back to zero signal",
            ChartPlan.Stroke.LINE,
            cells.lineX(),
            cells.lineY()));
    signals.add(
        trace(
            "95 % interval, as reported",
            ChartPlan.Stroke.INTERVAL, cells.intervalX(), cells.intervalY()));
    signals.add(
        new ChartPlan.Trace(
            "flasks (bars: replicates' sd)",
            ChartPlan.Stroke.POINTS,
            x,
            cells.flasks('J'),
            List.of(cells.flasks('N'))));
    cells
        .curve()
        .ifPresent(
            curve -> signals.add(trace("the electrode's curve", ChartPlan.Stroke.LINE, x, curve)));
    signals.add(trace("odd flask", ChartPlan.Stroke.CROSSES, x, cells.flasks('L')));
    List<ChartPlan.Trace> residuals = new ArrayList<>();
    residuals.add(trace("residual", ChartPlan.Stroke.POINTS, x, cells.flasks('K')));
    residuals.add(trace("odd flask", ChartPlan.Stroke.CROSSES, x, cells.flasks('M')));
    String xTitle = "addition, referred to the aliquot (zero signal: minus the concentration)";
    return List.of(
        new ChartPlan.Scatter(
            "Signal against addition",
            new ChartPlan.Box(0, 7, 2, 36),
            xTitle,
            "signal used",
            signals),
        new ChartPlan.Scatter(
            "Residuals",
            new ChartPlan.Box(0, 37, 2, 54),
            "addition, referred to the aliquot",
            "signal minus line",
            residuals));
  }

  private static ChartPlan.Trace trace(
      String name, ChartPlan.Stroke stroke, ChartPlan.Cells x, ChartPlan.Cells y) {
    return new ChartPlan.Trace(name, stroke, x, y, List.of());
  }
}
