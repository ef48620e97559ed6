package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.List;
import java.util.Locale;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * Coverage and width of the moderated interval, and false alarms of the family of tests, on nights
 * of 60 straight series.
 */
class NightCoverageTest {
  private static final int POOL = 60;

  /** What a run came to. */
  private record Tally(int series, int covered, int flagged, double own, double moderated) {
    double coverage() {
      return (double) covered / series;
    }

    double flags() {
      return (double) flagged / series;
    }

    double ratio() {
      return moderated / own;
    }
  }

  @Tag("simulation")
  @ParameterizedTest(name = "{0} flasks, spread {1}, proportional noise and weights {2}")
  @CsvSource({
    "3,0,false", "3,0.3,false", "3,0.6,false", "4,0,false", "4,0.3,false", "4,0.6,false",
    "5,0,false", "5,0.3,false", "5,0.6,false", "6,0,false", "6,0.3,false", "6,0.6,false",
    "3,0,true", "3,0.3,true", "3,0.6,true", "4,0,true", "4,0.3,true", "4,0.6,true",
    "5,0,true", "5,0.3,true", "5,0.6,true", "6,0,true", "6,0.3,true", "6,0.6,true"
  })
  void thirty_thousand_moderated_intervals_hold_the_truth_and_are_narrow(
      int flasks, double spread, boolean proportional) {
    Tally tally = simulate(500, flasks, spread, proportional);
    System.out.printf(
        Locale.ROOT,
        "%d flasks, spread %2.0f %%, %s: coverage %.2f %%, half-width %.2f %% (own %.2f %%, ratio"
            + " %.3f), flagged %.2f %%%n",
        flasks,
        100 * spread,
        proportional ? "proportional, weighted" : "constant, ordinary     ",
        100 * tally.coverage(),
        100 * tally.moderated,
        100 * tally.own,
        tally.ratio(),
        100 * tally.flags());
    assertThat(tally.coverage())
        .as("%s", tally)
        .isBetween(flasks == 3 ? 0.925 : 0.94, flasks == 3 ? 0.965 : 0.96);
    assertThat(tally.flags()).as("%s", tally).isLessThanOrEqualTo(0.025);
    if (flasks == 3) {
      assertThat(tally.ratio()).as("%s", tally).isLessThanOrEqualTo(0.30);
    } else if (flasks == 4) {
      assertThat(tally.ratio()).as("%s", tally).isLessThanOrEqualTo(spread > 0.5 ? 0.66 : 0.62);
    }
  }

  @ParameterizedTest(name = "{0} flasks, spread {1}, proportional noise and weights {2}")
  @CsvSource({"3,0.3,false", "4,0,false", "4,0.6,false", "6,0.3,false", "5,0.3,true"})
  void twelve_hundred_moderated_intervals_hold_the_truth_and_are_narrow(
      int flasks, double spread, boolean proportional) {
    Tally tally = simulate(20, flasks, spread, proportional);
    // Five standard deviations of 1200 trials about the window of the long run.
    assertThat(tally.coverage()).as("%s", tally).isBetween(0.905, 0.985);
    assertThat(tally.flags()).as("%s", tally).isLessThan(0.045);
    assertThat(tally.ratio()).as("%s", tally).isLessThan(flasks == 3 ? 0.35 : 0.9);
  }

  private static Tally simulate(int nights, int flasks, double spread, boolean proportional) {
    SplittableRandom random =
        new SplittableRandom(20250115L + flasks + Math.round(100 * spread) * 10);
    SimulatedNight.Plan plan = new SimulatedNight.Plan(POOL, flasks, 0.01, spread, proportional);
    PoolOptions options =
        PoolOptions.DEFAULT.with(proportional ? Weighting.BY_NOISE : Weighting.EQUAL);
    double[] own = new double[nights * POOL];
    double[] moderated = new double[nights * POOL];
    int covered = 0;
    int flagged = 0;
    for (int k = 0; k < nights; k++) {
      List<PooledSeries> night = SimulatedNight.straight(random, plan);
      Lent lent = PoolEvidence.of(night, List.of(), options).lent().orElseThrow();
      for (int j = 0; j < POOL; j++) {
        StraightLine line = SimulatedNight.line(night.get(j));
        ModeratedSeries series = ModeratedSeries.of(line, night.get(j), lent, 0);
        NativeEstimate estimate = series.estimate().orElseThrow();
        covered += SimulatedNight.holds(estimate) ? 1 : 0;
        flagged += FamilyOfTests.flags(series).isEmpty() ? 0 : 1;
        own[k * POOL + j] = SimulatedNight.halfWidth(NativeEstimate.of(line).orElseThrow());
        moderated[k * POOL + j] = SimulatedNight.halfWidth(estimate);
      }
    }
    return new Tally(
        nights * POOL,
        covered,
        flagged,
        SimulatedNight.median(own),
        SimulatedNight.median(moderated));
  }
}
