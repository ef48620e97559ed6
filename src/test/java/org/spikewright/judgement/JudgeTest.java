package org.spikewright.judgement;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;
import static org.spikewright.testkit.Bench.madeUpSeries;
import static org.spikewright.testkit.Bench.series;
import static org.spikewright.testkit.Bench.statedSeries;

import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.MethodFacts;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Gathered;
import org.spikewright.testkit.Bench;

class JudgeTest {
  private static final Instant NEXT_DAY = Bench.START.plus(Duration.ofDays(1));

  private static Outcome judge(List<Recorded> readings) {
    return judge(readings, NEXT_DAY);
  }

  private static Outcome judge(List<Recorded> readings, Instant moment) {
    return new Judge(CriteriaBook.defaults(), moment, Duration.ofHours(12)).judge(series(readings));
  }

  private static List<FlagKind> kinds(Outcome outcome) {
    return outcome.flags().stream().map(Flag::kind).toList();
  }

  @Test
  void aGoodSeriesIsReportedWithoutFlags() {
    Outcome outcome = judge(madeUpSeries(1.002, 1.499, 2.003, 2.498, 3.001));
    assertThat(outcome.flags()).isEmpty();
    assertThat(outcome.verdict()).isEqualTo(Verdict.REPORT);
    assertThat(outcome.result().orElseThrow().value()).isCloseTo(2.0, within(0.02));
    assertThat(outcome.reported()).matches("2\\.0\\d\\d? ± 0\\.0\\d\\d?");
  }

  @Test
  void ironInWaterGivesThePublishedResultAndStandardError() {
    // Skoog, Holler, Crouch, Principles of Instrumental Analysis, multiple-addition example (case
    // SA01; prints from memory): 7.01 ppm, standard deviation by extrapolation 0.16 ppm. 10 mL to
    // 50 mL, stock 11.1 ppm, additions of 0, 5, 10, 15, 20 mL.
    double[] x = {0, 5.55, 11.1, 16.65, 22.2};
    double[] y = {0.240, 0.437, 0.621, 0.809, 1.009};
    SeriesResult result = judge(statedSeries(x, y)).result().orElseThrow();
    assertThat(result.value()).isCloseTo(7.00869109947644, within(1e-12));
    assertThat(result.standardError().orElseThrow()).isCloseTo(0.158742391474556, within(1e-12));
    assertThat(result.lower95().orElseThrow()).isCloseTo(6.51506935874169, within(1e-11));
    assertThat(result.upper95().orElseThrow()).isCloseTo(7.52605767396432, within(1e-11));
  }

  @Test
  void aBendThatMovesTheResultIsRepeatedAndBothResultsAreNamed() {
    // Case SE06, constructed: saturating signal, truth 2, the line says 7.34.
    double[] x = {0, 1, 2, 3, 4, 5, 6, 8};
    double[] y = {0.3541, 0.4749, 0.5689, 0.6421, 0.6992, 0.7436, 0.7782, 0.8261};
    Outcome outcome = judge(statedSeries(x, y));
    Flag bent = outcome.flags().get(0);
    assertThat(bent.kind()).isEqualTo(FlagKind.BENT);
    assertThat(bent.sentence()).contains("7.34").contains("mg/L").contains("\u2212");
    assertThat(outcome.verdict()).isEqualTo(Verdict.REPEAT);
    assertThat(outcome.reported()).isEmpty();
  }

  @Test
  void oneOddFlaskIsNamedWithTheResultWithoutIt() {
    Outcome outcome = judge(madeUpSeries(1.003, 1.498, 2.001, 3.2, 3.001, 3.499, 4.002));
    assertThat(kinds(outcome)).contains(FlagKind.ODD_FLASK);
    assertThat(outcome.flags().get(0).sentence()).contains("Flask 3 mL").contains("above");
    assertThat(outcome.verdict()).isEqualTo(Verdict.REVIEW);
  }

  @Test
  void roundedCollinearDataRaiseNoOddFlask() {
    // Whole-number displays: four flasks exactly on a line and one off by one unit in the last
    // place.
    Outcome outcome = judge(madeUpSeries(10, 15, 20, 25, 31));
    assertThat(kinds(outcome)).doesNotContain(FlagKind.ODD_FLASK, FlagKind.BENT);
  }

  @Test
  void anUnestablishedSlopeIsRepeatedAndHasNoInterval() {
    // Case SE04, constructed: g = 48.
    double[] x = {0, 1, 2, 3, 4};
    double[] y = {1.0, 1.35, 0.9, 1.4, 1.15};
    Outcome outcome = judge(statedSeries(x, y));
    assertThat(kinds(outcome)).contains(FlagKind.SLOPE_NOT_ESTABLISHED);
    assertThat(outcome.result().orElseThrow().lower95()).isEmpty();
    assertThat(outcome.verdict()).isEqualTo(Verdict.REPEAT);
  }

  @Test
  void additionsFarTooSmallAreRepeatedOnlyWhenTheUncertaintySuffers() {
    Outcome rough = judge(madeUpSeries(100, 101.4, 101.7, 103.3));
    assertThat(kinds(rough)).contains(FlagKind.ADDITIONS_TOO_SMALL);
    assertThat(rough.verdict()).isEqualTo(Verdict.REPEAT);
    Outcome fine = judge(madeUpSeries(100, 101.0001, 101.9999, 103.0001));
    assertThat(kinds(fine)).contains(FlagKind.ADDITIONS_TOO_SMALL);
    assertThat(fine.verdict()).isEqualTo(Verdict.REPORT);
  }

  @ParameterizedTest
  @CsvSource({"5.6, NOTE", "11, REVIEW"})
  void additionsFarTooLargeAreNotedThenReviewed(double ratio, Flag.Weight weight) {
    double native0 = 3 / ratio;
    Outcome outcome =
        judge(madeUpSeries(native0 + 0.0001, native0 + 0.9999, native0 + 2.0001, native0 + 2.9999));
    assertThat(outcome.flags())
        .filteredOn(flag -> flag.kind() == FlagKind.ADDITIONS_TOO_LARGE)
        .extracting(Flag::weight)
        .containsExactly(weight);
  }

  @Test
  void withoutAnUnspikedFlaskTheLineIsFittedAndMarked() {
    List<Recorded> all = madeUpSeries(1.002, 1.499, 2.003, 2.498, 3.001);
    Outcome outcome = judge(all.subList(1, 5));
    assertThat(kinds(outcome)).containsExactly(FlagKind.NO_UNSPIKED_FLASK);
    assertThat(outcome.verdict()).isEqualTo(Verdict.REVIEW);
    assertThat(outcome.result()).isPresent();
  }

  @Test
  void twoFlasksGiveAResultButNeverAnUncertaintyOfZero() {
    Outcome outcome = judge(madeUpSeries(1, 2));
    assertThat(kinds(outcome)).contains(FlagKind.NO_FIT_UNCERTAINTY, FlagKind.FEW_FLASKS);
    SeriesResult result = outcome.result().orElseThrow();
    assertThat(result.standardError()).isEmpty();
    assertThat(result.detection()).isEmpty();
    assertThat(outcome.reported()).isEqualTo("1.00");
  }

  @Test
  void flasksStillDueAreWaitedForAndThenJudged() {
    List<Recorded> readings = madeUpSeries(1, 2, 3);
    Outcome early = judge(readings, Bench.START.plus(Duration.ofHours(3)));
    assertThat(early.verdict()).isEqualTo(Verdict.WAITING);
    assertThat(kinds(early)).contains(FlagKind.WAITING);
    assertThat(early.result()).isPresent();
    Outcome late = judge(readings, NEXT_DAY);
    assertThat(late.verdict()).isEqualTo(Verdict.REVIEW);
  }

  @Test
  void aSampleWithoutAdditionsIsRepeatedWithThatReason() {
    Outcome outcome = judge(madeUpSeries(1.5));
    assertThat(kinds(outcome)).contains(FlagKind.NO_ADDITIONS);
    assertThat(outcome.flags())
        .extracting(Flag::sentence)
        .contains("No flask of this sample has an addition.");
    assertThat(outcome.verdict()).isEqualTo(Verdict.REPEAT);
    assertThat(outcome.result()).isEmpty();
  }

  @Test
  void aFallingSignalGivesNoResult() {
    Outcome outcome = judge(madeUpSeries(4, 3, 2, 1));
    assertThat(kinds(outcome)).contains(FlagKind.SLOPE_NOT_ESTABLISHED);
    assertThat(outcome.result()).isEmpty();
  }

  @Test
  void aResultBelowTheCriticalValueIsReportedAsBelowTheDetectionLimit() {
    Outcome outcome = judge(madeUpSeries(0.03, 0.98, 2.04, 2.97, 4.01));
    assertThat(kinds(outcome)).contains(FlagKind.BELOW_DETECTION);
    assertThat(kinds(outcome)).doesNotContain(FlagKind.UNCERTAIN, FlagKind.ADDITIONS_TOO_LARGE);
    assertThat(outcome.reported()).matches("< 0\\.\\d+");
    assertThat(outcome.verdict()).isEqualTo(Verdict.REPORT);
  }

  @Test
  void aNegativeResultIsKeptAndShown() {
    Outcome outcome = judge(madeUpSeries(-0.5, 0.51, 1.49, 2.5, 3.5));
    assertThat(outcome.result().orElseThrow().value()).isNegative();
    assertThat(kinds(outcome)).contains(FlagKind.NEGATIVE_RESULT, FlagKind.BELOW_DETECTION);
  }

  @Test
  void theReportingLimitOfTheMethodReplacesTheDetectionLimit() {
    List<Recorded> readings = new ArrayList<>();
    for (Recorded recorded : madeUpSeries(0.103, 1.098, 2.104, 3.097, 4.101)) {
      readings.add(withMethod(recorded, OptionalDouble.of(0.5)));
    }
    assertThat(judge(readings).reported()).isEqualTo("< 0.5");
  }

  private static Recorded withMethod(Recorded recorded, OptionalDouble reportingLimit) {
    Reading r = recorded.reading();
    FlaskFacts f = r.facts();
    MethodFacts m = f.method();
    MethodFacts method =
        new MethodFacts(
            m.name(),
            m.resultUnit(),
            m.expectedFlasks(),
            m.fitReadings(),
            m.trustedSignal(),
            reportingLimit,
            m.targetUncertainty(),
            m.workingRange(),
            m.bendAllowance(),
            m.blankDue(),
            m.calculation(),
            m.electrode());
    FlaskFacts facts =
        new FlaskFacts(
            f.role(),
            f.design(),
            f.addition(),
            f.aliquot(),
            f.finalVolume(),
            f.startVolume(),
            f.preparation(),
            f.blanks(),
            method);
    return Bench.recorded(
        new Reading(
            r.subject(),
            r.batch(),
            r.flask(),
            r.flaskMapped(),
            r.replicate(),
            r.replicateMapped(),
            r.measuredAt(),
            r.signal(),
            facts,
            r.position()));
  }

  @Test
  void perfectSeriesRaiseStatisticalFlagsNoMoreOftenThanTheirRate() {
    Random random = new Random(20260304);
    int runs = 4000;
    int alarms = 0;
    for (int i = 0; i < runs; i++) {
      double[] signals = new double[5];
      for (int j = 0; j < signals.length; j++) {
        signals[j] = Math.round((1 + 0.5 * j + 0.01 * random.nextGaussian()) * 1e6) / 1e6;
      }
      List<FlagKind> kinds = kinds(judge(madeUpSeries(signals)));
      if (kinds.contains(FlagKind.BENT) || kinds.contains(FlagKind.ODD_FLASK)) {
        alarms++;
      }
    }
    // 2 % family-wise, three binomial standard deviations above: 2.7 %.
    assertThat(alarms).isLessThan((int) (0.027 * runs));
  }

  @Test
  void nastyNumbersGiveAVerdictAndNeverAnExceptionOrANumberThatIsNone() {
    double[] nasty = {0, -0.0, 1, -1, 1e-300, -1e-300, 1e300, -1e300, 1e154, 1e-154, 1e8, 3, 3.5};
    for (long seed = 1; seed <= 4000; seed++) {
      Random random = new Random(seed);
      int n = 1 + random.nextInt(6);
      double[] x = new double[n];
      double[] y = new double[n];
      for (int i = 0; i < n; i++) {
        x[i] = Math.abs(nasty[random.nextInt(nasty.length)]) + (random.nextBoolean() ? i : 0);
        y[i] = nasty[random.nextInt(nasty.length)];
      }
      for (Gathered gathered : Bench.gather(statedSeries(x, y))) {
        Outcome outcome =
            new Judge(CriteriaBook.defaults(), NEXT_DAY, Duration.ofHours(12)).judge(gathered);
        assertThat(outcome.verdict()).as("seed %d", seed).isNotNull();
        outcome.result().ifPresent(JudgeTest::assertFinite);
        assertThat(outcome.result().isPresent() || outcome.verdict() == Verdict.REPEAT)
            .as("seed %d: %s", seed, outcome)
            .isTrue();
      }
    }
  }

  private static void assertFinite(SeriesResult result) {
    assertThat(result.value()).isFinite();
    for (Optional<Double> number :
        List.of(boxed(result.standardError()), boxed(result.lower95()), boxed(result.upper95()))) {
      number.ifPresent(value -> assertThat(value).isFinite());
    }
  }

  private static Optional<Double> boxed(OptionalDouble number) {
    return number.isPresent() ? Optional.of(number.getAsDouble()) : Optional.empty();
  }

  @Test
  void aSeriesSaysHowItWasGathered() {
    AdditionSeries series = series(madeUpSeries(1, 2, 3, 4));
    assertThat(series.startedAt()).contains(Bench.START);
    assertThat(series.lastReadingAt()).isEqualTo(Bench.START.plus(Duration.ofMinutes(3)));
  }

  @Test
  void aSecondRunIsFittedBesideTheFirstAndNeverAveraged() {
    List<Recorded> readings = new ArrayList<>(madeUpSeries(1, 1.5, 2, 2.5));
    for (int i = 0; i < 4; i++) {
      readings.add(Bench.recorded(Bench.reading(Bench.madeUp(i), "1", 2 + 0.5 * i, 60 + i)));
    }
    Outcome outcome = judge(readings);
    assertThat(outcome.result().orElseThrow().value()).isCloseTo(2, within(1e-12));
    assertThat(outcome.flags())
        .filteredOn(flag -> flag.kind() == FlagKind.SECOND_RUN)
        .singleElement()
        .extracting(Flag::sentence)
        .asString()
        .contains("the second would give 4.00 mg/L");
    assertThat(outcome.verdict()).isEqualTo(Verdict.REVIEW);
  }
}
