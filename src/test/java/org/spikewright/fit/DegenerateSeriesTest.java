package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.util.Arrays;
import java.util.OptionalDouble;
import java.util.SplittableRandom;
import java.util.function.DoubleUnaryOperator;
import org.assertj.core.data.Offset;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Series at the edge of what a line can be put through, and beyond. */
class DegenerateSeriesTest {

  private static StraightLine line(double[] x, double[] y) {
    return (StraightLine) StraightLine.fit(x, y);
  }

  private static NativeEstimate estimate(StraightLine line) {
    return NativeEstimate.of(line).orElseThrow();
  }

  private static double[] map(double[] values, DoubleUnaryOperator change) {
    return Arrays.stream(values).map(change).toArray();
  }

  private static Offset<Double> relative(double digits, double value) {
    return Offset.offset(Math.abs(value) * digits);
  }

  @Test
  void a_negative_zero_is_a_zero() {
    StraightLine plain = line(new double[] {0, 1, 2}, new double[] {0, 1.1, 1.9});
    StraightLine negative = line(new double[] {-0.0, 1, 2}, new double[] {-0.0, 1.1, 1.9});
    assertThat(estimate(negative)).isEqualTo(estimate(plain));
    assertThat(StraightLine.fit(new double[] {0.0, -0.0}, new double[] {1, 2}))
        .isEqualTo(new NoLine("all additions are equal"));
  }

  @Test
  void two_flasks_have_a_concentration_and_no_uncertainty() {
    NativeEstimate estimate = estimate(line(new double[] {0, 2}, new double[] {1, 3}));
    OptionalDouble none = OptionalDouble.empty();
    assertThat(estimate).isEqualTo(new NativeEstimate(1, none, none, none, none, none));
    StraightLine line = line(new double[] {0, 2}, new double[] {1, 3});
    assertThat(line.residualSd()).isEmpty();
    assertThat(line.slopeStandardError()).isEmpty();
    assertThat(line.interceptStandardError()).isEmpty();
    assertThat(line.covariance()).isEmpty();
    assertThat(BendTest.of(line)).isEmpty();
    assertThat(DeletedResidual.of(line, 0, 0.1)).isEmpty();
  }

  @Test
  void two_flasks_borrow_a_standard_deviation() {
    StraightLine line = line(new double[] {0, 2}, new double[] {1, 3});
    NativeEstimate lent = NativeEstimate.of(line, 0.02, Double.POSITIVE_INFINITY).orElseThrow();
    // (s/b) sqrt(1/2 + (2/1)^2/2)
    assertThat(lent.standardError().orElseThrow())
        .isCloseTo(0.02 * Math.sqrt(2.5), Offset.offset(1e-15));
    assertThat(lent.t().orElseThrow()).isCloseTo(1.959963984540054, Offset.offset(1e-12));
    assertThat(lent.isBounded()).isTrue();
  }

  @ParameterizedTest
  @ValueSource(ints = {2, 3, 5, 7, 10, 13})
  void equal_additions_have_no_line_and_equal_signals_a_slope_of_exactly_0(int n) {
    for (int k = 1; k < 1000; k++) {
      double[] same = new double[n];
      Arrays.fill(same, 0.1 * k + 1e-3 / k);
      double[] steps = new double[n];
      Arrays.setAll(steps, i -> i * 0.7);
      assertThat(StraightLine.fit(same, steps)).isEqualTo(new NoLine("all additions are equal"));
      StraightLine flat = line(steps, same);
      assertThat(flat.slope()).as("signal %s", same[0]).isZero();
      assertThat(flat.residualSumOfSquares()).isZero();
      assertThat(flat.correlation()).isEmpty();
      assertThat(NativeEstimate.of(flat)).isEmpty();
      assertThat(NativeEstimate.of(flat, 1, 3)).isEmpty();
    }
  }

  @Test
  void flasks_exactly_on_a_line_are_neither_bent_nor_odd_nor_uncertain() {
    for (long seed = 1; seed <= 2_000; seed++) {
      SplittableRandom random = new SplittableRandom(seed);
      double slope = random.nextInt(1, 1000) * 0.001;
      double nativeConcentration = random.nextInt(1, 500) * 0.1;
      double[] x = {0, 0.1, 0.2, 0.3, 0.7};
      double[] y = map(x, v -> slope * (nativeConcentration + v));
      StraightLine line = line(x, y);
      NativeEstimate estimate = estimate(line);
      assertThat(estimate.value())
          .as("seed %s", seed)
          .isCloseTo(nativeConcentration, relative(1e-11, 100));
      assertThat(estimate.standardError().orElseThrow()).as("seed %s", seed).isLessThan(1e-9);
      NativeEstimate sure = NativeEstimate.of(line, 0, 3).orElseThrow();
      assertThat(sure.value())
          .as("seed %s", seed)
          .isBetween(sure.lower95().orElseThrow(), sure.upper95().orElseThrow());
      assertThat(BendTest.of(line).orElseThrow().pTwoSided()).as("seed %s", seed).isGreaterThan(.3);
      for (int i = 0; i < line.n(); i++) {
        assertThat(DeletedResidual.of(line, i, 0).orElseThrow().p())
            .as("seed %s point %s", seed, i)
            .isGreaterThan(0.3);
      }
    }
  }

  @ParameterizedTest(name = "x times {0}, y times {1}")
  @CsvSource({"1e-70, 1e70", "1e70, 1e-70", "1e-9, 1e9", "1e60, 1e60", "1e-60, 1e-60", "1, 1e-74"})
  void sizes_far_from_1_lose_nothing(double kx, double ky) {
    double[] x = {0, 1, 2, 3, 4};
    double[] y = {1.02, 2.01, 2.96, 4.05, 4.99};
    NativeEstimate expected = estimate(line(x, y));
    StraightLine line = line(map(x, v -> v * kx), map(y, v -> v * ky));
    NativeEstimate estimate = estimate(line);
    assertThat(estimate.value()).isCloseTo(kx * expected.value(), relative(1e-9, kx));
    assertThat(estimate.upper95().orElseThrow())
        .isCloseTo(kx * expected.upper95().orElseThrow(), relative(1e-9, kx));
    assertThat(BendTest.of(line).orElseThrow().t())
        .isCloseTo(BendTest.of(line(x, y)).orElseThrow().t(), Offset.offset(1e-9));
  }

  @ParameterizedTest
  @CsvSource({
    "1e150, 1, the numbers are too large to compute with",
    "1, 1e150, the numbers are too large to compute with",
    "1e308, 1e308, the numbers are too large to compute with",
    "Infinity, 1, the numbers are too large to compute with",
    "1e-150, 1, the numbers are too small to compute with",
    "1, 1e-150, the numbers are too small to compute with",
    "1, NaN, an addition or a signal is not a number",
    "NaN, 1, an addition or a signal is not a number"
  })
  void numbers_that_cannot_be_computed_with_are_no_line_and_the_reason_is_said(
      double kx, double ky, String reason) {
    double[] x = {kx, 2 * kx, 3 * kx};
    double[] y = {ky, 2 * ky, 4 * ky};
    assertThat(StraightLine.fit(x, y)).isEqualTo(new NoLine(reason));
  }

  @Test
  void too_few_flasks_and_additions_equal_but_for_rounding_are_no_line() {
    assertThat(StraightLine.fit(new double[0], new double[0]))
        .isEqualTo(new NoLine("no flask has a signal"));
    assertThat(StraightLine.fit(new double[1], new double[1]))
        .isEqualTo(new NoLine("only one flask has a signal"));
    assertThat(StraightLine.fit(new double[] {0.3, 0.1 + 0.2}, new double[] {1, 2}))
        .isEqualTo(new NoLine("the additions are equal but for rounding"));
  }

  @Test
  void broken_promises_of_the_caller_are_exceptions() {
    StraightLine line = line(new double[] {0, 1, 2}, new double[] {1, 2, 3});
    assertThatThrownBy(() -> StraightLine.fit(new double[2], new double[3]))
        .isInstanceOf(IllegalArgumentException.class)
        .hasMessage("2 x but 3 y");
    for (double[] bad : new double[][] {{-1, 1}, {Double.NaN, 1}, {1, 0}, {1, Double.NaN}}) {
      assertThatThrownBy(() -> NativeEstimate.of(line, bad[0], bad[1]))
          .isInstanceOf(IllegalArgumentException.class);
    }
  }

  @Test
  void the_line_keeps_its_own_copy_of_the_points() {
    double[] x = {0, 1, 2};
    StraightLine line = line(x, new double[] {1, 2, 3});
    x[0] = 77;
    assertThat(line.x()).containsExactly(0, 1, 2);
  }
}
