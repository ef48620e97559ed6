package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.catchThrowable;

import java.time.Duration;
import java.util.List;
import org.apache.commons.csv.CSVRecord;
import org.assertj.core.api.SoftAssertions;
import org.assertj.core.data.Offset;
import org.junit.jupiter.api.Test;
import org.spikewright.reference.ReferenceTable;

/** Student's t, central and not, and the detection factors, against R's qt and pt. */
class StudentTTest {
  private static final List<CSVRecord> BY_R = ReferenceTable.rows("fit-t.csv");

  @Test
  void quantiles_agree_to_ten_digits_for_any_degrees_of_freedom() {
    compare("q975", 1e-10, row -> StudentT.quantile(0.975, df(row)), 79);
    compare("q95", 1e-10, row -> StudentT.quantile(0.95, df(row)), 72);
  }

  @Test
  void probabilities_agree_to_nine_digits_from_the_far_tail_to_next_to_zero() {
    compare("p", 1e-9, row -> StudentT.cumulative(ReferenceTable.number(row, "t"), df(row)), 132);
  }

  @Test
  void the_noncentrality_of_the_detection_limit_agrees_to_nine_digits() {
    compare("delta", 1e-9, row -> Detection.factors(df(row))[1], 72);
  }

  @Test
  void noncentral_probabilities_agree_to_nine_digits() {
    compare(
        "pn",
        1e-9,
        row -> {
          String[] tAndDelta = row.get("t").split(";", -1);
          return Detection.noncentralT(
              Double.parseDouble(tAndDelta[0]), df(row), Double.parseDouble(tAndDelta[1]));
        },
        6);
  }

  @Test
  void known_standard_errors_have_the_normal_factors() {
    Detection known = Detection.of(1, Double.POSITIVE_INFINITY);
    assertThat(known.criticalValue()).isCloseTo(1.6448536269514722, offset(1e-12));
    assertThat(known.detectionLimit()).isCloseTo(2 * 1.6448536269514722, offset(1e-9));
    assertThat(Detection.of(1, 1e9).detectionLimit())
        .isCloseTo(known.detectionLimit(), offset(1e-6));
  }

  /** Currie, Pure Appl. Chem. 67 (1995) 1699: about 2t for many degrees of freedom. */
  @Test
  void the_factor_falls_from_5_5_at_two_degrees_of_freedom_towards_twice_the_normal_quantile() {
    assertThat(Detection.of(1, 2).detectionLimit()).isBetween(5.45, 5.55);
    double before = Double.POSITIVE_INFINITY;
    for (double df = 0.5; df < 5000; df *= 1.1) {
      double now = Detection.of(1, df).detectionLimit();
      assertThat(now).as("df %s", df).isLessThan(before).isGreaterThan(3.289);
      before = now;
    }
  }

  @Test
  void limits_scale_with_the_standard_error() {
    Detection one = Detection.of(1, 3);
    Detection tiny = Detection.of(2e-12, 3);
    assertThat(tiny.criticalValue()).isCloseTo(2e-12 * one.criticalValue(), offset(1e-26));
    assertThat(tiny.detectionLimit()).isCloseTo(2e-12 * one.detectionLimit(), offset(1e-26));
    assertThat(Detection.of(0, 3).detectionLimit()).isZero();
  }

  @Test
  void factors_of_a_new_number_of_degrees_of_freedom_take_milliseconds_and_of_a_known_one_none() {
    Detection.factors(7.25);
    long start = System.nanoTime();
    for (int i = 0; i < 100; i++) {
      Detection.factors(1.01 + i * 0.73);
    }
    Duration fresh = Duration.ofNanos((System.nanoTime() - start) / 100);
    assertThat(fresh).isLessThan(Duration.ofMillis(50));
    long again = System.nanoTime();
    for (int i = 0; i < 1_000_000; i++) {
      Detection.of(1, 3);
    }
    assertThat(Duration.ofNanos(System.nanoTime() - again)).isLessThan(Duration.ofSeconds(5));
  }

  @Test
  void what_cannot_be_a_standard_error_is_refused() {
    for (double[] bad :
        new double[][] {{-1, 3}, {Double.NaN, 3}, {1, 0}, {1, -2}, {1, Double.NaN}}) {
      assertThat(catchThrowable(() -> Detection.of(bad[0], bad[1])))
          .isInstanceOf(IllegalArgumentException.class);
    }
  }

  private interface Own {
    double of(CSVRecord row);
  }

  private static void compare(String quantity, double tolerance, Own own, int expectedRows) {
    SoftAssertions soft = new SoftAssertions();
    int rows = 0;
    for (CSVRecord row : BY_R) {
      if (row.get("quantity").equals(quantity)) {
        rows++;
        double expected = ReferenceTable.number(row, "value");
        double ours = own.of(row);
        soft.assertThat(Math.abs(ours - expected))
            .as("%s: ours %s", row, ours)
            .isLessThanOrEqualTo(tolerance * Math.abs(expected));
      }
    }
    soft.assertThat(rows).isEqualTo(expectedRows);
    soft.assertAll();
  }

  private static double df(CSVRecord row) {
    return ReferenceTable.number(row, "df");
  }

  private static Offset<Double> offset(double tolerance) {
    return Offset.offset(tolerance);
  }
}
