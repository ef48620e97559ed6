package org.spikewright.ledger;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Path;
import java.time.Duration;
import java.time.LocalDate;
import org.spikewright.reading.LabCalendar;

/**
 * The ledger of one laboratory: one file, one owner. Rows are added and never changed; each
 * delivery and each revision is one transaction. One delivery or revision at a time, from one
 * thread.
 */
public final class Ledger extends LedgerView {
  private final Sql sql;
  private final Owner owner;
  private final Ids ids;
  private final Arrivals arrivals;
  private final DayIndex days;
  private final long pauseMillis;
  private boolean closed;

  Ledger(Sql sql, Sql reads, Owner owner, LabCalendar calendar, Duration longestPause) {
    super(reads, calendar, longestPause);
    this.sql = sql;
    this.owner = owner;
    this.ids = new Ids(sql);
    this.arrivals = new Arrivals(sql);
    this.days = new DayIndex(calendar);
    this.pauseMillis = longestPause.toMillis();
  }

  /**
   * Opens a ledger to write in it, making the file when there is none; see {@link LedgerOpener}.
   *
   * @param file on a local disk
   * @param calendar by which lab days are counted; once deliveries were taken it can only be the
   *     same
   * @param longestPause the pause that divides series, or more
   * @param archiveHasFiles whether files lie in the archive, so that a blank ledger is a lost one
   */
  public static Opening open(
      Path file, LabCalendar calendar, Duration longestPause, boolean archiveHasFiles) {
    return LedgerOpener.open(file, calendar, longestPause, archiveHasFiles);
  }

  /**
   * Opens a ledger only to read it, also while another process owns it.
   *
   * @param longestPause as for {@link #open}
   */
  public static Opening.ToRead openReadOnly(Path file, Duration longestPause) {
    return LedgerOpener.openToRead(file, longestPause);
  }

  /** Begins to take a delivery; {@link IllegalStateException} while another is being taken. */
  public Delivery receive(Arriving file) {
    sql.begin();
    try {
      long number = arrivals.add(ids, file, Arrived.Result.READ, "", "");
      long labDay = file.labDay().toEpochDay();
      DayNotes notes = new DayNotes(sql, days, pauseMillis, number, labDay);
      return new Delivery(this, sql, ids, number, notes);
    } catch (RuntimeException fault) {
      abandon();
      throw fault;
    }
  }

  /**
   * Notes a file that was refused.
   *
   * @param reason in plain words
   * @param archiveName where the file is to lie
   */
  public Arrived refuse(Arriving file, String reason, String archiveName) {
    return note(file, Arrived.Result.REFUSED, reason, archiveName);
  }

  /**
   * Notes a file whose content was read before; it changes nothing else.
   *
   * @param firstArrival the delivery that read it
   * @param archiveName where the file is to lie
   */
  public Arrived again(Arriving file, long firstArrival, String archiveName) {
    String first = arrivals.get(firstArrival).name();
    String reason = "the same content as delivery " + firstArrival + ", " + first;
    return note(file, Arrived.Result.KNOWN, reason, archiveName);
  }

  /**
   * Notes that a delivery's file was moved; {@link IllegalStateException} the second time.
   *
   * @param where relative to the watched folder
   */
  public void filed(long number, String where) {
    requireIdle();
    arrivals.filed(number, where);
  }

  /** Begins a revision; {@link IllegalStateException} while another or a delivery is under way. */
  public RevisionWriter startRevision(RevisionStart start) {
    sql.begin();
    try {
      return new RevisionWriter(this, sql, ids, start);
    } catch (RuntimeException fault) {
      abandon();
      throw fault;
    }
  }

  /** Notes the files in which a revision was issued; the first note counts. */
  public void issued(LocalDate day, int revision, RevisionRecord.Issued files) {
    requireIdle();
    sql.run(
        "INSERT INTO issue (day, revision, workbook, workbook_sha256, csv, csv_sha256)"
            + " VALUES (?, ?, ?, ?, ?, ?) ON CONFLICT DO NOTHING",
        day.toEpochDay(),
        revision,
        files.workbook(),
        files.workbookSha256(),
        files.csv(),
        files.csvSha256());
  }

  /** Moves what the journal holds into the ledger's file. */
  public void checkpoint() {
    requireIdle();
    SqliteFile.checkpoint(sql);
  }

  /** Forgets what is under way and gives the ledger up; closed again, it does nothing. */
  @Override
  public void close() {
    if (closed) {
      return;
    }
    closed = true;
    try {
      super.close();
    } finally {
      try {
        sql.close();
      } finally {
        release();
      }
    }
  }

  /** Forgets the transaction, and every number that was given out in it. */
  void abandon() {
    sql.rollback();
    ids.forget();
  }

  private Arrived note(Arriving file, Arrived.Result outcome, String reason, String archiveName) {
    sql.begin();
    try {
      long number = arrivals.add(ids, file, outcome, reason, archiveName);
      if (outcome == Arrived.Result.REFUSED) {
        DayNotes notes = new DayNotes(sql, days, pauseMillis, number, file.labDay().toEpochDay());
        notes.bringToArrivalDay();
        notes.finish();
      }
      Arrived arrived = arrivals.get(number);
      sql.commit();
      return arrived;
    } catch (RuntimeException fault) {
      abandon();
      throw fault;
    }
  }

  /** A note made inside a delivery would be forgotten with it. */
  private void requireIdle() {
    if (sql.inTransaction()) {
      throw new IllegalStateException("the ledger is taking a delivery or a revision");
    }
  }

  private void release() {
    try {
      owner.close();
    } catch (IOException failure) {
      throw new UncheckedIOException(failure);
    }
  }
}
