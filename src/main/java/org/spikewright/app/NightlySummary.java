package org.spikewright.app;

import java.nio.file.Path;
import java.time.Instant;
import java.time.LocalDate;
import java.time.temporal.ChronoUnit;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;
import org.spikewright.analysis.Analysis;
import org.spikewright.analysis.DayFacts;
import org.spikewright.analysis.Learnt;
import org.spikewright.app.NightAnalysis.RevisionMoment;
import org.spikewright.config.Settings;
import org.spikewright.judgement.Judge;
import org.spikewright.judgement.Outcome;
import org.spikewright.ledger.Ledger;
import org.spikewright.ledger.RevisionRecord;
import org.spikewright.ledger.RevisionStart;
import org.spikewright.ledger.RevisionWriter;
import org.spikewright.summary.ResultRow;
import org.spikewright.workbook.WriteFault;

/**
 * Makes what is owed: for each lab day that has something new, a revision of its results in the
 * ledger, then the files that show it. A revision is committed before its files are written, and is
 * written again from the same inputs when the writing was interrupted.
 */
final class NightlySummary {
  private static final Logger LOG = LoggerFactory.getLogger(NightlySummary.class);

  /**
   * An issued revision.
   *
   * @param record as the ledger holds it
   * @param workbook where it lies
   */
  record Issued(RevisionRecord record, Path workbook) {}

  private final Station station;
  private final Ledger ledger;
  private final Progress progress;
  private final Stop stop;
  private final RevisionFiles files;

  NightlySummary(Station station, Progress progress, Stop stop) {
    this.station = station;
    this.ledger = station.ledger();
    this.progress = progress;
    this.stop = stop;
    this.files = new RevisionFiles(station, progress);
  }

  /**
   * Makes every summary that is owed.
   *
   * @param due what had come, closed or waited long enough by then is owed
   * @param includeInProgress whether lab days count that have not closed
   */
  List<Issued> makeOwed(Instant due, boolean includeInProgress) throws WriteFault {
    List<Issued> issued = new ArrayList<>(issueInterrupted());
    Optional<RuntimeException> first = Optional.empty();
    for (LocalDate day : ledger.owed(due, includeInProgress)) {
      if (stop.isRequested()) {
        break;
      }
      try {
        make(day).ifPresent(issued::add);
      } catch (RuntimeException fault) {
        // A lab day that cannot be judged must not keep the others from being summarised.
        LOG.debug("fault at lab_day={}", day, fault);
        first = first.or(() -> Optional.of(fault));
      }
    }
    progress.done();
    if (first.isPresent()) {
      throw first.get();
    }
    return issued;
  }

  /** Writes again what was committed and not issued: after a crash, or when a disk was full. */
  List<Issued> issueInterrupted() throws WriteFault {
    List<Issued> issued = new ArrayList<>();
    for (RevisionRecord revision : ledger.owedRevisions()) {
      if (stop.isRequested()) {
        break;
      }
      issued.add(files.write(revision));
    }
    return issued;
  }

  private Optional<Issued> make(LocalDate day) throws WriteFault {
    KeptNight kept = new KeptNight();
    Optional<RevisionRecord> revision = revise(day, kept);
    if (revision.isEmpty()) {
      return Optional.empty();
    }
    Optional<NightSource> source = kept.source();
    return Optional.of(
        source.isPresent()
            ? files.write(revision.get(), source.get())
            : files.write(revision.get(), kept.learnt()));
  }

  /** Judges a lab day's series and records what is new; empty when nothing is, or at a stop. */
  private Optional<RevisionRecord> revise(LocalDate day, KeptNight kept) {
    Settings settings = station.settings();
    Instant now = station.clock().instant().truncatedTo(ChronoUnit.MILLIS);
    boolean inProgress = settings.calendar().endOf(day).isAfter(now);
    RevisionStart start =
        new RevisionStart(
            day,
            now,
            inProgress,
            ledger.newestArrival(),
            settings.sha256(),
            settings.text(),
            Version.NUMBER);
    DaySeries series = NightAnalysis.series(ledger, settings, day, start.arrivalLimit());
    DayFacts facts = NightAnalysis.facts(ledger, settings, day, RevisionMoment.of(start));
    Judge judge = NightAnalysis.judge(settings, start.moment());
    try (RevisionWriter writer = ledger.startRevision(start);
        FittedDay fitted =
            new FittedDay(series, stop, count -> progress.at("fitting series", count))) {
      Analysis analysis = Analysis.of(fitted, judge, facts);
      Learnt learnt = analysis.learnt();
      if (facts.recall().stored().isEmpty() && !inProgress) {
        writer.pools(learnt.pools(), learnt.toRemember());
      }
      writer.controls(learnt.batches().found().points());
      Optional<Instant> waitingUntil = record(analysis, writer, kept);
      return stop.isRequested() ? Optional.empty() : writer.commit(waitingUntil);
    }
  }

  /** Records what is judged and returns when the first waiting series has waited long enough. */
  private Optional<Instant> record(Analysis analysis, RevisionWriter writer, KeptNight kept) {
    String settings = station.settings().sha256();
    Optional<Instant> waitingUntil = Optional.empty();
    long count = 0;
    for (Outcome outcome : analysis) {
      ResultRow row = ResultRow.of(outcome);
      writer.result(row, InputsHash.of(outcome.gathered(), settings));
      kept.add(outcome, row);
      waitingUntil = earlier(waitingUntil, outcome.waitingUntil());
      progress.at("judging series", ++count);
    }
    kept.knows(analysis.learnt());
    return waitingUntil;
  }

  private static Optional<Instant> earlier(Optional<Instant> one, Optional<Instant> other) {
    return Stream.of(one, other).flatMap(Optional::stream).min(Instant::compareTo);
  }
}
