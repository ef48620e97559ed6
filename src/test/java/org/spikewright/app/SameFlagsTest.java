package org.spikewright.app;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.file.Path;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import java.util.SplittableRandom;
import java.util.TreeMap;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.analysis.Analysis;
import org.spikewright.analysis.DayFacts;
import org.spikewright.analysis.Fitted;
import org.spikewright.fit.PooledSeries;
import org.spikewright.fit.SimulatedNight;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.FlagKind;
import org.spikewright.judgement.Judge;
import org.spikewright.judgement.Outcome;
import org.spikewright.testkit.Bench;
import org.spikewright.testkit.Exports;
import org.spikewright.testkit.Laboratory;
import org.spikewright.testkit.StatedSeries;

/**
 * A simulated night has the same flags and verdicts through an export, its mapping, {@code once}
 * and {@code results} as the simulations see that judge it without files.
 */
class SameFlagsTest {
  private static final int FLASKS = 4;
  private static final SimulatedNight.Plan PLAN =
      new SimulatedNight.Plan(40, FLASKS, 0.01, 0.3, false);
  private static final CriteriaBook BOOK = CriteriaBook.defaults();
  private static final Judge JUDGE =
      new Judge(BOOK, Bench.START.plus(Duration.ofDays(30)), Duration.ofHours(12));

  @TempDir Path folder;

  @Test
  void aNightWithAFaultOfEachKind() {
    double bend = SimulatedNight.curvatureFor(0.3, FLASKS);
    List<PooledSeries> night = SimulatedNight.bent(new SplittableRandom(5), PLAN, 3, bend);
    change(night, 3, y -> y[2] *= 1.2);
    change(
        night,
        4,
        y -> {
          double kept = y[1];
          y[1] = y[2];
          y[2] = kept;
        });
    change(
        night,
        5,
        y -> {
          for (int i = 1; i < FLASKS; i++) {
            y[i] += 9 * (y[i] - y[0]);
          }
        });

    assertThat(seenBothWays(night))
        .contains("bent", "odd-flask", "suspected-slip", "odd-slope", "");
  }

  @Test
  void aNightWhoseLinesBendTogether() {
    double bend = SimulatedNight.curvatureFor(0.1, FLASKS);

    assertThat(seenBothWays(SimulatedNight.bent(new SplittableRandom(6), PLAN, 40, bend)))
        .contains("shared-bend");
  }

  private interface Change {
    void of(double[] signals);
  }

  private static void change(List<PooledSeries> night, int series, Change change) {
    double[] y = night.get(series).y().clone();
    change.of(y);
    night.set(series, SimulatedNight.pooled(night.get(series).x(), y));
  }

  /** Every flag of the night once they are found to be the same; empty for a series without. */
  private List<String> seenBothWays(List<PooledSeries> made) {
    List<StatedSeries> night = StatedSeries.night(made, new Random(1));
    TreeMap<String, String> expected = new TreeMap<>();
    List<Fitted> fitted = night.stream().map(StatedSeries::gathered).map(Fitted::of).toList();
    for (Outcome outcome : Analysis.of(fitted, JUDGE, DayFacts.of(BOOK))) {
      expected.put(
          outcome.gathered().key().subject().sample().text(),
          said(outcome.verdict().word(), outcome));
    }
    assertThat(throughTheFolder(night)).isEqualTo(expected);
    List<String> flags = new ArrayList<>();
    for (String said : expected.values()) {
      flags.addAll(List.of(said.substring(said.indexOf(':') + 1).split(";", -1)));
    }
    return flags;
  }

  private static String said(String verdict, Outcome outcome) {
    return verdict
        + ":"
        + String.join(
            ";", outcome.flags().stream().map(f -> f.kind()).map(FlagKind::shortName).toList());
  }

  private TreeMap<String, String> throughTheFolder(List<StatedSeries> night) {
    Laboratory lab = new Laboratory(folder);
    List<String> rows = new ArrayList<>();
    night.forEach(one -> rows.addAll(one.rows()));
    lab.drop("bench/night.csv", Exports.text(rows));
    assertThat(InProcess.once(lab.conf()).code()).isEqualTo(ExitCode.DONE);
    String csv = InProcess.results(lab.conf());
    List<String> samples = Results.column(csv, "sample");
    List<String> verdicts = Results.column(csv, "verdict");
    List<String> flags = Results.column(csv, "flags");
    TreeMap<String, String> said = new TreeMap<>();
    for (int i = 0; i < samples.size(); i++) {
      said.put(samples.get(i), verdicts.get(i) + ":" + flags.get(i));
    }
    return said;
  }
}
