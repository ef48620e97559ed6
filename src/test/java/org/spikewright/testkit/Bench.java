package org.spikewright.testkit;

import java.time.Duration;
import java.time.Instant;
import java.time.LocalTime;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Numbers;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Batch;
import org.spikewright.reading.Blanks;
import org.spikewright.reading.Design;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.LabCalendar;
import org.spikewright.reading.MethodFacts;
import org.spikewright.reading.Preparation;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Role;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Subject;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Gathered;
import org.spikewright.series.Gathering;
import org.spikewright.series.GatheringRules;
import org.spikewright.table.Position;
import org.spikewright.table.Source;

/**
 * An imaginary bench that makes readings for tests: 10 mL aliquots made up to 50 mL, a stock of 10
 * mg/L, results in mg/L.
 */
public final class Bench {
  /** When the first reading of every test is taken. */
  public static final Instant START = Instant.parse("2026-03-04T08:00:00Z");

  /** When every delivery arrives. */
  public static final Instant ARRIVAL = Instant.parse("2026-03-04T20:00:00Z");

  /** Lab days from 06:00 UTC. */
  public static final LabCalendar CALENDAR = new LabCalendar(ZoneId.of("UTC"), LocalTime.of(6, 0));

  /** Whose readings they are. */
  public static final Subject SUBJECT = new Subject("furnace", new SampleId("BW-1"), "Cd", "");

  private static final Unit ML = Unit.of("mL");
  private static final Unit MG_PER_L = Unit.of("mg/L");

  private Bench() {}

  /** A volume in mL. */
  public static Measured ml(double value) {
    return Measured.exactly(new Quantity(value, ML));
  }

  /** A concentration in mg/L. */
  public static Measured mgPerL(double value) {
    return Measured.exactly(new Quantity(value, MG_PER_L));
  }

  /** Facts of a made-up flask with an addition of so many mL. */
  public static FlaskFacts madeUp(double addedMl) {
    return new FlaskFacts(
        Role.SAMPLE,
        Design.MADE_UP,
        new Addition.OfStock(new Quantity(addedMl, ML), mgPerL(10)),
        Optional.of(ml(10)),
        Optional.of(ml(50)),
        Optional.empty(),
        Preparation.NONE,
        Blanks.NONE,
        MethodFacts.of(MG_PER_L));
  }

  /** Facts of a vessel of 20 mL that holds 10 mL of sample, after so many mL in all. */
  public static FlaskFacts oneVessel(double addedMl) {
    FlaskFacts made = madeUp(addedMl);
    return new FlaskFacts(
        made.role(),
        Design.ONE_VESSEL,
        made.addition(),
        made.aliquot(),
        Optional.empty(),
        Optional.of(ml(20)),
        made.preparation(),
        made.blanks(),
        made.method());
  }

  /** Facts with a stated addition in mg/L, referred to the aliquot. */
  public static FlaskFacts stated(double addedMgPerL) {
    FlaskFacts made = madeUp(0);
    return new FlaskFacts(
        made.role(),
        Design.STATED,
        new Addition.Stated(new Quantity(addedMgPerL, MG_PER_L), Addition.Terms.SAMPLE),
        Optional.empty(),
        Optional.empty(),
        Optional.empty(),
        made.preparation(),
        made.blanks(),
        made.method());
  }

  /** A reading, so many minutes after the start, without a flask of its own. */
  public static Reading reading(FlaskFacts facts, String replicate, double signal, long minute) {
    return new Reading(
        SUBJECT,
        new Batch("run1.csv", false),
        facts.addition().amount().toString(),
        false,
        replicate,
        !replicate.isEmpty(),
        Optional.of(START.plus(Duration.ofMinutes(minute))),
        new Signal.Value(signal, Numbers.plain(signal)),
        facts,
        new Position(new Source("run1.csv", Optional.empty()), minute + 2, 5));
  }

  /** A reading as the first delivery brought it. */
  public static Recorded recorded(Reading reading) {
    return new Recorded(reading, 1, ARRIVAL, 0);
  }

  /** One reading a flask at additions of 0, 1, 2 … mL with these signals. */
  public static List<Recorded> madeUpSeries(double... signals) {
    List<Recorded> readings = new ArrayList<>();
    for (int i = 0; i < signals.length; i++) {
      readings.add(recorded(reading(madeUp(i), "1", signals[i], i)));
    }
    return readings;
  }

  /** One reading a flask at stated additions. */
  public static List<Recorded> statedSeries(double[] additions, double[] signals) {
    List<Recorded> readings = new ArrayList<>();
    for (int i = 0; i < signals.length; i++) {
      readings.add(recorded(reading(stated(additions[i]), "1", signals[i], i)));
    }
    return readings;
  }

  /** What gathering makes of readings, with pauses up to 4 h. */
  public static List<Gathered> gather(List<Recorded> readings) {
    return gather(SUBJECT, readings);
  }

  /** What gathering makes of the readings of a subject, with pauses up to 4 h. */
  public static List<Gathered> gather(Subject subject, List<Recorded> readings) {
    return new Gathering(new GatheringRules(CALENDAR, Duration.ofHours(4)))
        .gather(subject, readings);
  }

  /** The one series that gathering makes of readings. */
  public static AdditionSeries series(List<Recorded> readings) {
    List<Gathered> gathered = gather(readings);
    if (gathered.size() != 1 || !(gathered.get(0) instanceof AdditionSeries series)) {
      throw new AssertionError("not one series: " + gathered);
    }
    return series;
  }
}
