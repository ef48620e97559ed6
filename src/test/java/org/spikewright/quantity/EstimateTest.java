package org.spikewright.quantity;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatIllegalArgumentException;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class EstimateTest {
  @ParameterizedTest
  @CsvSource({
    "NaN, 1, 1",
    "Infinity, 1, 1",
    "1, -1, 1",
    "1, NaN, 1",
    "1, Infinity, 1",
    "1, 1, 0",
    "1, 1, NaN"
  })
  void what_is_no_number_or_out_of_range_is_refused(double value, double u, double df) {
    assertThatIllegalArgumentException().isThrownBy(() -> new Estimate(value, u, df));
  }

  @Test
  void an_uncertainty_taken_as_known_has_infinite_degrees_of_freedom() {
    assertThat(Estimate.known(3, 0))
        .isEqualTo(new Estimate(3, 0, Double.POSITIVE_INFINITY))
        .isNotEqualTo(new Estimate(3, 0, 5));
  }
}
