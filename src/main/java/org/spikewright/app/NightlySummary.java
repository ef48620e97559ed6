package org.spikewright.app;

import java.nio.file.Path;
import java.time.Instant;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;
import org.spikewright.analysis.Analysis;
import org.spikewright.config.Loaded;
import org.spikewright.config.Settings;
import org.spikewright.judgement.Judge;
import org.spikewright.judgement.Outcome;
import org.spikewright.ledger.Ledger;
import org.spikewright.ledger.ResultOrder;
import org.spikewright.ledger.RevisionRecord;
import org.spikewright.ledger.RevisionStart;
import org.spikewright.ledger.RevisionWriter;
import org.spikewright.series.Gathering;
import org.spikewright.series.GatheringRules;
import org.spikewright.summary.CsvPlan;
import org.spikewright.summary.Night;
import org.spikewright.summary.ResultRow;
import org.spikewright.summary.SummaryPlan;
import org.spikewright.workbook.CsvWriter;
import org.spikewright.workbook.WriteFault;
import org.spikewright.workbook.XlsxWriter;

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

  NightlySummary(Station station, Progress progress, Stop stop) {
    this.station = station;
    this.ledger = station.ledger();
    this.progress = progress;
    this.stop = stop;
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
        Optional<RevisionRecord> revision = revise(day);
        if (revision.isPresent()) {
          issued.add(issue(revision.get()));
        }
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
      issued.add(issue(revision));
    }
    return issued;
  }

  /** Judges a lab day's series and records what is new; empty when nothing is, or at a stop. */
  private Optional<RevisionRecord> revise(LocalDate day) {
    Settings settings = station.settings();
    Instant now = station.clock().instant();
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
    try (RevisionWriter writer = ledger.startRevision(start)) {
      Analysis analysis = analysis(settings, day, start.arrivalLimit(), writer.moment());
      long count = 0;
      for (Outcome outcome : analysis) {
        if (stop.isRequested()) {
          return Optional.empty();
        }
        writer.result(ResultRow.of(outcome), InputsHash.of(outcome.gathered(), settings.sha256()));
        progress.at("judging series", ++count);
      }
      return writer.commit(analysis.waitingUntil());
    }
  }

  private Analysis analysis(Settings settings, LocalDate day, long upTo, Instant moment) {
    Gathering gathering =
        new Gathering(new GatheringRules(settings.calendar(), settings.longestPause()));
    return new Analysis(
        new DaySeries(ledger, gathering, day, upTo),
        new Judge(settings.criteria(), moment, settings.waitForFlasks()));
  }

  /** Writes the files of a committed revision: results and flasks, then the workbook. */
  private Issued issue(RevisionRecord revision) throws WriteFault {
    Night night = night(revision);
    String name = revision.labDay() + "-r" + revision.revision();
    Path folder = station.settings().summaries();
    String results = "results-" + name + ".csv";
    String workbook = "summary-" + name + ".xlsx";
    String resultsHash =
        CsvWriter.write(
            CsvPlan.results(
                ledger.results(revision.labDay(), revision.revision(), ResultOrder.BY_KEY)),
            folder.resolve(results));
    CsvWriter.write(
        CsvPlan.flasks(night.outcomes()),
        folder.resolve("flasks-" + name + ".csv"),
        lines -> progress.at("writing flasks", lines));
    String workbookHash =
        new XlsxWriter()
            .write(
                SummaryPlan.of(night),
                folder.resolve(workbook),
                station.temporaryFolder(),
                series -> progress.at("writing workbook, series", series));
    ledger.issued(
        revision.labDay(),
        revision.revision(),
        new RevisionRecord.Issued(workbook, workbookHash, results, resultsHash));
    progress.done();
    LOG.info(
        "summary written lab_day={} revision={} series={} file={}",
        revision.labDay(),
        revision.revision(),
        revision.results(),
        workbook);
    return new Issued(revision, folder.resolve(workbook));
  }

  private Night night(RevisionRecord revision) {
    Settings settings = settingsOf(revision);
    LocalDate day = revision.labDay();
    long upTo = revision.arrivalLimit();
    return new Night(
        day,
        revision.revision(),
        revision.moment(),
        revision.inProgress(),
        settings.calendar().zone(),
        settings.laboratory(),
        revision.results(),
        ledger.results(day, revision.revision(), ResultOrder.BY_SEVERITY),
        analysis(settings, day, upTo, revision.moment()),
        ledger.files(day, upTo),
        ledger.refused(day, upTo),
        SettingsLines.of(settings, station.mappings().good(), revision),
        settings.criteria());
  }

  /** The settings that held when the revision was made, which may not be today's. */
  private Settings settingsOf(RevisionRecord revision) {
    Settings now = station.settings();
    if (now.sha256().equals(revision.settingsSha256())) {
      return now;
    }
    Loaded<Settings> then = Settings.read(now.summaries(), revision.settingsText());
    return then instanceof Loaded.Good<Settings> good ? good.value() : now;
  }
}
