package org.spikewright.summary;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.judgement.Verdict;

/**
 * The cells of the Plot sheet: the choice (B3), facts of the chosen series (B4 to B6), single
 * numbers (E, F), and one row a flask (H to O): number, x, signal, residual, odd signal, odd
 * residual, replicates' sd, and where a night has electrodes the signal of their curve. Below the
 * numbers in E, F stand the two ends of the line and of the interval. A formula without a result
 * gives {@code #N/A}, which charts leave out.
 */
final class PlotCells {
  private static final int FIRST = 4;

  private final PlotSheet.Chosen chosen;
  private final SeriesIndex index;
  private final int flasks;
  private final int series;

  PlotCells(PlotSheet.Chosen chosen, SeriesIndex index, int flasks) {
    this.chosen = chosen;
    this.index = index;
    this.flasks = flasks;
    this.series = index.entries().size();
  }

  /** A column of the list of series. */
  static String list(char column, int series) {
    return "'" + PlotData.NAME + "'!$" + column + "$2:$" + column + "$" + (series + 1);
  }

  List<List<CellPlan>> rows() {
    List<List<CellPlan>> rows = new ArrayList<>();
    for (int row = 1; row <= Math.max(FIRST + flasks, 54); row++) {
      List<CellPlan> cells = new ArrayList<>(left(row));
      pad(cells, 4);
      cells.addAll(numbers(row));
      pad(cells, 7);
      cells.addAll(flask(row));
      rows.add(cells);
    }
    return rows;
  }

  private static void pad(List<CellPlan> cells, int size) {
    while (cells.size() < size) {
      cells.add(CellPlan.EMPTY);
    }
  }

  private List<CellPlan> left(int row) {
    ResultRow result = chosen.row();
    Verdict verdict = result.verdict();
    return switch (row) {
      case 1 -> List.of(CellPlan.text("Plot of one series", Look.TITLE));
      case 2 ->
          List.of(
              CellPlan.text(
                  "Choose a series in the framed cell; the list is in the order of Results.",
                  Look.FAINT));
      case 3 ->
          List.of(
              CellPlan.text("Series", Look.STRONG),
              CellPlan.text(PlotData.label(chosen.number(), result), Look.CHOICE));
      case 4 -> List.of(CellPlan.text("To report"), words('J', result.reported(), Look.PLAIN));
      case 5 ->
          List.of(CellPlan.text("Unit of x"), words('K', chosen.entry().axisUnit(), Look.PLAIN));
      case 6 ->
          List.of(
              CellPlan.text("Flags"),
              words('L', String.join(" ", result.sentences()), Look.WRAPPED));
      default -> List.of();
    };
  }

  /** A text of the chosen series. */
  private CellPlan words(char column, String cached, Look look) {
    return new CellPlan.Formula(lookUp(column) + "&\"\"", new CellPlan.Text(cached, look));
  }

  private List<CellPlan> numbers(int row) {
    SeriesIndex.Entry entry = chosen.entry();
    return switch (row) {
      case 1 -> List.of(CellPlan.text("Helper cells: leave as they are", Look.FAINT));
      case 2 ->
          List.of(
              label("number"),
              formula("VALUE(LEFT($B$3,FIND(\" \",$B$3&\" \")-1))", some(chosen.number())));
      case 3 -> List.of(label("first row"), formula(lookUp('B'), some(entry.firstFlask())));
      case 4 -> List.of(label("flasks"), formula(lookUp('C'), some(entry.flasks())));
      case 5 -> List.of(label("slope"), number('D', entry.slope()));
      case 6 -> List.of(label("signal intercept"), number('E', entry.signalIntercept()));
      case 7 -> List.of(label("on the axis"), number('F', entry.concentration()));
      case 8 -> List.of(label("lower 95 %"), number('G', entry.lower95()));
      case 9 -> List.of(label("upper 95 %"), number('H', entry.upper95()));
      case 10 -> List.of(label("largest addition"), number('I', entry.topX()));
      case 12 -> List.of(label("line: x"), label("signal"));
      case 13 ->
          List.of(
              formula("IF(ISNUMBER(F7),-F7,F10)", at(lineX(), 0)), formula("0*F7", at(lineY(), 0)));
      case 14 -> List.of(formula("F10", at(lineX(), 1)), formula("F6+F5*F10", at(lineY(), 1)));
      case 16 -> List.of(label("interval: x"), label("signal"));
      case 17 ->
          List.of(
              formula("IF(ISNUMBER(F9),-F9,E13)", at(intervalX(), 0)),
              formula("0*F9", at(intervalY(), 0)));
      case 18 ->
          List.of(
              formula("IF(ISNUMBER(F8),-F8,E13)", at(intervalX(), 1)),
              formula("0*F8", at(intervalY(), 1)));
      default -> List.of();
    };
  }

  private List<CellPlan> flask(int row) {
    if (row == FIRST - 1) {
      return List.of(
          label("flask"),
          label("x"),
          label("signal"),
          label("residual"),
          label("odd signal"),
          label("odd residual"),
          label("spread"),
          label(hasCurves() ? "curve" : ""));
    }
    int i = row - FIRST;
    if (i < 0 || i >= flasks) {
      return List.of();
    }
    return List.of(
        CellPlan.count(i + 1),
        ofFlask(row, 'D', 'I', i),
        ofFlask(row, 'J', 'J', i),
        ofFlask(row, 'L', 'K', i),
        odd(row, 'J', 'L', i),
        odd(row, 'K', 'M', i),
        spread(row, i),
        hasCurves() ? curve(row, i) : CellPlan.EMPTY);
  }

  private boolean hasCurves() {
    return index.curves() > 0;
  }

  /** What was fitted, where that is no line. */
  private CellPlan curve(int row, int i) {
    String cell = cell('K', row);
    String found = "IF(ISNUMBER(" + cell + ")," + cell + ",NA())";
    return formula(
        "IF(AND($H" + row + "<=$F$4,ISNA($F$5))," + found + ",NA())", at(flasks('O'), i));
  }

  /** The electrode's curve; empty on a night without one. */
  Optional<ChartPlan.Cells> curve() {
    return hasCurves() ? Optional.of(flasks('O')) : Optional.empty();
  }

  /** A number of a flask, from its row on the Series sheet. */
  private CellPlan ofFlask(int row, char source, char target, int i) {
    String cell = cell(source, row);
    String found = "IF(ISNUMBER(" + cell + ")," + cell + ",NA())";
    return formula("IF($H" + row + "<=$F$4," + found + ",NA())", at(flasks(target), i));
  }

  private CellPlan odd(int row, char source, char target, int i) {
    String mark = "IF(" + cell('O', row) + "=\"" + FlaskLine.ODD + "\"," + source + row + ",NA())";
    return formula("IF($H" + row + "<=$F$4," + mark + ",NA())", at(flasks(target), i));
  }

  private CellPlan spread(int row, int i) {
    String cell = cell('G', row);
    String found = "IF(ISNUMBER(" + cell + ")," + cell + ",0)";
    return formula("IF($H" + row + "<=$F$4," + found + ",0)", at(flasks('N'), i));
  }

  private String cell(char column, int row) {
    String range =
        "'" + SeriesSheet.NAME + "'!$" + column + "$1:$" + column + "$" + index.lastRow();
    return "INDEX(" + range + ",$F$3+$H" + row + "-1)";
  }

  private String lookUp(char column) {
    return "INDEX(" + list(column, series) + ",$F$2)";
  }

  private CellPlan number(char column, OptionalDouble cached) {
    String found = lookUp(column);
    return formula("IF(ISNUMBER(" + found + ")," + found + ",NA())", cached);
  }

  private static CellPlan formula(String formula, OptionalDouble cached) {
    return new CellPlan.Formula(
        formula,
        cached.isPresent() ? CellPlan.number(cached, Formats.GENERAL) : CellPlan.NOT_AVAILABLE);
  }

  private static CellPlan label(String text) {
    return CellPlan.text(text, Look.FAINT);
  }

  /** A column of the flasks' helper cells, with what it holds for the series shown first. */
  ChartPlan.Cells flasks(char column) {
    List<Double> cached = new ArrayList<>();
    for (int i = 0; i < flasks; i++) {
      cached.add(
          i < chosen.flasks().size() ? shown(column, chosen.flasks().get(i)) : beyond(column));
    }
    return new ChartPlan.Cells(range(column, FIRST, FIRST + flasks - 1), cached);
  }

  private double shown(char column, FlaskLine line) {
    if (column == 'O') {
      boolean hasLine = chosen.entry().slope().isPresent();
      return hasLine ? Double.NaN : line.fitted().orElse(Double.NaN);
    }
    return value(column, line);
  }

  private static double beyond(char column) {
    return column == 'N' ? 0 : Double.NaN;
  }

  private static double value(char column, FlaskLine line) {
    boolean odd = line.remark().equals(FlaskLine.ODD);
    double spread = line.flask().replicateSd();
    return switch (column) {
      case 'I' -> line.x().orElse(Double.NaN);
      case 'J' -> line.signal().orElse(Double.NaN);
      case 'K' -> line.residual().orElse(Double.NaN);
      case 'L' -> odd ? line.signal().orElse(Double.NaN) : Double.NaN;
      case 'M' -> odd ? line.residual().orElse(Double.NaN) : Double.NaN;
      default -> Double.isFinite(spread) ? spread : 0;
    };
  }

  /** Where there is no such number, x stays on the chart: programs put a missing x at 1, 2, … */
  ChartPlan.Cells lineX() {
    return pair('E', 13, FlaskLine.finite(zero()), chosen.entry().topX());
  }

  private double zero() {
    SeriesIndex.Entry entry = chosen.entry();
    return entry.concentration().isPresent()
        ? -entry.concentration().getAsDouble()
        : entry.topX().orElse(Double.NaN);
  }

  ChartPlan.Cells lineY() {
    SeriesIndex.Entry entry = chosen.entry();
    double top =
        entry.signalIntercept().orElse(Double.NaN)
            + entry.slope().orElse(Double.NaN) * entry.topX().orElse(Double.NaN);
    return pair('F', 13, zeroWhere(entry.concentration()), FlaskLine.finite(top));
  }

  ChartPlan.Cells intervalX() {
    SeriesIndex.Entry entry = chosen.entry();
    double first = entry.upper95().isPresent() ? -entry.upper95().getAsDouble() : zero();
    double second = entry.lower95().isPresent() ? -entry.lower95().getAsDouble() : zero();
    return pair('E', 17, FlaskLine.finite(first), FlaskLine.finite(second));
  }

  ChartPlan.Cells intervalY() {
    SeriesIndex.Entry entry = chosen.entry();
    return pair('F', 17, zeroWhere(entry.upper95()), zeroWhere(entry.lower95()));
  }

  private static ChartPlan.Cells pair(
      char column, int row, OptionalDouble first, OptionalDouble second) {
    return new ChartPlan.Cells(
        range(column, row, row + 1), List.of(first.orElse(Double.NaN), second.orElse(Double.NaN)));
  }

  private static OptionalDouble zeroWhere(OptionalDouble value) {
    return value.isPresent() ? OptionalDouble.of(0) : value;
  }

  private static OptionalDouble at(ChartPlan.Cells cells, int i) {
    return FlaskLine.finite(cells.cached().get(i));
  }

  private static OptionalDouble some(double value) {
    return OptionalDouble.of(value);
  }

  private static String range(char column, int first, int last) {
    return "'" + PlotSheet.NAME + "'!$" + column + "$" + first + ":$" + column + "$" + last;
  }
}
