package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.List;
import java.util.OptionalDouble;
import java.util.SplittableRandom;
import java.util.stream.IntStream;
import org.assertj.core.data.Offset;
import org.junit.jupiter.api.Test;

/** What the night's numbers do, by laws and by examples that can be reckoned in the head. */
class NightLawsTest {
  private static final SimulatedNight.Plan PLAN = new SimulatedNight.Plan(40, 5, 0.01, 0.3, false);

  private static List<PooledSeries> night(long seed) {
    return SimulatedNight.straight(new SplittableRandom(seed), PLAN);
  }

  @Test
  void equal_weights_are_no_weights_to_the_last_bit() {
    for (PooledSeries series : night(1)) {
      double[] threes = new double[series.flasks()];
      Arrays.fill(threes, 3);
      StraightLine plain = SimulatedNight.line(series);
      StraightLine weighted = (StraightLine) StraightLine.fit(series.x(), series.y(), threes);
      assertThat(weighted.slope()).isEqualTo(plain.slope());
      assertThat(weighted.residualSumOfSquares()).isEqualTo(plain.residualSumOfSquares());
      assertThat(NativeEstimate.of(weighted)).isEqualTo(NativeEstimate.of(plain));
      assertThat(BendTest.of(weighted)).isEqualTo(BendTest.of(plain));
      assertThat(weighted.isUnweighted()).isTrue();
    }
  }

  @Test
  void weights_that_are_none_are_a_reason_for_no_line() {
    double[] x = {0, 1, 2};
    for (double bad : new double[] {0, -1, Double.NaN, Double.POSITIVE_INFINITY, 1e-20}) {
      assertThat(StraightLine.fit(x, x, new double[] {1, 1, bad}))
          .as("weight %s", bad)
          .isInstanceOf(NoLine.class);
    }
  }

  @Test
  void the_same_night_gives_the_same_bits() {
    assertThat(PoolEvidence.of(night(2), night(3))).isEqualTo(PoolEvidence.of(night(2), night(3)));
  }

  @Test
  void the_order_of_the_series_moves_nothing_but_rounding() {
    List<PooledSeries> turned = new ArrayList<>(night(4));
    Collections.reverse(turned);
    PoolEvidence one = PoolEvidence.of(night(4), List.of());
    PoolEvidence other = PoolEvidence.of(turned, List.of());
    VariancePrior prior = one.line().orElseThrow();
    assertThat(other.line().orElseThrow().variance())
        .isCloseTo(prior.variance(), Offset.offset(1e-6 * prior.variance()));
    assertThat(1 / other.line().orElseThrow().df()).isCloseTo(1 / prior.df(), Offset.offset(1e-4));
    assertThat(other.bend().orElseThrow().t())
        .isCloseTo(one.bend().orElseThrow().t(), Offset.offset(1e-4));
  }

  @Test
  void another_unit_of_the_signal_moves_no_test() {
    PoolEvidence one = PoolEvidence.of(night(5), List.of());
    PoolEvidence other =
        PoolEvidence.of(night(5).stream().map(s -> scaled(s, 1e-7)).toList(), List.of());
    assertThat(other.bend().orElseThrow().p())
        .isCloseTo(one.bend().orElseThrow().p(), Offset.offset(1e-4));
    assertThat(other.flaskNoise().orElseThrow().constant())
        .isCloseTo(
            1e-7 * one.flaskNoise().orElseThrow().constant(),
            Offset.offset(1e-10 * one.flaskNoise().orElseThrow().constant()));
    assertThat(other.line().orElseThrow().variance())
        .isCloseTo(one.line().orElseThrow().variance(), Offset.offset(1e-4));
  }

  private static PooledSeries scaled(PooledSeries s, double k) {
    double[] y = Arrays.stream(s.y()).map(v -> v * k).toArray();
    return SimulatedNight.pooled(s.x(), y);
  }

  @Test
  void the_noise_function_finds_constant_and_proportional_noise() {
    SplittableRandom random = new SplittableRandom(6);
    for (double[] truth : new double[][] {{5, 0}, {0, 0.02}, {5, 0.02}}) {
      List<PooledSeries> night = new ArrayList<>();
      for (int j = 0; j < 300; j++) {
        double sample = Math.pow(10, random.nextDouble(-1, 1.3));
        double[] x = IntStream.range(0, 5).mapToDouble(i -> sample * i / 2.0).toArray();
        double[] y = new double[5];
        for (int i = 0; i < 5; i++) {
          double signal = 100 * (sample + x[i]);
          y[i] = signal + Math.hypot(truth[0], truth[1] * signal) * random.nextGaussian();
        }
        night.add(SimulatedNight.pooled(x, y));
      }
      NoiseFunction found = NoiseFunction.ofFlasks(night, Weighting.EQUAL).orElseThrow();
      assertThat(found.constant()).as("%s", found).isCloseTo(truth[0], Offset.offset(1.0));
      assertThat(found.proportional()).as("%s", found).isCloseTo(truth[1], Offset.offset(0.003));
      // A few series that are bent out of shape move it little.
      for (int j = 0; j < 15; j++) {
        PooledSeries bad = night.get(j);
        double[] y = bad.y().clone();
        y[2] *= 3;
        night.set(j, SimulatedNight.pooled(bad.x(), y));
      }
      NoiseFunction robust = NoiseFunction.ofFlasks(night, Weighting.EQUAL).orElseThrow();
      assertThat(robust.sd(1000) / found.sd(1000)).as("%s", robust).isBetween(0.8, 1.35);
    }
  }

  @Test
  void replicates_give_the_noise_of_readings() {
    SplittableRandom random = new SplittableRandom(7);
    List<PooledSeries> night = new ArrayList<>();
    for (PooledSeries s : night(7)) {
      int[] three = {3, 3, 3, 3, 3};
      double[] variances = new double[5];
      for (int i = 0; i < 5; i++) {
        double sd = 0.03 * s.y()[i];
        double a = random.nextGaussian();
        double b = random.nextGaussian();
        variances[i] = sd * sd * (a * a + b * b) / 2;
      }
      night.add(
          new PooledSeries(
              s.addition(),
              s.x(),
              s.y(),
              s.factor(),
              three,
              variances,
              s.minutes(),
              s.sensitivity()));
    }
    NoiseFunction readings = PoolEvidence.of(night, List.of()).readingNoise().orElseThrow();
    assertThat(readings.sd(2000)).isBetween(50.0, 70.0);
    assertThat(PoolEvidence.of(night(7), List.of()).readingNoise()).isEmpty();
  }

  @Test
  void the_moderated_variance_lies_between_own_and_prior_and_no_flask_takes_the_prior() {
    VariancePrior prior = new VariancePrior(6, 2, 30);
    assertThat(prior.moderated(8, 2)).isEqualTo(new Variance(0.75 * 2 + 0.25 * 8, 8));
    assertThat(prior.moderated(77, 0)).isEqualTo(new Variance(2, 6));
    assertThat(new VariancePrior(Double.POSITIVE_INFINITY, 2, 30).moderated(8, 2))
        .isEqualTo(new Variance(2, Double.POSITIVE_INFINITY));
  }

  @Test
  void a_single_addition_borrows_its_whole_uncertainty() {
    Lent lent = PoolEvidence.of(night(8), List.of()).lent().orElseThrow();
    StraightLine two =
        (StraightLine) StraightLine.fit(new double[] {0, 2}, new double[] {1000, 3000});
    Variance variance = lent.variance(two, StraightLine.ones(2));
    assertThat(variance.df()).isEqualTo(lent.line().df());
    assertThat(variance.sd()).isBetween(8.0, 14.0);
    assertThat(NativeEstimate.of(two, variance.sd(), variance.df()).orElseThrow().isBounded())
        .isTrue();
  }

  @Test
  void nine_series_lend_nothing_ten_do_and_remembered_ones_count() {
    List<PooledSeries> night = night(9);
    assertThat(PoolEvidence.of(night.subList(0, 9), List.of()).lent()).isEmpty();
    assertThat(PoolEvidence.of(night.subList(0, 10), List.of()).lent()).isPresent();
    assertThat(PoolEvidence.of(night.subList(0, 2), night.subList(2, 10)).lent()).isPresent();
    Lent instrument =
        PoolEvidence.of(night.subList(0, 10), List.of()).lentByInstrument().orElseThrow();
    assertThat(instrument.basis()).isEqualTo(Lent.Basis.INSTRUMENT);
    assertThat(instrument.noise()).isEqualTo(NoiseFunction.RELATIVE);
    assertThat(instrument.bend()).isEmpty();
    assertThat(instrument.sensitivity()).isEmpty();
  }

  /** The figures of the design: 8 % in rising order, 1 % in scrambled order, for a 5 % fall. */
  @Test
  void drift_in_rising_order_hides_in_the_line_and_in_scrambled_order_does_not() {
    double[] x = {0, 0.5, 1, 1.5, 2};
    StraightLine line = (StraightLine) StraightLine.fit(x, new double[] {1, 1.5, 2, 2.5, 3});
    double rising = DriftExposure.of(line, new double[] {0, 1, 2, 3, 4}).orElseThrow();
    double scrambled = DriftExposure.of(line, new double[] {4, 1, 0, 3, 2}).orElseThrow();
    assertThat(5 * rising).isBetween(0.06, 0.09);
    assertThat(Math.abs(5 * scrambled)).isLessThan(0.02);
    assertThat(DriftExposure.of(line, new double[] {0, 1, 2, 3, Double.NaN}))
        .isEqualTo(OptionalDouble.empty());
    assertThat(DriftExposure.of(line, new double[5])).isEqualTo(OptionalDouble.empty());
  }

  @Test
  void one_level_delivered_short_is_found_by_the_night_and_measured() {
    List<PooledSeries> off =
        night(10).stream()
            .map(
                s -> {
                  double[] y = s.y().clone();
                  y[2] -= 0.04 * s.x()[2] * 1000;
                  return SimulatedNight.pooled(s.x(), y);
                })
            .toList();
    List<LevelBias> levels = PoolEvidence.of(off, List.of()).levels();
    assertThat(levels).hasSize(1);
    assertThat(levels.get(0).addition()).isEqualTo(1);
    assertThat(levels.get(0).effect()).isBetween(-0.05, -0.03);
    assertThat(levels.get(0).meanResidual()).isNegative();
    assertThat(levels.get(0).orBend()).isFalse();
    assertThat(PoolEvidence.of(night(10), List.of()).levels()).isEmpty();
  }

  @Test
  void a_top_level_delivered_short_or_a_bend_both_are_named() {
    List<PooledSeries> off =
        night(11).stream()
            .map(
                s -> {
                  double[] y = s.y().clone();
                  y[4] -= 0.015 * s.x()[4] * 1000;
                  return SimulatedNight.pooled(s.x(), y);
                })
            .toList();
    PoolEvidence evidence = PoolEvidence.of(off, List.of());
    assertThat(evidence.sharedBend()).isPresent();
    assertThat(evidence.levels()).isNotEmpty();
    assertThat(evidence.levels().get(0).addition()).isEqualTo(2);
    assertThat(evidence.levels().get(0).orBend()).isTrue();
  }

  @Test
  void a_drift_over_the_night_is_found_in_scrambled_order_and_measured() {
    double[] order = {2, 0, 4, 1, 3};
    List<PooledSeries> drifting = new ArrayList<>();
    int start = 0;
    for (PooledSeries s : night(12)) {
      double[] minutes = new double[5];
      double[] y = s.y().clone();
      for (int i = 0; i < 5; i++) {
        minutes[i] = start + 6 * order[i];
        y[i] *= 1 - 0.05 * minutes[i] / 60;
      }
      start += 8;
      drifting.add(
          new PooledSeries(
              s.addition(),
              s.x(),
              y,
              s.factor(),
              s.readings(),
              s.replicateVariance(),
              minutes,
              s.sensitivity()));
    }
    NightDrift drift = PoolEvidence.of(drifting, List.of()).drift().orElseThrow();
    assertThat(drift.p()).isLessThan(0.001);
    assertThat(drift.perHour()).isBetween(-0.09, -0.03);
    assertThat(Math.abs(drift.likeBend())).isLessThan(0.8);
    assertThat(PoolEvidence.of(night(12), List.of()).drift()).as("no times").isEmpty();
  }

  @Test
  void half_a_pool_that_bends_is_no_shared_bend_but_the_bent_series_are_found() {
    double k = SimulatedNight.curvatureFor(0.34, 5);
    List<PooledSeries> night = SimulatedNight.bent(new SplittableRandom(13), PLAN, 20, k);
    PoolEvidence evidence = PoolEvidence.of(night, List.of());
    assertThat(evidence.sharedBend()).as("%s", evidence.bend()).isEmpty();
    Lent lent = evidence.lent().orElseThrow();
    int found = 0;
    for (int j = 0; j < 20; j++) {
      StraightLine line = SimulatedNight.line(night.get(j));
      double p = ModeratedSeries.of(line, night.get(j), lent, 0).bend().orElseThrow().pOneSided();
      found += p < 0.005 ? 1 : 0;
    }
    assertThat(found).isGreaterThanOrEqualTo(18);
  }

  @Test
  void a_shared_bend_says_where_the_line_can_no_longer_be_trusted() {
    double k = SimulatedNight.curvatureFor(0.17, 5);
    List<PooledSeries> night = SimulatedNight.bent(new SplittableRandom(14), PLAN, 40, k);
    SharedBend bend = PoolEvidence.of(night, List.of()).sharedBend().orElseThrow();
    assertThat(bend.coefficient()).isBetween(0.9 * k / 1000, 1.1 * k / 1000);
    assertThat(bend.signalWhereItTakes(0.05).orElseThrow())
        .isCloseTo(0.05 / bend.coefficient() * 0.95, Offset.offset(1e-9));
    double linear = 2500;
    assertThat(bend.straight(linear - bend.coefficient() * linear * linear))
        .isCloseTo(linear, Offset.offset(1e-6));
  }

  @Test
  void noisier_nights_than_before_are_said() {
    SimulatedNight.Plan loud = new SimulatedNight.Plan(40, 5, 0.03, 0.3, false);
    List<PooledSeries> tonight = SimulatedNight.straight(new SplittableRandom(15), loud);
    NoiseHistory more = PoolEvidence.of(tonight, night(16)).history().orElseThrow();
    assertThat(more.p()).isLessThan(1e-4);
    assertThat(more.ratio()).isBetween(2.0, 4.5);
    NoiseHistory same = PoolEvidence.of(night(17), night(18)).history().orElseThrow();
    assertThat(same.p()).isGreaterThan(0.005);
    assertThat(same.ratio()).isBetween(0.6, 1.7);
  }

  @Test
  void weights_are_worth_much_on_proportional_noise_and_nothing_on_constant() {
    SimulatedNight.Plan grows = new SimulatedNight.Plan(60, 5, 0.02, 0, true);
    List<PooledSeries> night = SimulatedNight.straight(new SplittableRandom(19), grows);
    assertThat(PoolEvidence.of(night, List.of()).gainFromWeights().orElseThrow())
        .isBetween(0.1, 0.3);
    assertThat(PoolEvidence.of(night(20), List.of()).gainFromWeights().orElseThrow())
        .isLessThan(0.1);
  }
}
