package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.Collectors;
import org.apache.commons.csv.CSVRecord;
import org.assertj.core.api.SoftAssertions;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.spikewright.reference.ReferenceTable;

/** The fit of seeded random series against the stored numbers of R, which took another road. */
class RComparisonTest {
  private static final Map<String, List<CSVRecord>> SERIES =
      ReferenceTable.rows("fit-series.csv").stream()
          .collect(
              Collectors.groupingBy(
                  row -> row.get("series"), LinkedHashMap::new, Collectors.toList()));
  private static final Map<String, List<CSVRecord>> BY_R =
      ReferenceTable.rows("fit-r.csv").stream()
          .collect(Collectors.groupingBy(row -> row.get("series")));

  static List<String> series() {
    return List.copyOf(SERIES.keySet());
  }

  @ParameterizedTest
  @MethodSource("series")
  void every_number_agrees_to_nine_digits(String id) {
    FittedCase ours = FittedCase.of(id, SERIES.get(id));
    SoftAssertions soft = new SoftAssertions();
    for (CSVRecord row : BY_R.get(id)) {
      String quantity = row.get("quantity");
      double expected = ReferenceTable.number(row, "value");
      // A t near 0 is a difference of near equals in both programs: nine digits of 1.
      boolean isT = quantity.startsWith("rstudent") || quantity.equals("quad_t");
      double size = isT ? Math.max(1, Math.abs(expected)) : Math.abs(expected);
      soft.assertThat(Math.abs(ours.get(quantity) - expected) / size)
          .as("%s %s: %s, R %s", id, quantity, ours.get(quantity), expected)
          .isLessThanOrEqualTo(1e-9);
    }
    soft.assertAll();
  }

  @ParameterizedTest
  @MethodSource("series")
  void both_programs_find_the_same_intervals_unbounded_and_the_same_tests_impossible(String id) {
    FittedCase ours = FittedCase.of(id, SERIES.get(id));
    List<String> byR = BY_R.get(id).stream().map(row -> row.get("quantity")).toList();
    assertThat(ours.quantities().containsKey("fi_lo_x0")).isEqualTo(byR.contains("fi_lo_x0"));
    assertThat(ours.quantities().containsKey("quad_t")).isEqualTo(byR.contains("quad_t"));
    assertThat(ours.quantities().containsKey("rstudent1")).isEqualTo(byR.contains("rstudent1"));
  }

  @Test
  void the_series_have_every_odd_shape() {
    assertThat(SERIES).hasSize(44);
    assertThat(SERIES.keySet().stream().map(id -> id.substring(4)).distinct()).hasSize(10);
    assertThat(SERIES.values().stream().map(List::size).distinct().toList())
        .contains(3, 4, 5, 6, 12);
    assertThat(BY_R.values().stream().filter(rows -> isUnbounded(rows))).isNotEmpty();
  }

  private static boolean isUnbounded(List<CSVRecord> rows) {
    return rows.stream().noneMatch(row -> row.get("quantity").equals("fi_lo_x0"));
  }
}
