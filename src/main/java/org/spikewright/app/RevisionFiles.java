package org.spikewright.app;

import java.nio.file.Path;
import java.time.LocalDate;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.FutureTask;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;
import org.spikewright.analysis.Learnt;
import org.spikewright.config.Loaded;
import org.spikewright.config.Settings;
import org.spikewright.ledger.Ledger;
import org.spikewright.ledger.RevisionRecord;
import org.spikewright.summary.CsvPlan;
import org.spikewright.summary.Night;
import org.spikewright.summary.SummaryPlan;
import org.spikewright.workbook.CsvWriter;
import org.spikewright.workbook.WriteFault;
import org.spikewright.workbook.XlsxWriter;

/**
 * Writes the files of a committed revision: results, flasks, workbook. Written again they are the
 * same, since everything in them follows from what the revision fixed.
 */
final class RevisionFiles {
  private static final Logger LOG = LoggerFactory.getLogger(RevisionFiles.class);

  private final Station station;
  private final Ledger ledger;
  private final Progress progress;

  RevisionFiles(Station station, Progress progress) {
    this.station = station;
    this.ledger = station.ledger();
    this.progress = progress;
  }

  /** Writes the files from the ledger: after a crash, or for a night too large to be kept. */
  NightlySummary.Issued write(RevisionRecord revision) throws WriteFault {
    return write(revision, NightSource.from(ledger, settingsOf(revision), revision));
  }

  NightlySummary.Issued write(RevisionRecord revision, Learnt learnt) throws WriteFault {
    return write(revision, NightSource.from(ledger, settingsOf(revision), revision, learnt));
  }

  NightlySummary.Issued write(RevisionRecord revision, NightSource source) throws WriteFault {
    Path folder = station.settings().summaries();
    String name = revision.labDay() + "-r" + revision.revision();
    String results = "results-" + name + ".csv";
    String workbook = "summary-" + name + ".xlsx";
    String resultsHash = CsvWriter.write(CsvPlan.results(source.byKey()), folder.resolve(results));
    FutureTask<String> flasks =
        new FutureTask<>(
            () ->
                CsvWriter.write(
                    CsvPlan.flasks(source.outcomes()), folder.resolve("flasks-" + name + ".csv")));
    if (source.inMemory()) {
      new Thread(flasks, "flasks file").start();
    } else {
      flasks.run();
    }
    String workbookHash;
    try {
      workbookHash = workbook(revision, source, folder.resolve(workbook));
    } finally {
      waitFor(flasks);
    }
    throwFaultOf(flasks);
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
    return new NightlySummary.Issued(revision, folder.resolve(workbook));
  }

  private String workbook(RevisionRecord revision, NightSource source, Path target)
      throws WriteFault {
    return new XlsxWriter()
        .write(
            SummaryPlan.of(night(revision, source)),
            target,
            station.temporaryFolder(),
            count -> progress.at("writing workbook, series", count));
  }

  /** Waits for a file's end, whatever became of it. */
  private static void waitFor(FutureTask<String> file) {
    boolean interrupted = false;
    while (!file.isDone()) {
      try {
        file.get();
      } catch (InterruptedException again) {
        interrupted = true;
      } catch (ExecutionException toldLater) {
        break;
      }
    }
    if (interrupted) {
      Thread.currentThread().interrupt();
    }
  }

  private static void throwFaultOf(FutureTask<String> file) throws WriteFault {
    try {
      file.get();
    } catch (ExecutionException failed) {
      if (failed.getCause() instanceof WriteFault fault) {
        throw fault;
      }
      if (failed.getCause() instanceof Error broken) {
        // Out of memory on this thread is as grave as on the other.
        throw broken;
      }
      throw new IllegalStateException(failed.getCause());
    } catch (InterruptedException told) {
      throw new IllegalStateException(told);
    }
  }

  private Night night(RevisionRecord revision, NightSource source) {
    LocalDate day = revision.labDay();
    Settings settings = settingsOf(revision);
    return new Night(
        day,
        revision.revision(),
        revision.moment(),
        revision.inProgress(),
        settings.calendar().zone(),
        settings.laboratory(),
        revision.results(),
        source.worstFirst(),
        source.detailed(),
        ledger.files(day, revision.arrivalLimit()),
        ledger.refused(day, revision.arrivalLimit()),
        SettingsLines.of(settings, station.mappings().good(), revision),
        settings.criteria(),
        source.learnt().pools(),
        source.learnt().batches().found());
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
