package org.spikewright.summary;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.series.ToResult;

/**
 * The stored numbers of a series over the same computed by live worksheet functions from the flask
 * rows above them, and over each pair a check cell.
 *
 * <p>The live residual standard deviation sums squared residuals instead of calling STEYX, whose
 * usual formula loses its digits on nearly exact data.
 *
 * @param quantities from the second column on
 * @param scale the factors from the axis to the result, which the live cells use
 * @param formulas of this series
 */
record LiveCells(List<Quantity> quantities, ToResult scale, LiveFormulas formulas) {

  /** Header, stored, live, check. */
  static final int HEIGHT = 4;

  static final String AGREES = "agrees";
  static final String DIFFERS = "DIFFERS";

  private static final double TOLERANCE = 1e-9;

  /**
   * One stored number and its live counterpart.
   *
   * @param title what it is
   * @param stored as the night found it; empty where there is none
   * @param live as the worksheet computes it; NaN where it cannot
   * @param formula how the worksheet computes it
   * @param size what differences are held against where the number itself is near zero
   * @param format how it is shown
   */
  record Quantity(
      String title, OptionalDouble stored, double live, String formula, Size size, String format) {

    boolean isChecked() {
      return stored.isPresent() && Double.isFinite(stored.getAsDouble()) && Double.isFinite(live);
    }

    boolean agrees() {
      double allowed = TOLERANCE * Math.max(Math.abs(stored.getAsDouble()), size.value());
      return Math.abs(live - stored.getAsDouble()) <= allowed;
    }
  }

  /** A number and the formula that gives it. */
  record Size(double value, String formula) {}

  static LiveCells of(SeriesResult result, List<FlaskLine> flasks, int firstFlask) {
    ToResult scale = result.series().toResult();
    int last = firstFlask + flasks.size() - 1;
    LiveFormulas at = new LiveFormulas(firstFlask, last, last + 2);
    WorksheetLine live = WorksheetLine.of(flasks, scale, result.estimate().t());
    List<Quantity> quantities = new ArrayList<>(onAxis(result, live, at));
    quantities.addAll(onSample(result, live, at));
    quantities.addAll(statistics(result, live, at));
    return new LiveCells(quantities, scale, at);
  }

  private static List<Quantity> onAxis(SeriesResult result, WorksheetLine live, LiveFormulas at) {
    Size steep = new Size(live.topSignal() / live.topX(), at.topSignal() + "/" + at.topX());
    Size signal = new Size(live.topSignal(), at.topSignal());
    Size scatter = new Size(live.topSignal() / 1000, at.topSignal() + "/1000");
    Size addition = new Size(live.topX(), at.topX());
    return List.of(
        quantity("Slope", result.line().slope(), live.slope(), at.slope(), steep),
        quantity(
            "Signal intercept",
            result.line().signalIntercept(),
            live.signalIntercept(),
            at.intercept(),
            signal),
        quantity(
            "Residual sd",
            result.line().residualSd().orElse(Double.NaN),
            live.residualSd(),
            at.residualSd(),
            scatter),
        quantity(
            "On the axis", result.estimate().value(), live.concentration(), at.onAxis(), addition));
  }

  private static List<Quantity> onSample(SeriesResult result, WorksheetLine live, LiveFormulas at) {
    ToResult scale = result.series().toResult();
    Size size = new Size(scale.length(live.topX()), at.topOnSample());
    double error = result.standardError().orElse(0);
    String shown = Formats.significant(error > 0 ? error : result.value() / 100, 3);
    return List.of(
        new Quantity("Result", some(result.value()), live.result(), at.result(), size, shown),
        new Quantity(
            "Standard error",
            result.standardError(),
            live.standardError(),
            at.standardError(),
            size,
            shown),
        new Quantity("Lower 95 %", result.lower95(), live.lower95(), at.end('-'), size, shown),
        new Quantity("Upper 95 %", result.upper95(), live.upper95(), at.end('+'), size, shown));
  }

  private static List<Quantity> statistics(
      SeriesResult result, WorksheetLine live, LiveFormulas at) {
    double t = result.estimate().t().orElse(Double.NaN);
    Size one = new Size(1, "1");
    // Spreadsheet programs give Student's t to fewer digits than the rest.
    Size loose = new Size(1000, "1000");
    double n = result.line().n();
    return List.of(
        new Quantity("Flasks used", some(n), live.n(), at.count(), one, Formats.WHOLE),
        quantity("t (95 %)", t, t, at.t(), loose),
        quantity("g", result.estimate().g().orElse(Double.NaN), live.g(), at.g(), one));
  }

  private static Quantity quantity(
      String title, double stored, double live, String formula, Size size) {
    return new Quantity(title, some(stored), live, formula, size, Formats.significant(stored, 6));
  }

  private static OptionalDouble some(double value) {
    return FlaskLine.finite(value);
  }

  /** How many pairs differ. */
  int differing() {
    return (int) quantities.stream().filter(q -> q.isChecked() && !q.agrees()).count();
  }

  /** Header, stored, live, check. */
  List<List<CellPlan>> rows() {
    List<CellPlan> header = new ArrayList<>();
    List<CellPlan> stored = new ArrayList<>();
    List<CellPlan> live = new ArrayList<>();
    List<CellPlan> check = new ArrayList<>();
    header.add(CellPlan.EMPTY);
    stored.add(CellPlan.text("stored", Look.FAINT));
    live.add(CellPlan.text("live", Look.FAINT));
    check.add(CellPlan.text("check", Look.FAINT));
    char column = 'B';
    for (Quantity quantity : quantities) {
      header.add(CellPlan.text(quantity.title(), Look.FAINT_RIGHT));
      stored.add(CellPlan.number(quantity.stored(), quantity.format()));
      live.add(quantity.isChecked() ? liveCell(quantity) : CellPlan.EMPTY);
      check.add(quantity.isChecked() ? checkCell(quantity, column) : CellPlan.EMPTY);
      column++;
    }
    factors(header, stored);
    return List.of(header, stored, live, check);
  }

  private static CellPlan liveCell(Quantity quantity) {
    return new CellPlan.Formula(
        quantity.formula(), CellPlan.number(quantity.live(), quantity.format()));
  }

  private CellPlan checkCell(Quantity quantity, char column) {
    return new CellPlan.Formula(
        formulas.check(column, quantity.size().formula()),
        CellPlan.text(quantity.agrees() ? AGREES : DIFFERS, Look.FAINT_RIGHT));
  }

  private void factors(List<CellPlan> header, List<CellPlan> stored) {
    String[] titles = {"Dilution", "Method blank", "Per sample", "Unit factor"};
    double[] values = {
      scale.dilution(), scale.methodBlank(), scale.perSample(), scale.unitFactor()
    };
    for (int i = 0; i < titles.length; i++) {
      header.add(CellPlan.text(titles[i], Look.FAINT_RIGHT));
      stored.add(CellPlan.number(values[i], Formats.GENERAL));
    }
  }
}
