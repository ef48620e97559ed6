package org.spikewright.analysis;

import static org.assertj.core.api.Assertions.assertThat;
import static org.spikewright.testkit.Bench.madeUp;
import static org.spikewright.testkit.Bench.oneVessel;
import static org.spikewright.testkit.Bench.stated;

import java.lang.reflect.RecordComponent;
import java.time.Duration;
import java.util.ArrayList;
import java.util.Collection;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.Flag;
import org.spikewright.judgement.Flag.Weight;
import org.spikewright.judgement.Judge;
import org.spikewright.judgement.Outcome;
import org.spikewright.judgement.Verdict;
import org.spikewright.quantity.Numbers;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Batch;
import org.spikewright.reading.Calculation;
import org.spikewright.reading.Design;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.MethodFacts;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Subject;
import org.spikewright.series.Gathered;
import org.spikewright.summary.ResultRow;
import org.spikewright.summary.RowEvidence;
import org.spikewright.testkit.Bench;

/** Whatever the readings: a verdict with a reason, finite numbers or none, and no exception. */
class NastySeriesTest {
  private static final int SERIES = 10_000;

  private static final double[] EXTREME = {
    0,
    -0.0,
    1,
    -1,
    1e-8,
    1e8,
    1e15,
    1e74,
    -1e74,
    1e-74,
    1e150,
    1e-150,
    1e300,
    -1e300,
    1e-300,
    Double.MAX_VALUE,
    -Double.MAX_VALUE,
    Double.MIN_VALUE,
    1 + 1e-15
  };

  /** Electrodes are seldom: their curves take longest. */
  private static final Design[] DESIGNS = {
    Design.MADE_UP,
    Design.ONE_VESSEL,
    Design.STATED,
    Design.MADE_UP,
    Design.STATED,
    Design.MADE_UP,
    Design.ONE_VESSEL,
    Design.STATED,
    Design.ELECTRODE
  };

  private static final CriteriaBook BOOK = CriteriaBook.defaults();
  private static final Judge JUDGE =
      new Judge(BOOK, Bench.START.plus(Duration.ofDays(2)), Duration.ofHours(12));

  /** What is the matter with the additions and the signals of a series. */
  private enum Kind {
    GOOD,
    NO_UNSPIKED,
    EQUAL_ADDITIONS,
    FALLING,
    EQUAL_SIGNALS,
    ONE_FLASK,
    TWO_FLASKS,
    ONE_EXTREME_SIGNAL,
    EXTREME_SIGNALS,
    EXTREME_SCALE,
    EXTREME_ADDITION,
    NOISE,
    EXACT,
    WORDS
  }

  /** One flask as drawn. */
  private record Drawn(double added, double signal) {}

  @Test
  void ten_thousand_nasty_series_end_with_a_verdict_and_a_reason() throws Exception {
    Map<Verdict, Integer> verdicts = new EnumMap<>(Verdict.class);
    int judged = 0;
    int lent = 0;
    for (long seed = 1; judged < SERIES; seed++) {
      SplittableRandom random = new SplittableRandom(seed);
      for (Outcome outcome : night(random, "seed " + seed)) {
        judged++;
        lent += outcome.result().filter(r -> r.borrowed().isPresent()).isPresent() ? 1 : 0;
        verdicts.merge(outcome.verdict(), 1, Integer::sum);
        String seen = "seed " + seed + ", " + outcome.gathered().key().subject();
        reasoned(outcome, seen);
        finite(ResultRow.of(outcome), seen);
      }
    }
    assertThat(verdicts.getOrDefault(Verdict.REPORT, 0)).as("%s", verdicts).isGreaterThan(100);
    assertThat(verdicts.getOrDefault(Verdict.REVIEW, 0)).as("%s", verdicts).isGreaterThan(1_000);
    assertThat(verdicts.getOrDefault(Verdict.REPEAT, 0)).as("%s", verdicts).isGreaterThan(1_000);
    assertThat(lent).as("series that borrow").isGreaterThan(1_000);
  }

  private static Iterable<Outcome> night(SplittableRandom random, String seen) {
    List<Gathered> night = new ArrayList<>();
    Design design = DESIGNS[random.nextInt(DESIGNS.length)];
    Calculation calculation = calculation(random);
    Kind[] kinds = Kind.values();
    boolean mixed = random.nextBoolean();
    Kind common = kinds[random.nextInt(kinds.length)];
    int size = random.nextInt(1, 40);
    for (int j = 0; j < size; j++) {
      Kind kind = mixed || random.nextInt(4) == 0 ? kinds[random.nextInt(kinds.length)] : common;
      Subject subject = new Subject("bench", new SampleId(kind + "-" + j), "Cd", "");
      night.addAll(Bench.gather(subject, readings(random, kind, subject, design, calculation)));
    }
    try {
      List<Outcome> outcomes = new ArrayList<>();
      List<Fitted> fitted = night.stream().map(Fitted::of).toList();
      Analysis.of(fitted, JUDGE, DayFacts.of(BOOK)).forEach(outcomes::add);
      assertThat(outcomes).as(seen).hasSameSizeAs(night);
      return outcomes;
    } catch (RuntimeException trouble) {
      throw new AssertionError(seen + ": " + trouble, trouble);
    }
  }

  private static Calculation calculation(SplittableRandom random) {
    Calculation.Interval[] intervals = Calculation.Interval.values();
    Calculation.Weights[] weights = Calculation.Weights.values();
    Calculation.Bend[] bends = Calculation.Bend.values();
    return new Calculation(
        intervals[random.nextInt(intervals.length)],
        weights[random.nextInt(weights.length)],
        bends[random.nextInt(bends.length)],
        false);
  }

  private static List<Recorded> readings(
      SplittableRandom random, Kind kind, Subject subject, Design design, Calculation calculation) {
    List<Recorded> readings = new ArrayList<>();
    List<Drawn> flasks = flasks(random, kind, design == Design.ELECTRODE);
    int replicates = random.nextInt(1, 4);
    boolean timed = random.nextBoolean();
    for (Drawn flask : flasks) {
      for (int replicate = 1; replicate <= replicates; replicate++) {
        FlaskFacts facts = facts(design, flask.added, calculation);
        double value = flask.signal;
        if (kind != Kind.EXACT && kind != Kind.EQUAL_SIGNALS && Math.abs(value) < 1e300) {
          value *= 1 + 1e-3 * random.nextGaussian();
        }
        boolean word = kind == Kind.WORDS && random.nextInt(3) > 0;
        Signal signal =
            word
                ? new Signal.NoNumber(
                    Signal.State.values()[random.nextInt(Signal.State.values().length)], "-")
                : new Signal.Value(value, Numbers.plain(value));
        readings.add(
            Bench.recorded(reading(subject, facts, replicate, signal, readings.size(), timed)));
      }
    }
    return readings;
  }

  private static Reading reading(
      Subject subject, FlaskFacts facts, int replicate, Signal signal, long minute, boolean timed) {
    Reading plain = Bench.reading(facts, Integer.toString(replicate), 0, minute);
    return new Reading(
        subject,
        new Batch("run1.csv", false),
        plain.flask(),
        false,
        plain.replicate(),
        true,
        timed ? plain.measuredAt() : Optional.empty(),
        signal,
        facts,
        plain.position());
  }

  private static FlaskFacts facts(Design design, double added, Calculation calculation) {
    FlaskFacts facts =
        switch (design) {
          case MADE_UP, WEIGHED -> madeUp(added);
          case ONE_VESSEL, ELECTRODE -> oneVessel(added);
          case STATED -> stated(added);
        };
    MethodFacts method = facts.method();
    return new FlaskFacts(
        facts.role(),
        design,
        facts.addition(),
        facts.aliquot(),
        facts.finalVolume(),
        facts.startVolume(),
        facts.preparation(),
        facts.blanks(),
        new MethodFacts(
            method.name(),
            method.resultUnit(),
            method.expectedFlasks(),
            method.fitReadings(),
            method.trustedSignal(),
            method.reportingLimit(),
            method.targetUncertainty(),
            method.workingRange(),
            OptionalDouble.of(0.1),
            method.blankDue(),
            calculation,
            design == Design.ELECTRODE
                ? Optional.of(
                    new MethodFacts.Electrode(1, OptionalDouble.empty(), OptionalDouble.of(25)))
                : Optional.empty(),
            design == Design.ELECTRODE ? Optional.of(Unit.of("mV")) : Optional.empty()));
  }

  private static double extreme(SplittableRandom random) {
    return EXTREME[random.nextInt(EXTREME.length)];
  }

  private static List<Drawn> flasks(SplittableRandom random, Kind kind, boolean electrode) {
    int n =
        switch (kind) {
          case ONE_FLASK -> 1;
          case TWO_FLASKS -> 2;
          default -> random.nextInt(3, 8);
        };
    double scale = kind == Kind.EXTREME_SCALE ? Math.pow(10, random.nextInt(-300, 300)) : 1;
    int odd = random.nextInt(n);
    List<Drawn> flasks = new ArrayList<>();
    for (int i = 0; i < n; i++) {
      double added =
          switch (kind) {
            case NO_UNSPIKED -> 0.5 + i;
            case EQUAL_ADDITIONS -> 1;
            case EXTREME_ADDITION -> i == odd ? Math.abs(extreme(random)) : i;
            default -> i;
          };
      double signal = electrode ? 120 + 58 * Math.log10(2 + i) : 2.0 + i;
      signal =
          switch (kind) {
            case FALLING -> 10 - signal;
            case EQUAL_SIGNALS -> 1;
            case ONE_EXTREME_SIGNAL -> i == odd ? extreme(random) : signal;
            case EXTREME_SIGNALS -> extreme(random);
            case NOISE -> random.nextGaussian();
            default -> scale * signal;
          };
      flasks.add(new Drawn(added, signal));
    }
    return flasks;
  }

  private static void reasoned(Outcome outcome, String seen) {
    for (Flag flag : outcome.flags()) {
      if (flag.sentence().isBlank() || !Double.isFinite(flag.number().orElse(0))) {
        throw new AssertionError(seen + ": " + flag);
      }
    }
    Verdict verdict = outcome.verdict();
    Weight due = verdict == Verdict.REPEAT ? Weight.REPEAT : Weight.REVIEW;
    boolean hasReason =
        verdict == Verdict.REPORT
            ? !outcome.reported().isBlank()
            : outcome.flags().stream().anyMatch(flag -> flag.weight() == due);
    boolean hasNumbers = outcome.result().isPresent() || outcome.electrode().isPresent();
    if (!hasReason || !hasNumbers && verdict != Verdict.REPEAT) {
      throw new AssertionError(seen + ": " + verdict + " by " + outcome.flags());
    }
  }

  /** Texts are put together only where something is wrong: there are a million numbers. */
  private static void finite(Object of, String seen) throws Exception {
    for (RecordComponent component : of.getClass().getRecordComponents()) {
      component.getAccessor().setAccessible(true);
      Object value = component.getAccessor().invoke(of);
      if (value instanceof OptionalDouble optional && !Double.isFinite(optional.orElse(0))
          || value instanceof Double number && !Double.isFinite(number)
          || value instanceof String text && isNoNumber(text)
          || value instanceof Collection<?> many
              && many.stream().anyMatch(one -> isNoNumber(one.toString()))) {
        throw new AssertionError(seen + ": " + component.getName() + " = " + value);
      }
      if (value instanceof RowEvidence) {
        finite(value, seen);
      }
    }
  }

  private static boolean isNoNumber(String text) {
    return text.contains("NaN") || text.contains("Infinity");
  }
}
