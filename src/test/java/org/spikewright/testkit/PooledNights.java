package org.spikewright.testkit;

import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import org.spikewright.analysis.Memory;
import org.spikewright.analysis.Recall;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Numbers;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Blanks;
import org.spikewright.reading.Calculation;
import org.spikewright.reading.Design;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.MethodFacts;
import org.spikewright.reading.Preparation;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Role;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Subject;
import org.spikewright.series.Gathered;
import org.spikewright.summary.Night;
import org.spikewright.table.Position;
import org.spikewright.table.Source;

/** Nights whose series know one another. */
public final class PooledNights {
  private static final Unit ML = Unit.of("mL");
  private static final Unit MG_PER_L = Unit.of("mg/L");
  private static final Unit UG_PER_L = Unit.of("µg/L");
  private static final Source FURNACE = new Source("furnace/run-0115.csv", Optional.empty());
  private static final Source ELECTRODE = new Source("electrode/0115.csv", Optional.empty());
  private static final Instant START = Instant.parse("2025-01-15T09:00:00Z");

  /** How many lines {@link #closed()} has. */
  public static final int LINES = 50;

  /** How many of them are weighted. */
  public static final int WEIGHTED = 12;

  private PooledNights() {}

  /**
   * A closed night of 50 lines: lead bends, cadmium has one level off, zinc has proportional noise
   * and weights with one series of the wrong stock, nickel is too few; and two electrode series.
   */
  public static Night closed() {
    return Nights.together(series(), Recall.NOTHING);
  }

  /** The same while its lab day is in progress. */
  public static Night inProgress() {
    return Nights.together(series(), new Recall(Memory.NONE, Optional.empty(), true));
  }

  private static List<Gathered> series() {
    List<Gathered> series = new ArrayList<>();
    for (int i = 0; i < 20; i++) {
      series.add(line("Pb", i, Calculation.Weights.EQUAL));
    }
    for (int i = 0; i < 14; i++) {
      series.add(line("Cd", i, Calculation.Weights.EQUAL));
    }
    for (int i = 0; i < WEIGHTED; i++) {
      series.add(line("Zn", i, Calculation.Weights.POOL));
    }
    for (int i = 0; i < 4; i++) {
      series.add(line("Ni", i, Calculation.Weights.EQUAL));
    }
    series.add(potentials("Mill race", 0.15));
    series.add(potentials("Tap 4", 0));
    return series;
  }

  private static double signal(String analyte, int i, int flask, double native0, Random random) {
    double x = native0 + 10.0 * flask * (analyte.equals("Cd") && flask == 3 ? 1.1 : 1);
    x *= analyte.equals("Zn") && i == 7 ? 0.5 : 1;
    double signal = 0.004 * (x - (analyte.equals("Pb") ? 0.0016 * x * x : 0));
    return analyte.equals("Zn")
        ? signal * (1 + 0.02 * random.nextGaussian())
        : signal + 0.0012 * random.nextGaussian();
  }

  private static Gathered line(String analyte, int i, Calculation.Weights weights) {
    Random random = new Random(1000 * i + analyte.hashCode());
    String sample = String.format(Locale.ROOT, "BW-%04d", 412 + i);
    Subject subject = new Subject("furnace", new SampleId(sample), analyte, "");
    double native0 = analyte.equals("Zn") ? 2 + i % 3 : 12 + i % 9;
    List<Recorded> readings = new ArrayList<>();
    for (int flask = 0; flask < 5; flask++) {
      double signal = signal(analyte, i, flask, native0, random);
      for (int replicate = 1; replicate <= 2; replicate++) {
        double read = rounded(signal * (1 + 0.004 * random.nextGaussian()), 1e5);
        // Not in rising order: a drift is not to look like a bend.
        int place = 10 * i + 2 * ((2 * flask + i) % 5) + replicate;
        readings.add(
            Nights.recorded(
                subject,
                "F" + (flask + 1),
                replicate,
                START.plus(Duration.ofMinutes(place)),
                new Signal.Value(read, Numbers.plain(read)),
                facts(20.0 * flask, weights),
                new Position(FURNACE, 2L + place, 6)));
      }
    }
    return Nights.gathered(subject, readings);
  }

  private static Gathered potentials(String sample, double scatter) {
    Random random = new Random(sample.hashCode());
    Subject subject = new Subject("electrode", new SampleId(sample), "F", "");
    List<Recorded> readings = new ArrayList<>();
    double amount = 4 * 25;
    for (int step = 0; step < 6; step++) {
      amount += step == 0 ? 0 : 100;
      double potential = 210 - 58 * Math.log10(amount / (50 + step));
      double read = rounded(potential + scatter * random.nextGaussian(), 1e2);
      readings.add(
          Nights.recorded(
              subject,
              "V" + step,
              1,
              START.plus(Duration.ofMinutes(3L * step)),
              new Signal.Value(read, Numbers.plain(read)),
              vessel(step),
              new Position(ELECTRODE, 2L + step, 4)));
    }
    return Nights.gathered(subject, readings);
  }

  private static double rounded(double value, double steps) {
    return Math.round(value * steps) / steps;
  }

  private static Measured ml(double value) {
    return Measured.exactly(new Quantity(value, ML));
  }

  private static Measured stock(double value) {
    return Measured.exactly(new Quantity(value, MG_PER_L));
  }

  private static FlaskFacts facts(double microlitres, Calculation.Weights weights) {
    Calculation calculation =
        new Calculation(
            Calculation.Interval.BEST_KNOWN, weights, Calculation.Bend.SATURATION, false);
    return new FlaskFacts(
        Role.SAMPLE,
        Design.MADE_UP,
        new Addition.OfStock(new Quantity(microlitres, Unit.of("µL")), stock(5)),
        Optional.of(ml(10)),
        Optional.of(ml(20)),
        Optional.empty(),
        Preparation.NONE,
        Blanks.NONE,
        method(UG_PER_L, calculation, Optional.empty(), Optional.empty()));
  }

  private static FlaskFacts vessel(int step) {
    return new FlaskFacts(
        Role.SAMPLE,
        Design.ELECTRODE,
        new Addition.OfStock(new Quantity(step, ML), stock(100)),
        Optional.of(ml(25)),
        Optional.empty(),
        Optional.of(ml(50)),
        Preparation.NONE,
        Blanks.NONE,
        method(
            MG_PER_L,
            Calculation.DEFAULT,
            Optional.of(
                new MethodFacts.Electrode(-1, OptionalDouble.empty(), OptionalDouble.of(25))),
            Optional.of(Unit.of("mV"))));
  }

  private static MethodFacts method(
      Unit result,
      Calculation calculation,
      Optional<MethodFacts.Electrode> electrode,
      Optional<Unit> signal) {
    OptionalDouble none = OptionalDouble.empty();
    return new MethodFacts(
        "",
        result,
        4,
        false,
        none,
        none,
        none,
        Optional.empty(),
        none,
        false,
        calculation,
        electrode,
        signal);
  }
}
