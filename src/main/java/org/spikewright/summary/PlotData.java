package org.spikewright.summary;

import java.util.Iterator;
import java.util.List;
import java.util.Optional;
import java.util.function.Function;
import org.spikewright.reading.Subject;

/**
 * The hidden sheet behind the Plot sheet: one row for each series of the Series sheet, worst first,
 * with the label to choose it by and the numbers its chart needs.
 */
final class PlotData {
  static final String NAME = "Plot data";

  private static final int LONGEST_LABEL = 200;

  private static final List<ColumnPlan> COLUMNS =
      List.of(
          new ColumnPlan("Choice", 40),
          new ColumnPlan("Row of its first flask on Series", 12),
          new ColumnPlan("Flasks", 9),
          new ColumnPlan("Slope", 12),
          new ColumnPlan("Signal intercept", 12),
          new ColumnPlan("On the axis", 12),
          new ColumnPlan("Lower 95 % on the axis", 12),
          new ColumnPlan("Upper 95 % on the axis", 12),
          new ColumnPlan("Largest addition", 12),
          new ColumnPlan("To report", 20),
          new ColumnPlan("Unit of the axis", 12),
          new ColumnPlan("Why", 60));

  private PlotData() {}

  static SheetPlan of(Night night, SeriesIndex index) {
    SheetPlan.Layout layout =
        new SheetPlan.Layout(true, Optional.of("PlotDataTable"), true, 0, true, false);
    return SheetPlan.table(NAME, COLUMNS, rows(night, index), layout);
  }

  /** The label by which a series is chosen; it begins with its place in the list. */
  static String label(int number, ResultRow row) {
    Subject subject = row.key().subject();
    String line = subject.line().isEmpty() ? "" : " " + subject.line();
    String whose = subject.sample().text() + " · " + subject.analyte() + line;
    String label =
        number + " · " + whose + " · " + subject.instrument() + " · " + row.verdict().word();
    return label.length() <= LONGEST_LABEL ? label : label.substring(0, LONGEST_LABEL) + "…";
  }

  /** The numbering begins anew with each walk. */
  private static Iterable<List<CellPlan>> rows(Night night, SeriesIndex index) {
    return () -> {
      Function<ResultRow, List<CellPlan>> numbered = new Numbered(index);
      Iterator<List<CellPlan>> rows =
          Lazily.some(night.results(), row -> index.entries().containsKey(row.key()), numbered)
              .iterator();
      return rows;
    };
  }

  private static final class Numbered implements Function<ResultRow, List<CellPlan>> {
    private final SeriesIndex index;
    private int number;

    Numbered(SeriesIndex index) {
      this.index = index;
    }

    @Override
    public List<CellPlan> apply(ResultRow row) {
      SeriesIndex.Entry entry = index.entries().get(row.key());
      number++;
      return List.of(
          CellPlan.text(label(number, row)),
          CellPlan.count(entry.firstFlask()),
          CellPlan.count(entry.flasks()),
          CellPlan.number(entry.slope(), Formats.GENERAL),
          CellPlan.number(entry.signalIntercept(), Formats.GENERAL),
          CellPlan.number(entry.concentration(), Formats.GENERAL),
          CellPlan.number(entry.lower95(), Formats.GENERAL),
          CellPlan.number(entry.upper95(), Formats.GENERAL),
          CellPlan.number(entry.topX(), Formats.GENERAL),
          CellPlan.text(row.reported()),
          CellPlan.text(entry.axisUnit()),
          CellPlan.text(String.join(" ", row.sentences())));
    }
  }
}
