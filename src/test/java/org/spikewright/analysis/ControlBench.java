package org.spikewright.analysis;

import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.analysis.ControlRule.Certified;
import org.spikewright.analysis.ControlRule.Kind;
import org.spikewright.analysis.ControlRule.Limits;
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
import org.spikewright.testkit.Bench;

/** Series with results that are known beforehand: stated additions, results in mg/L. */
final class ControlBench {
  static final Unit MG_PER_L = Unit.of("mg/L");

  /** Flask errors in units of the signal; their mean and slope over the additions are 0. */
  private static final double[] ERRORS = {0.01, -0.02, 0, 0.02, -0.01};

  private static final double[] EXACT = {0, 0, 0, 0, 0};

  private ControlBench() {}

  /** A series to be made. */
  record Sample(
      String id, Role role, String line, String batch, double value, double dilution, long minute) {
    static Sample of(String id, double value) {
      return new Sample(id, Role.SAMPLE, "", "run1", value, 1, 0);
    }

    Sample role(Role other) {
      return new Sample(id, other, line, batch, value, dilution, minute);
    }

    Sample line(String other) {
      return new Sample(id, role, other, batch, value, dilution, minute);
    }

    Sample batch(String other) {
      return new Sample(id, role, line, other, value, dilution, minute);
    }

    Sample dilution(double other) {
      return new Sample(id, role, line, batch, value, other, minute);
    }

    Sample at(long other) {
      return new Sample(id, role, line, batch, value, dilution, other);
    }

    Subject subject() {
      return new Subject("furnace", new SampleId(id), "Cd", line);
    }

    /** Five flasks at 0 to 4 mg/L; slope 1, so that the result is the value. */
    AdditionSeries series() {
      return series(ERRORS, Blanks.NONE, false);
    }

    AdditionSeries exact() {
      return series(EXACT, Blanks.NONE, false);
    }

    AdditionSeries with(Blanks blanks, boolean blankDue) {
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

  static Instant time(long minute) {
    return Bench.START.plus(Duration.ofMinutes(minute));
  }

  static Position position(long row) {
    return new Position(new Source("run1.csv", Optional.empty()), row, 5);
  }

  static SeriesResult result(AdditionSeries series) {
    return ((SeriesFit.Fitted) SeriesFit.of(series)).result();
  }

  static CheckReading check(String name, long minute, double signal) {
    return new CheckReading(
        new Subject("furnace", new SampleId(name), "Cd", ""),
        new Batch("run1.csv", false),
        Optional.of(time(minute)),
        1,
        new Signal.Value(signal, Numbers.plain(signal)),
        position(100 + minute));
  }

  static CalibrationPoint calibration(double concentration, double signal) {
    return new CalibrationPoint(
        new Subject("furnace", new SampleId("Std " + concentration), "Cd", ""),
        new Batch("run1", true),
        Optional.of(time(-60)),
        1,
        new Signal.Value(signal, Numbers.plain(signal)),
        position(50),
        new Quantity(concentration, MG_PER_L));
  }

  static ControlRule rule(String sample, Kind kind, double reference, double u, Limits limits) {
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

  static ControlRule beside(String suffix, Kind kind, PerAnalyte<Certified> added) {
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

  static ControlHistory history(ControlKey key, double... values) {
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

  static Evidence evidence(List<ControlRule> rules, List<AdditionSeries> night) {
    return evidence(rules, night, List.of(), ControlHistory.NONE);
  }

  static Evidence evidence(
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
