package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatIllegalArgumentException;
import static org.assertj.core.api.Assertions.within;

import java.util.Arrays;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Repeated medians, outliers, lack of fit and lines through the origin. */
class FurtherTestsTest {
  private static StraightLine line(double[] x, double[] y) {
    return (StraightLine) StraightLine.fit(x, y);
  }

  @Test
  void one_wild_flask_of_five_does_not_move_the_repeated_median_line() {
    double[] x = {0, 1, 2, 3, 4};
    RepeatedMedian robust = RepeatedMedian.of(line(x, new double[] {2, 3, 40, 5, 6})).orElseThrow();
    assertThat(robust.slope()).isCloseTo(1, within(1e-12));
    assertThat(robust.nativeConcentration().orElseThrow()).isCloseTo(2, within(1e-12));
  }

  @Test
  void a_repeated_median_line_that_falls_has_no_native_concentration() {
    double[] x = {0, 0, 1, 2};
    RepeatedMedian falling = RepeatedMedian.of(line(x, new double[] {3, 3, 2, 1})).orElseThrow();
    assertThat(falling.slope()).isNegative();
    assertThat(falling.nativeConcentration()).isEmpty();
  }

  /** Case LC08 of the reference set: manganese, duplicates, one pair apart; by hand from means. */
  @Test
  void duplicates_that_lie_apart_are_pure_error_and_no_lack_of_fit() {
    double[] x = {0, 0, 2, 2, 4, 4, 6, 6, 8, 8, 10, 10};
    double[] y = {114, 14, 870, 1141, 2087, 2212, 3353, 2633, 3970, 4299, 4950, 5207};
    LackOfFit test = LackOfFit.of(line(x, y)).orElseThrow();
    // Half the squared differences of the pairs, and the rest of the line's 434602.552.
    double within = (100 * 100 + 271 * 271 + 125 * 125 + 720 * 720 + 329 * 329 + 257 * 257) / 2.0;
    double f = (434602.552380952 - within) / 4 / (within / 6);
    assertThat(test.f()).isCloseTo(f, within(1e-9));
    assertThat(test.levelDf()).isEqualTo(4);
    assertThat(test.withinDf()).isEqualTo(6);
    assertThat(test.p()).isGreaterThan(0.8);
    double[][] pairs = {
      {114, 14}, {870, 1141}, {2087, 2212}, {3353, 2633}, {3970, 4299}, {4950, 5207}
    };
    Outliers.Cochran scattered = Outliers.cochran(pairs).orElseThrow();
    assertThat(scattered.index()).isEqualTo(3);
    assertThat(scattered.c()).isLessThan(scattered.critical(0.05));
    assertThat(scattered.p()).isGreaterThan(0.05);
  }

  /** Case LC09 of the reference set: F is about 5.5e4. */
  @Test
  void a_plainly_saturating_curve_lacks_fit_beyond_doubt() {
    double[] levels = {1, 2, 3, 5, 7, 10, 20, 30, 50, 70, 100};
    double[] y = {
      0.4148, 0.4173, 0.4141, 0.4156, 0.8321, 0.8315, 0.8317, 0.8285, 1.2396, 1.2367, 1.2356,
      1.2343, 2.0127, 2.0281, 2.0321, 2.026, 2.795, 2.7948, 2.7962, 2.8022, 3.8656, 3.8625, 3.8695,
      3.8668, 7.1166, 7.1236, 7.1132, 7.1079, 9.8641, 9.8512, 9.8558, 9.8498, 14.0724, 14.0646,
      14.0644, 14.0801, 17.0616, 17.076, 17.0488, 17.1096, 20.3078, 20.299, 20.3642, 20.321
    };
    double[] x = new double[44];
    Arrays.setAll(x, i -> levels[i / 4]);
    LackOfFit test = LackOfFit.of(line(x, y)).orElseThrow();
    assertThat(test.f()).isBetween(5.45e4, 5.55e4);
    assertThat(test.p()).isLessThan(1e-50);
  }

  @Test
  void lack_of_fit_needs_three_levels_and_one_with_two_flasks() {
    double[] four = {0, 1, 2, 3};
    assertThat(LackOfFit.of(line(four, new double[] {1, 2, 3, 5}))).isEmpty();
    double[] two = {0, 0, 2, 2};
    assertThat(LackOfFit.of(line(two, new double[] {1, 2, 3, 5}))).isEmpty();
    double[] nearly = {0, 0.1 + 0.2, 0.3, 1};
    assertThat(LackOfFit.of(line(nearly, new double[] {1, 2, 2.1, 5}))).isPresent();
    double[] exact = {0, 0, 1, 1, 2, 2};
    assertThat(LackOfFit.of(line(exact, new double[] {1, 1, 2, 2, 3, 3})).orElseThrow().p())
        .isGreaterThan(0.05);
  }

  @Test
  void the_preparation_scatter_is_the_residual_variance_over_that_of_a_mean_of_readings() {
    StraightLine line = line(new double[] {0, 1, 2}, new double[] {1, 2.3, 3});
    double variance = line.residualSumOfSquares();
    assertThat(LackOfFit.preparationScatter(line, variance / 2, 3).orElseThrow())
        .isCloseTo(6, within(1e-12));
    assertThat(LackOfFit.preparationScatter(line, 0, 3)).isEmpty();
    StraightLine two = line(new double[] {0, 1}, new double[] {1, 2});
    assertThat(LackOfFit.preparationScatter(two, 1, 3)).isEmpty();
  }

  @ParameterizedTest
  @ValueSource(ints = {3, 4, 6, 10})
  void normal_values_and_groups_are_called_odd_no_oftener_than_the_p_says(int n) {
    SplittableRandom random = new SplittableRandom(20250115L + n);
    int odd = 0;
    int scattered = 0;
    int runs = 20_000;
    for (int k = 0; k < runs; k++) {
      double[] values = random.doubles(n).toArray();
      Arrays.setAll(values, i -> 1000 + random.nextGaussian());
      Outliers.Grubbs test = Outliers.grubbs(values).orElseThrow();
      odd += test.p() <= 0.05 ? 1 : 0;
      assertThat(test.p() <= 0.05).as("%s", test).isEqualTo(test.g() >= test.critical(0.05));
      double[][] groups = new double[n][];
      Arrays.setAll(
          groups, i -> random.doubles(2 + i % 3).map(v -> random.nextGaussian()).toArray());
      scattered += Outliers.cochran(groups).orElseThrow().p() <= 0.05 ? 1 : 0;
    }
    assertThat((double) odd / runs).isBetween(0.043, 0.0555);
    assertThat((double) scattered / runs).isBetween(0.04, 0.0555);
  }

  @Test
  void values_that_do_not_differ_or_are_too_few_hold_no_outlier() {
    assertThat(Outliers.grubbs(new double[] {1, 2})).isEmpty();
    assertThat(Outliers.grubbs(new double[] {0.3, 0.3, 0.3})).isEmpty();
    Outliers.Grubbs certain = Outliers.grubbs(new double[] {1, 1, 1, 5}).orElseThrow();
    assertThat(certain.index()).isEqualTo(3);
    assertThat(certain.p()).isLessThan(1e-6);
    assertThat(Outliers.cochran(new double[][] {{1, 2}, {3}})).isEmpty();
    assertThat(Outliers.cochran(new double[][] {{1, 1}, {3, 3}})).isEmpty();
    Outliers.Cochran only = Outliers.cochran(new double[][] {{1, 1}, {3, 4}, {2, 2}}).orElseThrow();
    assertThat(only.index()).isEqualTo(1);
    assertThat(only.c()).isEqualTo(1);
    assertThat(only.p()).isZero();
  }

  @Test
  void a_line_through_the_origin_needs_an_x_and_keeps_its_degrees_of_freedom() {
    assertThat(OriginLine.fit(new double[] {}, new double[] {})).isEmpty();
    assertThat(OriginLine.fit(new double[] {0, 0}, new double[] {1, 2})).isEmpty();
    assertThat(OriginLine.fit(new double[] {1, Double.NaN}, new double[] {1, 2})).isEmpty();
    OriginLine one = OriginLine.fit(new double[] {2}, new double[] {5}).orElseThrow();
    assertThat(one.slope()).isEqualTo(2.5);
    assertThat(one.slopeStandardError()).isEmpty();
    assertThat(one.residualDf()).isZero();
    OriginLine silent = OriginLine.fit(new double[] {1, 2}, new double[] {0, 0}).orElseThrow();
    assertThat(silent.slope()).isZero();
    assertThat(silent.rSquared()).isEmpty();
    assertThatIllegalArgumentException()
        .isThrownBy(() -> OriginLine.fit(new double[] {1}, new double[] {1, 2}));
  }
}
