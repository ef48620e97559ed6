package org.spikewright.published;

import static org.assertj.core.api.Assertions.assertThat;
import static org.spikewright.published.Agreement.isAbout;
import static org.spikewright.published.HandBench.SCATTERED;
import static org.spikewright.published.HandBench.T2;
import static org.spikewright.published.HandBench.madeUp;
import static org.spikewright.published.HandBench.series;
import static org.spikewright.published.HandBench.steps;

import java.io.IOException;
import java.nio.file.Path;
import java.util.Arrays;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.spikewright.judgement.Flag;
import org.spikewright.judgement.FlagKind;
import org.spikewright.judgement.Outcome;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.reading.Role;
import org.spikewright.series.Flask;
import org.spikewright.summary.ResultColumns;
import org.spikewright.summary.ResultRow;

/**
 * What counts as a flask, a step and a role, by results that are computed in the test by the
 * formulas of {@link ByHand}.
 */
class HandComputedFlasksTest {
  @TempDir Path folder;

  private PublishedCase read(String mapping, String... lines) throws IOException {
    return HandBench.read(folder, mapping, lines);
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

  /** Each step brings its own stock: 0, 1, 2 and 12 mg/L referred to the 10 mL aliquot. */
  @Test
  void stocksOfDifferentStrengthInOneVesselAddUpStepByStep() throws IOException {
    double[] added = {0, 0.1, 0.2, 0.3};
    double[] x = {0, 1, 2, 12};
    double[] signal = {0.5, 0.75, 1.0, 3.5};
    double[] y = new double[4];
    for (int i = 0; i < 4; i++) {
      y[i] = signal[i] * (20 + added[i]) / 20;
    }
    SeriesResult result =
        read(
                VESSEL,
                "sample,step,added,stock,signal",
                "BW-1,0,0,100,0.5",
                "BW-1,1,100,100,0.75",
                "BW-1,2,100,100,1.0",
                "BW-1,3,100,1000,3.5")
            .result();
    ByHand line = ByHand.line(x, y);
    isAbout(line.found(), result.value(), 1e-12);
    isAbout(line.slope(), result.line().slope(), 1e-12);
  }

  /** What was added cannot be told from the last stock and the total volume. */
  @Test
  void totalsOfStocksOfDifferentStrengthAreRefusedAndNeverMixedUp() throws IOException {
    Outcome outcome =
        read(
                VESSEL.replace("\"each\"", "\"cumulative\""),
                "sample,step,added,stock,signal",
                "BW-1,0,0,100,0.5",
                "BW-1,1,100,100,0.75",
                "BW-1,2,200,100,1.0",
                "BW-1,3,300,1000,3.5")
            .only();
    assertThat(outcome.result()).isEmpty();
    assertThat(outcome.flags()).extracting(Flag::kind).contains(FlagKind.NO_SERIES);
    assertThat(outcome.flags().get(0).sentence()).contains("100 mg/L", "1000 mg/L", "each");
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
}
