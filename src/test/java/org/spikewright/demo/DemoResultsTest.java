package org.spikewright.demo;

import static java.util.stream.Collectors.toMap;
import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;
import static org.spikewright.demo.ReferenceTable.key;
import static org.spikewright.demo.ReferenceTable.number;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeMap;
import java.util.TreeSet;
import java.util.function.Function;
import java.util.stream.Stream;
import org.apache.commons.csv.CSVRecord;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.quantity.Unit;

/** What the program makes of its example folder is what R makes of it, and finds every trouble. */
class DemoResultsTest {
  private static final double RELATIVE = 1e-9;

  @TempDir private static Path folder;
  private static DemoRun demo;
  private static Map<String, CSVRecord> results;
  private static Map<String, CSVRecord> flasks;

  @BeforeAll
  static void run() {
    demo = DemoRun.in(folder);
    results = demo.results().stream().collect(toMap(ReferenceTable::key, Function.identity()));
    flasks = demo.flasks().stream().collect(toMap(DemoResultsTest::flaskKey, Function.identity()));
  }

  @Test
  void results_intervals_and_correlations_agree_with_r() {
    assertThat(results.keySet())
        .containsExactlyInAnyOrderElementsOf(
            ReferenceTable.series().stream().map(ReferenceTable::key).toList());
    for (CSVRecord r : ReferenceTable.series()) {
      CSVRecord ours = results.get(key(r));
      agrees(ours, "value", r, "result", 1);
      agrees(ours, "own_standard_error", r, "result_se", 1);
      agrees(ours, "own_lower95", r, "lower95", 1);
      agrees(ours, "own_upper95", r, "upper95", 1);
      agrees(ours, "r", r, "r", 1);
      agrees(ours, "signal_intercept", r, "signal_intercept", 1);
      agrees(ours, "residual_sd", r, "residual_sd", 1);
      agrees(ours, "slope", r, "slope", rUnitsPerOurs(r));
      assertThat(ours.get("unit")).as(key(r)).isEqualTo(r.get("unit"));
      assertThat(ours.get("flasks")).as(key(r)).isEqualTo(r.get("flasks"));
    }
  }

  @Test
  void flasks_agree_with_r() {
    Map<String, CSVRecord> lines =
        ReferenceTable.series().stream().collect(toMap(ReferenceTable::key, Function.identity()));
    long used = demo.flasks().stream().filter(flask -> flask.get("used").equals("yes")).count();
    assertThat(used).isEqualTo(ReferenceTable.flasks().size());
    for (CSVRecord r : ReferenceTable.flasks()) {
      CSVRecord line = lines.get(key(r));
      CSVRecord ours = flasks.get(flaskKey(r));
      assertThat(ours).as(flaskKey(r)).isNotNull();
      agrees(ours, "x", r, "x", 1 / rUnitsPerOurs(line));
      agrees(ours, "mean_signal", r, "mean", 1);
      agrees(ours, "volume_factor", r, "volume_factor", 1);
      agrees(ours, "signal_used", r, "y", 1);
      assertThat(ours.get("readings")).as(flaskKey(r)).isEqualTo(r.get("readings"));
      double fitted = number(line, "signal_intercept") + number(line, "slope") * number(r, "x");
      double rounding = RELATIVE * Math.abs(number(r, "y"));
      assertThat(number(ours, "fitted")).as(flaskKey(r)).isCloseTo(fitted, within(rounding));
      assertThat(number(ours, "residual"))
          .as(flaskKey(r))
          .isCloseTo(number(r, "y") - fitted, within(rounding));
    }
  }

  @Test
  void every_series_gets_the_flag_and_the_verdict_that_the_truth_calls_for() {
    for (CSVRecord truth : ReferenceTable.truth()) {
      CSVRecord ours = results.get(key(truth));
      if (truth.get("verdict").isEmpty()) {
        assertThat(ours).as("nothing of a refused file counts").isNull();
        continue;
      }
      assertThat(ours.get("verdict"))
          .as(key(truth) + ": " + ours.get("sentences"))
          .isEqualTo(truth.get("verdict"));
      if (!truth.get("flag").isEmpty()) {
        assertThat(flags(ours)).as(key(truth)).contains(truth.get("flag"));
      }
    }
  }

  /** Another sight of the same trouble may go with it; what has no trouble has no flag at all. */
  @Test
  void no_series_gets_a_flag_that_its_trouble_does_not_explain() {
    for (CSVRecord truth : ReferenceTable.truth()) {
      CSVRecord ours = results.get(key(truth));
      if (ours != null) {
        Set<String> unexplained = new TreeSet<>(flags(ours));
        unexplained.remove(truth.get("flag"));
        unexplained.removeAll(scenario(truth).companions());
        assertThat(unexplained).as(key(truth) + ": " + ours.get("sentences")).isEmpty();
      }
    }
  }

  @Test
  void the_bend_is_certain_and_the_bent_line_comes_near_the_truth() {
    CSVRecord truth =
        ReferenceTable.truth().stream()
            .filter(row -> scenario(row) == Scenario.BENT)
            .findFirst()
            .orElseThrow();
    CSVRecord ours = results.get(key(truth));
    // Holm's strictest share of 2 % for the five statistical flags.
    assertThat(number(ours, "bend_p")).isLessThan(0.02 / 5);
    assertThat(number(ours, "bent_value") / number(truth, "true_concentration"))
        .isBetween(0.9, 1.1);
  }

  @Test
  void every_pool_is_large_enough_to_speak_for_itself() {
    Map<String, String> sizes = new TreeMap<>();
    for (CSVRecord ours : results.values()) {
      if (!ours.get("role").equals("blank")) {
        assertThat(ours.get("interval_basis")).as(key(ours)).contains("pool");
        sizes.put(ours.get("instrument") + " " + ours.get("analyte"), ours.get("pool_series"));
      }
    }
    assertThat(sizes).hasSize(5);
    assertThat(sizes.values()).allSatisfy(n -> assertThat(Integer.parseInt(n)).isBetween(10, 14));
  }

  @Test
  void at_least_90_in_100_clean_intervals_hold_the_truth() {
    List<CSVRecord> clean =
        ReferenceTable.truth().stream()
            .filter(truth -> truth.get("scenario").equals(Scenario.CLEAN.words()))
            .toList();
    assertThat(clean).hasSizeGreaterThan(40);
    for (String basis : List.of("own_", "")) {
      long hit = clean.stream().filter(truth -> holdsTruth(truth, basis)).count();
      assertThat(hit / (double) clean.size()).as(basis).isGreaterThanOrEqualTo(0.90);
    }
  }

  private static boolean holdsTruth(CSVRecord truth, String basis) {
    double concentration = number(truth, "true_concentration");
    CSVRecord ours = results.get(key(truth));
    return number(ours, basis + "lower95") <= concentration
        && concentration <= number(ours, basis + "upper95");
  }

  @Test
  void the_refused_row_is_listed_beside_its_file_and_its_flask_lives_on() throws IOException {
    Path done = demo.folder().resolve("inbox/done/2026-03-04/furnace");
    String rows = Files.readString(done.resolve("run_0304_pm.csv.rows.txt"));
    assertThat(rows.lines().filter(line -> line.startsWith("line "))).hasSize(1);
    assertThat(rows).contains("line 127, column 8", "'#####'", "Peak area (s)");
    String exported =
        Files.readAllLines(done.resolve("run_0304_pm.csv"), FurnaceExport.ENCODING).get(126);
    assertThat(exported).contains("BW-2603-017;Pb;3;2;").contains("#####");
    CSVRecord flask = flasks.get("furnace BW-2603-017 Pb 3");
    assertThat(flask.get("readings")).isEqualTo("2");
    assertThat(flask.get("source_cells")).doesNotContain("line 127,");
  }

  @Test
  void the_cut_file_lies_untouched_under_rejected_with_its_reason() throws IOException {
    Path rejected = demo.folder().resolve("inbox/rejected/furnace");
    assertThat(rejected.resolve("run_0305.csv"))
        .hasSameBinaryContentAs(Path.of("watch-folder-example/inbox/furnace/run_0305.csv"));
    assertThat(Files.readString(rejected.resolve("run_0305.csv.reason.txt")))
        .contains("line 26", "never closed");
    assertThat(demo.flasks().stream().map(flask -> flask.get("source_files")))
        .noneMatch(files -> files.contains("run_0305"));
  }

  /**
   * How many of R's axis units one of ours holds. R took µg/L throughout; the program's axis is in
   * the unit of the stock, so that its slope is the signal per mg/L, a thousand times R's.
   */
  private static double rUnitsPerOurs(CSVRecord line) {
    CSVRecord flask =
        demo.flasks().stream().filter(row -> key(row).equals(key(line))).findFirst().orElseThrow();
    return Unit.of(flask.get("x_unit")).to(Unit.of(line.get("axis_unit")));
  }

  private static void agrees(
      CSVRecord ours, String ourColumn, CSVRecord r, String rColumn, double factor) {
    double expected = number(r, rColumn) * factor;
    assertThat(number(ours, ourColumn))
        .as(key(r) + " " + ourColumn)
        .isCloseTo(expected, within(RELATIVE * Math.abs(expected)));
  }

  private static Scenario scenario(CSVRecord truth) {
    return Stream.of(Scenario.values())
        .filter(one -> one.words().equals(truth.get("scenario")))
        .findFirst()
        .orElseThrow();
  }

  private static List<String> flags(CSVRecord row) {
    String flags = row.get("flags");
    return flags.isEmpty() ? List.of() : List.of(flags.split(";"));
  }

  private static String flaskKey(CSVRecord row) {
    return key(row) + " " + row.get("flask");
  }
}
