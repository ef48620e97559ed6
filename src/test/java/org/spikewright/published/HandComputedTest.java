package org.spikewright.published;

import static org.assertj.core.api.Assertions.assertThat;
import static org.spikewright.published.Agreement.isAbout;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.spikewright.judgement.Flag;
import org.spikewright.judgement.FlagKind;
import org.spikewright.judgement.Outcome;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.judgement.Verdict;
import org.spikewright.reading.Role;
import org.spikewright.series.Flask;
import org.spikewright.summary.ResultColumns;
import org.spikewright.summary.ResultRow;

/**
 * Results that a person can follow with a pencil: each is computed in the test by the formulas of
 * {@link ByHand}, from the numbers of the export.
 */
class HandComputedTest {
  /** Two-sided 95 % quantiles of Student's t, from any table, to more digits. */
  private static final double T2 = 4.302652729749464;

  private static final double T3 = 3.182446305283710;

  private static final double[] SCATTERED = {0.503, 0.748, 1.006, 1.249};

  @TempDir Path folder;

  private static String madeUp(String fixed, String more) {
    return """
        name  = "bench"
        files = "*.csv"
        [columns]
        sample          = "sample"
        signal          = "signal"
        addition_volume = { header = "added", unit = "mL" }
        [fixed]
        analyte        = "Cd"
        design         = "made up"
        final_volume   = "50 mL"
        stock          = "10 mg/L"
        %s
        %s
        """
        .formatted(fixed, more);
  }

  private static final String PLAIN =
      madeUp("aliquot_volume = \"10 mL\"", "[result]\nunit = \"mg/L\"");

  private static String withMethod(String method) {
    return PLAIN + "\n[method]\n" + method;
  }

  private PublishedCase read(String mapping, String... lines) throws IOException {
    Path file = Files.write(folder.resolve("run.csv"), List.of(lines));
    return PublishedCase.read(mapping, file, "run.csv");
  }

  /** Flasks with 0, 1, 2 … mL, which with 10 mL of 10 mg/L stand at 0, 1, 2 … mg/L. */
  private static String[] series(double... signals) {
    String[] lines = new String[signals.length + 1];
    lines[0] = "sample,added,signal";
    for (int i = 0; i < signals.length; i++) {
      lines[i + 1] = "BW-1," + i + "," + signals[i];
    }
    return lines;
  }

  private static double[] steps(int n, double step) {
    double[] x = new double[n];
    for (int i = 0; i < n; i++) {
      x[i] = i * step;
    }
    return x;
  }

  @Test
  void eachOfTheThreeBlanksIsTakenOffWhereItBelongs() throws IOException {
    String mapping =
        madeUp(
            """
            aliquot_volume = "10 mL"
            dilution       = "1 + 4"
            baseline       = 0.2
            solvent_blank  = "500 µg/L"
            method_blank   = "0.3 mg/L ± 0.06 mg/L"
            """,
            "[result]\nunit = \"µg/L\"");
    SeriesResult result = read(mapping, series(0.703, 0.948, 1.206, 1.449)).result();
    // Baseline: 0.2 off every signal. Solvent: the stock holds 10 + 0.5 mg/L, so 1.05 mg/L a mL.
    ByHand line = ByHand.line(steps(4, 1.05), SCATTERED);
    // Five-fold dilution back to the sample, then the method blank there, then µg.
    isAbout((line.found() * 5 - 0.3) * 1000, result.value(), 1e-12);
    isAbout(line.standardError() * 5 * 1000, result.standardError(), 1e-11);
    double[] limits = line.limits(T2);
    isAbout((limits[0] * 5 - 0.3) * 1000, result.lower95(), 1e-11);
    isAbout((limits[1] * 5 - 0.3) * 1000, result.upper95(), 1e-11);
    // Half-width of a rectangle over √3, in quadrature: nothing is left of it where it is small.
    double atZero = Math.hypot(line.standardErrorAtZero() * 5, 0.06 / Math.sqrt(3)) * 1000;
    isAbout(atZero, result.detection().orElseThrow().standardErrorAtZero(), 1e-11);
  }

  @Test
  void aSolidIsFollowedFromTheFlaskToTheDryPortion() throws IOException {
    String mapping =
        madeUp(
            """
            aliquot_volume = "10 mL"
            dilution       = "2 mL to 10 mL"
            test_portion   = "0.4321 g"
            digest_volume  = "25 mL"
            dry_mass       = "82.5 %"
            method_blank   = "40 µg/L ± 10 µg/L"
            """,
            "[result]\nunit = \"mg/kg\"");
    SeriesResult result = read(mapping, series(SCATTERED)).result();
    ByHand line = ByHand.line(steps(4, 1), SCATTERED);
    // mg/L · 0.025 L / 0.0004321 kg, over the dry share.
    double perKilogram = 0.025 / 0.0004321 / 0.825;
    isAbout((line.found() * 5 - 0.040) * perKilogram, result.value(), 1e-12);
    isAbout(line.standardError() * 5 * perKilogram, result.standardError(), 1e-11);
    isAbout((line.limits(T2)[0] * 5 - 0.040) * perKilogram, result.lower95(), 1e-11);
    isAbout((line.limits(T2)[1] * 5 - 0.040) * perKilogram, result.upper95(), 1e-11);
    isAbout(
        Math.hypot(line.standardErrorAtZero() * 5, 0.010 / Math.sqrt(3)) * perKilogram,
        result.detection().orElseThrow().standardErrorAtZero(),
        1e-11);
    assertThat(result.series().toResult().unit().symbol()).isEqualTo("mg/kg dry");
  }

  @ParameterizedTest
  @ValueSource(strings = {"10", "1 + 9", "1 mL to 10 mL", "500 µL to 5 mL"})
  void aTenfoldDilutionIsOneHoweverItIsWritten(String dilution) throws IOException {
    String fixed = "aliquot_volume = \"10 mL\"\ndilution = \"" + dilution + "\"";
    String mapping = madeUp(fixed, "[result]\nunit = \"mg/L\"");
    SeriesResult result = read(mapping, series(SCATTERED)).result();
    ByHand line = ByHand.line(steps(4, 1), SCATTERED);
    isAbout(10 * line.found(), result.value(), 1e-12);
    isAbout(10 * line.standardError(), result.standardError(), 1e-11);
  }

  @Test
  void additionsStatedInTheFlaskLeadBackToTheSample() throws IOException {
    String mapping =
        """
        name  = "bench"
        files = "*.csv"
        [columns]
        sample   = "sample"
        signal   = "signal"
        addition = { header = "added", unit = "µg/L" }
        [fixed]
        analyte        = "Cd"
        design         = "stated"
        addition_terms = "flask"
        aliquot_volume = "10 mL"
        final_volume   = "50 mL"
        dilution       = 4
        method_blank   = "2 µg/L"
        [result]
        unit = "mg/L"
        """;
    SeriesResult result = read(mapping, series(SCATTERED)).result();
    ByHand line = ByHand.line(steps(4, 1), SCATTERED);
    // In the flask; five times that in the aliquot; four times that in the sample.
    isAbout((line.found() * 5 * 4 - 2) / 1000, result.value(), 1e-12);
    isAbout(line.standardError() * 5 * 4 / 1000, result.standardError(), 1e-11);
    isAbout((line.limits(T2)[1] * 5 * 4 - 2) / 1000, result.upper95(), 1e-11);
  }

  @Test
  void unequalAliquotsScaleBothTheAdditionAndTheSignal() throws IOException {
    String mapping =
        PLAIN
            .replace("aliquot_volume = \"10 mL\"", "")
            .replace(
                "[fixed]", "aliquot_volume = { header = \"aliquot\", unit = \"mL\" }\n[fixed]");
    double[] aliquot = {20, 18, 16, 12};
    double[] signal = {1.010, 1.149, 1.305, 1.352};
    String[] lines = series(signal);
    lines[0] += ",aliquot";
    double[] x = new double[4];
    double[] y = new double[4];
    for (int i = 0; i < 4; i++) {
      lines[i + 1] += "," + aliquot[i];
      x[i] = 10.0 * i / aliquot[i];
      // Signal per aliquot; any common factor cancels in the result.
      y[i] = signal[i] / aliquot[i];
    }
    PublishedCase read = read(mapping, lines);
    ByHand line = ByHand.line(x, y);
    isAbout(line.found(), read.result().value(), 1e-12);
    isAbout(line.standardError(), read.result().standardError(), 1e-11);
    isAbout(line.limits(T2)[0], read.result().lower95(), 1e-11);
    assertThat(read.flags()).contains(FlagKind.UNEQUAL_ALIQUOTS);
  }

  @ParameterizedTest
  @CsvSource({
    // found 2.0116 mg/L
    "2500 µg/L, < 2.5",
    "2.1 mg/L, < 2.1",
    "2.0 mg/L, 2.01 ± 0.13"
  })
  void belowTheReportingLimitThatLimitIsReported(String limit, String reported) throws IOException {
    Outcome outcome =
        read(withMethod("reporting_limit = \"" + limit + "\""), series(SCATTERED)).only();
    assertThat(outcome.reported()).isEqualTo(reported);
    assertThat(outcome.verdict()).isEqualTo(Verdict.REPORT);
  }

  @Test
  void aNegativeResultKeepsItsSignAndIsReportedAsNotDetected() throws IOException {
    double[] signals = {-0.004, 0.247, 0.502, 0.748};
    PublishedCase negative = read(PLAIN, series(signals));
    ByHand line = ByHand.line(steps(4, 1), signals);
    assertThat(line.found()).isNegative();
    isAbout(line.found(), negative.result().value(), 1e-11);
    isAbout(line.limits(T2)[0], negative.result().lower95(), 1e-11);
    isAbout(line.limits(T2)[1], negative.result().upper95(), 1e-11);
    assertThat(negative.flags()).contains(FlagKind.NEGATIVE_RESULT, FlagKind.BELOW_DETECTION);
    assertThat(negative.only().reported()).startsWith("< ");
  }

  @Test
  void theTargetUncertaintyOfTheMethodIsHeldAgainstTheExpandedUncertainty() throws IOException {
    ByHand line = ByHand.line(steps(4, 1), SCATTERED);
    double relative = T2 * line.standardError() / line.found();
    assertThat(relative).isBetween(0.05, 0.10);
    Outcome missed =
        read(withMethod("target_uncertainty = " + relative * 0.99), series(SCATTERED)).only();
    Flag flag =
        missed.flags().stream().filter(f -> f.kind() == FlagKind.UNCERTAIN).findFirst().get();
    isAbout(relative, flag.number(), 1e-11);
    assertThat(missed.verdict()).isEqualTo(Verdict.REVIEW);
    Outcome met =
        read(withMethod("target_uncertainty = " + relative * 1.01), series(SCATTERED)).only();
    assertThat(met.flags()).isEmpty();
  }

  @Test
  void theTrustedRangeIsHeldAgainstTheSignalAsRead() throws IOException {
    // 1.449 was read; 0.2 of it is baseline. The instrument does not know of baselines.
    String mapping =
        withMethod("trusted_signal = 1.4").replace("[fixed]", "[fixed]\nbaseline = 0.2");
    PublishedCase read = read(mapping, series(0.703, 0.948, 1.206, 1.449));
    Flag flag =
        read.only().flags().stream()
            .filter(f -> f.kind() == FlagKind.ADDITIONS_TOO_LARGE)
            .findFirst()
            .orElseThrow();
    isAbout(1.449, flag.number(), 1e-12);
    assertThat(read.only().verdict()).isEqualTo(Verdict.REVIEW);
    PublishedCase within =
        read(mapping.replace("= 1.4", "= 1.45"), series(0.703, 0.948, 1.206, 1.449));
    assertThat(within.only().flags()).isEmpty();
  }

  private static final String WITH_FLASKS =
      """
      name  = "bench"
      files = "*.csv"
      [columns]
      sample          = "sample"
      flask           = "flask"
      replicate       = "replicate"
      signal          = "signal"
      measured_at     = "at"
      addition_volume = { header = "added", unit = "mL" }
      [fixed]
      analyte        = "Cd"
      design         = "made up"
      aliquot_volume = "10 mL"
      final_volume   = "50 mL"
      stock          = "10 mg/L"
      flasks         = 3
      [result]
      unit = "mg/L"
      """;

  private static final String HEADER = "sample,flask,replicate,added,signal,at";

  /** Three flasks, of which the middle one is off; readings of a flask agree closely. */
  private static final String[] THREE_FLASKS = {
    HEADER,
    "BW-1,A,1,0,0.500,2026-03-04 08:00",
    "BW-1,A,2,0,0.504,2026-03-04 08:01",
    "BW-1,B,1,1,0.780,2026-03-04 08:02",
    "BW-1,B,2,1,0.784,2026-03-04 08:03",
    "BW-1,C,1,2,1.002,2026-03-04 08:04",
    "BW-1,C,2,2,0.998,2026-03-04 08:05",
  };

  @Test
  void theFlaskIsTheUnitOfEvidence() throws IOException {
    SeriesResult result = read(WITH_FLASKS, THREE_FLASKS).result();
    ByHand line = ByHand.line(steps(3, 1), new double[] {0.502, 0.782, 1.000});
    isAbout(line.found(), result.value(), 1e-12);
    isAbout(line.standardError(), result.standardError(), 1e-11);
    assertThat(result.line().residualDf()).isEqualTo(1);
    assertThat(result.flasks()).extracting(Flask::numbers).containsExactly(2, 2, 2);
  }

  @Test
  void readingsAsFlasksGiveTheIntervalOfReadingsAndSaySo() throws IOException {
    PublishedCase read = read(WITH_FLASKS + "[method]\nunit = \"reading\"", THREE_FLASKS);
    double[] x = {0, 0, 1, 1, 2, 2};
    double[] y = {0.500, 0.504, 0.780, 0.784, 1.002, 0.998};
    ByHand line = ByHand.line(x, y);
    isAbout(line.found(), read.result().value(), 1e-12);
    isAbout(line.standardError(), read.result().standardError(), 1e-11);
    double t4 = 2.776445105197793;
    isAbout(line.limits(t4)[0], read.result().lower95(), 1e-11);
    isAbout(line.limits(t4)[1], read.result().upper95(), 1e-11);
    assertThat(read.flags()).contains(FlagKind.READINGS_AS_FLASKS);
  }

  @Test
  void readingsAsFlasksDoNotMakeUpForFlasksThatAreMissing() throws IOException {
    String mapping = WITH_FLASKS.replace("= 3", "= 4") + "[method]\nunit = \"reading\"";
    PublishedCase read = read(mapping, THREE_FLASKS);
    assertThat(read.flags()).contains(FlagKind.FEW_FLASKS);
    assertThat(
            read.only().flags().stream()
                .filter(flag -> flag.kind() == FlagKind.FEW_FLASKS)
                .map(Flag::sentence))
        .containsExactly("3 flasks at 3 levels of addition; the method expects 4.");
  }

  @ParameterizedTest
  @ValueSource(strings = {"flask", "reading"})
  void aSecondRunIsNeitherAveragedNorForgotten(String unit) throws IOException {
    String[] lines = Arrays.copyOf(THREE_FLASKS, THREE_FLASKS.length + 1);
    lines[THREE_FLASKS.length] = "BW-1,B,1,1,9.999,2026-03-04 09:30";
    String mapping = WITH_FLASKS + "[method]\nunit = \"" + unit + "\"";
    PublishedCase with = read(mapping, lines);
    PublishedCase without = read(mapping, THREE_FLASKS);
    assertThat(with.result().value()).isEqualTo(without.result().value());
    assertThat(with.result().upper95()).isEqualTo(without.result().upper95());
    assertThat(with.only().flags())
        .filteredOn(flag -> flag.kind() == FlagKind.SECOND_RUN)
        .extracting(Flag::weight)
        .containsExactly(Flag.Weight.REVIEW);
    assertThat(without.flags()).doesNotContain(FlagKind.SECOND_RUN);
  }

  private static final String VESSEL =
      """
      name  = "vessel"
      files = "*.csv"
      [columns]
      sample          = "sample"
      flask           = "step"
      signal          = "signal"
      addition_volume = { header = "added", unit = "µL" }
      stock           = { header = "stock", unit = "mg/L" }
      [fixed]
      analyte        = "Cd"
      design         = "one vessel"
      additions      = "each"
      aliquot_volume = "10 mL"
      start_volume   = "20 mL"
      [result]
      unit = "mg/L"
      """;

  @Test
  void stepsIntoOneVesselAddUpAndTheVolumeGrows() throws IOException {
    double[] signal = {0.503, 0.741, 0.987, 1.214};
    double[] x = new double[4];
    double[] y = new double[4];
    String[] lines = new String[5];
    lines[0] = "sample,step,added,stock,signal";
    for (int i = 0; i < 4; i++) {
      lines[i + 1] = "BW-1," + i + "," + (i == 0 ? 0 : 100) + ",100," + signal[i];
      x[i] = 100 * 0.1 * i / 10;
      y[i] = signal[i] * (20 + 0.1 * i) / 20;
    }
    SeriesResult result = read(VESSEL, lines).result();
    ByHand line = ByHand.line(x, y);
    isAbout(line.found(), result.value(), 1e-12);
    isAbout(line.limits(T2)[0], result.lower95(), 1e-11);
    isAbout(line.limits(T2)[1], result.upper95(), 1e-11);
  }

  /** What the steps added up to cannot be told from the last stock and the total volume. */
  @Test
  void stocksOfDifferentStrengthInOneVesselAreRefusedAndNeverMixedUp() throws IOException {
    Outcome outcome =
        read(
                VESSEL,
                "sample,step,added,stock,signal",
                "BW-1,0,0,100,0.5",
                "BW-1,1,100,100,0.75",
                "BW-1,2,100,100,1.0",
                "BW-1,3,100,1000,3.5")
            .only();
    assertThat(outcome.result()).isEmpty();
    assertThat(outcome.flags()).extracting(Flag::kind).contains(FlagKind.NO_SERIES);
    assertThat(outcome.flags().get(0).sentence()).contains("100 mg/L", "1000 mg/L");
  }

  /** The stock beside a step that added nothing says nothing. */
  @Test
  void theStockBesideNoAdditionDoesNotMatter() throws IOException {
    SeriesResult result =
        read(
                VESSEL,
                "sample,step,added,stock,signal",
                "BW-1,0,0,250,0.5",
                "BW-1,1,100,100,0.75",
                "BW-1,2,100,100,1.0",
                "BW-1,3,100,100,1.25")
            .result();
    assertThat(result.flasks()).hasSize(4);
  }

  private static final String ROLES =
      madeUp(
          "aliquot_volume = \"10 mL\"\nmethod_blank = \"0.3 mg/L\"",
          """
          [roles]
          column  = "type"
          sample  = "Unknown"
          blank   = "Blank"
          control = "QC*"
          [result]
          unit = "mg/L"
          """);

  @ParameterizedTest
  @CsvSource({"Unknown, SAMPLE, 0.3", "QC low, CONTROL, 0.3", "Blank, BLANK, 0"})
  void theMethodBlankIsTakenOffAllButTheBlankItself(String type, Role role, double blank)
      throws IOException {
    String[] lines = series(SCATTERED);
    lines[0] += ",type";
    for (int i = 1; i < lines.length; i++) {
      lines[i] += "," + type;
    }
    PublishedCase read = read(ROLES, lines);
    SeriesResult result = read.result();
    assertThat(ResultColumns.fields(ResultRow.of(read.only())))
        .element(ResultColumns.NAMES.indexOf("role"))
        .isEqualTo(role.word());
    assertThat(result.series().role()).isEqualTo(role);
    double found = ByHand.line(steps(4, 1), SCATTERED).found();
    isAbout(found - blank, result.value(), 1e-12);
  }

  @Test
  void flasksOfDifferentRolesAreNotOneSeries() throws IOException {
    String[] lines = series(SCATTERED);
    lines[0] += ",type";
    for (int i = 1; i < lines.length; i++) {
      lines[i] += i == 1 ? ",Blank" : ",Unknown";
    }
    Outcome outcome = read(ROLES, lines).only();
    assertThat(outcome.result()).isEmpty();
    assertThat(outcome.flags().get(0).sentence()).contains("role", "blank", "sample");
  }

  @Test
  void aSeriesOfFiveHasThreeDegreesOfFreedom() throws IOException {
    double[] signals = {0.503, 0.748, 1.006, 1.249, 1.502};
    PublishedCase five = read(PLAIN, series(signals));
    ByHand line = ByHand.line(steps(5, 1), signals);
    isAbout(line.limits(T3)[0], five.result().lower95(), 1e-11);
    isAbout(line.limits(T3)[1], five.result().upper95(), 1e-11);
  }
}
