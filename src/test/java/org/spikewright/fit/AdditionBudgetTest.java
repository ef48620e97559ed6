package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatIllegalArgumentException;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.EnumMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.fit.Preparation.Delivery;
import org.spikewright.fit.Preparation.Input;
import org.spikewright.fit.Preparation.OneVessel;
import org.spikewright.fit.Preparation.Part;

/**
 * The combined uncertainty against a Monte-Carlo propagation (JCGM 101:2008): each trial draws
 * every input in its stated shape and the signals with a normal flask error of known deviation,
 * lets the laboratory prepare and measure with them, and does the whole calculation with the
 * nominal values.
 */
class AdditionBudgetTest {
  private static final int TRIALS = 100_000;
  private static final double KNOWN = Double.POSITIVE_INFINITY;

  /** Of the solution: native concentration 1 in the aliquot, 10 before the dilution. */
  private static final double DILUTION = 10;

  private static final double BLANK = 1.5;
  private static final double PER_SOLUTION = 4;
  private static final double ALIQUOT = 10;

  /** The inputs whose errors all flasks share, in all shapes. */
  private static Map<Input, Tolerance> tolerances() {
    Map<Input, Tolerance> all = new EnumMap<>(Input.class);
    all.put(Input.STOCK, Tolerance.expanded(0.012, 2));
    all.put(Input.ALIQUOT, Tolerance.triangular(0.015));
    all.put(Input.ADDITIONS, Tolerance.rectangular(0.014));
    all.put(Input.DILUTION, Tolerance.triangular(0.012));
    all.put(Input.DIGEST_VOLUME, Tolerance.rectangular(0.008));
    all.put(Input.PORTION, Tolerance.standard(0.006));
    all.put(Input.DRY_MASS, Tolerance.rectangular(0.01));
    all.put(Input.BLANK, Tolerance.standard(0.08));
    return all;
  }

  private static Map<Input, Part> parts() {
    Map<Input, Part> parts = new EnumMap<>(Input.class);
    tolerances().forEach((input, t) -> parts.put(input, Part.known(t.standardUncertainty())));
    return parts;
  }

  private static double draw(SplittableRandom random, Tolerance tolerance) {
    return switch (tolerance.shape()) {
      case NORMAL -> tolerance.standardUncertainty() * random.nextGaussian();
      case RECTANGULAR -> tolerance.size() * random.nextDouble(-1, 1);
      case TRIANGULAR -> tolerance.size() * (random.nextDouble() - random.nextDouble());
    };
  }

  /**
   * How a laboratory works.
   *
   * @param start volume in the vessel before the first addition; 0 for flasks made up one by one
   * @param step volume of each addition
   * @param noise of a flask, relative to the unspiked signal
   * @param delivery each addition's own tolerance, rectangular, absolute
   */
  private record Bench(int flasks, double start, double step, double noise, Tolerance delivery) {
    boolean oneVessel() {
      return start > 0;
    }

    double stock() {
      return 2 * ALIQUOT / (step * (flasks - 1));
    }

    double[] nominalX() {
      double[] x = new double[flasks];
      for (int i = 0; i < flasks; i++) {
        x[i] = stock() * step * i / ALIQUOT;
      }
      return x;
    }

    Preparation preparation() {
      List<Double> added = new ArrayList<>();
      List<Delivery> deliveries = new ArrayList<>();
      for (int i = 0; i < flasks; i++) {
        added.add(step * i);
        if (i > 0) {
          double u = delivery.standardUncertainty();
          deliveries.add(new Delivery(i, stock() / ALIQUOT, u));
        }
      }
      return new Preparation(
          parts(),
          DILUTION,
          BLANK,
          PER_SOLUTION,
          oneVessel()
              ? Optional.of(new OneVessel(start, ALIQUOT, 0.05, added, deliveries))
              : Optional.empty());
    }

    /** The result of one trial. */
    double trial(SplittableRandom random) {
      Map<Input, Double> off = new EnumMap<>(Input.class);
      tolerances().forEach((input, tolerance) -> off.put(input, draw(random, tolerance)));
      double native1 = 1 / (1 + off.get(Input.DILUTION));
      native1 *= (1 + off.get(Input.PORTION)) * (1 + off.get(Input.DRY_MASS));
      native1 /= 1 + off.get(Input.DIGEST_VOLUME);
      // What the blank brings is there whatever the portion; the portion's part scales.
      double blankPart = BLANK / DILUTION;
      native1 = (1 - blankPart) * native1 + blankPart / (1 + off.get(Input.DILUTION));
      double aliquot = ALIQUOT * (1 + off.get(Input.ALIQUOT));
      double volume = oneVessel() ? start + aliquot - ALIQUOT + 0.05 * random.nextGaussian() : 100;
      double sum = 0;
      double[] y = new double[flasks];
      for (int i = 0; i < flasks; i++) {
        double own = i > 0 && oneVessel() ? draw(random, delivery) : 0;
        double now = i > 0 ? (step + own) * (1 + off.get(Input.ADDITIONS)) : 0;
        sum += now;
        double amount = native1 * aliquot + stock() * (1 + off.get(Input.STOCK)) * sum;
        double before = oneVessel() ? start : 100;
        y[i] = amount / (oneVessel() ? volume + sum : 100);
        y[i] *= oneVessel() ? (start + step * i) / start : 1;
        y[i] += noise * ALIQUOT / before * random.nextGaussian();
      }
      double c =
          NativeEstimate.of((StraightLine) StraightLine.fit(nominalX(), y)).orElseThrow().value();
      return (c * DILUTION - BLANK - off.get(Input.BLANK)) * PER_SOLUTION;
    }

    /** The line as it is without any error, and the standard error of its x-intercept. */
    Optional<Budget> budget(Preparation preparation) {
      double unit = ALIQUOT / (oneVessel() ? start : 100);
      double[] x = nominalX();
      double[] y = new double[flasks];
      for (int i = 0; i < flasks; i++) {
        y[i] = (1 + x[i]) * unit;
      }
      StraightLine line = (StraightLine) StraightLine.fit(x, y);
      NativeEstimate own = NativeEstimate.of(line, noise * unit, flasks - 2).orElseThrow();
      assertThat(own.g().orElseThrow()).as("g").isLessThan(0.05);
      Part fit = new Part(own.standardError().orElseThrow(), flasks - 2);
      return AdditionBudget.of(line, own.value(), Optional.of(fit), preparation);
    }
  }

  private static double simulated(Bench bench, long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    double mean = 0;
    double squares = 0;
    for (int k = 0; k < TRIALS; k++) {
      double result = bench.trial(random);
      double apart = result - mean;
      mean += apart / (k + 1);
      squares += apart * (result - mean);
    }
    return Math.sqrt(squares / (TRIALS - 1));
  }

  @ParameterizedTest(name = "{0} flasks, start {1}, noise {3}")
  @CsvSource({
    "3, 0, 0.2, 0.01, 0",
    "4, 0, 0.2, 0.02, 0",
    "5, 0, 0.2, 0.002, 0",
    "6, 0, 0.2, 0.03, 0",
    "3, 10, 0.4, 0.005, 0.01",
    "4, 20, 0.3, 0.01, 0.015",
    "5, 20, 0.5, 0.005, 0.03",
    "6, 10, 0.5, 0.01, 0.05",
    "5, 10, 1, 0.001, 0.05"
  })
  void a_monte_carlo_propagation_gives_the_same_combined_uncertainty_within_two_percent(
      int flasks, double start, double step, double noise, double delivery) {
    Bench bench = new Bench(flasks, start, step, noise, Tolerance.rectangular(delivery));
    Budget budget = bench.budget(bench.preparation()).orElseThrow();
    double u = simulated(bench, 20250115L + flasks);
    System.out.printf(
        Locale.ROOT,
        "%s: u %.5f, Monte Carlo %.5f, ratio %.4f%n",
        bench,
        budget.standardUncertainty(),
        u,
        budget.standardUncertainty() / u);
    assertThat(budget.standardUncertainty() / u).isBetween(0.98, 1.02);
  }

  /** The comparison can fail: without the deliveries' own part it does. */
  @Test
  void a_budget_without_the_deliveries_own_errors_would_be_seen_to_be_short() {
    Bench bench = new Bench(5, 10, 0.5, 0.005, Tolerance.rectangular(0.05));
    Preparation whole = bench.preparation();
    OneVessel vessel = whole.vessel().orElseThrow();
    OneVessel without =
        new OneVessel(
            vessel.startVolume(),
            vessel.aliquot(),
            vessel.otherUncertainty(),
            vessel.added(),
            List.of());
    Preparation less =
        new Preparation(whole.parts(), DILUTION, BLANK, PER_SOLUTION, Optional.of(without));
    double u = simulated(bench, 5);
    assertThat(bench.budget(whole).orElseThrow().standardUncertainty() / u).isBetween(0.98, 1.02);
    assertThat(bench.budget(less).orElseThrow().standardUncertainty() / u).isLessThan(0.9);
  }

  @Test
  void every_known_input_is_named_once_and_unknown_ones_are_left_out() {
    Bench bench = new Bench(4, 0, 0.2, 0.01, Tolerance.standard(0));
    Budget budget = bench.budget(bench.preparation()).orElseThrow();
    assertThat(budget.others())
        .extracting(Contribution::name)
        .containsExactly(
            "stock",
            "aliquot",
            "additions",
            "dilution",
            "digest volume",
            "test portion",
            "dry mass",
            "blank");
    assertThat(budget.fit().orElseThrow().df()).isEqualTo(2);
    Preparation nothing = new Preparation(Map.of(), 1, 0, 1, Optional.empty());
    assertThat(bench.budget(nothing).orElseThrow().others()).isEmpty();
  }

  @Test
  void signals_that_no_volume_corrects_leave_the_vessels_volume_out() {
    double[] x = {0, 1, 2};
    StraightLine line = (StraightLine) StraightLine.fit(x, new double[] {1, 2, 3});
    Map<Input, Part> additions = Map.of(Input.ADDITIONS, Part.known(0.01));
    OneVessel ratio = new OneVessel(KNOWN, 10, 0.5, List.of(0.0, 1.0, 2.0), List.of());
    Preparation preparation = new Preparation(additions, 1, 0, 1, Optional.of(ratio));
    Budget budget = AdditionBudget.of(line, 1, Optional.empty(), preparation).orElseThrow();
    assertThat(budget.standardUncertainty()).isCloseTo(0.01, within(1e-15));
    assertThat(budget.fit()).isEmpty();
  }

  @Test
  void a_vessel_of_another_series_is_a_broken_promise() {
    StraightLine line = (StraightLine) StraightLine.fit(new double[] {0, 1}, new double[] {1, 2});
    OneVessel three = new OneVessel(10, 10, 0, List.of(0.0, 1.0, 2.0), List.of());
    Preparation preparation = new Preparation(Map.of(), 1, 0, 1, Optional.of(three));
    assertThatIllegalArgumentException()
        .isThrownBy(() -> AdditionBudget.of(line, 1, Optional.empty(), preparation));
  }
}
