package org.spikewright.summary;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.series.ToResult;

/**
 * The stored numbers of a series over the same computed by live worksheet functions from the flask
 * rows above them, and under each pair a check cell; then the same for the interval by the pool.
 *
 * <p>The live residual standard deviation sums squared residuals instead of calling STEYX, whose
 * usual formula loses its digits on nearly exact data.
 *
 * @param quantities from the second column on
 * @param pooled likewise for the interval by the pool; none where no pool lends
 * @param poolIsReported whether that is the one reported
 * @param scale the factors from the axis to the result, which the live cells use
 * @param stored the row of the stored numbers
 */
record LiveCells(
    List<Quantity> quantities,
    List<Quantity> pooled,
    boolean poolIsReported,
    ToResult scale,
    int stored) {

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

  /** Spreadsheet programs give Student's t to fewer digits than the rest. */
  static final Size LOOSE = new Size(1000, "1000");

  static LiveCells of(SeriesResult result, List<FlaskLine> flasks, int firstFlask) {
    ToResult scale = result.series().toResult();
    int last = firstFlask + flasks.size() - 1;
    LiveFormulas at = new LiveFormulas(firstFlask, last, last + 2, !result.line().isUnweighted());
    WorksheetLine live = WorksheetLine.of(flasks);
    WorksheetLine.Spread spread =
        live.spread(live.residualSd(), result.estimate().t().orElse(Double.NaN), scale);
    List<Quantity> quantities = new ArrayList<>(onAxis(result, live, at));
    quantities.addAll(onSample(result, live, spread, at));
    quantities.addAll(statistics(result, live, spread, at));
    return new LiveCells(
        quantities,
        result.borrowed().map(pool -> PoolCells.of(result, live, at, pool)).orElse(List.of()),
        result.reportedPool().isPresent(),
        scale,
        last + 2);
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

  private static List<Quantity> onSample(
      SeriesResult result, WorksheetLine live, WorksheetLine.Spread spread, LiveFormulas at) {
    ToResult scale = result.series().toResult();
    Size size = new Size(scale.length(live.topX()), at.topOnSample());
    double error = result.standardError().orElse(0);
    String shown = Formats.significant(error > 0 ? error : result.value() / 100, 3);
    return List.of(
        new Quantity(
            "Result",
            some(result.value()),
            scale.value(live.concentration()),
            at.result(),
            size,
            shown),
        new Quantity(
            "Standard error",
            result.standardError(),
            spread.standardError(),
            at.standardError(at.own()),
            size,
            shown),
        new Quantity(
            "Lower 95 %", result.lower95(), spread.lower95(), at.end(at.own(), '-'), size, shown),
        new Quantity(
            "Upper 95 %", result.upper95(), spread.upper95(), at.end(at.own(), '+'), size, shown));
  }

  private static List<Quantity> statistics(
      SeriesResult result, WorksheetLine live, WorksheetLine.Spread spread, LiveFormulas at) {
    double t = result.estimate().t().orElse(Double.NaN);
    Size one = new Size(1, "1");
    double n = result.line().n();
    return List.of(
        new Quantity("Flasks used", some(n), live.n(), at.count(), one, Formats.WHOLE),
        quantity("t (95 %)", t, t, at.t(), LOOSE),
        quantity("g", result.estimate().g().orElse(Double.NaN), spread.g(), at.g(at.own()), one));
  }

  private static Quantity quantity(
      String title, double stored, double live, String formula, Size size) {
    return new Quantity(title, some(stored), live, formula, size, Formats.significant(stored, 6));
  }

  private static OptionalDouble some(double value) {
    return FlaskLine.finite(value);
  }

  /** How many rows. */
  int height() {
    return pooled.isEmpty() ? HEIGHT : 2 * HEIGHT;
  }

  /** How many pairs differ. */
  int differing() {
    return differing(quantities) + differing(pooled);
  }

  private static int differing(List<Quantity> pairs) {
    return (int) pairs.stream().filter(q -> q.isChecked() && !q.agrees()).count();
  }

  /** Header, stored, live, check; and once more by the pool. */
  List<List<CellPlan>> rows() {
    String own = pooled.isEmpty() ? "" : poolIsReported ? "own" : "own: reported";
    List<List<CellPlan>> rows = new ArrayList<>(block(own, "", quantities, stored));
    factors(rows.get(0), rows.get(1));
    if (!pooled.isEmpty()) {
      String pool = poolIsReported ? "pool: reported" : "pool";
      rows.addAll(block(pool, "pool: ", pooled, stored + HEIGHT));
    }
    return rows;
  }

  private static List<List<CellPlan>> block(
      String title, String prefix, List<Quantity> quantities, int stored) {
    List<CellPlan> header = new ArrayList<>();
    List<CellPlan> kept = new ArrayList<>();
    List<CellPlan> live = new ArrayList<>();
    List<CellPlan> check = new ArrayList<>();
    header.add(CellPlan.text(title, Look.FAINT));
    kept.add(CellPlan.text(prefix + "stored", Look.FAINT));
    live.add(CellPlan.text(prefix + "live", Look.FAINT));
    check.add(CellPlan.text(prefix + "check", Look.FAINT));
    char column = 'B';
    for (Quantity quantity : quantities) {
      header.add(CellPlan.text(quantity.title(), Look.FAINT_RIGHT));
      kept.add(CellPlan.number(quantity.stored(), quantity.format()));
      live.add(quantity.isChecked() ? liveCell(quantity) : CellPlan.EMPTY);
      check.add(quantity.isChecked() ? checkCell(quantity, column, stored) : CellPlan.EMPTY);
      column++;
    }
    return List.of(header, kept, live, check);
  }

  private static CellPlan liveCell(Quantity quantity) {
    return new CellPlan.Formula(
        quantity.formula(), CellPlan.number(quantity.live(), quantity.format()));
  }

  private static CellPlan checkCell(Quantity quantity, char column, int stored) {
    return new CellPlan.Formula(
        LiveFormulas.check(column, stored, quantity.size().formula()),
        CellPlan.text(quantity.agrees() ? AGREES : DIFFERS, Look.FAINT_RIGHT));
  }

  private void factors(List<CellPlan> header, List<CellPlan> kept) {
    String[] titles = {"Dilution", "Method blank", "Per sample", "Unit factor"};
    double[] values = {
      scale.dilution(), scale.methodBlank(), scale.perSample(), scale.unitFactor()
    };
    for (int i = 0; i < titles.length; i++) {
      header.add(CellPlan.text(titles[i], Look.FAINT_RIGHT));
      kept.add(CellPlan.number(values[i], Formats.GENERAL));
    }
  }
}
