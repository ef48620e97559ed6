package org.spikewright.analysis;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.analysis.ControlResult.Verdict;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.Criterion;
import org.spikewright.judgement.Flag;
import org.spikewright.judgement.FlagKind;
import org.spikewright.judgement.Limit;
import org.spikewright.reading.CheckReading;
import org.spikewright.series.AdditionSeries;

/** How drift checks moved. */
final class Checks {
  private final Beside beside;
  private final CriteriaBook criteria;

  Checks(Beside beside, CriteriaBook criteria) {
    this.beside = beside;
    this.criteria = criteria;
  }

  /** Every run of a check, by the general limit. */
  List<CheckResult> all() {
    Limit limit = criteria.general().of(Criterion.CHECK_DRIFT);
    List<CheckResult> results = new ArrayList<>();
    for (List<CheckReading> run : beside.runs()) {
      OptionalDouble worst = change(run, worst(run));
      results.add(
          new CheckResult(
              run.get(0).subject(),
              Beside.batchOf(run.get(0)),
              run,
              worst,
              limit.value(),
              verdict(worst, limit)));
    }
    return results;
  }

  private static Verdict verdict(OptionalDouble worst, Limit limit) {
    if (worst.isEmpty() || !limit.on()) {
      return Verdict.NOT_JUDGED;
    }
    return Math.abs(worst.getAsDouble()) <= limit.value() ? Verdict.IN : Verdict.OUT;
  }

  /** Which reading of a run is furthest from the first. */
  private static int worst(List<CheckReading> run) {
    int worst = 0;
    for (int i = 1; i < run.size(); i++) {
      if (Math.abs(change(run, i).orElse(0)) > Math.abs(change(run, worst).orElse(0))) {
        worst = i;
      }
    }
    return worst;
  }

  /** The relative change of a reading against the first of its run. */
  private static OptionalDouble change(List<CheckReading> run, int i) {
    double first = Beside.signal(run.get(0));
    double change = Beside.signal(run.get(i)) / first - 1;
    return run.size() > 1 && first > 0 && Double.isFinite(change)
        ? OptionalDouble.of(change)
        : OptionalDouble.empty();
  }

  /** A flag where a check moved too far while a series was measured. */
  Optional<Flag> flagFor(AdditionSeries series) {
    Limit limit = criteria.of(series.method().name()).of(Criterion.CHECK_DRIFT);
    for (List<CheckReading> run : beside.checksOf(series)) {
      if (run.isEmpty()) {
        continue;
      }
      int at = worst(run);
      OptionalDouble change = change(run, at);
      if (verdict(change, limit) == Verdict.OUT) {
        return Optional.of(flag(run.get(at), change.getAsDouble(), limit));
      }
    }
    return Optional.empty();
  }

  private static Flag flag(CheckReading check, double change, Limit limit) {
    return Say.review(
        FlagKind.CHECK_READING_OFF,
        change,
        limit,
        "Drift check "
            + check.subject().sample()
            + " changed by "
            + (change < 0 ? "\u2212" : "+")
            + Say.share(Math.abs(change))
            + " while this was measured ("
            + check.position().within()
            + "); the limit is "
            + Say.share(limit.value())
            + ".",
        "See how far a drift moves this result, and measure again with the flasks in mixed order.");
  }
}
