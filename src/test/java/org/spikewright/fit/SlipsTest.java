package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatIllegalArgumentException;

import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.SplittableRandom;
import java.util.function.UnaryOperator;
import java.util.stream.DoubleStream;
import org.apache.commons.math3.distribution.BinomialDistribution;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * Slips on simulated series of native concentration 1: how often flawless ones are suspected, and
 * how often slips are found. A lent variance is drawn as the pool's model has it.
 */
class SlipsTest {
  private static final double[] RATES = {0.002, 0.005, 0.01, 0.02, 0.05};

  /** What one series of a night can spend on this flag: 2 % over five tests. */
  private static final double ALARM = 0.02 / 5;

  private static final double PRIOR_DF = 20;

  /**
   * Flawless series.
   *
   * @param suspected how many have a p of the rate or less, by rate
   * @param pointed likewise of the chance that the residuals point so far, whether or not the slip
   *     fits
   */
  private record Flawless(int series, int[] suspected, int[] pointed) {}

  private static Flawless flawless(int series, int flasks, double noise, double priorDf) {
    SplittableRandom random = new SplittableRandom(20250115L + flasks);
    int[] suspected = new int[RATES.length];
    int[] pointed = new int[RATES.length];
    for (int k = 0; k < series; k++) {
      double sd = noise * spread(random, priorDf);
      Slips.Suspect suspect = suspect(truth(random, levels(flasks, 2), sd));
      Slips.Lent lent = lent(priorDf, noise);
      double p = Slips.of(suspect, lent).orElseThrow().p();
      SlipSearch search = new SlipSearch(suspect, lent);
      List<SlipSearch.Tried> tried = search.tried();
      double chance = search.chance(tried, SlipSearch.farthest(tried));
      for (int r = 0; r < RATES.length; r++) {
        suspected[r] += p <= RATES[r] ? 1 : 0;
        pointed[r] += chance <= RATES[r] ? 1 : 0;
      }
    }
    return new Flawless(series, suspected, pointed);
  }

  private static void assertValid(Flawless flawless, String what) {
    System.out.printf(
        Locale.ROOT,
        "%s: %d flawless series, p <= %s: suspected %s, pointed %s%n",
        what,
        flawless.series,
        Arrays.toString(RATES),
        percent(flawless.suspected, flawless.series),
        percent(flawless.pointed, flawless.series));
    for (int r = 0; r < RATES.length; r++) {
      BinomialDistribution honest = new BinomialDistribution(null, flawless.series, RATES[r]);
      int most = honest.inverseCumulativeProbability(0.9995);
      assertThat(flawless.suspected[r]).as("%s at %s", what, RATES[r]).isLessThanOrEqualTo(most);
      assertThat(flawless.pointed[r])
          .as("%s at %s", what, RATES[r])
          .isBetween((int) (0.3 * RATES[r] * flawless.series), most);
    }
  }

  private static String percent(int[] counts, int of) {
    return Arrays.stream(counts)
        .mapToObj(count -> String.format(Locale.ROOT, "%.2f %%", 100.0 * count / of))
        .toList()
        .toString();
  }

  @Tag("simulation")
  @ParameterizedTest(name = "{0} flasks, noise {1}, prior df {2}")
  @CsvSource({
    "3, 0.01, 20",
    "4, 0.01, 20",
    "5, 0.01, 20",
    "6, 0.01, 20",
    "3, 0.3, 20",
    "4, 0.3, 20",
    "5, 0.3, 20",
    "6, 0.3, 20",
    "4, 0.3, 0",
    "5, 0.3, 0",
    "6, 0.3, 0",
    "6, 0.01, 0",
    "5, 0.3, 4"
  })
  void a_hundred_thousand_flawless_series_are_suspected_no_oftener_than_the_p_says(
      int flasks, double noise, double priorDf) {
    assertValid(
        flawless(100_000, flasks, noise, priorDf),
        flasks + " flasks, noise " + noise + ", prior df " + priorDf);
  }

  @ParameterizedTest(name = "{0} flasks, noise {1}, prior df {2}")
  @CsvSource({"3, 0.01, 20", "4, 0.3, 20", "5, 0.01, 20", "6, 0.3, 20", "5, 0.3, 0"})
  void flawless_series_are_suspected_no_oftener_than_the_p_says(
      int flasks, double noise, double priorDf) {
    assertValid(
        flawless(10_000, flasks, noise, priorDf),
        flasks + " flasks, noise " + noise + ", prior df " + priorDf);
  }

  /**
   * Found: suspected at the rate of the flag, the right slip first, its value within 5 % of that of
   * the series without the slip.
   */
  private static double found(
      int flasks,
      double priorDf,
      Slips.Kind kind,
      List<Integer> points,
      UnaryOperator<double[]> slip) {
    SplittableRandom random = new SplittableRandom(7);
    int found = 0;
    int series = 1_000;
    for (int k = 0; k < series; k++) {
      double[] stated = levels(flasks, 2);
      double sd = 0.01 * spread(random, priorDf);
      double[] y = signals(random, slip.apply(stated.clone()), sd);
      StraightLine line = (StraightLine) StraightLine.fit(stated, y);
      Slips slips = Slips.of(suspect(line), lent(priorDf, 0.01)).orElseThrow();
      boolean right =
          slips.best().isPresent()
              && slips.best().get().kind() == kind
              && slips.best().get().points().equals(points)
              && Math.abs(slips.best().get().nativeConcentration() - 1) < 0.1;
      found += right && slips.p() <= ALARM ? 1 : 0;
    }
    double rate = (double) found / series;
    System.out.printf(
        Locale.ROOT, "%s %s, %d flasks, prior df %s: %.3f%n", kind, points, flasks, priorDf, rate);
    return rate;
  }

  @ParameterizedTest(name = "{0} flasks, prior df {1}, {2} and the next")
  @CsvSource({
    "4, 20, 0, 0.9",
    "4, 20, 2, 0.9",
    "5, 20, 0, 0.9",
    "5, 20, 1, 0.9",
    "5, 20, 2, 0.9",
    "5, 20, 3, 0.9",
    "6, 20, 2, 0.9",
    "5, 0, 1, 0.8",
    "6, 0, 2, 0.9"
  })
  void swapped_neighbours_are_found(int flasks, double priorDf, int lower, double atLeast) {
    UnaryOperator<double[]> swap =
        x -> {
          double kept = x[lower];
          x[lower] = x[lower + 1];
          x[lower + 1] = kept;
          return x;
        };
    assertThat(found(flasks, priorDf, Slips.Kind.SWAPPED, List.of(lower, lower + 1), swap))
        .isGreaterThanOrEqualTo(atLeast);
  }

  @ParameterizedTest(name = "{0} flasks, {1} of flask {2}")
  @CsvSource({
    "4, MISSED, 1",
    "4, MISSED, 3",
    "5, MISSED, 2",
    "5, MISSED, 4",
    "6, MISSED, 3",
    "4, DOUBLED, 1",
    "5, DOUBLED, 2",
    "5, DOUBLED, 4",
    "6, DOUBLED, 1"
  })
  void a_missed_or_doubled_addition_is_found(int flasks, Slips.Kind kind, int i) {
    UnaryOperator<double[]> slip =
        x -> {
          x[i] *= kind == Slips.Kind.MISSED ? 0 : 2;
          return x;
        };
    assertThat(found(flasks, PRIOR_DF, kind, List.of(i), slip)).isGreaterThanOrEqualTo(0.9);
  }

  @ParameterizedTest(name = "{0} flasks, {1}")
  @CsvSource({"4, 1", "5, 1", "5, -1", "6, 1"})
  void labels_shifted_by_one_are_found(int flasks, int by) {
    UnaryOperator<double[]> shift =
        x -> {
          double[] shifted = new double[x.length];
          for (int i = 0; i < x.length; i++) {
            shifted[i] = x[Math.floorMod(i - by, x.length)];
          }
          return shifted;
        };
    Slips.Kind kind = by > 0 ? Slips.Kind.SHIFTED_UP : Slips.Kind.SHIFTED_DOWN;
    assertThat(found(flasks, PRIOR_DF, kind, List.of(), shift)).isGreaterThanOrEqualTo(0.9);
  }

  @Test
  void a_volume_that_grew_unnoticed_is_found_and_the_value_without_it_given() {
    double[] x = {0, 0.5, 1, 1.5, 2};
    List<Double> growth = List.of(1.0, 1.1, 1.2, 1.3, 1.4);
    double[] y = new double[5];
    Arrays.setAll(y, i -> (1 + x[i]) / growth.get(i));
    StraightLine line = (StraightLine) StraightLine.fit(x, y);
    Slips.Suspect suspect = new Slips.Suspect(line, Slips.Layout.FLASKS, List.of(), growth);
    Slips slips = Slips.of(suspect, Slips.Lent.variance(20, 1e-4)).orElseThrow();
    assertThat(slips.best().orElseThrow().kind()).isEqualTo(Slips.Kind.GROWING_VOLUME);
    assertThat(slips.best().orElseThrow().nativeConcentration()).isBetween(1 - 1e-9, 1 + 1e-9);
    assertThat(slips.p()).isLessThan(ALARM);
    assertThat(Slips.of(suspect(line), Slips.Lent.variance(20, 1e-4)).orElseThrow().best())
        .as("without the volumes nobody can know")
        .isNotEqualTo(slips.best());
  }

  @ParameterizedTest
  @CsvSource({"MISSED, -1", "DOUBLED, 1"})
  void in_one_vessel_a_slip_stays_for_all_later_steps(Slips.Kind kind, int times) {
    double[] stated = {0, 0.5, 1, 1.5, 2};
    List<Double> applied = List.of(1.0, 1.05, 1.1, 1.15, 1.2);
    double[] y = new double[5];
    for (int i = 0; i < 5; i++) {
      double slip = i >= 2 ? times : 0;
      double inTruth = 1 + 0.05 * (i + slip);
      y[i] = (1 + stated[i] + 0.5 * slip) / inTruth * applied.get(i);
    }
    StraightLine line = (StraightLine) StraightLine.fit(stated, y);
    Slips.Suspect suspect = new Slips.Suspect(line, Slips.Layout.ONE_VESSEL, applied, List.of());
    Slips slips = Slips.of(suspect, Slips.Lent.variance(20, 1e-4)).orElseThrow();
    Slips.Slip best = slips.best().orElseThrow();
    assertThat(best.kind()).isEqualTo(kind);
    assertThat(best.points()).containsExactly(2);
    assertThat(best.nativeConcentration()).isBetween(1 - 1e-9, 1 + 1e-9);
    assertThat(slips.p()).isLessThan(ALARM);
  }

  @ParameterizedTest
  @CsvSource({"2.28, STOCK_TENFOLD, 10", "-2.35, STOCK_TENTH, 0.1"})
  void a_tenfold_stock_shows_in_the_sensitivity_alone(double log, Slips.Kind kind, double factor) {
    StraightLine line = truth(new SplittableRandom(3), levels(5, 2), 0.01);
    Slips.Sensitivity sensitivity = new Slips.Sensitivity(log, 0.05, 30);
    Slips slips =
        Slips.of(suspect(line), new Slips.Lent(20, 1e-4, 0, Optional.of(sensitivity)))
            .orElseThrow();
    assertThat(slips.best().orElseThrow().kind()).isEqualTo(kind);
    assertThat(slips.best().orElseThrow().nativeConcentration())
        .isBetween(0.9 * factor, 1.1 * factor);
    assertThat(slips.p()).isLessThan(1e-9);
    assertThat(Slips.of(suspect(line), Slips.Lent.variance(20, 1e-4)).orElseThrow().p())
        .isGreaterThan(0.05);
  }

  @Test
  void a_sensitivity_that_is_odd_but_not_by_ten_is_no_stock_slip() {
    StraightLine line = truth(new SplittableRandom(3), levels(5, 2), 0.01);
    Slips.Sensitivity sensitivity = new Slips.Sensitivity(0.7, 0.05, 30);
    Slips slips =
        Slips.of(suspect(line), new Slips.Lent(20, 1e-4, 0, Optional.of(sensitivity)))
            .orElseThrow();
    assertThat(slips.best().map(Slips.Slip::kind))
        .isNotEqualTo(Optional.of(Slips.Kind.STOCK_TENFOLD));
    assertThat(slips.p()).isGreaterThan(0.05);
  }

  @Test
  void a_flask_that_is_merely_odd_is_no_slip() {
    double[] x = levels(5, 2);
    double[] y = {1, 1.5, 2.2, 2.5, 3};
    StraightLine line = (StraightLine) StraightLine.fit(x, y);
    Slips slips = Slips.of(suspect(line), Slips.Lent.variance(20, 1e-4)).orElseThrow();
    assertThat(slips.best()).isEmpty();
    assertThat(slips.p()).isEqualTo(1);
    assertThat(slips.tried()).isGreaterThan(15);
  }

  @Test
  void three_flasks_tell_nothing_alone_and_two_nothing_at_all() {
    StraightLine three = (StraightLine) StraightLine.fit(levels(3, 2), new double[] {1, 3, 2});
    StraightLine two = (StraightLine) StraightLine.fit(levels(2, 2), new double[] {3, 1});
    assertThat(Slips.of(suspect(three), Slips.Lent.nothing())).isEmpty();
    assertThat(Slips.of(suspect(two), Slips.Lent.variance(20, 1))).isEmpty();
    Slips lent = Slips.of(suspect(three), Slips.Lent.variance(20, 1e-4)).orElseThrow();
    assertThat(lent.best().orElseThrow().kind()).isEqualTo(Slips.Kind.SWAPPED);
    assertThat(lent.best().orElseThrow().points()).containsExactly(1, 2);
    assertThat(lent.p()).isLessThan(ALARM);
  }

  @Test
  void flasks_of_one_addition_cannot_be_swapped() {
    double[] x = {0, 0, 1, 1, 2, 2};
    StraightLine line = (StraightLine) StraightLine.fit(x, new double[] {1, 1.01, 2, 2, 3, 3.01});
    // 12 pairs of unlike additions, 4 additions missed or doubled; no shift among equal levels.
    assertThat(Slips.of(suspect(line), Slips.Lent.variance(20, 1e-4)).orElseThrow().tried())
        .isEqualTo(12 + 8);
  }

  @Test
  void exactly_collinear_flasks_and_signals_without_scatter_raise_nothing() {
    for (double[] y :
        List.of(new double[] {1, 2, 3, 4, 5}, new double[5], new double[] {3, 3, 3, 3, 3})) {
      StraightLine line = (StraightLine) StraightLine.fit(levels(5, 2), y);
      Slips slips = Slips.of(suspect(line), Slips.Lent.nothing()).orElseThrow();
      assertThat(slips.p()).isGreaterThan(0.05);
    }
  }

  @Test
  void broken_promises_are_refused() {
    StraightLine line = truth(new SplittableRandom(3), levels(4, 2), 0.01);
    assertThatIllegalArgumentException().isThrownBy(() -> Slips.Lent.variance(5, 0));
    assertThatIllegalArgumentException().isThrownBy(() -> Slips.Lent.variance(Double.NaN, 1));
    assertThatIllegalArgumentException().isThrownBy(() -> new Slips.Sensitivity(1, 0, 1));
    assertThatIllegalArgumentException()
        .isThrownBy(() -> new Slips.Suspect(line, Slips.Layout.FLASKS, List.of(1.0), List.of()));
  }

  private static Slips.Suspect suspect(StraightLine line) {
    return new Slips.Suspect(line, Slips.Layout.FLASKS, List.of(), List.of());
  }

  private static Slips.Lent lent(double priorDf, double noise) {
    return priorDf > 0 ? Slips.Lent.variance(priorDf, noise * noise) : Slips.Lent.nothing();
  }

  /** The factor of a series' own standard deviation over the pool's, as its model draws it. */
  private static double spread(SplittableRandom random, double priorDf) {
    if (priorDf == 0) {
      return 1;
    }
    double chiSquare =
        DoubleStream.generate(random::nextGaussian).limit((long) priorDf).map(z -> z * z).sum();
    return Math.sqrt(priorDf / chiSquare);
  }

  private static StraightLine truth(SplittableRandom random, double[] x, double sd) {
    return (StraightLine) StraightLine.fit(x, signals(random, x, sd));
  }

  private static double[] signals(SplittableRandom random, double[] x, double sd) {
    double[] y = new double[x.length];
    Arrays.setAll(y, i -> 1 + x[i] + sd * random.nextGaussian());
    return y;
  }

  private static double[] levels(int flasks, double top) {
    double[] x = new double[flasks];
    Arrays.setAll(x, i -> top * i / (flasks - 1));
    return x;
  }
}
