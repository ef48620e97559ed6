package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.Arrays;
import java.util.Locale;
import java.util.SplittableRandom;
import org.apache.commons.math3.distribution.BinomialDistribution;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * How often the 95 % interval holds the true concentration, on clean simulated series: flasks
 * evenly spaced up to a top addition of 1 to 3 times the native concentration, each the mean of
 * three readings, with a constant flask deviation of 1 to 2 % of the unspiked signal. An unbounded
 * interval counts as holding it.
 *
 * <p>The simulation takes 100 000 series a design, whose own scatter is 0.07 %: a run of 20 000
 * scatters by 0.15 % and leaves the window of ± 0.5 % for one seed in a thousand.
 */
class CoverageTest {
  private static final int READINGS = 3;

  /** What a run of series came to. */
  private record Tally(int series, int covered, int unbounded, double medianHalfWidthPercent) {
    double coverage() {
      return (double) covered / series;
    }
  }

  @Tag("simulation")
  @ParameterizedTest(name = "{0} flasks")
  @ValueSource(ints = {4, 5, 6})
  void a_hundred_thousand_intervals_hold_the_truth_in_95_percent(int flasks) {
    Tally tally = simulate(100_000, flasks, 20250115L + flasks);
    System.out.printf(
        Locale.ROOT,
        "%d flasks: %d series, coverage %.2f %%, unbounded %d, median half-width %.1f %%%n",
        flasks,
        tally.series,
        100 * tally.coverage(),
        tally.unbounded,
        tally.medianHalfWidthPercent);
    assertThat(tally.coverage()).as("%s", tally).isBetween(0.945, 0.955);
  }

  @ParameterizedTest(name = "{0} flasks")
  @ValueSource(ints = {3, 4, 5, 6})
  void two_thousand_intervals_hold_the_truth_as_often_as_95_percent_allows(int flasks) {
    Tally tally = simulate(2_000, flasks, 7L + flasks);
    BinomialDistribution honest = new BinomialDistribution(null, tally.series, 0.95);
    assertThat(tally.covered)
        .as("%s", tally)
        .isBetween(
            honest.inverseCumulativeProbability(0.0005),
            honest.inverseCumulativeProbability(0.9995));
  }

  /**
   * Fitting readings instead of flask means is the error that the flask means are there against.
   */
  @ParameterizedTest(name = "{0} flasks")
  @ValueSource(ints = {4, 5, 6})
  void readings_taken_for_flasks_would_cover_far_less(int flasks) {
    SplittableRandom random = new SplittableRandom(99);
    int covered = 0;
    for (int k = 0; k < 2_000; k++) {
      double[] x = new double[flasks * READINGS];
      double[] y = new double[flasks * READINGS];
      for (int i = 0; i < flasks; i++) {
        double addition = 2.0 * i / (flasks - 1);
        double flask = 1 + addition + 0.015 * random.nextGaussian();
        for (int r = 0; r < READINGS; r++) {
          x[i * READINGS + r] = addition;
          y[i * READINGS + r] = flask + 0.003 * random.nextGaussian();
        }
      }
      NativeEstimate estimate =
          NativeEstimate.of((StraightLine) StraightLine.fit(x, y)).orElseThrow();
      covered += holds(estimate, 1) ? 1 : 0;
    }
    assertThat(covered / 2_000.0).isBetween(0.55, 0.92);
  }

  private static Tally simulate(int series, int flasks, long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    double[] halfWidths = new double[series];
    int covered = 0;
    int unbounded = 0;
    for (int k = 0; k < series; k++) {
      double truth = Math.pow(10, random.nextDouble(-2, 2));
      NativeEstimate estimate = NativeEstimate.of(draw(random, flasks, truth)).orElseThrow();
      covered += holds(estimate, truth) ? 1 : 0;
      unbounded += estimate.isBounded() ? 0 : 1;
      double width = estimate.upper95().orElse(Double.MAX_VALUE) - estimate.lower95().orElse(0);
      halfWidths[k] = 50 * width / truth;
    }
    Arrays.sort(halfWidths);
    return new Tally(series, covered, unbounded, halfWidths[series / 2]);
  }

  private static StraightLine draw(SplittableRandom random, int flasks, double truth) {
    double sensitivity = Math.pow(10, random.nextDouble(-3, 3));
    double top = truth * random.nextDouble(1, 3);
    double noise = sensitivity * truth * random.nextDouble(0.01, 0.02);
    double[] x = new double[flasks];
    double[] y = new double[flasks];
    for (int i = 0; i < flasks; i++) {
      x[i] = top * i / (flasks - 1);
      for (int r = 0; r < READINGS; r++) {
        // The deviation of a reading that leaves the mean of three with the noise of the flask.
        double reading = noise * Math.sqrt(READINGS) * random.nextGaussian();
        y[i] += (sensitivity * (truth + x[i]) + reading) / READINGS;
      }
    }
    return (StraightLine) StraightLine.fit(x, y);
  }

  private static boolean holds(NativeEstimate estimate, double truth) {
    return !estimate.isBounded()
        || estimate.lower95().orElseThrow() <= truth && truth <= estimate.upper95().orElseThrow();
  }
}
