package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatIllegalArgumentException;
import static org.assertj.core.api.Assertions.within;

import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.quantity.Estimate;

class EquivalenceTest {
  private static Equivalence compare(double b1, double u1, double b2, double u2, double df) {
    return Equivalence.of(new Estimate(b1, u1, df), new Estimate(b2, u2, df), 0.1).orElseThrow();
  }

  @Test
  void close_slopes_are_equivalent_when_known_well_and_not_when_known_badly() {
    assertThat(compare(1.02, 0.01, 1, 0.01, 8).p()).isLessThan(0.001);
    assertThat(compare(1.02, 0.1, 1, 0.1, 8).p()).isGreaterThan(0.2);
    assertThat(compare(1.3, 0.001, 1, 0.001, 8).p()).isGreaterThan(0.999);
  }

  /** On the edge of the margin the wrong "equivalent" comes in 5 %. */
  @ParameterizedTest(name = "ratio {0}")
  @CsvSource({"0.9", "1.1"})
  void slopes_at_the_margin_are_called_equivalent_in_five_percent(double ratio) {
    SplittableRandom random = new SplittableRandom(11);
    int equivalent = 0;
    int holds = 0;
    int runs = 20_000;
    for (int k = 0; k < runs; k++) {
      Equivalence compared =
          Equivalence.of(drawn(random, ratio, 0.015, 3), drawn(random, 1, 0.01, 4), 0.1)
              .orElseThrow();
      equivalent += compared.p() <= 0.05 ? 1 : 0;
      double low = compared.lower95().orElseThrow();
      holds += low <= ratio && ratio <= compared.upper95().orElseThrow() ? 1 : 0;
    }
    assertThat((double) equivalent / runs).isBetween(0.04, 0.06);
    assertThat((double) holds / runs).isBetween(0.94, 0.96);
  }

  private static Estimate drawn(SplittableRandom random, double b, double u, int df) {
    double chiSquare = 0;
    for (int i = 0; i < df; i++) {
      double z = random.nextGaussian();
      chiSquare += z * z;
    }
    return new Estimate(b + u * random.nextGaussian(), u * Math.sqrt(chiSquare / df), df);
  }

  @Test
  void the_ratio_is_free_of_the_unit_and_its_interval_holds_it() {
    Equivalence one = compare(1.05, 0.02, 1, 0.03, 5);
    Equivalence two = compare(1050, 20, 1000, 30, 5);
    assertThat(two.ratio()).isCloseTo(one.ratio(), within(1e-14));
    assertThat(two.p()).isCloseTo(one.p(), within(1e-12));
    assertThat(one.lower95().orElseThrow()).isLessThan(one.ratio());
    assertThat(one.upper95().orElseThrow()).isGreaterThan(one.ratio());
    assertThat(one.standardError()).isCloseTo(Math.hypot(0.02, 1.05 * 0.03), within(1e-14));
  }

  @Test
  void a_second_slope_that_is_not_established_leaves_the_interval_open() {
    Equivalence open = compare(1, 0.01, 1, 0.6, 3);
    assertThat(open.lower95()).isEmpty();
    assertThat(open.upper95()).isEmpty();
    assertThat(open.p()).isGreaterThan(0.3);
  }

  @Test
  void slopes_without_scatter_or_without_a_rise_are_not_compared() {
    Estimate exact = Estimate.known(1, 0);
    assertThat(Equivalence.of(exact, exact, 0.1)).isEmpty();
    assertThat(Equivalence.of(exact, new Estimate(-1, 0.1, 3), 0.1)).isEmpty();
    assertThat(Equivalence.of(exact, new Estimate(0, 0.1, 3), 0.1)).isEmpty();
    assertThatIllegalArgumentException().isThrownBy(() -> Equivalence.of(exact, exact, 1));
    assertThatIllegalArgumentException().isThrownBy(() -> Equivalence.of(exact, exact, Double.NaN));
  }
}
