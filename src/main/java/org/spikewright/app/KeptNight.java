package org.spikewright.app;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.spikewright.analysis.Learnt;
import org.spikewright.judgement.Outcome;
import org.spikewright.series.AdditionSeries;
import org.spikewright.summary.ResultRow;

/**
 * What was judged, kept until the files are written, unless that would take too much memory: then
 * everything is forgotten, and is read from the ledger and judged again.
 */
final class KeptNight {
  /**
   * What a reading in memory takes, with its share of everything around it; measured, rounded up.
   */
  private static final long BYTES_A_READING = 700;

  private final long mostReadings = mostReadings();
  private List<Outcome> outcomes = new ArrayList<>();
  private List<ResultRow> rows = new ArrayList<>();
  private Learnt learnt = Learnt.NOTHING;
  private long readings;

  /** So many readings may stay in memory. */
  static long mostReadings() {
    return Runtime.getRuntime().maxMemory() / 2 / BYTES_A_READING;
  }

  void add(Outcome outcome, ResultRow row) {
    readings += 1 + (outcome.gathered() instanceof AdditionSeries series ? series.readings() : 0);
    if (readings <= mostReadings) {
      outcomes.add(outcome);
      rows.add(row);
    } else {
      outcomes = List.of();
      rows = List.of();
    }
  }

  void knows(Learnt night) {
    learnt = night;
  }

  /** What the night knows. */
  Learnt learnt() {
    return learnt;
  }

  /** What was kept; empty when it was too much. */
  Optional<NightSource> source() {
    return readings <= mostReadings
        ? Optional.of(NightSource.kept(outcomes, rows, learnt))
        : Optional.empty();
  }
}
