package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.Arrays;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.fit.ControlLimits.Standing;

class ControlLimitsTest {
  private static final ControlLimits TEN = new ControlLimits(10, 1, 20, false);

  @Test
  void the_limits_lie_two_and_three_deviations_from_the_mean_of_the_history() {
    // Moving ranges 1, 2, 1, 2: mean 1.5; 1.5/1.128 is 1.3296 and 2.66 times 1.5 is 3.99.
    ControlLimits limits = ControlLimits.of(new double[] {10, 11, 9, 10, 12}).orElseThrow();
    assertThat(limits.centre()).isCloseTo(10.4, within(1e-12));
    assertThat(limits.upperAction() - limits.centre()).isCloseTo(3.99, within(0.005));
    assertThat(limits.upperWarning() - limits.centre()).isCloseTo(2.66, within(0.005));
    assertThat(limits.lowerAction() + limits.upperAction()).isCloseTo(20.8, within(1e-12));
    assertThat(limits.lowerWarning() + limits.upperWarning()).isCloseTo(20.8, within(1e-12));
    assertThat(limits.provisional()).isTrue();
  }

  @ParameterizedTest
  @CsvSource({"19, true", "20, false", "40, false"})
  void limits_from_fewer_than_twenty_points_are_provisional(int n, boolean provisional) {
    double[] history = new double[n];
    Arrays.setAll(history, i -> i % 2);
    ControlLimits limits = ControlLimits.of(history, 0.4).orElseThrow();
    assertThat(limits.provisional()).isEqualTo(provisional);
    assertThat(limits.centre()).isEqualTo(0.4);
    assertThat(limits.points()).isEqualTo(n);
  }

  @Test
  void a_shift_in_the_history_hardly_widens_the_limits() {
    SplittableRandom random = new SplittableRandom(4);
    double[] history = new double[60];
    Arrays.setAll(history, i -> (i < 30 ? 0 : 4) + random.nextGaussian());
    // The standard deviation of all points is about 2.2.
    assertThat(ControlLimits.of(history).orElseThrow().sd()).isBetween(0.75, 1.35);
  }

  @Test
  void the_moving_range_estimates_the_deviation_of_normal_results() {
    SplittableRandom random = new SplittableRandom(4);
    double[] history = new double[100_000];
    Arrays.setAll(history, i -> 50 + 2 * random.nextGaussian());
    assertThat(ControlLimits.of(history).orElseThrow().sd()).isCloseTo(2, within(0.03));
  }

  @ParameterizedTest
  @CsvSource({
    "10, 10, 10, WITHIN",
    "10, 10, 12, WITHIN",
    "10, 10, 12.1, WARNING",
    "10, 10, 7.9, WARNING",
    "12.1, 10, 12.1, TWO_OF_THREE",
    "10, 7.9, 7.9, TWO_OF_THREE",
    "7.9, 10, 12.1, WARNING",
    "12.1, 12.1, 10, WITHIN",
    "10, 10, 13.1, ACTION",
    "10, 10, 6.9, ACTION",
    "10, 13.5, 12.1, TWO_OF_THREE",
    "10, 10, NaN, ACTION"
  })
  void the_latest_result_is_judged_with_the_two_before_it(
      double first, double second, double latest, Standing standing) {
    assertThat(TEN.standing(first, second, latest)).isEqualTo(standing);
    assertThat(TEN.standing(12.5, 12.5, first, second, latest)).isEqualTo(standing);
  }

  @Test
  void a_first_result_can_warn_and_two_make_a_pair() {
    assertThat(TEN.standing(12.5)).isEqualTo(Standing.WARNING);
    assertThat(TEN.standing(12.5, 12.5)).isEqualTo(Standing.TWO_OF_THREE);
  }

  @Test
  void no_history_or_none_that_varies_has_no_limits() {
    assertThat(ControlLimits.of(new double[] {})).isEmpty();
    assertThat(ControlLimits.of(new double[] {1}, 1)).isEmpty();
    assertThat(ControlLimits.of(new double[] {1, 1, 1})).isEmpty();
    assertThat(ControlLimits.of(new double[] {1, Double.NaN, 1})).isEmpty();
  }

  @Test
  void scores_are_distances_in_their_own_unit_and_empty_without_one() {
    assertThat(ControlLimits.z(12, 10, 0.5).orElseThrow()).isEqualTo(4);
    assertThat(ControlLimits.z(12, 10, 0)).isEmpty();
    assertThat(ControlLimits.en(9, 3, 10, 4).orElseThrow()).isEqualTo(-0.2);
    assertThat(ControlLimits.en(9, 0, 10, 0)).isEmpty();
  }
}
