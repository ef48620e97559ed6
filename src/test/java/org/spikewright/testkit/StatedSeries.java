package org.spikewright.testkit;

import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.Random;
import org.spikewright.fit.PooledSeries;
import org.spikewright.quantity.Numbers;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Batch;
import org.spikewright.reading.Blanks;
import org.spikewright.reading.Design;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.MethodFacts;
import org.spikewright.reading.Preparation;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Role;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Subject;
import org.spikewright.series.AdditionSeries;
import org.spikewright.table.Position;
import org.spikewright.table.Source;

/**
 * A simulated series with stated additions in µg/L, one reading a flask, as readings gathered by
 * the program and as rows of an export for {@link Laboratory#BENCH}.
 *
 * @param number the place of the series in its night, from 0; the sample is named after it
 * @param additions in µg/L of the sample
 * @param signals as shown by the instrument
 * @param order the flasks in the order they were measured in
 */
public record StatedSeries(
    int number, double[] additions, List<String> signals, List<Integer> order) {
  /** One flask a minute, the series one after the other. */
  private static final Duration PER_FLASK = Duration.ofMinutes(1);

  private static final Instant BEGIN = Instant.parse("2026-03-04T09:00:00Z");
  private static final Unit UG_PER_L = Unit.of("µg/L");

  /** A series whose instrument shows three decimals. */
  public static StatedSeries of(
      int number, double[] additions, double[] signals, List<Integer> order) {
    List<String> shown = new ArrayList<>();
    for (double signal : signals) {
      shown.add(String.format(Locale.ROOT, "%.3f", signal));
    }
    return new StatedSeries(number, additions, shown, order);
  }

  /** A night of such series, each measured in an order of its own. */
  public static List<StatedSeries> night(List<PooledSeries> made, Random shuffling) {
    List<StatedSeries> night = new ArrayList<>();
    for (PooledSeries one : made) {
      List<Integer> order = new ArrayList<>();
      for (int i = 0; i < one.flasks(); i++) {
        order.add(i);
      }
      Collections.shuffle(order, shuffling);
      night.add(of(night.size(), one.x(), one.y(), order));
    }
    return night;
  }

  /** The sample's name. */
  public String sample() {
    return String.format(Locale.ROOT, "BW-%04d", 1000 + number);
  }

  /** Rows below {@link Exports#HEADER}, in the order of measurement. */
  public List<String> rows() {
    List<String> rows = new ArrayList<>();
    for (int i : order) {
      String time = measuredAt(i).toString().replace("Z", "");
      String added = Numbers.plain(additions[i]);
      rows.add(String.join(",", sample(), "Cd", added, signals.get(i), time));
    }
    return rows;
  }

  private Instant measuredAt(int flask) {
    long before = (long) number * order.size() + order.indexOf(flask);
    return BEGIN.plus(PER_FLASK.multipliedBy(before));
  }

  /** What gathering makes of it, for a method that expects as many flasks as there are. */
  public AdditionSeries gathered() {
    Subject subject = new Subject("bench", new SampleId(sample()), "Cd", "");
    MethodFacts method = method();
    List<Recorded> readings = new ArrayList<>();
    for (int i : order) {
      readings.add(Bench.recorded(reading(subject, method, i)));
    }
    return (AdditionSeries) Bench.gather(subject, readings).get(0);
  }

  private MethodFacts method() {
    MethodFacts plain = MethodFacts.of(UG_PER_L);
    return new MethodFacts(
        plain.name(),
        plain.resultUnit(),
        additions.length,
        plain.fitReadings(),
        plain.trustedSignal(),
        plain.reportingLimit(),
        plain.targetUncertainty(),
        plain.workingRange(),
        plain.bendAllowance(),
        plain.blankDue(),
        plain.calculation(),
        plain.electrode());
  }

  private Reading reading(Subject subject, MethodFacts method, int flask) {
    FlaskFacts facts =
        new FlaskFacts(
            Role.SAMPLE,
            Design.STATED,
            new Addition.Stated(new Quantity(additions[flask], UG_PER_L), Addition.Terms.SAMPLE),
            Optional.empty(),
            Optional.empty(),
            Optional.empty(),
            Preparation.NONE,
            Blanks.NONE,
            method);
    String text = signals.get(flask);
    return new Reading(
        subject,
        new Batch("run.csv", false),
        Numbers.plain(additions[flask]),
        false,
        "",
        false,
        Optional.of(measuredAt(flask)),
        new Signal.Value(Double.parseDouble(text), text),
        facts,
        new Position(new Source("run.csv", Optional.empty()), 2L + flask, 4));
  }
}
