package org.spikewright.analysis;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.analysis.ControlResult.Verdict;
import org.spikewright.analysis.ControlRule.Certified;
import org.spikewright.analysis.ControlRule.Kind;
import org.spikewright.analysis.ControlRule.Limits;
import org.spikewright.analysis.ControlRule.Range;
import org.spikewright.judgement.Flag;
import org.spikewright.judgement.FlagKind;
import org.spikewright.mapping.PerAnalyte;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Blanks;
import org.spikewright.reading.CheckReading;
import org.spikewright.reading.Role;
import org.spikewright.series.AdditionSeries;
import org.spikewright.testkit.Bench;
import org.spikewright.testkit.ControlBench;
import org.spikewright.testkit.ControlBench.Sample;

class EvidenceTest {

  private static final AdditionSeries SAMPLE = Sample.of("W-1", 8).series();

  private static List<FlagKind> kinds(Evidence evidence, AdditionSeries series) {
    return evidence.flagsFor(series, ControlBench.result(series)).stream().map(Flag::kind).toList();
  }

  private static Limits limits(Range recovery, double z, double sd, double en) {
    return new Limits(
        Optional.ofNullable(recovery),
        z > 0 ? OptionalDouble.of(z) : OptionalDouble.empty(),
        sd > 0 ? PerAnalyte.one(new Quantity(sd, ControlBench.MG_PER_L)) : PerAnalyte.none(),
        en > 0 ? OptionalDouble.of(en) : OptionalDouble.empty(),
        OptionalDouble.empty(),
        PerAnalyte.none());
  }

  @ParameterizedTest(name = "found {0} of 10: {1}")
  @CsvSource({"10, IN", "8.01, IN", "7.9, OUT", "11.99, IN", "12.1, OUT"})
  void aControlWithoutLimitsOfItsOwnIsHeldAgainstEightyToAHundredAndTwentyPercent(
      double found, Verdict verdict) {
    AdditionSeries control = Sample.of("QC", found).role(Role.CONTROL).series();
    Evidence evidence =
        ControlBench.evidence(
            List.of(ControlBench.rule("QC", Kind.CONTROL_SAMPLE, 10, 0, Limits.NONE)),
            List.of(SAMPLE, control));
    ControlResult result = evidence.found().controls().get(0);
    assertThat(result.verdict()).isEqualTo(verdict);
    assertThat(result.recovery().getAsDouble()).isCloseTo(found / 10, within(1e-9));
    assertThat(kinds(evidence, SAMPLE).contains(FlagKind.CONTROL_OUT))
        .isEqualTo(verdict == Verdict.OUT);
  }

  @Test
  void aControlThatIsOutIsSaidWithItsNumbers() {
    AdditionSeries control = Sample.of("QC", 14).series();
    Evidence evidence =
        ControlBench.evidence(
            List.of(ControlBench.rule("QC", Kind.REFERENCE_MATERIAL, 10, 0.1, Limits.NONE)),
            List.of(SAMPLE, control));
    Flag flag = evidence.flagsFor(SAMPLE, ControlBench.result(SAMPLE)).get(0);
    assertThat(flag.weight()).isEqualTo(Flag.Weight.REVIEW);
    assertThat(flag.sentence())
        .isEqualTo(
            "Reference material QC of the batch is out: found 14.0 mg/L, known 10.0 mg/L,"
                + " recovery 140 %; outside recovery 80 % to 120 % (common practice).");
  }

  @Test
  void aControlSpeaksOnlyOfItsOwnBatchAndLine() {
    AdditionSeries control = Sample.of("QC", 14).series();
    AdditionSeries otherBatch = Sample.of("W-2", 8).batch("run2").series();
    AdditionSeries otherLine = Sample.of("W-1", 8).line("228.8").series();
    Evidence evidence =
        ControlBench.evidence(
            List.of(ControlBench.rule("QC", Kind.CONTROL_SAMPLE, 10, 0, Limits.NONE)),
            List.of(SAMPLE, control, otherBatch, otherLine));
    assertThat(kinds(evidence, SAMPLE)).containsExactly(FlagKind.CONTROL_OUT);
    assertThat(kinds(evidence, control)).containsExactly(FlagKind.CONTROL_OUT);
    assertThat(kinds(evidence, otherBatch)).isEmpty();
    assertThat(kinds(evidence, otherLine)).isEmpty();
  }

  @Test
  void theZScoreCountsInTheLaboratorysStandardDeviations() {
    AdditionSeries control = Sample.of("QC", 10.9).series();
    Evidence evidence =
        ControlBench.evidence(
            List.of(ControlBench.rule("QC", Kind.CONTROL_SAMPLE, 10, 0, limits(null, 2, 0.4, 0))),
            List.of(control));
    ControlResult result = evidence.found().controls().get(0);
    assertThat(result.z().getAsDouble()).isCloseTo(2.25, within(1e-9));
    assertThat(result.verdict()).isEqualTo(Verdict.OUT);
    assertThat(result.lower().getAsDouble()).isCloseTo(9.2, within(1e-12));
    assertThat(result.upper().getAsDouble()).isCloseTo(10.8, within(1e-12));
  }

  @Test
  void theEnScoreIsTheDistanceOverBothExpandedUncertainties() {
    AdditionSeries control = Sample.of("QC", 10.5).series();
    double expanded =
        ControlBench.result(control).estimate().t().getAsDouble()
            * ControlBench.result(control).standardError().getAsDouble();
    Evidence evidence =
        ControlBench.evidence(
            List.of(
                ControlBench.rule("QC", Kind.REFERENCE_MATERIAL, 10, 0.2, limits(null, 0, 0, 1))),
            List.of(control));
    ControlResult result = evidence.found().controls().get(0);
    assertThat(result.en().getAsDouble()).isCloseTo(0.5 / Math.hypot(expanded, 0.4), within(1e-9));
    assertThat(result.verdict()).isEqualTo(Verdict.OUT);
  }

  @Test
  void aControlWithoutAnEntryIsShownAndNotJudged() {
    AdditionSeries control = Sample.of("QC", 14).role(Role.CONTROL).series();
    ControlResult result =
        ControlBench.evidence(List.of(), List.of(control)).found().controls().get(0);
    assertThat(result.verdict()).isEqualTo(Verdict.NOT_JUDGED);
    assertThat(result.words()).isEqualTo("no entry in controls.toml");
  }

  @Test
  void aKnownValueOfAnotherKindIsNotHeldAgainstAResult() {
    ControlRule molar =
        new ControlRule(
            "QC",
            Kind.CONTROL_SAMPLE,
            new org.spikewright.mapping.Glob("QC"),
            Optional.empty(),
            List.of(),
            PerAnalyte.one(
                new Certified(new Quantity(1, Unit.of("mmol/L")), OptionalDouble.empty())),
            Optional.empty(),
            Limits.NONE);
    ControlResult result =
        ControlBench.evidence(List.of(molar), List.of(Sample.of("QC", 14).series()))
            .found()
            .controls()
            .get(0);
    assertThat(result.verdict()).isEqualTo(Verdict.NOT_JUDGED);
    assertThat(result.words()).contains("1 mmol/L").contains("mg/L");
  }

  @Test
  void aControlWithoutAResultIsOut() {
    AdditionSeries control = Sample.of("QC", 14).series();
    BatchEvidence gathered =
        new BatchEvidence(
            new ControlBook(
                List.of(ControlBench.rule("QC", Kind.CONTROL_SAMPLE, 10, 0, Limits.NONE))),
            org.spikewright.judgement.CriteriaBook.defaults(),
            List.of(),
            ControlHistory.NONE);
    gathered.add(SAMPLE, ControlBench.result(SAMPLE));
    gathered.addWithout(control, "the signal does not rise with the additions");
    Evidence evidence = gathered.evidence();
    assertThat(kinds(evidence, SAMPLE)).containsExactly(FlagKind.CONTROL_OUT);
    assertThat(evidence.found().points()).isEmpty();
  }

  @ParameterizedTest(name = "found {0} in the spiked one: recovery {1}")
  @CsvSource({"13, 1.0, IN", "11.8, 0.76, OUT", "14.2, 1.24, OUT"})
  void aSpikedControlIsHeldAgainstItsParentAndWhatWasAdded(
      double found, double recovery, Verdict verdict) {
    AdditionSeries spiked = Sample.of("W-1-S", found).series();
    Evidence evidence =
        ControlBench.evidence(
            List.of(
                ControlBench.beside(
                    "-S",
                    Kind.SPIKED_CONTROL,
                    PerAnalyte.one(
                        new Certified(
                            new Quantity(5000, Unit.of("µg/L")), OptionalDouble.empty())))),
            List.of(SAMPLE, spiked));
    ControlResult result = evidence.found().controls().get(0);
    assertThat(result.recovery().getAsDouble()).isCloseTo(recovery, within(1e-9));
    assertThat(result.verdict()).isEqualTo(verdict);
    assertThat(kinds(evidence, SAMPLE).contains(FlagKind.RECOVERY_OUT))
        .isEqualTo(verdict == Verdict.OUT);
    assertThat(result.point().orElseThrow().unit()).isEqualTo("1");
  }

  @Test
  void aSpikedControlWithoutItsParentIsNotJudged() {
    Evidence evidence =
        ControlBench.evidence(
            List.of(
                ControlBench.beside(
                    "-S",
                    Kind.SPIKED_CONTROL,
                    PerAnalyte.one(
                        new Certified(
                            new Quantity(5, ControlBench.MG_PER_L), OptionalDouble.empty())))),
            List.of(Sample.of("W-1-S", 13).series()));
    ControlResult result = evidence.found().controls().get(0);
    assertThat(result.verdict()).isEqualTo(Verdict.NOT_JUDGED);
    assertThat(result.words()).isEqualTo("no result of its parent W-1");
  }

  @ParameterizedTest(name = "{0} beside 8: difference {1}")
  @CsvSource({"8, 0, IN", "9.5, 0.171429, IN", "10, 0.222222, OUT", "6.4, 0.222222, OUT"})
  void duplicatesAreHeldAgainstTheirMean(double copy, double difference, Verdict verdict) {
    AdditionSeries duplicate = Sample.of("W-1-D", copy).series();
    Evidence evidence =
        ControlBench.evidence(
            List.of(ControlBench.beside("-D", Kind.DUPLICATE, PerAnalyte.none())),
            List.of(SAMPLE, duplicate));
    DuplicateResult result = evidence.found().duplicates().get(0);
    assertThat(result.difference().getAsDouble()).isCloseTo(difference, within(1e-6));
    assertThat(result.verdict()).isEqualTo(verdict);
    assertThat(kinds(evidence, SAMPLE).contains(FlagKind.DUPLICATES_APART))
        .isEqualTo(verdict == Verdict.OUT);
  }

  @Test
  void aBlankOfMoreThanATenthOfAResultBringsThatResultToReview() {
    AdditionSeries blank = Sample.of("Reagents", 0.9).role(Role.BLANK).series();
    AdditionSeries large = Sample.of("W-2", 9.5).series();
    Evidence evidence = ControlBench.evidence(List.of(), List.of(SAMPLE, large, blank));
    assertThat(evidence.found().blanks()).hasSize(1);
    assertThat(kinds(evidence, SAMPLE)).containsExactly(FlagKind.BLANK_HIGH);
    assertThat(kinds(evidence, large)).isEmpty();
    assertThat(kinds(evidence, blank)).isEmpty();
  }

  @Test
  void blankAndResultAreComparedAsTheyWereBeforeTheirDilutions() {
    AdditionSeries blank = Sample.of("Reagents", 0.9).role(Role.BLANK).series();
    AdditionSeries diluted = Sample.of("W-3", 20).dilution(10).series();
    Evidence evidence = ControlBench.evidence(List.of(), List.of(diluted, blank));
    assertThat(kinds(evidence, diluted)).isEmpty();
  }

  @Test
  void aBlankInWhichNothingWasDetectedRaisesNothing() {
    AdditionSeries blank = Sample.of("Reagents", 0.01).role(Role.BLANK).series();
    AdditionSeries small = Sample.of("W-2", 0.06).series();
    Evidence evidence = ControlBench.evidence(List.of(), List.of(small, blank));
    assertThat(evidence.found().blanks().get(0).detected()).isFalse();
    assertThat(kinds(evidence, small)).isEmpty();
  }

  @Test
  void aBlankThatIsDueAndNowhereIsMissing() {
    AdditionSeries due = Sample.of("W-4", 8).with(Blanks.NONE, true);
    AdditionSeries mapped =
        Sample.of("W-5", 8)
            .with(
                new Blanks(
                    OptionalDouble.empty(), Optional.of(Bench.mgPerL(0.1)), Optional.empty()),
                true);
    AdditionSeries blank = Sample.of("Reagents", 0.2).role(Role.BLANK).series();
    assertThat(kinds(ControlBench.evidence(List.of(), List.of(due, mapped)), due))
        .containsExactly(FlagKind.BLANK_MISSING);
    assertThat(kinds(ControlBench.evidence(List.of(), List.of(due, mapped)), mapped)).isEmpty();
    assertThat(kinds(ControlBench.evidence(List.of(), List.of(due, blank)), due)).isEmpty();
  }

  @Test
  void seriesOfOneSampleThatDisagreeAreAllReviewed() {
    AdditionSeries one = Sample.of("W-1", 8).series();
    AdditionSeries apart = Sample.of("W-1", 9).dilution(2).at(20).series();
    AdditionSeries near = Sample.of("W-1", 8.01).dilution(2).at(20).series();
    Evidence disagree = ControlBench.evidence(List.of(), List.of(one, apart));
    assertThat(kinds(disagree, one)).containsExactly(FlagKind.SERIES_DISAGREE);
    assertThat(kinds(disagree, apart)).containsExactly(FlagKind.SERIES_DISAGREE);
    Evidence agree = ControlBench.evidence(List.of(), List.of(one, near));
    assertThat(kinds(agree, one)).isEmpty();
    Agreement found = agree.found().agreements().get(0);
    assertThat(found.combination().mean()).isBetween(8.0, 8.01);
    assertThat(found.agree()).isTrue();
  }

  @Test
  void linesOfOneElementStandSideBySideAndAreNotCombined() {
    Evidence evidence =
        ControlBench.evidence(
            List.of(),
            List.of(
                Sample.of("W-1", 8).line("228.8").series(),
                Sample.of("W-1", 10).line("214.4").series()));
    assertThat(evidence.found().agreements()).isEmpty();
    LinesBeside lines = evidence.found().lines().get(0);
    assertThat(lines.lines()).hasSize(2);
    assertThat(lines.spread().getAsDouble()).isCloseTo(2.0 / 9, within(1e-9));
  }

  @Test
  void aDriftCheckCountsOnlyWhileASeriesWasMeasured() {
    List<CheckReading> checks =
        List.of(
            ControlBench.check("CCV", -10, 1.00),
            ControlBench.check("CCV", 10, 0.98),
            ControlBench.check("CCV", 60, 0.80));
    AdditionSeries early = Sample.of("W-1", 8).series();
    AdditionSeries late = Sample.of("W-2", 8).at(30).series();
    Evidence evidence =
        ControlBench.evidence(
            List.of(), List.of(early, late), List.copyOf(checks), ControlHistory.NONE);
    assertThat(kinds(evidence, early)).isEmpty();
    assertThat(kinds(evidence, late)).containsExactly(FlagKind.CHECK_READING_OFF);
    CheckResult run = evidence.found().checks().get(0);
    assertThat(run.worst().getAsDouble()).isCloseTo(-0.2, within(1e-12));
    assertThat(run.verdict()).isEqualTo(Verdict.OUT);
  }

  @ParameterizedTest(name = "external slope {0}: {1}")
  @CsvSource({"2.02, none beyond ± 10 %", "2.6, beyond ± 10 %", "2.2, not settled"})
  void theSensitivityInTheSampleIsComparedWithTheCalibrations(double slope, String words) {
    // 10 mL in 20 mL: a slope of 1 on the axis is 2 per concentration in the flask.
    Evidence evidence =
        ControlBench.evidence(
            List.of(),
            List.of(SAMPLE),
            List.of(
                ControlBench.calibration(0, 0.001),
                ControlBench.calibration(1, slope),
                ControlBench.calibration(2, 2 * slope + 0.002),
                ControlBench.calibration(4, 4 * slope)),
            ControlHistory.NONE);
    MatrixEffect effect = evidence.found().matrixEffects().get(0);
    assertThat(effect.inSample()).isCloseTo(2, within(0.01));
    assertThat(effect.external()).isCloseTo(slope, within(0.01));
    assertThat(effect.words()).isEqualTo(words);
  }

  private static double[] past(int n) {
    double[] past = new double[n];
    for (int i = 0; i < n; i++) {
      past[i] = 10 + (i % 2 == 0 ? 0.1 : -0.1);
    }
    return past;
  }

  @ParameterizedTest(name = "{0} earlier points: {1}")
  @CsvSource({"19, IN", "20, OUT"})
  void aChartJudgesOnlyFromTwentyPointsOn(int points, Verdict verdict) {
    // The mean range of neighbours is 0.2, the standard deviation 0.18: 10.7 is beyond three.
    AdditionSeries control = Sample.of("QC", 10.7).series();
    ControlKey key = new ControlKey("QC", Kind.CONTROL_SAMPLE, "furnace", "Cd", "");
    Evidence evidence =
        ControlBench.evidence(
            List.of(ControlBench.rule("QC", Kind.CONTROL_SAMPLE, 10, 0, Limits.NONE)),
            List.of(control),
            List.of(),
            ControlBench.history(key, past(points)));
    ControlResult result = evidence.found().controls().get(0);
    assertThat(result.chart().orElseThrow().provisional()).isEqualTo(points < 20);
    assertThat(result.verdict()).isEqualTo(verdict);
    assertThat(Arrays.asList("", "beyond an action limit of its chart")).contains(result.words());
  }

  @Test
  void theNightAddsItsControlsAndBlanksToTheHistory() {
    Evidence evidence =
        ControlBench.evidence(
            List.of(ControlBench.rule("QC*", Kind.CONTROL_SAMPLE, 10, 0, Limits.NONE)),
            List.of(
                Sample.of("QC 4 March", 9.9).series(),
                Sample.of("Reagents", 0.2).role(Role.BLANK).series()));
    assertThat(evidence.found().points())
        .extracting(point -> point.key().name())
        .containsExactly("QC*", "Reagents");
    assertThat(evidence.found().points().get(0).reference()).hasValue(10);
  }
}
