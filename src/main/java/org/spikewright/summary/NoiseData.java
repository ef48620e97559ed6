package org.spikewright.summary;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.analysis.PoolKey;
import org.spikewright.fit.NoiseFunction;
import org.spikewright.fit.PoolEvidence;

/**
 * The hidden sheet behind the chart of the Noise sheet: the flasks of the largest pool, and its
 * noise function by live formulas from the cells of the Noise sheet.
 */
final class NoiseData {
  static final String NAME = "Noise data";

  private static final int STEPS = 20;

  private static final List<ColumnPlan> COLUMNS =
      List.of(
          ColumnPlan.number("Signal of a flask", 14),
          ColumnPlan.number("Its distance from the line", 14),
          ColumnPlan.number("Signal", 14),
          ColumnPlan.number("Noise function there", 14));

  private NoiseData() {}

  /** The pool with most series tonight of those that have a noise function and flasks. */
  static Optional<PoolKey> largest(Night night, SeriesIndex index) {
    PoolKey largest = null;
    int most = 0;
    for (Map.Entry<PoolKey, PoolEvidence> pool : night.evidence().pools().entrySet()) {
      boolean shown =
          pool.getValue().flaskNoise().isPresent() && !points(index, pool.getKey()).isEmpty();
      if (shown && pool.getValue().tonight() > most) {
        largest = pool.getKey();
        most = pool.getValue().tonight();
      }
    }
    return Optional.ofNullable(largest);
  }

  static SheetPlan of(Night night, SeriesIndex index) {
    SheetPlan.Layout layout =
        new SheetPlan.Layout(SheetPlan.Kind.HIDDEN_ROWS, Optional.of("NoiseDataTable"), 0);
    List<List<CellPlan>> rows =
        largest(night, index).map(pool -> rows(night, index, pool)).orElse(List.of());
    return SheetPlan.table(NAME, COLUMNS, rows, layout);
  }

  private static List<List<CellPlan>> rows(Night night, SeriesIndex index, PoolKey pool) {
    List<PoolFlasks.Point> points = points(index, pool);
    List<Double> signals = curveSignals(points);
    NoiseFunction noise = night.evidence().pools().get(pool).flaskNoise().orElseThrow();
    int stands = NoiseSheet.rowOf(night, pool);
    String constant = "'" + NoiseSheet.NAME + "'!$D$" + stands;
    String proportional = "'" + NoiseSheet.NAME + "'!$E$" + stands;
    List<List<CellPlan>> rows = new ArrayList<>();
    for (int i = 0; i < Math.max(points.size(), signals.size()); i++) {
      List<CellPlan> cells = new ArrayList<>();
      boolean isPoint = i < points.size();
      cells.add(number(isPoint, isPoint ? points.get(i).signal() : 0));
      cells.add(number(isPoint, isPoint ? points.get(i).scatter() : 0));
      if (i < signals.size()) {
        cells.add(CellPlan.number(signals.get(i), Formats.GENERAL));
        cells.add(
            new CellPlan.Formula(
                "SQRT(" + constant + "^2+(" + proportional + "*C" + (i + 2) + ")^2)",
                CellPlan.number(noise.sd(signals.get(i)), Formats.GENERAL)));
      }
      rows.add(cells);
    }
    return rows;
  }

  private static CellPlan number(boolean there, double value) {
    return there ? CellPlan.number(value, Formats.GENERAL) : CellPlan.EMPTY;
  }

  private static List<PoolFlasks.Point> points(SeriesIndex index, PoolKey pool) {
    return index.pools().of(pool).stream()
        .filter(point -> Double.isFinite(point.scatter()) && point.signal() > 0)
        .toList();
  }

  private static List<Double> curveSignals(List<PoolFlasks.Point> points) {
    double top = points.stream().mapToDouble(PoolFlasks.Point::signal).max().orElse(0);
    List<Double> signals = new ArrayList<>();
    for (int i = 0; i <= STEPS; i++) {
      signals.add(top * i / STEPS);
    }
    return signals;
  }

  /** The chart of a pool. */
  static ChartPlan chart(Night night, SeriesIndex index, PoolKey pool, ChartPlan.Box box) {
    List<PoolFlasks.Point> points = points(index, pool);
    List<Double> signals = curveSignals(points);
    NoiseFunction noise = night.evidence().pools().get(pool).flaskNoise().orElseThrow();
    return new ChartPlan.Scatter(
        "Noise of flasks against signal: " + pool.shown(),
        box,
        "signal as read",
        "distance from the line, without sign",
        List.of(
            new ChartPlan.Trace(
                "noise function: about two thirds of the flasks lie below it",
                ChartPlan.Stroke.LINE,
                cells('C', signals),
                cells('D', signals.stream().map(noise::sd).toList()),
                List.of()),
            new ChartPlan.Trace(
                "flasks on the Series sheet, at most " + PoolFlasks.MOST,
                ChartPlan.Stroke.POINTS,
                cells('A', points.stream().map(PoolFlasks.Point::signal).toList()),
                cells('B', points.stream().map(PoolFlasks.Point::scatter).toList()),
                List.of())));
  }

  private static ChartPlan.Cells cells(char column, List<Double> cached) {
    return new ChartPlan.Cells(
        "'" + NAME + "'!$" + column + "$2:$" + column + "$" + (cached.size() + 1), cached);
  }
}
