package org.spikewright.ledger;

import java.time.Duration;
import java.time.Instant;
import java.time.LocalDate;
import java.util.List;
import java.util.Optional;
import org.spikewright.analysis.ControlHistory;
import org.spikewright.analysis.Recall;
import org.spikewright.reading.BatchReading;
import org.spikewright.reading.LabCalendar;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Subject;
import org.spikewright.summary.FileEntry;
import org.spikewright.summary.RefusedRow;
import org.spikewright.summary.ResultRow;

/**
 * Reads what is committed in a ledger, also beside a process that writes in it. Whatever a revision
 * is made from is asked for with the number of the last delivery that counts, and gives the same
 * answer for ever. Any method can throw a {@link LedgerFault}. For one thread.
 */
public sealed class LedgerView implements AutoCloseable permits Ledger {
  private final Sql reads;
  private final LabCalendar calendar;
  private final long pauseMillis;
  private final Arrivals arrivals;
  private final ReadingQueries readings;
  private final FileQueries files;
  private final RevisionQueries revisions;
  private final PoolStore pools;

  LedgerView(Sql reads, LabCalendar calendar, Duration longestPause) {
    this.reads = reads;
    this.calendar = calendar;
    this.pauseMillis = longestPause.toMillis();
    this.arrivals = new Arrivals(reads);
    this.readings = new ReadingQueries(reads, new DayIndex(calendar), longestPause.toMillis());
    this.files = new FileQueries(reads);
    this.revisions = new RevisionQueries(reads);
    this.pools = new PoolStore(reads);
  }

  /** The number of the newest delivery; 0 when there is none. */
  public final long newestArrival() {
    return arrivals.newest();
  }

  /** The number of the delivery that read this content; a refused content is not known. */
  public final Optional<Long> known(String sha256) {
    return arrivals.known(sha256);
  }

  /** Deliveries whose file was not moved yet, oldest first. */
  public final List<Arrived> unfiled() {
    return arrivals.unfiled();
  }

  /**
   * Whether a delivery has this archive name, or one that differs only in case or accents' form.
   */
  public final boolean archiveNameTaken(String archiveName) {
    return arrivals.archiveNameTaken(archiveName);
  }

  /** The subjects with a reading on a lab day, in order. */
  public final List<Subject> subjects(LocalDate day, long upTo) {
    return readings.subjects(day, upTo);
  }

  /**
   * The readings from which a subject's series of a lab day are gathered: the timed ones of the day
   * and those before and after that no long pause divides from them, the whole of each batch that
   * delimits one of these, and the untimed ones of batches that came within 30 lab days. Of each
   * identity the newest.
   *
   * @return by time (untimed first), batch, preparation, flask and replicate
   */
  public final List<Recorded> readings(Subject subject, LocalDate day, long upTo) {
    return readings.readings(subject, day, upTo);
  }

  /** The same of several subjects, in their order; asked together they cost far less. */
  public final List<List<Recorded>> readings(List<Subject> subjects, LocalDate day, long upTo) {
    return readings.readings(subjects, day, upTo);
  }

  /**
   * Readings of drift checks and calibration solutions that can speak of a lab day's series: those
   * of the day and those that no long pause divides from it, and those of its untimed batches.
   *
   * @return by subject, time (untimed first), batch and order
   */
  public final List<BatchReading> besideSamples(LocalDate day, long upTo) {
    return new BatchReadings(reads).of(day, new DayIndex(calendar), pauseMillis, upTo);
  }

  /**
   * What controls came to on earlier lab days, as the first summary after the close of this day
   * could know it: later revisions of the day get the same answer.
   *
   * @param moment of the revision that asks
   */
  public final ControlHistory controlHistory(LocalDate day, Instant moment) {
    return new ControlPoints(reads).before(day, moment);
  }

  /**
   * Lab days that are to be looked at, in order: never looked at, or something came since, or they
   * closed since, or a series has waited long enough.
   *
   * @param now what came, closed or had waited long enough by then counts
   * @param includeInProgress whether days count that have not closed at {@code now}
   */
  public final List<LocalDate> owed(Instant now, boolean includeInProgress) {
    return revisions.owed(now, calendar, includeInProgress);
  }

  /** Revisions that were committed and not issued yet, oldest lab day first. */
  public final List<RevisionRecord> owedRevisions() {
    return revisions.unissued();
  }

  /** Lab days with a revision, in order. */
  public final List<LocalDate> summarisedDays() {
    return revisions.summarisedDays();
  }

  /** The newest revision of a lab day. */
  public final Optional<RevisionRecord> newest(LocalDate day) {
    return revisions.newest(day);
  }

  /**
   * What is known of a lab day before its series are looked at: what earlier days left behind, and
   * what its own pools came to, where it was summarised after its close.
   */
  public final Recall recall(LocalDate day, boolean inProgress) {
    return pools.recall(day, inProgress);
  }

  /** The results a revision shows; fetched one by one, and can be walked more than once. */
  public final Iterable<ResultRow> results(LocalDate day, int revision, ResultOrder order) {
    return revisions.results(day, revision, order);
  }

  /** Deliveries that arrived on a lab day or brought something new to it, oldest first. */
  public final List<FileEntry> files(LocalDate day, long upTo) {
    return files.files(day, upTo);
  }

  /** The rows of these deliveries that were not used; can be walked more than once. */
  public final Iterable<RefusedRow> refused(LocalDate day, long upTo) {
    return files.refused(day, upTo);
  }

  /** The calendar by which lab days are counted. */
  public final LabCalendar calendar() {
    return calendar;
  }

  @Override
  public void close() {
    reads.close();
  }
}
