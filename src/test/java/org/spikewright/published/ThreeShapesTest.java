package org.spikewright.published;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.TreeMap;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.judgement.Outcome;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.summary.ResultColumns;
import org.spikewright.summary.ResultRow;

/** One truth, three kinds of export: the form of a file changes no result. */
class ThreeShapesTest {
  private static final int SAMPLES = 20;
  private static final long SEED = 20260304;

  /** Columns that tell of the file or the sample's name and of nothing else. */
  private static final List<String> OF_THE_FILE = List.of("sample", "source_files");

  @TempDir Path folder;

  private static String mapping(String table, String time) {
    return """
        name  = "bench"
        files = "*"
        %s
        [columns]
        sample          = "sample"
        flask           = "flask"
        replicate       = "replicate"
        signal          = "signal"
        measured_at     = %s
        batch           = "batch"
        addition_volume = { header = "added_mL", unit = "mL" }
        [fixed]
        analyte        = "Cd"
        design         = "made up"
        flasks         = 5
        aliquot_volume = "10 mL"
        final_volume   = "50 mL"
        stock          = "10 mg/L"
        [result]
        unit = "mg/L"
        """
        .formatted(table, time);
  }

  @Test
  void theSameReadingsGiveTheSameResultsToTheBit() throws IOException {
    MadeNight night = new MadeNight(SAMPLES, SEED);
    String european =
        """
        [table]
        separator = ";"
        decimal   = ","
        encoding  = "windows-1252"
        """;
    Map<String, List<String>> plain =
        results(mapping("", "\"measured_at\""), night.plain(folder.resolve("a.csv")), "S-");
    assertThat(plain).hasSize(SAMPLES);
    assertThat(
            results(
                mapping(european, "{ header = \"measured_at\", format = \"dd.MM.yyyy HH:mm:ss\" }"),
                night.european(folder.resolve("b.csv")),
                "Fluß-Mü-"))
        .isEqualTo(plain);
    assertThat(
            results(
                mapping("", "\"measured_at\""), night.spreadsheet(folder.resolve("c.xlsx")), "S-"))
        .isEqualTo(plain);
  }

  @Test
  void mostIntervalsHoldTheTruth() throws IOException {
    MadeNight night = new MadeNight(SAMPLES, SEED);
    Path file = night.plain(folder.resolve("a.csv"));
    int hit = 0;
    for (Outcome outcome :
        PublishedCase.read(mapping("", "\"measured_at\""), file, "a.csv").outcomes()) {
      SeriesResult result = outcome.result().orElseThrow();
      String sample = result.series().key().subject().sample().text();
      double truth = night.truth(Integer.parseInt(sample.substring(2)));
      if (result.lower95().orElseThrow() <= truth && truth <= result.upper95().orElseThrow()) {
        hit++;
      }
    }
    // 20 intervals at 95 %: fewer than 17 happen in 2 of 100 nights.
    assertThat(hit).isGreaterThanOrEqualTo(17);
  }

  /** The fields of each result by its sample's number, but for those that tell of the file. */
  private static Map<String, List<String>> results(String mapping, Path file, String prefix) {
    Map<String, List<String>> results = new TreeMap<>();
    String name = file.getFileName().toString();
    for (Outcome outcome : PublishedCase.read(mapping, file, name).outcomes()) {
      List<String> fields = ResultColumns.fields(ResultRow.of(outcome));
      String sample = fields.get(ResultColumns.NAMES.indexOf("sample"));
      assertThat(sample).startsWith(prefix);
      List<String> kept = new ArrayList<>();
      for (int i = 0; i < fields.size(); i++) {
        if (!OF_THE_FILE.contains(ResultColumns.NAMES.get(i))) {
          kept.add(fields.get(i));
        }
      }
      results.put(sample.substring(prefix.length()), kept);
    }
    return results;
  }

  private static final String VESSEL =
      """
      name  = "vessel"
      files = "*.csv"
      [columns]
      sample          = "sample"
      flask           = "step"
      signal          = "signal"
      addition_volume = { header = "added_mL", unit = "mL" }
      [fixed]
      analyte        = "Cd"
      design         = "one vessel"
      additions      = "cumulative"
      aliquot_volume = "10 mL"
      start_volume   = "20 mL"
      stock          = "10 mg/L"
      [result]
      unit = "mg/L"
      """;

  /** Without noise only the signals' last digit stands between the result and the truth. */
  @Test
  void aVesselWithoutNoiseGivesTheTruthToTheRoundingOfItsSignals() throws IOException {
    double lastDigit = 1e-6;
    double[] added = {0, 0.5, 1, 1.5, 2};
    for (double truth : new double[] {0.6, 0.7, 1.3, 2.9}) {
      StringBuilder text = new StringBuilder("sample,step,added_mL,signal\n");
      double[] x = new double[added.length];
      double[] y = new double[added.length];
      double[] factor = new double[added.length];
      for (int i = 0; i < added.length; i++) {
        double signal = 0.8 * (truth * 10 + 10 * added[i]) / (20 + added[i]);
        text.append("V,").append(i).append(',').append(added[i]);
        text.append(String.format(Locale.ROOT, ",%.6f\n", signal));
        x[i] = 10 * added[i] / 10;
        factor[i] = (20 + added[i]) / 20;
        y[i] = signal * factor[i];
      }
      Path file = Files.writeString(folder.resolve("v.csv"), text);
      SeriesResult result = PublishedCase.read(VESSEL, file, "v.csv").result();
      assertThat(result.value())
          .isCloseTo(truth, within(1.01 * worst(ByHand.line(x, y), x, factor, lastDigit / 2)));
      assertThat(PublishedCase.read(VESSEL, file, "v.csv").only().flags()).isEmpty();
    }
  }

  /**
   * The most that a change of every signal by {@code half} can move the intercept over the slope.
   */
  private static double worst(ByHand line, double[] x, double[] factor, double half) {
    double sum = 0;
    for (int i = 0; i < x.length; i++) {
      double share = 1.0 / line.n() / line.slope();
      double lever = line.yMean() / Math.pow(line.slope(), 2) * (x[i] - line.xMean()) / line.sxx();
      sum += Math.abs(share - lever) * factor[i] * half;
    }
    return sum;
  }
}
