package org.spikewright.judgement;

import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import org.spikewright.judgement.Flag.Weight;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Gathered;
import org.spikewright.series.Ungrouped;

/** Holds a series against the criteria and says what is to happen with its result. */
public final class Judge {
  private final CriteriaBook book;
  private final Instant moment;
  private final Duration waitForFlasks;

  /**
   * A judge for one revision of a summary.
   *
   * @param book the limits of each method
   * @param moment the instant the revision stands for
   * @param waitForFlasks how long after its last reading a series short of flasks is waited for
   */
  public Judge(CriteriaBook book, Instant moment, Duration waitForFlasks) {
    this.book = book;
    this.moment = moment;
    this.waitForFlasks = waitForFlasks;
  }

  /** The outcome of a series that stands alone. */
  public Outcome judge(Gathered gathered) {
    return gathered instanceof AdditionSeries series
        ? judge(series, SeriesFit.of(series), Around.NOTHING)
        : judge((Ungrouped) gathered);
  }

  /** The outcome of readings that form no series. */
  public Outcome judge(Ungrouped ungrouped) {
    return outcome(ungrouped, Optional.empty(), List.of(DesignFlags.noSeries(ungrouped)));
  }

  /**
   * The outcome of a series among others. Never throws on account of its numbers and never holds a
   * NaN.
   */
  public Outcome judge(AdditionSeries series, SeriesFit fit, Around around) {
    Criteria criteria = book.of(series.method().name());
    List<Flag> flags = new ArrayList<>(DesignFlags.of(series, criteria));
    if (fit instanceof SeriesFit.Unfitted unfitted) {
      flags.add(DesignFlags.unfitted(series, unfitted.reason()));
      return outcome(series, Optional.empty(), flags);
    }
    if (fit instanceof SeriesFit.ByElectrode electrode) {
      flags.addAll(new ElectrodeFlags(electrode.result(), criteria).all());
      return outcome(series, Optional.empty(), flags).with(electrode.result());
    }
    PoolView pool = around.pool(series);
    SeriesResult result = Moderating.of(((SeriesFit.Fitted) fit).result(), pool);
    flags.addAll(new LineFlags(result, criteria).all());
    flags.addAll(new NightFlags(result, pool, criteria).all());
    flags.addAll(new ReadingFlags(result, pool, criteria).all());
    flags.addAll(new ResultFlags(result, criteria).all());
    flags.addAll(around.flags(series, result));
    return outcome(series, Optional.of(result), flags);
  }

  /** The instant up to which a series is waited for; empty when it is not short of flasks. */
  private Optional<Instant> waitingUntil(Gathered gathered) {
    if (gathered instanceof AdditionSeries series
        && series.preparedFlasks() < series.method().expectedFlasks()) {
      Instant until = series.lastReadingAt().plus(waitForFlasks);
      return until.isAfter(moment) ? Optional.of(until) : Optional.empty();
    }
    return Optional.empty();
  }

  private Outcome outcome(Gathered gathered, Optional<SeriesResult> result, List<Flag> found) {
    List<Flag> flags = new ArrayList<>(found);
    Optional<Instant> until = waitingUntil(gathered);
    until.ifPresent(instant -> flags.add(DesignFlags.waiting(gathered, instant)));
    flags.sort(Comparator.comparing(Flag::kind));
    Verdict verdict = until.isPresent() ? Verdict.WAITING : verdict(flags);
    String reported =
        verdict == Verdict.REPEAT || verdict == Verdict.WAITING
            ? ""
            : result.map(ReportedText::of).orElse("");
    return new Outcome(
        gathered, result, List.copyOf(flags), verdict, reported, until, Optional.empty());
  }

  private static Verdict verdict(List<Flag> flags) {
    if (flags.stream().anyMatch(flag -> flag.weight() == Weight.REPEAT)) {
      return Verdict.REPEAT;
    }
    return flags.stream().anyMatch(flag -> flag.weight() == Weight.REVIEW)
        ? Verdict.REVIEW
        : Verdict.REPORT;
  }
}
