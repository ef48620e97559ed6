package org.spikewright.testkit;

import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.analysis.BatchEvidence;
import org.spikewright.analysis.ControlBook;
import org.spikewright.analysis.ControlHistory;
import org.spikewright.analysis.ControlKey;
import org.spikewright.analysis.ControlPoint;
import org.spikewright.analysis.ControlRule;
import org.spikewright.analysis.ControlRule.Certified;
import org.spikewright.analysis.ControlRule.Kind;
import org.spikewright.analysis.ControlRule.Limits;
import org.spikewright.analysis.Evidence;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.SeriesFit;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.mapping.Glob;
import org.spikewright.mapping.PerAnalyte;
import org.spikewright.quantity.Numbers;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Batch;
import org.spikewright.reading.BatchReading;
import org.spikewright.reading.Blanks;
import org.spikewright.reading.Calculation;
import org.spikewright.reading.CalibrationPoint;
import org.spikewright.reading.CheckReading;
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
import org.spikewright.series.Gathering;
import org.spikewright.series.GatheringRules;
import org.spikewright.table.Position;
import org.spikewright.table.Source;

/** Series with results that are known beforehand: stated additions, results in mg/L. */
public final class ControlBench {
  /** The unit of every result. */
  public static final Unit MG_PER_L = Unit.of("mg/L");

  /** Flask errors in units of the signal; their mean and slope over the additions are 0. */
  private static final double[] ERRORS = {0.01, -0.02, 0, 0.02, -0.01};

  private static final double[] EXACT = {0, 0, 0, 0, 0};

  private ControlBench() {}

  /** A series to be made. */
  public record Sample(
      String id, Role role, String line, String batch, double value, double dilution, long minute) {
    /** A sample in run1 with this result in mg/L. */
    public static Sample of(String id, double value) {
      return new Sample(id, Role.SAMPLE, "", "run1", value, 1, 0);
    }

    /** The same of another role. */
    public Sample role(Role other) {
      return new Sample(id, other, line, batch, value, dilution, minute);
    }

    /** The same at another line. */
    public Sample line(String other) {
      return new Sample(id, role, other, batch, value, dilution, minute);
    }

    /** The same in another batch. */
    public Sample batch(String other) {
      return new Sample(id, role, line, other, value, dilution, minute);
    }

    /** The same, diluted before the aliquot. */
    public Sample dilution(double other) {
      return new Sample(id, role, line, batch, value, other, minute);
    }

    /** The same, measured so many minutes after the start. */
    public Sample at(long other) {
      return new Sample(id, role, line, batch, value, dilution, other);
    }

    /** Whose series it is. */
    public Subject subject() {
      return new Subject("furnace", new SampleId(id), "Cd", line);
    }

    /** Five flasks at 0 to 4 mg/L; slope 1, so that the result is the value. */
    public AdditionSeries series() {
      return series(ERRORS, Blanks.NONE, false);
    }

    /** The same without flask errors. */
    public AdditionSeries exact() {
      return series(EXACT, Blanks.NONE, false);
    }

    /** The same with blanks, or with a blank that is due. */
    public AdditionSeries with(Blanks blanks, boolean blankDue) {
      return series(ERRORS, blanks, blankDue);
    }

    private AdditionSeries series(double[] errors, Blanks blanks, boolean blankDue) {
      List<Recorded> readings = new ArrayList<>();
      for (int i = 0; i < errors.length; i++) {
        readings.add(
            Bench.recorded(reading(i, value / dilution + i + errors[i], blanks, blankDue)));
      }
      return (AdditionSeries)
          new Gathering(new GatheringRules(Bench.CALENDAR, Duration.ofHours(4)))
              .gather(subject(), readings)
              .get(0);
    }

    private Reading reading(int i, double signal, Blanks blanks, boolean blankDue) {
      FlaskFacts plain = Bench.stated(i);
      MethodFacts method = plain.method();
      FlaskFacts facts =
          new FlaskFacts(
              role,
              plain.design(),
              plain.addition(),
              Optional.of(Bench.ml(10)),
              Optional.of(Bench.ml(20)),
              Optional.empty(),
              new Preparation(
                  Optional.empty(),
                  dilution,
                  Optional.empty(),
                  Optional.empty(),
                  OptionalDouble.empty()),
              blanks,
              new MethodFacts(
                  "method",
                  method.resultUnit(),
                  5,
                  false,
                  method.trustedSignal(),
                  method.reportingLimit(),
                  method.targetUncertainty(),
                  method.workingRange(),
                  method.bendAllowance(),
                  blankDue,
                  Calculation.DEFAULT,
                  method.electrode()));
      return new Reading(
          subject(),
          new Batch(batch, true),
          "F" + i,
          true,
          "1",
          true,
          Optional.of(time(minute + i)),
          new Signal.Value(signal, Numbers.plain(signal)),
          facts,
          position(minute + i + 2));
    }
  }

  /** So many minutes after the start. */
  public static Instant time(long minute) {
    return Bench.START.plus(Duration.ofMinutes(minute));
  }

  /** A cell of the one file. */
  public static Position position(long row) {
    return new Position(new Source("run1.csv", Optional.empty()), row, 5);
  }

  /** The fit of a series. */
  public static SeriesResult result(AdditionSeries series) {
    return ((SeriesFit.Fitted) SeriesFit.of(series)).result();
  }

  /** A reading of a drift check. */
  public static CheckReading check(String name, long minute, double signal) {
    return new CheckReading(
        new Subject("furnace", new SampleId(name), "Cd", ""),
        new Batch("run1.csv", false),
        Optional.of(time(minute)),
        1,
        new Signal.Value(signal, Numbers.plain(signal)),
        position(100 + minute));
  }

  /** A reading of a calibration solution, in mg/L. */
  public static CalibrationPoint calibration(double concentration, double signal) {
    return new CalibrationPoint(
        new Subject("furnace", new SampleId("Std " + concentration), "Cd", ""),
        new Batch("run1", true),
        Optional.of(time(-60)),
        1,
        new Signal.Value(signal, Numbers.plain(signal)),
        position(50),
        new Quantity(concentration, MG_PER_L));
  }

  /** A rule with a known value in mg/L. */
  public static ControlRule rule(
      String sample, Kind kind, double reference, double u, Limits limits) {
    return new ControlRule(
        sample,
        kind,
        new Glob(sample),
        Optional.empty(),
        List.of(),
        PerAnalyte.one(
            new Certified(
                new Quantity(reference, MG_PER_L),
                u > 0 ? OptionalDouble.of(u) : OptionalDouble.empty())),
        Optional.empty(),
        limits);
  }

  /** A rule for samples whose ID ends in a suffix. */
  public static ControlRule beside(String suffix, Kind kind, PerAnalyte<Certified> added) {
    return new ControlRule(
        "*" + suffix,
        kind,
        new Glob("*" + suffix),
        Optional.empty(),
        List.of(),
        added,
        Optional.of(new ControlRule.Parent.WithoutSuffix(suffix)),
        Limits.NONE);
  }

  /** A history of values in mg/L, a lab day each. */
  public static ControlHistory history(ControlKey key, double... values) {
    List<ControlPoint> points = new ArrayList<>();
    for (int i = 0; i < values.length; i++) {
      points.add(
          new ControlPoint(
              Bench.CALENDAR.dayOf(Bench.START).minusDays(values.length - i),
              key,
              "mg/L",
              values[i],
              OptionalDouble.empty(),
              OptionalDouble.empty(),
              OptionalDouble.empty()));
    }
    return new ControlHistory(Map.of(key, points));
  }

  /** What series say about each other. */
  public static Evidence evidence(List<ControlRule> rules, List<AdditionSeries> night) {
    return evidence(rules, night, List.of(), ControlHistory.NONE);
  }

  /** The same with what was measured beside them and earlier. */
  public static Evidence evidence(
      List<ControlRule> rules,
      List<AdditionSeries> night,
      List<BatchReading> beside,
      ControlHistory history) {
    BatchEvidence gathered =
        new BatchEvidence(new ControlBook(rules), CriteriaBook.defaults(), beside, history);
    night.stream()
        .sorted((a, b) -> a.key().compareTo(b.key()))
        .forEach(series -> gathered.add(series, result(series)));
    return gathered.evidence();
  }
}
