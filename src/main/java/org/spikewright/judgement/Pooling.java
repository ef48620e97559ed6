package org.spikewright.judgement;

import java.time.Duration;
import java.time.Instant;
import java.time.ZoneOffset;
import java.util.List;
import java.util.OptionalDouble;
import org.spikewright.fit.PooledSeries;
import org.spikewright.fit.StraightLine;
import org.spikewright.reading.Recorded;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;

/** A series as its pool sees it. */
final class Pooling {
  private Pooling() {}

  static PooledSeries of(AdditionSeries series, List<Flask> flasks, StraightLine line) {
    Instant begin = series.key().labDay().atStartOfDay().toInstant(ZoneOffset.UTC);
    int n = flasks.size();
    double[] addition = new double[n];
    double[] factor = new double[n];
    int[] readings = new int[n];
    double[] variance = new double[n];
    double[] minutes = new double[n];
    for (int i = 0; i < n; i++) {
      Flask flask = flasks.get(i);
      addition[i] = flask.delivered();
      factor[i] = flask.volumeFactor();
      readings[i] = flask.numbers();
      variance[i] = flask.replicateSd() * flask.replicateSd();
      minutes[i] = minutes(flask, begin);
    }
    double sensitivity = line.slope() * series.toSensitivity();
    return new PooledSeries(
        addition,
        line.x(),
        line.y(),
        factor,
        readings,
        variance,
        minutes,
        sensitivity > 0 && Double.isFinite(sensitivity)
            ? OptionalDouble.of(sensitivity)
            : OptionalDouble.empty());
  }

  /** Mean time of a flask's readings since the day began; NaN where one has none. */
  static double minutes(Flask flask, Instant begin) {
    double sum = 0;
    int timed = 0;
    for (Recorded recorded : flask.readings()) {
      if (recorded.reading().measuredAt().isPresent()) {
        Duration since = Duration.between(begin, recorded.reading().measuredAt().get());
        sum += since.toMillis() / 60_000.0;
        timed++;
      }
    }
    return timed == flask.readings().size() && timed > 0 ? sum / timed : Double.NaN;
  }
}
