package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.Arrays;
import java.util.OptionalDouble;
import java.util.SplittableRandom;
import java.util.function.BiConsumer;
import java.util.function.DoubleUnaryOperator;
import org.assertj.core.data.Offset;
import org.junit.jupiter.api.Test;

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

  private static double[] map(double[] values, DoubleUnaryOperator change) {
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

  /** The interval is the set of x at which the line's signal does not differ from 0. */
  @Test
  void fiellers_interval_holds_exactly_the_points_where_the_line_may_be_zero() {
    everySeries(
        (line, seed) -> {
          NativeEstimate estimate = estimate(line);
          for (double c = -3; estimate.isBounded() && c < 9; c += 0.37) {
            double away = c + line.xMean();
            double se =
                line.residualSd().orElseThrow()
                    * Math.sqrt(1.0 / line.n() + away * away / line.sxx());
            boolean mayBeZero = Math.abs(line.at(-c)) <= estimate.t().orElseThrow() * se;
            boolean inside =
                estimate.lower95().orElseThrow() <= c && c <= estimate.upper95().orElseThrow();
            assertThat(inside).as("%s at %s", seed, c).isEqualTo(mayBeZero);
          }
        });
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
}
