package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.util.Arrays;
import java.util.OptionalDouble;
import java.util.SplittableRandom;
import java.util.function.BiConsumer;
import org.assertj.core.data.Offset;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Laws that hold whatever the data are; series from seeded loops, the seed in every failure. */
class FitLawsTest {
  private static final int SERIES = 500;

  /** A random addition series: 3 to 10 flasks, some levels repeated, noise up to 20 %. */
  private static void everySeries(BiConsumer<StraightLine, String> law) {
    for (long seed = 1; seed <= SERIES; seed++) {
      law.accept(random(new SplittableRandom(seed)), "seed " + seed);
    }
  }

  private static StraightLine random(SplittableRandom random) {
    int n = random.nextInt(3, 11);
    double[] x = new double[n];
    double[] y = new double[n];
    double nativeConcentration = random.nextDouble(0.2, 5);
    double noise = Math.pow(10, random.nextDouble(-4, -0.7));
    for (int i = 0; i < n; i++) {
      x[i] = i == 0 ? 0 : random.nextInt(4) == 0 ? x[i - 1] : random.nextDouble(0, 8);
      y[i] = (nativeConcentration + x[i]) * (1 + noise * random.nextGaussian());
    }
    x[n - 1] = 8;
    return line(x, y);
  }

  private static StraightLine line(double[] x, double[] y) {
    return (StraightLine) StraightLine.fit(x, y);
  }

  private static NativeEstimate estimate(StraightLine line) {
    return NativeEstimate.of(line).orElseThrow();
  }

  private static double[] map(double[] values, java.util.function.DoubleUnaryOperator change) {
    return Arrays.stream(values).map(change).toArray();
  }

  private static Offset<Double> relative(double digits, double value) {
    return Offset.offset(Math.abs(value) * digits + 1e-300);
  }

  @Test
  void the_order_of_the_rows_does_not_matter() {
    everySeries(
        (line, seed) -> {
          double[] x = new double[line.n()];
          double[] y = new double[line.n()];
          for (int i = 0; i < x.length; i++) {
            x[i] = line.x()[x.length - 1 - i];
            y[i] = line.y()[x.length - 1 - i];
          }
          assertAlike(estimate(line), estimate(line(x, y)), 1, seed);
          assertThat(line(x, y).residualSumOfSquares())
              .as(seed)
              .isCloseTo(line.residualSumOfSquares(), relative(1e-9, line.syy() * 1e-4));
        });
  }

  @Test
  void a_factor_on_every_signal_leaves_the_concentration_and_its_interval() {
    everySeries(
        (line, seed) -> {
          for (double k : new double[] {1e-9, 0.3, 7e6}) {
            StraightLine other = line(line.x(), map(line.y(), v -> v * k));
            assertAlike(estimate(line), estimate(other), 1, seed);
            assertThat(other.slope()).as(seed).isCloseTo(k * line.slope(), relative(1e-9, k));
          }
        });
  }

  @Test
  void another_unit_of_the_additions_scales_the_concentration_and_its_interval() {
    everySeries(
        (line, seed) -> {
          for (double k : new double[] {1e-9, 1000, 1e6 / 3}) {
            StraightLine other = line(map(line.x(), v -> v * k), line.y());
            assertAlike(estimate(line), estimate(other), k, seed);
            assertThat(bendT(other)).as(seed).isCloseTo(bendT(line), Offset.offset(1e-7));
          }
        });
  }

  private static double bendT(StraightLine line) {
    return BendTest.of(line).map(BendTest::t).filter(t -> Math.abs(t) < 1e6).orElse(0.0);
  }

  private static void assertAlike(NativeEstimate one, NativeEstimate other, double k, String seed) {
    double digits = 1e-8 * k;
    assertThat(other.value()).as(seed).isCloseTo(k * one.value(), relative(1e-8, k * one.value()));
    assertClose(one.standardError(), other.standardError(), k, seed);
    assertClose(one.g(), other.g(), 1, seed);
    assertThat(one.isBounded()).as(seed).isEqualTo(other.isBounded());
    if (one.isBounded() && one.g().orElseThrow() < 0.9) {
      double size = one.upper95().orElseThrow() - one.lower95().orElseThrow() + one.value();
      Offset<Double> close = relative(digits, size);
      assertThat(other.lower95().orElseThrow())
          .as(seed)
          .isCloseTo(k * one.lower95().orElseThrow(), close);
      assertThat(other.upper95().orElseThrow())
          .as(seed)
          .isCloseTo(k * one.upper95().orElseThrow(), close);
    }
  }

  private static void assertClose(OptionalDouble one, OptionalDouble other, double k, String seed) {
    double expected = k * one.orElseThrow();
    assertThat(other.orElseThrow()).as(seed).isCloseTo(expected, relative(1e-6, expected));
  }

  @Test
  void points_exactly_on_the_line_leave_it_where_it_is() {
    everySeries(
        (line, seed) -> {
          double[] x = Arrays.copyOf(line.x(), line.n() + 2);
          double[] y = Arrays.copyOf(line.y(), line.n() + 2);
          x[line.n()] = 3.5;
          x[line.n() + 1] = 20;
          y[line.n()] = line.at(3.5);
          y[line.n() + 1] = line.at(20);
          StraightLine more = line(x, y);
          assertThat(more.slope()).as(seed).isCloseTo(line.slope(), Offset.offset(1e-12));
          assertThat(more.signalIntercept())
              .as(seed)
              .isCloseTo(line.signalIntercept(), Offset.offset(1e-11));
          assertThat(more.residualSumOfSquares())
              .as(seed)
              .isCloseTo(line.residualSumOfSquares(), Offset.offset(1e-12 * line.syy()));
        });
  }

  @Test
  void fiellers_interval_holds_the_value_and_is_missing_exactly_from_g_of_1() {
    int unbounded = 0;
    for (long seed = 1; seed <= 5_000; seed++) {
      SplittableRandom random = new SplittableRandom(seed);
      double[] x = {0, 1, 2, 3};
      double slope = random.nextDouble(-1, 1);
      double[] y = map(x, v -> 1 + slope * v + random.nextGaussian() * 0.3);
      NativeEstimate estimate = estimate(line(x, y));
      boolean bounded = estimate.g().orElseThrow() < 1;
      assertThat(estimate.isBounded()).as("seed %s", seed).isEqualTo(bounded);
      assertThat(estimate.upper95().isPresent()).as("seed %s", seed).isEqualTo(bounded);
      if (bounded) {
        assertThat(estimate.value())
            .as("seed %s", seed)
            .isBetween(estimate.lower95().orElseThrow(), estimate.upper95().orElseThrow());
      } else {
        unbounded++;
      }
    }
    assertThat(unbounded).isBetween(1000, 4500);
  }

  @Test
  void a_deleted_residual_is_the_distance_from_the_line_refitted_without_the_point() {
    everySeries(
        (line, seed) -> {
          for (int i = 0; line.n() > 3 && i < line.n(); i++) {
            double byLeverage =
                line.residual(i) / Math.sqrt(1 - line.leverage(i)); // over s(i): the text-book form
            DeletedResidual.of(line, i, 0)
                .ifPresent(
                    odd -> {
                      double s = odd.without().residualSd().orElseThrow();
                      double size = Math.max(1, Math.abs(odd.t()));
                      if (s > 1e-9) {
                        assertThat(odd.t())
                            .as(seed)
                            .isCloseTo(byLeverage / s, Offset.offset(1e-6 * size));
                      }
                      assertThat(odd.p()).as(seed).isBetween(0.0, 1.0);
                      assertThat(odd.df()).as(seed).isEqualTo(line.n() - 3);
                    });
          }
        });
  }

  @Test
  void a_floor_takes_the_place_of_a_smaller_scatter_and_of_none() {
    StraightLine line = line(new double[] {0, 1, 2, 3, 4}, new double[] {1, 2, 3, 4, 5.001});
    double without = DeletedResidual.of(line, 4, 0).orElseThrow().t();
    double withFloor = DeletedResidual.of(line, 4, 0.001).orElseThrow().t();
    assertThat(without).isGreaterThan(1e9);
    // 0.001 off a line through four points, at one step beyond: 1/sqrt(1 + 1/4 + 2.5^2/5)
    assertThat(withFloor).isCloseTo(1 / Math.sqrt(2.5), Offset.offset(1e-9));
  }

  @Test
  void the_bend_tests_sign_says_saturation_and_its_mirror() {
    for (long seed = 1; seed <= SERIES; seed++) {
      SplittableRandom random = new SplittableRandom(seed);
      double[] x = {0, 1, 2, 3, 4, 5};
      double bend = random.nextDouble(0.02, 0.1);
      double[] y = map(x, v -> 2 + v - bend * v * v + random.nextGaussian() * 0.01);
      BendTest saturating = BendTest.of(line(x, y)).orElseThrow();
      BendTest mirrored = BendTest.of(line(x, map(y, v -> 20 - v))).orElseThrow();
      assertThat(saturating.t()).as("seed %s", seed).isNegative();
      assertThat(saturating.pOneSided()).as("seed %s", seed).isLessThan(0.1);
      assertThat(mirrored.t()).as("seed %s", seed).isCloseTo(-saturating.t(), Offset.offset(1e-6));
      assertThat(mirrored.pOneSided() + saturating.pOneSided())
          .as("seed %s", seed)
          .isCloseTo(1, Offset.offset(1e-9));
      double straight = estimate(line(x, y)).value();
      assertThat(saturating.nativeConcentration().orElseThrow())
          .as("seed %s", seed)
          .isLessThan(straight);
    }
  }

  @Test
  void a_parabola_that_never_reaches_zero_has_no_native_concentration() {
    double[] x = {0, 1, 2, 3, 4};
    StraightLine line = line(x, map(x, v -> 1 + 0.1 * v + v * v));
    assertThat(QuadraticFit.of(line).orElseThrow().nativeConcentration()).isEmpty();
    assertThat(BendTest.of(line).orElseThrow().t()).isPositive();
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
