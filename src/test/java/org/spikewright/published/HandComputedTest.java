package org.spikewright.published;

import static org.assertj.core.api.Assertions.assertThat;
import static org.spikewright.published.Agreement.isAbout;
import static org.spikewright.published.HandBench.PLAIN;
import static org.spikewright.published.HandBench.SCATTERED;
import static org.spikewright.published.HandBench.T2;
import static org.spikewright.published.HandBench.T3;
import static org.spikewright.published.HandBench.madeUp;
import static org.spikewright.published.HandBench.series;
import static org.spikewright.published.HandBench.steps;
import static org.spikewright.published.HandBench.withMethod;

import java.io.IOException;
import java.nio.file.Path;
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

/**
 * Results that a person can follow with a pencil: each is computed in the test by the formulas of
 * {@link ByHand}, from the numbers of the export.
 */
class HandComputedTest {
  @TempDir Path folder;

  private PublishedCase read(String mapping, String... lines) throws IOException {
    return HandBench.read(folder, mapping, lines);
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

  @Test
  void aSeriesOfFiveHasThreeDegreesOfFreedom() throws IOException {
    double[] signals = {0.503, 0.748, 1.006, 1.249, 1.502};
    PublishedCase five = read(PLAIN, series(signals));
    ByHand line = ByHand.line(steps(5, 1), signals);
    isAbout(line.limits(T3)[0], five.result().lower95(), 1e-11);
    isAbout(line.limits(T3)[1], five.result().upper95(), 1e-11);
  }
}
