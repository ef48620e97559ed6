package org.spikewright.demo;

import static java.util.stream.Collectors.toMap;
import static org.assertj.core.api.Assertions.assertThat;

import java.util.List;
import java.util.Map;
import java.util.function.Function;
import org.apache.commons.csv.CSVRecord;
import org.junit.jupiter.api.Test;
import org.spikewright.fit.StraightLine;

/** What R finds in the exports is what the truth file says is in them. */
class DemoReferenceTest {
  /** Most that either of two statistical flags may have as p, at 2 % for both together. */
  private static final double ALARM = 0.02 / 2;

  /** What controls.toml says of RM-SED-04, in mg/kg. */
  private static final double CERTIFIED_COPPER = 58.5;

  private final Map<String, CSVRecord> found = byKey(ReferenceTable.series());
  private final List<CSVRecord> truth = ReferenceTable.truth();

  @Test
  void r_found_every_series_but_those_of_the_cut_file() {
    List<String> readable =
        truth.stream()
            .filter(row -> !row.get("scenario").equals(Scenario.REFUSED_FILE.words()))
            .map(ReferenceTable::key)
            .toList();
    assertThat(found.keySet()).hasSize(59).containsExactlyInAnyOrderElementsOf(readable);
  }

  @Test
  void each_trouble_is_there_once() {
    for (Scenario scenario : Scenario.values()) {
      int expected =
          switch (scenario) {
            case CLEAN -> 42;
            case REFUSED_FILE, CONTROL_IN, CONTROL_OUT_BESIDE -> 2;
            default -> 1;
          };
      assertThat(rows(scenario)).as(scenario.words()).hasSize(expected);
    }
  }

  @Test
  void clean_series_are_straight_and_raise_no_alarm() {
    for (CSVRecord row : rows(Scenario.CLEAN)) {
      CSVRecord r = of(row);
      String name = ReferenceTable.key(row);
      assertThat(number(r, "r")).as(name).isGreaterThan(0.999);
      assertThat(number(r, "bend_p_one_sided")).as(name).isGreaterThan(ALARM);
      assertThat(oddP(r)).as(name).isGreaterThan(ALARM);
    }
  }

  @Test
  void about_95_in_100_clean_intervals_hold_the_truth() {
    List<CSVRecord> clean = rows(Scenario.CLEAN);
    long hit = clean.stream().filter(this::intervalHoldsTruth).count();
    // 42 intervals at 95 %: fewer than 37 happen in 2 of 100 nights.
    assertThat(hit).isBetween(37L, (long) clean.size());
  }

  @Test
  void the_bent_series_is_found_out_though_its_correlation_is_high() {
    CSVRecord row = only(Scenario.BENT);
    CSVRecord r = of(row);
    assertThat(number(r, "bend_p_one_sided")).isLessThan(ALARM);
    assertThat(number(r, "native") / number(r, "bent_native")).isGreaterThan(1.10);
    assertThat(number(r, "result") / number(row, "true_concentration")).isBetween(1.17, 1.27);
    assertThat(number(r, "r")).isGreaterThan(0.998);
    assertThat(oddP(r)).isGreaterThan(ALARM);
  }

  @Test
  void the_odd_flask_is_named() {
    CSVRecord r = of(only(Scenario.ODD_FLASK));
    assertThat(r.get("odd_flask")).isEqualTo(Integer.toString(Measurement.ODD_FLASK_NUMBER));
    assertThat(oddP(r)).isLessThan(ALARM);
    assertThat(number(r, "bend_p_one_sided")).isGreaterThan(ALARM);
  }

  @Test
  void additions_too_small_and_too_large_show_in_the_result() {
    CSVRecord small = of(only(Scenario.ADDITIONS_TOO_SMALL));
    assertThat(topAddition(small) / number(small, "native")).isBetween(0.05, 0.15);
    // Half the interval is more than the 20 % that the mapping asks for.
    assertThat((number(small, "upper95") - number(small, "lower95")) / 2 / number(small, "result"))
        .isGreaterThan(0.25);
    CSVRecord large = of(only(Scenario.ADDITIONS_TOO_LARGE));
    assertThat(topAddition(large) / number(large, "native")).isBetween(12.0, 18.0);
  }

  @Test
  void what_is_missing_is_missing() {
    CSVRecord unspiked = only(Scenario.NO_UNSPIKED_FLASK);
    assertThat(flasks(unspiked)).hasSize(5).noneMatch(flask -> number(flask, "x") == 0);
    assertThat(flasks(only(Scenario.OVER_RANGE)))
        .hasSize(5)
        .noneMatch(flask -> flask.get("flask").equals("6"));
    List<CSVRecord> shortened = flasks(only(Scenario.REFUSED_ROW));
    assertThat(shortened.stream().map(flask -> flask.get("readings")))
        .containsExactly("3", "3", "2", "3", "3");
  }

  @Test
  void the_wrong_stock_doubles_a_result_whose_own_line_shows_nothing() {
    CSVRecord row = only(Scenario.WRONG_STOCK);
    CSVRecord r = of(row);
    assertThat(number(r, "result") / number(row, "true_concentration")).isBetween(1.9, 2.1);
    assertThat(number(r, "r")).isGreaterThan(0.999);
    assertThat(number(r, "bend_p_one_sided")).isGreaterThan(ALARM);
    assertThat(oddP(r)).isGreaterThan(ALARM);
  }

  @Test
  void the_swapped_flasks_lie_on_the_line_once_they_are_put_back() {
    List<CSVRecord> flasks = flasks(only(Scenario.SWAPPED));
    double[] x = flasks.stream().mapToDouble(flask -> number(flask, "x")).toArray();
    double[] y = flasks.stream().mapToDouble(flask -> number(flask, "y")).toArray();
    assertThat(correlation(x, y)).isLessThan(0.95);
    double third = y[2];
    y[2] = y[3];
    y[3] = third;
    assertThat(correlation(x, y)).isGreaterThan(0.999);
  }

  @Test
  void the_noisy_series_scatters_several_times_as_much_as_its_neighbours() {
    double[] usual =
        rows(Scenario.CLEAN).stream()
            .filter(row -> row.get("analyte").equals("Ni"))
            .mapToDouble(row -> scatter(of(row)))
            .sorted()
            .toArray();
    assertThat(scatter(of(only(Scenario.NOISY)))).isGreaterThan(3 * usual[usual.length / 2]);
  }

  @Test
  void controls_are_where_the_laboratory_expects_them_but_for_one() {
    for (CSVRecord row : rows(Scenario.CONTROL_IN)) {
      double recovery = number(of(row), "result") / number(row, "true_concentration");
      assertThat(recovery).as(ReferenceTable.key(row)).isBetween(0.9, 1.1);
    }
    assertThat(number(of(only(Scenario.CONTROL_OUT)), "result") / CERTIFIED_COPPER)
        .isBetween(0.7, 0.85);
  }

  @Test
  void there_is_hardly_any_cadmium_in_the_blank_and_in_one_sample() {
    for (Scenario scenario : List.of(Scenario.REAGENT_BLANK, Scenario.BELOW_DETECTION)) {
      CSVRecord r = of(only(scenario));
      assertThat(number(r, "lower95")).as(scenario.words()).isNegative();
      assertThat(number(r, "upper95")).as(scenario.words()).isBetween(0.0, 1.0);
    }
  }

  /** Residual standard deviation over the signal of the mean flask. */
  private static double scatter(CSVRecord r) {
    double mean =
        flasks(r).stream().mapToDouble(flask -> number(flask, "y")).average().orElseThrow();
    return number(r, "residual_sd") / mean;
  }

  private static double correlation(double[] x, double[] y) {
    return ((StraightLine) StraightLine.fit(x, y)).correlation().orElseThrow();
  }

  private boolean intervalHoldsTruth(CSVRecord row) {
    double concentration = number(row, "true_concentration");
    CSVRecord r = of(row);
    return number(r, "lower95") <= concentration && concentration <= number(r, "upper95");
  }

  private CSVRecord only(Scenario scenario) {
    assertThat(rows(scenario)).hasSize(1);
    return rows(scenario).get(0);
  }

  private List<CSVRecord> rows(Scenario scenario) {
    return truth.stream().filter(row -> row.get("scenario").equals(scenario.words())).toList();
  }

  private CSVRecord of(CSVRecord row) {
    assertThat(found).containsKey(ReferenceTable.key(row));
    return found.get(ReferenceTable.key(row));
  }

  private static List<CSVRecord> flasks(CSVRecord row) {
    return ReferenceTable.flasks().stream()
        .filter(flask -> ReferenceTable.key(flask).equals(ReferenceTable.key(row)))
        .toList();
  }

  private static double topAddition(CSVRecord row) {
    return flasks(row).stream().mapToDouble(flask -> number(flask, "x")).max().orElseThrow();
  }

  /** For the choice of the oddest among the flasks. */
  private static double oddP(CSVRecord row) {
    return Math.min(1, number(row, "odd_p") * number(row, "flasks"));
  }

  private static double number(CSVRecord row, String column) {
    return ReferenceTable.number(row, column);
  }

  private static Map<String, CSVRecord> byKey(List<CSVRecord> rows) {
    return rows.stream().collect(toMap(ReferenceTable::key, Function.identity()));
  }
}
