package org.spikewright.analysis;

import static org.assertj.core.api.Assertions.assertThat;

import java.time.Duration;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.EnumSet;
import java.util.List;
import java.util.Locale;
import java.util.Random;
import java.util.Set;
import java.util.SplittableRandom;
import java.util.function.Function;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.spikewright.fit.SimulatedNight;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.Flag;
import org.spikewright.judgement.FlagKind;
import org.spikewright.judgement.Judge;
import org.spikewright.judgement.Outcome;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.series.AdditionSeries;
import org.spikewright.testkit.Bench;
import org.spikewright.testkit.StatedSeries;

/**
 * What a laboratory may expect of intervals and flags, by simulated nights judged as the program
 * judges them. Prints the tables that stand in the README.
 *
 * <p>Nights of 60 series; native concentration 1, flasks evenly spaced up to a top addition of 2,
 * one reading each, in scrambled order; noise of a flask 1 % of the unspiked signal, differing by
 * 30 % between series; sensitivity differing by 5 %.
 */
class ProofTest {
  static final double NOISE = 0.01;

  private static final int[] FLASKS = {3, 4, 5, 6};

  /** The numbers of flasks for which a share of the faults has to be found. */
  private static final int FOUR_TO_SIX = 3;

  private static final int CLEAN_NIGHTS = 600;

  /** For each cell of the table of detection. */
  private static final int TOUCHED = 600;

  private static final int LEAST_NIGHTS = 30;
  private static final int MOST_NIGHTS = 400;

  private static final Set<FlagKind> SERIES_TESTS =
      EnumSet.of(
          FlagKind.BENT,
          FlagKind.ODD_FLASK,
          FlagKind.ODD_LEVEL,
          FlagKind.NOISY,
          FlagKind.SUSPECTED_SLIP,
          FlagKind.ODD_SLOPE);

  private static final Set<FlagKind> NIGHT_TESTS =
      EnumSet.of(FlagKind.SHARED_BEND, FlagKind.LEVEL_OFF, FlagKind.NIGHT_DRIFT);

  private static final CriteriaBook BOOK = CriteriaBook.defaults();
  private static final Judge JUDGE =
      new Judge(BOOK, Bench.START.plus(Duration.ofDays(2)), Duration.ofHours(12));

  /** Shares of clean series, and median half-widths over the native concentration. */
  private record Clean(
      int flasks,
      double ownCoverage,
      double poolCoverage,
      double ownHalfWidth,
      double poolHalfWidth,
      double seriesAlarms,
      double nightAlarms,
      double alarms) {}

  /** Shares of touched series with any flag of a test, and with one that names the fault. */
  private record Found(double any, double named) {}

  private interface Seen {
    void take(Outcome outcome, Set<FlagKind> flags);
  }

  @Tag("simulation")
  @Test
  void intervals_hold_the_truth_and_clean_series_are_seldom_flagged() {
    List<Clean> all = Arrays.stream(FLASKS).parallel().mapToObj(ProofTest::clean).toList();
    printf("%d clean series for each number of flasks%n%n", CLEAN_NIGHTS * NightFault.NIGHT);
    head("");
    row("own interval: coverage", all, one -> percent(one.ownCoverage, 1));
    row("pool's interval: coverage", all, one -> percent(one.poolCoverage, 1));
    row("own interval: median half-width", all, one -> percent(one.ownHalfWidth, 1));
    row("pool's interval: median half-width", all, one -> percent(one.poolHalfWidth, 1));
    row("series with a false statistical flag", all, one -> percent(one.seriesAlarms, 2));
    row("series with a false flag of the night's tests", all, one -> percent(one.nightAlarms, 2));
    printf("%n");
    for (Clean one : all) {
      assertThat(one.ownCoverage).as("%s", one).isBetween(0.945, 0.955);
      assertThat(one.poolCoverage)
          .as("%s", one)
          .isBetween(one.flasks == 3 ? 0.925 : 0.94, one.flasks == 3 ? 0.965 : 0.96);
      assertThat(one.alarms).as("%s", one).isBetween(0.001, 0.025);
      assertThat(one.poolHalfWidth / one.ownHalfWidth)
          .as("%s", one)
          .isLessThanOrEqualTo(one.flasks == 3 ? 0.30 : one.flasks == 4 ? 0.62 : 1);
    }
  }

  @Tag("simulation")
  @Test
  void faults_are_found() {
    printf("found, in brackets named as what it is%n%n");
    head("what is wrong");
    for (NightFault fault : NightFault.ALL) {
      List<Found> all = Arrays.stream(FLASKS).parallel().mapToObj(n -> found(fault, n)).toList();
      row(
          fault.words(),
          all,
          one -> String.format(Locale.ROOT, "%.0f (%.0f) %%", 100 * one.any, 100 * one.named));
      assertThat(all.subList(FLASKS.length - FOUR_TO_SIX, FLASKS.length))
          .as(fault.words())
          .allSatisfy(one -> assertThat(one.any).isGreaterThanOrEqualTo(fault.least()));
    }
    printf("%n");
  }

  /** Walks the touched series of nights with a fault. */
  private static void simulate(NightFault fault, int flasks, int nights, Seen seen) {
    SplittableRandom random = new SplittableRandom(20260304L + flasks);
    Random shuffling = new Random(flasks);
    SimulatedNight.Plan plan = new SimulatedNight.Plan(NightFault.NIGHT, flasks, NOISE, 0.3, false);
    for (int night = 0; night < nights; night++) {
      List<AdditionSeries> series =
          StatedSeries.night(fault.maker().night(random, plan), shuffling).stream()
              .map(StatedSeries::gathered)
              .toList();
      List<Fitted> fitted = series.stream().map(Fitted::of).toList();
      Analysis analysis = Analysis.of(fitted, JUDGE, DayFacts.of(BOOK));
      for (Fitted one : fitted.subList(0, fault.touched())) {
        Outcome outcome = analysis.outcome(one);
        Set<FlagKind> flags = EnumSet.noneOf(FlagKind.class);
        outcome.flags().stream().map(Flag::kind).forEach(flags::add);
        seen.take(outcome, flags);
      }
    }
  }

  private static Clean clean(int flasks) {
    int all = CLEAN_NIGHTS * NightFault.NIGHT;
    List<Double> own = new ArrayList<>();
    List<Double> pool = new ArrayList<>();
    int[] ownHolds = {0};
    int[] poolHolds = {0};
    int[] alarms = {0, 0, 0};
    simulate(
        NightFault.NONE,
        flasks,
        CLEAN_NIGHTS,
        (outcome, flags) -> {
          SeriesResult result = outcome.result().orElseThrow();
          assertThat(result.reportedPool()).isPresent();
          Interval mine =
              new Interval(
                  result.lower95().orElse(Double.NEGATIVE_INFINITY),
                  result.upper95().orElse(Double.POSITIVE_INFINITY));
          Interval lent =
              new Interval(
                  result.reportedLower95().orElse(Double.NEGATIVE_INFINITY),
                  result.reportedUpper95().orElse(Double.POSITIVE_INFINITY));
          own.add(mine.halfWidth());
          pool.add(lent.halfWidth());
          ownHolds[0] += mine.holds() ? 1 : 0;
          poolHolds[0] += lent.holds() ? 1 : 0;
          boolean ofSeries = !Collections.disjoint(flags, SERIES_TESTS);
          boolean ofNight = !Collections.disjoint(flags, NIGHT_TESTS);
          alarms[0] += ofSeries ? 1 : 0;
          alarms[1] += ofNight ? 1 : 0;
          alarms[2] += ofSeries || ofNight ? 1 : 0;
        });
    assertThat(own).hasSize(all);
    return new Clean(
        flasks,
        (double) ownHolds[0] / all,
        (double) poolHolds[0] / all,
        median(own),
        median(pool),
        (double) alarms[0] / all,
        (double) alarms[1] / all,
        (double) alarms[2] / all);
  }

  /** An unbounded interval holds everything. */
  private record Interval(double lower, double upper) {
    double halfWidth() {
      return (upper - lower) / 2 / SimulatedNight.TRUTH;
    }

    boolean holds() {
      return lower <= SimulatedNight.TRUTH && SimulatedNight.TRUTH <= upper;
    }
  }

  private static Found found(NightFault fault, int flasks) {
    int nights = Math.max(LEAST_NIGHTS, Math.min(MOST_NIGHTS, TOUCHED / fault.touched()));
    int[] count = {0, 0, 0};
    simulate(
        fault,
        flasks,
        nights,
        (outcome, flags) -> {
          boolean any =
              !Collections.disjoint(flags, SERIES_TESTS)
                  || !Collections.disjoint(flags, NIGHT_TESTS);
          count[0]++;
          count[1] += any ? 1 : 0;
          count[2] += Collections.disjoint(flags, fault.names()) ? 0 : 1;
        });
    return new Found((double) count[1] / count[0], (double) count[2] / count[0]);
  }

  private static double median(List<Double> values) {
    return SimulatedNight.median(values.stream().mapToDouble(Double::doubleValue).toArray());
  }

  private static String percent(double share, int decimals) {
    return String.format(Locale.ROOT, "%." + decimals + "f %%", 100 * share);
  }

  private static void head(String first) {
    printf("| %s | 3 flasks | 4 | 5 | 6 |%n| --- | --- | --- | --- | --- |%n", first);
  }

  private static <T> void row(String words, List<T> columns, Function<T, String> cell) {
    printf("| %s | %s |%n", words, String.join(" | ", columns.stream().map(cell).toList()));
  }

  private static void printf(String format, Object... values) {
    System.out.printf(Locale.ROOT, format, values);
  }
}
