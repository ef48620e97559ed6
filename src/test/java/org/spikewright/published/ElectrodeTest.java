package org.spikewright.published;

import static org.assertj.core.api.Assertions.assertThat;
import static org.spikewright.published.Agreement.isAbout;
import static org.spikewright.published.Agreement.prints;

import java.io.IOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.judgement.ElectrodeResult;
import org.spikewright.judgement.FlagKind;
import org.spikewright.judgement.Outcome;
import org.spikewright.judgement.Verdict;
import org.spikewright.summary.ResultRow;

/** Known additions with an electrode, from the export to the outcome. */
class ElectrodeTest {
  @TempDir Path folder;

  private static ElectrodeResult numbers(PublishedCase read) {
    return read.only().electrode().orElseThrow(() -> new AssertionError(read.only().flags()));
  }

  /** C = (C_s·v/(V_0 + v))/(10^(ΔE/S) − V_0/(V_0 + v)). */
  private static double twoPotentials(double step, double slope, double v0, double v, double cs) {
    return cs * v / (v0 + v) / (Math.pow(10, step / slope) - v0 / (v0 + v));
  }

  /**
   * Nitrate in water: Harvey, Analytical Chemistry 2.1, practice exercise 11.6; second potential,
   * volumes and standard as in the book, first potential and the answer 11.0 mg/L from memory.
   */
  @Test
  void nitrateInWater() {
    PublishedCase nitrate = PublishedCase.of("sd01", "electrode/nitrate.csv");
    ElectrodeResult result = numbers(nitrate);
    isAbout(twoPotentials(0.089 - 0.102, -0.05916, 25, 1, 200), result.value(), 1e-9);
    prints("11.0", result.value());
    assertThat(result.standardError()).isEmpty();
    assertThat(nitrate.flags())
        .contains(FlagKind.NO_FIT_UNCERTAINTY)
        .doesNotContain(FlagKind.ELECTRODE_SLOPE);
    assertThat(nitrate.only().verdict()).isEqualTo(Verdict.REVIEW);
    assertThat(nitrate.only().reported()).isEqualTo("11.0");
  }

  /**
   * Calcium in sea water: data from memory of an example in Harvey, Analytical Chemistry 2.1; no
   * print is claimed. A tenfold dilution comes before the aliquot.
   */
  @Test
  void calciumInSeaWater() {
    ElectrodeResult result = numbers(PublishedCase.of("sd03", "electrode/seawater.csv"));
    isAbout(10 * twoPotentials(0.00873, 0.02958, 50, 1, 0.05), result.value(), 1e-9);
    isAbout(9.877e-3, result.value(), 1e-3);
  }

  /**
   * Fluoride: case SD04 of the reference set, whose printed answer, 2.96e-4 mol/L, scales
   * potentials in proportion; the data give 7.4e-8, and an addition some 700 times as large.
   */
  @Test
  void fluorideIsNotWhatWasPrinted() {
    PublishedCase fluoride = PublishedCase.of("sd04", "electrode/water.csv");
    ElectrodeResult result = numbers(fluoride);
    isAbout(
        twoPotentials(-0.349 + 0.1805, -0.05916, 50, 0.5, 100) / 18.998 / 1000,
        result.value(),
        1e-9);
    isAbout(7.4e-8, result.value(), 0.01);
    assertThat(fluoride.flags()).contains(FlagKind.ADDITIONS_TOO_LARGE);
    assertThat(fluoride.only().verdict()).isEqualTo(Verdict.REVIEW);
  }

  private static String mapping(int charge, String method) {
    return """
        name  = "electrode"
        files = "*.csv"
        [columns]
        sample          = "sample"
        flask           = "step"
        signal          = "mV"
        addition_volume = { header = "added", unit = "mL" }
        stock           = { header = "stock", unit = "mg/L" }
        [fixed]
        analyte        = "ion"
        design         = "electrode"
        additions      = "each"
        signal_unit    = "mV"
        aliquot_volume = "25 mL"
        start_volume   = "50 mL"
        [method]
        charge = %d
        %s
        [result]
        unit = "mg/L"
        """
        .formatted(charge, method);
  }

  /** Potentials of 4 mg/L in 25 of 50 mL after steps of 1 mL, to the last digit. */
  private static List<String> potentials(double slope, double... stocks) {
    List<String> lines = new ArrayList<>(List.of("sample,step,added,stock,mV"));
    double amount = 4 * 25;
    for (int i = 0; i < stocks.length; i++) {
      amount += i == 0 ? 0 : stocks[i];
      double potential = 210 + slope * Math.log10(amount / (50 + i));
      lines.add(
          String.format(Locale.ROOT, "BW-1,%d,%d,%s,%s", i, i == 0 ? 0 : 1, stocks[i], potential));
    }
    return lines;
  }

  private PublishedCase read(String mapping, List<String> lines) throws IOException {
    return HandBench.read(folder, mapping, lines.toArray(String[]::new));
  }

  /** Slopes of 98, 98, 85 and 110 % of theory at 25 °C. */
  @ParameterizedTest
  @CsvSource({"-1, -57.98, false", "2, 28.99, false", "1, 50.3, true", "-2, -32.5, true"})
  void aFreeSlopeIsFittedAndHeldAgainstTheory(int charge, double slope, boolean flagged)
      throws IOException {
    PublishedCase read =
        read(mapping(charge, "temperature = 25"), potentials(slope, 100, 100, 100, 100, 100));
    ElectrodeResult result = numbers(read);
    isAbout(4, result.value(), 1e-7);
    isAbout(slope, result.fit().slope(), 1e-7);
    isAbout(210, result.fit().standardPotential(), 1e-6);
    assertThat(read.flags().contains(FlagKind.ELECTRODE_SLOPE)).isEqualTo(flagged);
    PublishedCase withoutTemperature =
        read(mapping(charge, ""), potentials(slope, 100, 100, 100, 100, 100));
    assertThat(withoutTemperature.flags()).doesNotContain(FlagKind.ELECTRODE_SLOPE);
  }

  @Test
  void severalStocksAddUpInTheVessel() throws IOException {
    isAbout(
        4, numbers(read(mapping(-1, ""), potentials(-58, 50, 50, 100, 100, 200))).value(), 1e-7);
  }

  @Test
  void scatterBecomesAnIntervalThatHoldsTheResultAndNoDetectionLimit() throws IOException {
    List<String> lines = new ArrayList<>(potentials(-58, 100, 100, 100, 100, 100, 100));
    double[] off = {0.2, -0.3, 0.1, 0.25, -0.15, -0.1};
    for (int i = 0; i < off.length; i++) {
      String line = lines.get(i + 1);
      int comma = line.lastIndexOf(',');
      double potential = Double.parseDouble(line.substring(comma + 1)) + off[i];
      lines.set(i + 1, line.substring(0, comma + 1) + Math.round(10 * potential) / 10.0);
    }
    Outcome outcome = read(mapping(-1, "temperature = 25"), lines).only();
    ElectrodeResult result = outcome.electrode().orElseThrow();
    assertThat(result.lower95().orElseThrow()).isLessThan(result.value());
    assertThat(result.upper95().orElseThrow()).isGreaterThan(result.value());
    assertThat(outcome.reported()).contains(" ± ");
    ResultRow row = ResultRow.of(outcome);
    assertThat(row.value()).hasValue(result.value());
    assertThat(row.lower95()).isEqualTo(result.lower95());
    assertThat(row.slope().orElseThrow()).isBetween(-60.0, -54.0);
    assertThat(row.detectionLimit()).isEmpty();
    assertThat(row.flasks()).isEqualTo(6);
    assertThat(row.residualDf()).hasValue(3);
  }

  @Test
  void fewPotentialsWithoutAMeasuredSlopeSayWhatIsMissing() throws IOException {
    Outcome outcome = read(mapping(-1, ""), potentials(-58, 100, 100, 100)).only();
    assertThat(outcome.electrode()).isEmpty();
    assertThat(outcome.verdict()).isEqualTo(Verdict.REPEAT);
    assertThat(outcome.flags())
        .anyMatch(
            flag ->
                flag.kind() == FlagKind.SLOPE_NOT_ESTABLISHED
                    && flag.sentence().contains("measured slope"));
  }
}
