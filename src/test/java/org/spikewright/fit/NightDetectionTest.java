package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** What the night finds: bends of single series and of all, wrong levels, swaps, wrong stocks. */
class NightDetectionTest {

  /** Shares of bent series found, and of nights in which the bend was found to be shared. */
  private record Found(double atOnePercent, double inFamily, double shared, double moved) {}

  private static Found bends(int nights, int bent, double bias, long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    SimulatedNight.Plan plan = new SimulatedNight.Plan(60, 4, 0.01, 0.3, false);
    double k = SimulatedNight.curvatureFor(bias, 4);
    int atOnePercent = 0;
    int inFamily = 0;
    int shared = 0;
    int moved = 0;
    for (int night = 0; night < nights; night++) {
      List<PooledSeries> series = SimulatedNight.bent(random, plan, bent, k);
      PoolEvidence evidence = PoolEvidence.of(series, List.of());
      Lent lent = evidence.lent().orElseThrow();
      shared += evidence.sharedBend().isPresent() ? 1 : 0;
      for (int j = 0; j < bent; j++) {
        StraightLine line = SimulatedNight.line(series.get(j));
        ModeratedSeries moderated = ModeratedSeries.of(line, series.get(j), lent, 0);
        atOnePercent += moderated.bend().orElseThrow().pOneSided() < 0.01 ? 1 : 0;
        inFamily +=
            FamilyOfTests.significant(moderated).contains(FamilyOfTests.Member.BENT) ? 1 : 0;
        double[] factor = series.get(j).factor();
        moved +=
            evidence.sharedBend().filter(b -> b.bias(line, factor).orElse(1) > 0.05).isPresent()
                ? 1
                : 0;
      }
    }
    double all = (double) nights * bent;
    return new Found(atOnePercent / all, inFamily / all, (double) shared / nights, moved / all);
  }

  @Tag("simulation")
  @ParameterizedTest(name = "{0} of 60 bent by {1}")
  @CsvSource({"6,0.17,0.65,0.50", "6,0.34,0.90,0.83"})
  void a_bend_of_a_few_series_is_found(int bent, double bias, double alone, double inFamily) {
    Found found = bends(300, bent, bias, 31);
    print("a few bend by " + bias, found);
    assertThat(found.atOnePercent).as("%s", found).isGreaterThanOrEqualTo(alone);
    assertThat(found.inFamily).as("%s", found).isGreaterThanOrEqualTo(inFamily);
  }

  @Tag("simulation")
  @Test
  void a_bend_of_all_series_is_found_by_the_night() {
    Found found = bends(300, 60, 0.17, 32);
    print("all bend by 0.17", found);
    assertThat(found.moved).as("%s", found).isGreaterThanOrEqualTo(0.99);
  }

  private static void print(String what, Found found) {
    System.out.printf(
        Locale.ROOT,
        "%s: %.1f %% at 1 %%, %.1f %% in the family; shared in %.1f %% of nights, flags %.1f %%%n",
        what,
        100 * found.atOnePercent,
        100 * found.inFamily,
        100 * found.shared,
        100 * found.moved);
  }

  @Test
  void bends_are_found_one_by_one_or_by_the_night() {
    Found few = bends(15, 6, 0.34, 7);
    assertThat(few.atOnePercent).as("%s", few).isGreaterThan(0.8);
    assertThat(few.inFamily).as("%s", few).isGreaterThan(0.75);
    assertThat(few.moved).as("%s", few).isZero();
    Found all = bends(5, 60, 0.17, 8);
    assertThat(all.moved).as("%s", all).isEqualTo(1);
    Found strong = bends(5, 60, 0.34, 9);
    assertThat(strong.moved).as("%s", strong).isEqualTo(1);
  }

  /** Share of nights in which a bend of all 40 series is found at 1 %. */
  private static double sharedBends(int nights, double bias, long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    // Each flask the mean of three readings of 2 % of the mid-level signal, which is 2.
    SimulatedNight.Plan plan = new SimulatedNight.Plan(40, 5, 0.02 * 2 / Math.sqrt(3), 0, false);
    double k = SimulatedNight.curvatureFor(bias, 5);
    int found = 0;
    for (int night = 0; night < nights; night++) {
      List<PooledSeries> series = SimulatedNight.bent(random, plan, bias > 0 ? 40 : 0, k);
      found += PoolEvidence.of(series, List.of()).sharedBend().isPresent() ? 1 : 0;
    }
    return (double) found / nights;
  }

  @Tag("simulation")
  @Test
  void a_shared_bend_of_five_percent_is_found_and_few_straight_nights_alarm() {
    double found = sharedBends(4_000, 0.05, 11);
    double alarms = sharedBends(20_000, 0, 12);
    System.out.printf(
        Locale.ROOT,
        "shared bend of 5 %%: found in %.1f %% of 4000 nights; alarms on %.2f %% of 20000%n",
        100 * found,
        100 * alarms);
    assertThat(found).isGreaterThanOrEqualTo(0.84);
    assertThat(alarms).isBetween(0.007, 0.013);
  }

  @Test
  void a_shared_bend_is_found_in_most_of_a_hundred_nights_and_seldom_where_none_is() {
    assertThat(sharedBends(100, 0.05, 13)).isGreaterThan(0.7);
    assertThat(sharedBends(200, 0, 14)).isLessThan(0.05);
  }

  /** Share of nights whose one series with a wrong level is flagged, that level being named. */
  private static double wrongLevels(int nights, int level, double wrong, long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    int named = 0;
    for (int night = 0; night < nights; night++) {
      List<PooledSeries> series = new ArrayList<>();
      for (int j = 0; j < 60; j++) {
        double[] x = new double[15];
        double[] y = new double[15];
        for (int i = 0; i < x.length; i++) {
          x[i] = 0.5 * (i / 3);
          double delivered = x[i] * (j == 0 && i / 3 == level ? 1 + wrong : 1);
          y[i] = 1000 * (1 + delivered + 0.02 * 2 * random.nextGaussian());
        }
        series.add(SimulatedNight.pooled(x, y));
      }
      ModeratedSeries moderated = moderated(series, 0);
      OddFlask odd = moderated.odd().orElseThrow();
      boolean flagged = FamilyOfTests.flags(moderated).contains(FamilyOfTests.Member.ODD_FLASK);
      named += flagged && odd.flasks()[0] / 3 == level ? 1 : 0;
    }
    return (double) named / nights;
  }

  private static ModeratedSeries moderated(List<PooledSeries> night, int j) {
    Lent lent = PoolEvidence.of(night, List.of()).lent().orElseThrow();
    return ModeratedSeries.of(SimulatedNight.line(night.get(j)), night.get(j), lent, 0);
  }

  @Tag("simulation")
  @ParameterizedTest(name = "level {0} wrong by {1}")
  @CsvSource({"1,-0.3", "1,0.3", "2,-0.3", "2,0.3", "3,-0.3", "3,0.3", "4,-0.3", "4,0.3"})
  void a_wrong_volume_at_one_level_is_flagged_and_the_level_named(int level, double wrong) {
    // The lowest level moves the line least; the others are found every time.
    double named = wrongLevels(level == 1 ? 1_000 : 200, level, wrong, 41);
    System.out.printf(
        Locale.ROOT,
        "level %d wrong by %+.0f %%: named in %.1f %%%n",
        level,
        100 * wrong,
        100 * named);
    assertThat(named).isGreaterThanOrEqualTo(0.9);
  }

  @ParameterizedTest(name = "level {0} wrong by {1}")
  @CsvSource({"1,0.3", "2,-0.3", "4,0.3"})
  void a_wrong_volume_at_one_level_is_named_in_most_of_fifteen_nights(int level, double wrong) {
    assertThat(wrongLevels(15, level, wrong, 42)).isGreaterThan(0.7);
  }

  private static double swaps(int nights, int first, double spread, long seed) {
    SplittableRandom random = new SplittableRandom(seed);
    SimulatedNight.Plan plan = new SimulatedNight.Plan(60, 5, 0.02, spread, false);
    int flagged = 0;
    for (int night = 0; night < nights; night++) {
      List<PooledSeries> series = SimulatedNight.straight(random, plan);
      double[] y = series.get(0).y().clone();
      y[first] = series.get(0).y()[first + 1];
      y[first + 1] = series.get(0).y()[first];
      series.set(0, SimulatedNight.pooled(series.get(0).x(), y));
      flagged +=
          FamilyOfTests.flags(moderated(series, 0)).contains(FamilyOfTests.Member.ODD_FLASK)
              ? 1
              : 0;
    }
    return (double) flagged / nights;
  }

  @Tag("simulation")
  @ParameterizedTest(name = "flasks {0} and next, spread {1}")
  @CsvSource({"0,0", "1,0", "2,0", "3,0", "0,0.3", "1,0.3", "2,0.3", "3,0.3"})
  void swapped_neighbours_are_flagged(int first, double spread) {
    double flagged = swaps(200, first, spread, 51);
    System.out.printf(
        Locale.ROOT,
        "flasks %d and %d of 5 swapped, spread %2.0f %%: flagged in %.1f %%%n",
        first,
        first + 1,
        100 * spread,
        100 * flagged);
    assertThat(flagged).isGreaterThanOrEqualTo(0.9);
  }

  @Test
  void swapped_inner_neighbours_do_not_hide_each_other() {
    assertThat(swaps(15, 1, 0.3, 52)).isGreaterThan(0.75);
  }

  @Test
  void a_stock_ten_times_too_strong_is_an_odd_slope_every_time() {
    SplittableRandom random = new SplittableRandom(61);
    SimulatedNight.Plan plan = new SimulatedNight.Plan(60, 4, 0.01, 0.3, false);
    for (int night = 0; night < 40; night++) {
      List<PooledSeries> series = SimulatedNight.straight(random, plan);
      double[] y = series.get(0).y().clone();
      double slope = series.get(0).sensitivity().orElseThrow();
      for (int i = 0; i < y.length; i++) {
        y[i] += 9 * slope * series.get(0).x()[i];
      }
      series.set(0, SimulatedNight.pooled(series.get(0).x(), y));
      ModeratedSeries odd = moderated(series, 0);
      assertThat(FamilyOfTests.flags(odd))
          .as("night %s of seed 61", night)
          .contains(FamilyOfTests.Member.ODD_SLOPE);
      assertThat(odd.oddSlope().orElseThrow().ratio()).isBetween(7.0, 13.0);
    }
  }
}
