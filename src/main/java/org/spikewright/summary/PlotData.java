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
          ColumnPlan.text("Choice", 40),
          ColumnPlan.number("Row of its first flask on Series", 12),
          ColumnPlan.number("Flasks", 9),
          ColumnPlan.number("Slope", 12),
          ColumnPlan.number("Signal intercept", 12),
          ColumnPlan.number("On the axis", 12),
          ColumnPlan.number("Lower 95 % on the axis", 12),
          ColumnPlan.number("Upper 95 % on the axis", 12),
          ColumnPlan.number("Largest addition", 12),
          ColumnPlan.text("To report", 20),
          ColumnPlan.text("Unit of the axis", 12),
          ColumnPlan.text("Why", 60));

  private PlotData() {}

  static SheetPlan of(Night night, SeriesIndex index) {
    SheetPlan.Layout layout =
        new SheetPlan.Layout(SheetPlan.Kind.HIDDEN_ROWS, Optional.of("PlotDataTable"), 0);
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
