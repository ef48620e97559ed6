package org.spikewright.summary;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.analysis.ControlKey;
import org.spikewright.analysis.ControlPoint;
import org.spikewright.analysis.ControlResult.Verdict;
import org.spikewright.analysis.Evidence;
import org.spikewright.fit.ControlLimits;

/**
 * Shewhart charts of controls over the stored history, and the cells that feed them.
 *
 * @param rows below the other parts of the sheet
 * @param charts over these rows
 */
record ControlCharts(List<List<CellPlan>> rows, List<ChartPlan> charts) {
  /** How many controls have a chart. */
  private static final int MOST = 8;

  /** How many points a chart shows. */
  private static final int POINTS = 40;

  /** Action limits in standard deviations. */
  private static final double ACTION = 3;

  private static final int HEIGHT = 17;
  private static final int SPLIT = 8;
  private static final int RIGHT = 17;

  /** A control with its latest points, this night's at the end. */
  private record Charted(
      ControlKey key, String unit, List<ControlPoint> points, Optional<ControlLimits> limits) {
    /** What differences are taken from: an axis about 0 shows them, however large the values. */
    double centre() {
      return limits.map(ControlLimits::centre).orElse(points.get(0).value());
    }
  }

  /**
   * The charts; those of controls that are out first.
   *
   * @param above rows of the sheet that stand above
   */
  static ControlCharts of(Evidence.Found found, int above) {
    List<Charted> all = charted(found);
    if (all.isEmpty()) {
      return new ControlCharts(List.of(), List.of());
    }
    List<Charted> shown = all.subList(0, Math.min(MOST, all.size()));
    List<List<CellPlan>> rows = new ArrayList<>();
    rows.add(List.of(CellPlan.text("Charts of controls over the lab days", Look.HEADING)));
    rows.add(List.of(CellPlan.text(sentence(all.size()), Look.FAINT)));
    int top = above + rows.size();
    int height = HEIGHT * ((shown.size() + 1) / 2);
    for (int i = 0; i < height; i++) {
      rows.add(List.of());
    }
    rows.add(List.of(CellPlan.text("Points of the charts", Look.HEADING)));
    rows.add(
        SheetPlan.header(
            List.of(
                ColumnPlan.text("Control", 1),
                ColumnPlan.text("Analyte, line", 1),
                ColumnPlan.text("Lab day", 1),
                ColumnPlan.number("No.", 1),
                ColumnPlan.number("Value", 1),
                ColumnPlan.number("Difference", 1),
                ColumnPlan.number("Lower action", 1),
                ColumnPlan.number("Upper action", 1),
                ColumnPlan.number("Known value", 1))));
    List<ChartPlan> charts = new ArrayList<>();
    for (int i = 0; i < shown.size(); i++) {
      int first = above + rows.size() + 1;
      shown.get(i).points().forEach(new Numbered(rows, shown.get(i))::add);
      int row = top + HEIGHT * (i / 2);
      ChartPlan.Box box =
          new ChartPlan.Box(
              i % 2 == 0 ? 0 : SPLIT, row, i % 2 == 0 ? SPLIT : RIGHT, row + HEIGHT - 1);
      charts.add(chart(shown.get(i), box, first));
    }
    return new ControlCharts(List.copyOf(rows), List.copyOf(charts));
  }

  private static String sentence(int all) {
    String latest =
        "Differences from the mean of the history, with its action limits: the latest "
            + POINTS
            + " points of each, this night's at the end.";
    return all > MOST
        ? latest + " Shown are " + MOST + " of " + all + " controls, those that are out first."
        : latest;
  }

  /** One chart for each control and unit with at least two points; what is out goes first. */
  private static List<Charted> charted(Evidence.Found found) {
    Map<ControlKey, List<ControlPoint>> tonight = new LinkedHashMap<>();
    found.controls().stream()
        .sorted((a, b) -> Boolean.compare(b.verdict() == Verdict.OUT, a.verdict() == Verdict.OUT))
        .forEach(
            control ->
                control
                    .point()
                    .ifPresent(
                        point ->
                            tonight
                                .computeIfAbsent(control.key(), key -> new ArrayList<>())
                                .add(point)));
    found
        .blanks()
        .forEach(
            blank ->
                tonight.computeIfAbsent(blank.key(), key -> new ArrayList<>()).add(blank.point()));
    List<Charted> charted = new ArrayList<>();
    tonight.forEach(
        (key, points) -> {
          String unit = points.get(0).unit();
          List<ControlPoint> all = new ArrayList<>(found.history().of(key, unit));
          points.stream().filter(point -> point.unit().equals(unit)).forEach(all::add);
          if (all.size() > 1) {
            charted.add(
                new Charted(
                    key,
                    unit,
                    all.subList(Math.max(0, all.size() - POINTS), all.size()),
                    found.history().limits(key, unit)));
          }
        });
    return charted;
  }

  /** Adds the points of one chart as rows. */
  private static final class Numbered {
    private final List<List<CellPlan>> rows;
    private final Charted charted;
    private int number;

    Numbered(List<List<CellPlan>> rows, Charted charted) {
      this.rows = rows;
      this.charted = charted;
    }

    void add(ControlPoint point) {
      String format =
          charted
              .limits()
              .map(limits -> Formats.significant(limits.sd(), 2))
              .orElse(Formats.significant(point.value(), 4));
      rows.add(
          List.of(
              CellPlan.text(point.key().name()),
              CellPlan.text((point.key().analyte() + " " + point.key().line()).strip()),
              new CellPlan.Day(point.labDay()),
              CellPlan.count(++number),
              CellPlan.number(point.value(), format),
              CellPlan.number(point.value() - charted.centre(), format),
              limit(charted.limits().map(limits -> -ACTION * limits.sd()), format),
              limit(charted.limits().map(limits -> ACTION * limits.sd()), format),
              CellPlan.number(known(point, charted.centre()), format)));
    }

    private static OptionalDouble known(ControlPoint point, double centre) {
      return point.reference().isPresent()
          ? OptionalDouble.of(point.reference().getAsDouble() - centre)
          : point.reference();
    }

    private static CellPlan limit(Optional<Double> value, String format) {
      return value.map(number -> CellPlan.number(number, format)).orElse(CellPlan.EMPTY);
    }
  }

  private static ChartPlan chart(Charted charted, ChartPlan.Box box, int first) {
    ControlKey key = charted.key();
    int n = charted.points().size();
    List<Double> numbers = new ArrayList<>();
    for (int i = 1; i <= n; i++) {
      numbers.add((double) i);
    }
    ChartPlan.Cells x = cells('D', first, numbers);
    List<ChartPlan.Trace> traces = new ArrayList<>();
    charted
        .limits()
        .ifPresent(
            limits -> {
              traces.add(level("lower action limit", x, 'G', first, -ACTION * limits.sd(), n));
              traces.add(level("upper action limit", x, 'H', first, ACTION * limits.sd(), n));
            });
    traces.add(
        new ChartPlan.Trace(
            "result",
            ChartPlan.Stroke.POINTS,
            x,
            cells(
                'F',
                first,
                charted.points().stream().map(point -> point.value() - charted.centre()).toList()),
            List.of()));
    OptionalDouble known = charted.points().get(n - 1).reference();
    if (known.isPresent()) {
      traces.add(
          new ChartPlan.Trace(
              "known value",
              ChartPlan.Stroke.CROSSES,
              cells('D', first + n - 1, List.of((double) n)),
              cells('I', first + n - 1, List.of(known.getAsDouble() - charted.centre())),
              List.of()));
    }
    String provisional =
        charted.limits().map(ControlLimits::provisional).orElse(true) ? " (provisional)" : "";
    String what = (key.analyte() + " " + key.line()).strip();
    return new ChartPlan.Scatter(
        key.name() + ", " + what + ", " + key.instrument() + provisional,
        box,
        "point",
        "difference from "
            + (charted.limits().isPresent() ? "the mean, " : "the first, ")
            + (charted.unit().equals("1") ? "recovery" : charted.unit()),
        traces);
  }

  private static ChartPlan.Trace level(
      String name, ChartPlan.Cells x, char column, int first, double value, int n) {
    return new ChartPlan.Trace(
        name,
        ChartPlan.Stroke.LINE,
        x,
        cells(column, first, java.util.Collections.nCopies(n, value)),
        List.of());
  }

  private static ChartPlan.Cells cells(char column, int first, List<Double> cached) {
    int last = first + cached.size() - 1;
    return new ChartPlan.Cells(
        "'" + ControlsSheet.NAME + "'!$" + column + "$" + first + ":$" + column + "$" + last,
        cached);
  }
}
