package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.List;
import java.util.Map;
import java.util.TreeSet;
import org.apache.commons.csv.CSVRecord;
import org.assertj.core.api.SoftAssertions;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.spikewright.reference.ReferenceTable;

/** Every quantity of the fit against values computed with 50 digits. */
class ReferenceCasesTest {
  private static final List<CSVRecord> VALUES = ReferenceTable.rows("values.csv");

  /** What a quantity that is exactly 0 may come out as, relative to this one of its case. */
  private static final Map<String, String> SIZE_OF_ZERO =
      Map.of("s", "ybar", "se_a", "a", "se_b", "b", "se_x0", "x0", "SSE", "SST", "cov_ab", "SST");

  static List<String> cases() {
    return FittedCase.ids();
  }

  @ParameterizedTest
  @MethodSource("cases")
  void every_quantity_of_a_case_agrees_to_nine_digits(String id) {
    FittedCase ours = FittedCase.of(id);
    SoftAssertions soft = new SoftAssertions();
    for (CSVRecord row : VALUES) {
      String quantity = row.get("quantity");
      if (row.get("case").equals(id)) {
        double expected = ReferenceTable.number(row, "value");
        double tolerance =
            expected == 0
                ? 1e-14 * Math.abs(ours.quantities().getOrDefault(sizeOf(quantity), 1.0))
                : 1e-9 * Math.abs(expected);
        soft.assertThat(Math.abs(ours.get(quantity) - expected))
            .as("%s %s: %s, expected %s", id, quantity, ours.get(quantity), expected)
            .isLessThanOrEqualTo(tolerance);
      }
    }
    soft.assertAll();
  }

  private static String sizeOf(String quantity) {
    return SIZE_OF_ZERO.getOrDefault(quantity, "");
  }

  @Test
  void the_values_cover_every_case_and_more_than_nine_hundred_numbers() {
    TreeSet<String> withValues = new TreeSet<>();
    VALUES.forEach(row -> withValues.add(row.get("case")));
    assertThat(withValues).isEqualTo(new TreeSet<>(FittedCase.ids())).hasSize(28);
    assertThat(VALUES).hasSizeGreaterThan(900);
  }

  /** Constructed: additions smaller than the noise (case SE04 of the reference set). */
  @Test
  void a_slope_within_its_noise_has_a_g_of_48_and_no_interval() {
    NativeEstimate estimate = NativeEstimate.of(FittedCase.of("SE04").line()).orElseThrow();
    assertThat(estimate.g().orElseThrow()).isBetween(48.1, 48.2);
    assertThat(estimate.isBounded()).isFalse();
    assertThat(estimate.upper95()).isEmpty();
    assertThat(estimate.standardError()).isPresent();
  }

  /** Constructed: a saturating series (case SE06 of the reference set), true concentration 2. */
  @Test
  void a_saturating_series_is_found_bent_while_r_is_still_0_96() {
    StraightLine line = FittedCase.of("SE06").line();
    BendTest bend = BendTest.of(line).orElseThrow();
    assertThat(line.correlation().orElseThrow()).isGreaterThan(0.95);
    assertThat(bend.pOneSided()).isLessThan(1e-4);
    assertThat(bend.t()).isNegative();
    double straight = NativeEstimate.of(line).orElseThrow().value();
    double bent = bend.nativeConcentration().orElseThrow();
    assertThat(bent).isLessThan(straight / 2).isGreaterThan(2);
  }

  /** Anscombe, American Statistician 27 (1973) 17, set 4: one point holds the line. */
  @Test
  void a_point_that_alone_holds_the_line_has_no_deleted_residual_and_the_line_no_bend_test() {
    StraightLine line = FittedCase.of("LC04").line();
    assertThat(line.leverage(7)).isEqualTo(1.0);
    assertThat(DeletedResidual.of(line, 7, 0)).isEmpty();
    assertThat(DeletedResidual.of(line, 0, 0)).isPresent();
    assertThat(QuadraticFit.of(line)).isEmpty();
    assertThat(BendTest.of(line)).isEmpty();
  }

  /** Anscombe, American Statistician 27 (1973) 17: four pictures, one line. */
  @Test
  void only_the_second_set_of_anscombe_is_bent() {
    assertThat(BendTest.of(FittedCase.of("LC01").line()).orElseThrow().pTwoSided())
        .isGreaterThan(0.4);
    assertThat(BendTest.of(FittedCase.of("LC02").line()).orElseThrow().pOneSided())
        .isLessThan(1e-20);
  }

  /** Miller and Miller, sec. 5.11 (from memory): the last point lies in the bend. */
  @Test
  void the_last_point_of_a_line_that_levels_off_is_the_odd_one() {
    StraightLine line = FittedCase.of("LC06").line();
    DeletedResidual last = DeletedResidual.of(line, 5, 0).orElseThrow();
    assertThat(last.t()).isLessThan(-16);
    assertThat(last.p() * line.n()).isLessThan(0.01);
    assertThat(last.without().n()).isEqualTo(5);
    assertThat(BendTest.of(line).orElseThrow().pTwoSided()).isGreaterThan(0.1);
  }
}
