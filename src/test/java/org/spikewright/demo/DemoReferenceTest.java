package org.spikewright.demo;

import static java.util.stream.Collectors.toMap;
import static org.assertj.core.api.Assertions.assertThat;

import java.util.List;
import java.util.Map;
import java.util.function.Function;
import org.apache.commons.csv.CSVRecord;
import org.junit.jupiter.api.Test;

/** What R finds in the exports is what the truth file says is in them. */
class DemoReferenceTest {
  /** Most that either of two statistical flags may have as p, at 2 % for both together. */
  private static final double ALARM = 0.02 / 2;

  private final Map<String, CSVRecord> found = byKey(ReferenceTable.series());
  private final List<CSVRecord> truth = ReferenceTable.truth();

  @Test
  void r_found_every_series_but_those_of_the_cut_file() {
    List<String> readable =
        truth.stream()
            .filter(row -> !row.get("scenario").equals(Scenario.REFUSED_FILE.words()))
            .map(ReferenceTable::key)
            .toList();
    assertThat(found.keySet()).hasSize(40).containsExactlyInAnyOrderElementsOf(readable);
  }

  @Test
  void each_trouble_is_there_once() {
    for (Scenario scenario : Scenario.values()) {
      int expected =
          switch (scenario) {
            case CLEAN -> 33;
            case REFUSED_FILE -> 2;
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
    // 33 intervals at 95 %: fewer than 29 happen in 2 of 100 nights.
    assertThat(hit).isBetween(29L, (long) clean.size());
  }

  @Test
  void the_bent_series_is_found_out_though_its_correlation_is_high() {
    CSVRecord row = only(Scenario.BENT);
    CSVRecord r = of(row);
    assertThat(number(r, "bend_p_one_sided")).isLessThan(ALARM);
    assertThat(number(r, "native") / number(r, "bent_native")).isGreaterThan(1.10);
    assertThat(number(r, "result") / number(row, "true_concentration")).isGreaterThan(1.10);
    assertThat(number(r, "r")).isGreaterThan(0.999);
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
    assertThat(topAddition(small) / number(small, "native")).isBetween(0.1, 0.3);
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
