package org.spikewright.published;

import static org.assertj.core.api.Assertions.assertThat;
import static org.spikewright.published.Agreement.isAbout;

import java.io.IOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.spikewright.judgement.SeriesResult;

/**
 * Exports of every design, made from the physics of the bench: a signal in proportion to the
 * concentration in the measured solution. Each must give back what was put in, which it does only
 * where axis and volume factor are right; the volumes and masses differ from flask to flask so that
 * a wrong one shows.
 */
class DesignsByHandTest {
  @TempDir Path folder;

  /** What is in the sample, in mg/L or mg/kg. */
  private static final double FOUND = 0.25;

  private static final double STOCK = 2;
  private static final double[] ALIQUOT = {10.0, 10.2, 9.9, 10.1};
  private static final double[] ADDED = {0, 0.5, 1.0, 1.5};
  private static final double[] TOTAL = {50.0, 49.5, 50.5, 50.2};
  private static final double[] STANDARD = {0.100, 0.104, 0.097, 0.101};

  /** What the instrument makes of the same solution while its sensitivity drifts. */
  private static final double[] DRIFT = {1, 0.97, 1.04, 0.91};

  private static double inFlask(int i) {
    return (FOUND * ALIQUOT[i] + STOCK * ADDED[i]) / TOTAL[i];
  }

  private PublishedCase read(String mapping, List<String> lines) throws IOException {
    return HandBench.read(folder, mapping, lines.toArray(String[]::new));
  }

  private static String mapping(String columns, String fixed, String result) {
    return """
        name  = "bench"
        files = "*.csv"
        [columns]
        sample = "sample"
        signal = "signal"
        flask  = "flask"
        %s
        [fixed]
        analyte = "Cd"
        %s
        [result]
        unit = "%s"
        """
        .formatted(columns, fixed, result);
  }

  private static final String MASSES =
      """
      aliquot_mass  = { header = "aliquot", unit = "g" }
      addition_mass = { header = "added", unit = "g" }
      final_mass    = { header = "total", unit = "g" }
      """;

  private static final String VOLUMES =
      """
      aliquot_volume  = { header = "aliquot", unit = "mL" }
      addition_volume = { header = "added", unit = "mL" }
      final_volume    = { header = "total", unit = "mL" }
      """;

  private static List<String> bench(double[] signal, double[] standard) {
    List<String> lines = new ArrayList<>();
    lines.add("sample,flask,aliquot,added,total,weighed,signal,standard");
    for (int i = 0; i < signal.length; i++) {
      lines.add(
          "BW-1,%d,%s,%s,%s,%s,%s,%s"
              .formatted(i, ALIQUOT[i], ADDED[i], TOTAL[i], STANDARD[i], signal[i], standard[i]));
    }
    return lines;
  }

  private interface OfFlask {
    double at(int i);
  }

  private static double[] each(OfFlask number) {
    double[] numbers = new double[4];
    for (int i = 0; i < 4; i++) {
      numbers[i] = number.at(i);
    }
    return numbers;
  }

  private static final double[] NO_STANDARD = {1, 1, 1, 1};

  @Test
  void weighedFlasksReferToTheMassOfTheAliquot() throws IOException {
    String mapping = mapping(MASSES, "design = \"weighed\"\nstock = \"2 mg/kg\"", "mg/kg");
    SeriesResult result = read(mapping, bench(each(i -> 1000 * inFlask(i)), NO_STANDARD)).result();
    isAbout(FOUND, result.value(), 1e-12);
    assertThat(result.line().x()).containsExactly(0, 2 * 0.5 / 10.2, 2 * 1.0 / 9.9, 2 * 1.5 / 10.1);
    double meanAliquot = (10.0 + 10.2 + 9.9 + 10.1) / 4;
    double meanTotal = (50.0 + 49.5 + 50.5 + 50.2) / 4;
    isAbout(1000 * meanAliquot / meanTotal, result.line().slope(), 1e-12);
    // 1000 for each mg/kg in the flask is 1e9 for each g/g.
    isAbout(1e9, result.line().slope() * result.series().toSensitivity(), 1e-12);
  }

  /** A test portion dissolved to 40 g: 0.25 mg/kg in the solution is 20 mg/kg in 0.5 g. */
  @Test
  void aWeighedDigestLeadsToTheSolid() throws IOException {
    String mapping =
        mapping(
            MASSES,
            "design = \"weighed\"\nstock = \"2 mg/kg\"\ntest_portion = \"0.5 g\"\n"
                + "digest_mass = \"40 g\"\ndry_mass = \"80 %\"",
            "mg/kg");
    SeriesResult result = read(mapping, bench(each(i -> 1000 * inFlask(i)), NO_STANDARD)).result();
    isAbout(0.25 * 40 / 0.5 / 0.8, result.value(), 1e-12);
    assertThat(result.series().toResult().unit().symbol()).isEqualTo("mg/kg dry");
  }

  private static String withStandard(String places, String design, String given, String unit) {
    return mapping(
        places
            + "internal_standard = \"standard\"\n"
            + (given.equals("weighed in")
                ? "internal_standard_mass = { header = \"weighed\", unit = \"g\" }\n"
                : ""),
        "design = \""
            + design
            + "\"\nstock = \"2 "
            + unit
            + "\"\nbaseline = 7\n"
            + "internal_standard_baseline = 11\ninternal_standard_given = \""
            + given
            + "\"",
        unit);
  }

  private static double standard(String given, int i) {
    return switch (given) {
      case "in the flask" -> 20000 * 0.1 / TOTAL[i];
      case "weighed in" -> 20000 * STANDARD[i] / TOTAL[i];
      default -> 30;
    };
  }

  private static List<String> drifting(String given) {
    return bench(
        each(i -> 7 + 1000 * DRIFT[i] * inFlask(i)), each(i -> 11 + DRIFT[i] * standard(given, i)));
  }

  @ParameterizedTest
  @ValueSource(strings = {"in the flask", "weighed in", "on line"})
  void anInternalStandardTakesTheDriftOutHoweverItWasGiven(String given) throws IOException {
    SeriesResult volumes =
        read(withStandard(VOLUMES, "made up", given, "mg/L"), drifting(given)).result();
    isAbout(FOUND, volumes.value(), 1e-12);
    SeriesResult masses =
        read(withStandard(MASSES, "weighed", given, "mg/kg"), drifting(given)).result();
    isAbout(FOUND, masses.value(), 1e-12);
  }

  @Test
  void anInternalStandardThatIsTakenForAnotherKindMissesTheResult() throws IOException {
    String mapping = withStandard(VOLUMES, "made up", "in the flask", "mg/L");
    double wrong = read(mapping, drifting("on line")).result().value();
    assertThat(Math.abs(wrong / FOUND - 1)).isGreaterThan(1e-3);
  }

  /** Weighed in, the ratio refers to the aliquot itself: slope is sensitivity. */
  @Test
  void theSensitivityOfARatioToAWeighedStandardIsTheSlope() throws IOException {
    SeriesResult result =
        read(withStandard(MASSES, "weighed", "weighed in", "mg/kg"), drifting("weighed in"))
            .result();
    // 1000 counts for each mg/kg over 20000 for each g/g of standard.
    isAbout(1000.0 / 20000, result.line().slope(), 1e-12);
    isAbout(1000.0 / 20000 * 1e6, result.line().slope() * result.series().toSensitivity(), 1e-12);
  }

  @Test
  void theFinalVolumeNeedNotBeKnownWhereTheStandardIsInTheFlask() throws IOException {
    String places = VOLUMES.replaceAll("(?m)^final_volume.*$", "");
    String mapping = withStandard(places, "made up", "in the flask", "mg/L");
    isAbout(FOUND, read(mapping, drifting("in the flask")).result().value(), 1e-12);
  }

  @Test
  void aStandardOnceInTheVesselTakesItsGrowingVolumeOut() throws IOException {
    String mapping =
        withStandard(
                VOLUMES.replaceAll("(?m)^(final|aliquot)_volume.*$", ""),
                "one vessel",
                "in the flask",
                "mg/L")
            .replace(
                "[result]",
                "additions = \"cumulative\"\naliquot_volume = \"10 mL\"\n"
                    + "start_volume = \"20 mL\"\n[result]");
    double[] signal =
        each(i -> 7 + 1000 * DRIFT[i] * (FOUND * 10 + STOCK * ADDED[i]) / (20 + ADDED[i]));
    double[] standard = each(i -> 11 + DRIFT[i] * 900 / (20 + ADDED[i]));
    SeriesResult result = read(mapping, bench(signal, standard)).result();
    isAbout(FOUND, result.value(), 1e-12);
    assertThat(result.flasks()).allMatch(flask -> flask.volumeFactor() == 1);
  }

  /** The instrument reads 0.8 of what is there. */
  @Test
  void concentrationsReadBackGiveTheMatrixFactor() throws IOException {
    String mapping =
        mapping(
            VOLUMES, "design = \"made up\"\nstock = \"2 mg/L\"\nsignal_unit = \"µg/L\"", "mg/L");
    SeriesResult result =
        read(mapping, bench(each(i -> 0.8 * 1000 * inFlask(i)), NO_STANDARD)).result();
    isAbout(FOUND, result.value(), 1e-12);
    isAbout(0.8, result.series().matrixFactor(result.line().slope()), 1e-12);
  }

  @Test
  void plainSignalsHaveNoMatrixFactor() throws IOException {
    String mapping = mapping(VOLUMES, "design = \"made up\"\nstock = \"2 mg/L\"", "mg/L");
    SeriesResult result = read(mapping, bench(each(i -> inFlask(i)), NO_STANDARD)).result();
    assertThat(result.series().matrixFactor(result.line().slope())).isEmpty();
  }

  /** 2 mg/L of lead are 2/207.2 mmol/L. */
  @ParameterizedTest
  @ValueSource(
      strings = {"0.00965250965250965 mmol/L", "0.00965250965250965 mM", "9.65250965250965 µmol/L"})
  void aStockInAmountsLeadsToAResultInMassesByTheMolarMass(String stock) throws IOException {
    String mapping =
        mapping(
            VOLUMES,
            "design = \"made up\"\nmolar_mass = \"207.2 g/mol\"\nstock = \"" + stock + "\"",
            "mg/L");
    SeriesResult result = read(mapping, bench(each(i -> inFlask(i)), NO_STANDARD)).result();
    isAbout(FOUND, result.value(), 1e-12);
  }

  @Test
  void aStockInMassesLeadsToAResultInAmountsPerDryMass() throws IOException {
    String mapping =
        mapping(
            VOLUMES,
            "design = \"made up\"\nmolar_mass = \"207.2 g/mol\"\nstock = \"2 mg/L\"\n"
                + "test_portion = \"0.5 g\"\ndigest_volume = \"50 mL\"\ndry_mass = \"80 %\"",
            "mmol/kg");
    SeriesResult result = read(mapping, bench(each(i -> inFlask(i)), NO_STANDARD)).result();
    isAbout(0.25 / 207.2 * 50 / 0.5 / 0.8, result.value(), 1e-12);
    assertThat(result.series().toResult().unit().symbol()).isEqualTo("mmol/kg dry");
  }

  /** Flasks each with their own stock: 0.5 mL of 2 mg/L, 1 mL of 4 mg/L and so on. */
  @Test
  void stocksOfDifferentStrengthInFlasksThatAreMadeUp() throws IOException {
    double[] stock = {2, 2, 4, 1};
    List<String> lines = new ArrayList<>(List.of("sample,flask,aliquot,added,total,stock,signal"));
    for (int i = 0; i < 4; i++) {
      double signal = (FOUND * ALIQUOT[i] + stock[i] * ADDED[i]) / TOTAL[i];
      lines.add(
          "BW-1,%d,%s,%s,%s,%s,%s".formatted(i, ALIQUOT[i], ADDED[i], TOTAL[i], stock[i], signal));
    }
    String mapping =
        mapping(
            VOLUMES + "stock = { header = \"stock\", unit = \"mg/L\" }\n",
            "design = \"made up\"",
            "mg/L");
    isAbout(FOUND, read(mapping, lines).result().value(), 1e-12);
  }

  /**
   * Sample diluted tenfold before the aliquot, blank twofold before it was measured: 0.25·10 −
   * 0.3·2 = 1.9 mg/L in the digest; of 50 mL and 0.5 g 190 mg/kg.
   */
  @Test
  void sampleAndMethodBlankComeToTheDigestByTheirOwnDilutions() throws IOException {
    String mapping =
        mapping(
            VOLUMES,
            "design = \"made up\"\nstock = \"2 mg/L\"\ndilution = \"1 + 9\"\n"
                + "method_blank = \"0.3 mg/L ± 0.03 mg/L\"\nmethod_blank_dilution = \"2\"\n"
                + "test_portion = \"0.5 g\"\ndigest_volume = \"50 mL\"",
            "mg/kg");
    SeriesResult result = read(mapping, bench(each(i -> inFlask(i)), NO_STANDARD)).result();
    isAbout(190, result.value(), 1e-12);
    isAbout(0.06 / Math.sqrt(3), result.series().toResult().methodBlankUncertainty(), 1e-12);
  }
}
