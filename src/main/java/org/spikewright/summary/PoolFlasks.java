package org.spikewright.summary;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.OptionalDouble;
import java.util.function.ToDoubleFunction;
import org.spikewright.analysis.PoolKey;
import org.spikewright.fit.StraightLine;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.quantity.Numbers;
import org.spikewright.quantity.Quantity;
import org.spikewright.series.Flask;

/**
 * Some flasks of each pool, gathered in the walk over the outcomes: how large its signals are and
 * how far they lie from their lines.
 */
final class PoolFlasks {
  /** So many flasks of a pool show its noise. */
  static final int MOST = 400;

  /** A flask that its line follows this closely says nothing of the noise. */
  private static final double LEAST_FREEDOM = 0.02;

  private final Map<PoolKey, List<Point>> points = new HashMap<>();

  /**
   * One flask.
   *
   * @param signal of its line, as read
   * @param scatter distance of its signal from the line, as read, over √(1 − leverage): what its
   *     standard deviation is estimated by; NaN where the line follows the flask
   * @param readings how many its mean is of
   * @param addition the amount delivered, in base units
   * @param shown the same as the bench sheet has it
   */
  record Point(double signal, double scatter, int readings, double addition, String shown) {}

  /** Takes a series. */
  void add(SeriesResult result) {
    List<Point> pool =
        points.computeIfAbsent(PoolKey.of(result.series()), key -> new ArrayList<>());
    StraightLine line = result.line();
    for (int i = 0; i < line.n() && pool.size() < MOST; i++) {
      Flask flask = result.flasks().get(i);
      Quantity amount = flask.facts().addition().amount();
      double factor = result.pooled().factor()[i];
      double free = 1 - line.leverage(i);
      pool.add(
          new Point(
              line.at(line.x()[i]) / factor,
              free > LEAST_FREEDOM
                  ? Math.abs(line.residual(i)) / Math.sqrt(free) / factor
                  : Double.NaN,
              result.pooled().readings()[i],
              result.pooled().addition()[i],
              Numbers.plain(amount.value()) + " " + amount.unit().symbol()));
    }
  }

  /** The flasks of a pool, at most {@link #MOST}. */
  List<Point> of(PoolKey pool) {
    return points.getOrDefault(pool, List.of());
  }

  /** The median signal of a pool as read; empty where none is above 0. */
  OptionalDouble signal(PoolKey pool) {
    OptionalDouble signal = median(pool, Point::signal);
    return signal.orElse(0) > 0 ? signal : OptionalDouble.empty();
  }

  /** How many readings the usual flask of a pool has; 1 where nothing is known. */
  double readings(PoolKey pool) {
    return Math.max(1, median(pool, Point::readings).orElse(1));
  }

  /** A level of addition as the bench sheet has it; empty where no flask of the pool has it. */
  String shown(PoolKey pool, double addition) {
    return of(pool).stream()
        .filter(
            point ->
                Math.abs(point.addition() - addition)
                    <= 1e-6 * Math.max(Math.abs(point.addition()), Math.abs(addition)))
        .map(Point::shown)
        .findFirst()
        .orElse("");
  }

  private OptionalDouble median(PoolKey pool, ToDoubleFunction<Point> part) {
    double[] sorted = of(pool).stream().mapToDouble(part).toArray();
    Arrays.sort(sorted);
    return sorted.length == 0
        ? OptionalDouble.empty()
        : FlaskLine.finite(sorted[sorted.length / 2]);
  }
}
