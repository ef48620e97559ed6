package org.spikewright.ledger;

import java.util.List;
import org.spikewright.mapping.MappedSink;
import org.spikewright.mapping.Rejection;
import org.spikewright.mapping.Tally;
import org.spikewright.reading.BatchReading;
import org.spikewright.reading.Reading;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Subject;

/**
 * One file being recorded, in one transaction: everything of it counts from {@link #commit} on, and
 * nothing when it is closed before. Any method can throw a {@link LedgerFault}; then only closing
 * is left.
 */
public final class Delivery implements MappedSink, AutoCloseable {
  private final Ledger ledger;
  private final Sql sql;
  private final Ids ids;
  private final long number;
  private final DayNotes notes;
  private final ReadingWriter readings;
  private final Batched rejections;
  private final BatchReadings besideSamples;
  private boolean broughtBesideSamples;
  private long rejected;
  private boolean open = true;

  Delivery(Ledger ledger, Sql sql, Ids ids, long number, DayNotes notes) {
    this.ledger = ledger;
    this.sql = sql;
    this.ids = ids;
    this.number = number;
    this.notes = notes;
    this.readings = new ReadingWriter(sql, ids, notes, number);
    this.besideSamples = new BatchReadings(sql);
    this.rejections =
        new Batched(
            sql,
            "INSERT INTO rejection (arrival, nth, reason, file, sheet, line_no, column_no, header,"
                + " found, expected) VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?)");
  }

  @Override
  public void reading(Reading reading) {
    requireOpen();
    readings.add(reading);
  }

  @Override
  public void batchReading(BatchReading reading) {
    requireOpen();
    long day = notes.dayOf(reading.measuredAt());
    if (besideSamples.add(ids, reading, day, number)) {
      broughtBesideSamples = true;
      notes.freshBesideSamples(day, reading.measuredAt());
    }
  }

  @Override
  public void rejection(Rejection rejection) {
    requireOpen();
    var position = rejection.position();
    rejections.add(
        number,
        ++rejected,
        ids.name(rejection.reason().words()),
        ids.name(position.source().file()),
        position.source().sheet().map(ids::name).orElse(Ids.NONE),
        position.row(),
        position.column(),
        ids.name(rejection.column()),
        rejection.found(),
        rejection.expected());
  }

  /** The number this delivery will have. */
  public long number() {
    return number;
  }

  /** How many readings so far were known with the same signal and the same facts. */
  public long repeated() {
    requireOpen();
    readings.flush();
    return readings.repeated();
  }

  /**
   * The subjects of this delivery of which the ledger, this delivery included, has no reading with
   * an addition; in order.
   */
  public List<Subject> withoutAdditions() {
    requireOpen();
    readings.flush();
    return readings.unspiked().stream()
        .filter(this::neverSpiked)
        .mapToObj(this::subject)
        .sorted()
        .toList();
  }

  /**
   * Records the delivery as read.
   *
   * @param tally what became of its rows
   * @param note what is to be noted about it; empty when nothing is
   * @param archiveName where the file is to lie
   */
  public Arrived commit(Tally tally, String note, String archiveName) {
    return end(Arrived.Result.READ, tally, note, archiveName);
  }

  /**
   * Records the delivery as refused, keeping its rejections; for a file that yielded not one
   * reading. {@link IllegalStateException} when it did.
   *
   * @param tally what became of its rows
   * @param reason why
   * @param archiveName where the file is to lie
   */
  public Arrived refuse(Tally tally, String reason, String archiveName) {
    if (readings.taken() > 0) {
      throw new IllegalStateException("a delivery with readings cannot be refused and kept");
    }
    if (broughtBesideSamples) {
      besideSamples.forget(number);
    }
    return end(Arrived.Result.REFUSED, tally, reason, archiveName);
  }

  /** Forgets the delivery unless it was committed. */
  @Override
  public void close() {
    if (open) {
      open = false;
      ledger.abandon();
    }
  }

  private Arrived end(Arrived.Result outcome, Tally tally, String reason, String archiveName) {
    requireOpen();
    readings.flush();
    rejections.flush();
    if (rejected > 0 || outcome == Arrived.Result.REFUSED) {
      notes.bringToArrivalDay();
    }
    notes.finish();
    Arrivals arrivals = new Arrivals(sql);
    arrivals.complete(number, outcome, tally, readings.repeated(), reason, archiveName);
    Arrived arrived = arrivals.get(number);
    sql.commit();
    open = false;
    return arrived;
  }

  private boolean neverSpiked(int subject) {
    return sql.number(
            "SELECT r.facts FROM reading r JOIN flask_facts f ON f.id = r.facts"
                + " WHERE r.subject = ? AND f.spiked = 1 LIMIT 1",
            subject)
        .isEmpty();
  }

  private Subject subject(int id) {
    return sql.first(
            "SELECT i.text, s.text, a.text, l.text FROM subject u"
                + " JOIN name i ON i.id = u.instrument JOIN name s ON s.id = u.sample"
                + " JOIN name a ON a.id = u.analyte JOIN name l ON l.id = u.line WHERE u.id = ?",
            row ->
                new Subject(
                    Sql.text(row, 1),
                    new SampleId(Sql.text(row, 2)),
                    Sql.text(row, 3),
                    Sql.text(row, 4)),
            id)
        .orElseThrow();
  }

  private void requireOpen() {
    if (!open) {
      throw new IllegalStateException("the delivery was committed or closed");
    }
  }
}
