package org.spikewright.ledger;

import java.sql.ResultSet;
import java.sql.SQLException;
import java.time.Instant;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Batch;
import org.spikewright.reading.BatchReading;
import org.spikewright.reading.CalibrationPoint;
import org.spikewright.reading.CheckReading;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Subject;
import org.spikewright.table.Position;
import org.spikewright.table.Source;

/** Writes and reads readings of drift checks and calibration solutions. */
final class BatchReadings {
  private static final int CHECK = 0;
  private static final int CALIBRATION = 1;
  private static final String IDENTITY =
      " WHERE kind = ? AND subject = ? AND read_at = ? AND batch = ? AND ordinal = ?";
  private static final String ROWS =
      "SELECT r.kind, r.subject, r.read_at, r.batch, r.ordinal, r.batch_name, r.delimits,"
          + " r.signal, r.state, r.text, r.concentration, r.unit, r.file, r.sheet, r.line_no,"
          + " r.column_no, u.instrument, u.sample, u.analyte, u.line FROM batch_reading r"
          + " JOIN subject u ON u.id = r.subject WHERE ";
  private static final String NEWEST =
      " AND r.arrival = (SELECT MAX(n.arrival) FROM batch_reading n WHERE n.kind = r.kind AND n.subject = r.subject AND n.read_at = r.read_at"
          + " AND n.batch = r.batch AND n.ordinal = r.ordinal AND n.arrival <= ?)";

  private final Sql sql;

  BatchReadings(Sql sql) {
    this.sql = sql;
  }

  /**
   * Adds a reading unless it is known as it is.
   *
   * @return whether it was new, or another signal or concentration than before
   */
  boolean add(Ids ids, BatchReading reading, long day, long arrival) {
    boolean timed = reading.measuredAt().isPresent();
    long batch = ids.name(reading.batch().name());
    Object[] identity = {
      reading instanceof CheckReading ? CHECK : CALIBRATION,
      ids.subject(reading.subject()),
      reading.measuredAt().map(Instant::toEpochMilli).orElse(0L),
      timed ? Ids.NONE : batch,
      reading.ordinal()
    };
    Optional<Quantity> concentration =
        reading instanceof CalibrationPoint point
            ? Optional.of(point.concentration())
            : Optional.empty();
    Double signal = reading.signal() instanceof Signal.Value number ? number.value() : null;
    boolean known =
        sql.first(
                "SELECT signal, state, concentration, unit, batch_name, delimits"
                    + " FROM batch_reading"
                    + IDENTITY
                    + " ORDER BY arrival DESC LIMIT 1",
                row -> isSame(row, signal, reading, concentration, batch),
                identity)
            .orElse(false);
    if (!known) {
      insert(day, identity, arrival, ids, reading, concentration, signal);
    }
    return !known;
  }

  /** Forgets what a delivery brought that is refused in the end. */
  void forget(long arrival) {
    sql.run("DELETE FROM batch_reading WHERE arrival = ?", arrival);
  }

  private static boolean isSame(
      ResultSet row,
      Double signal,
      BatchReading reading,
      Optional<Quantity> concentration,
      long batch)
      throws SQLException {
    double value = row.getDouble(1);
    boolean sameSignal =
        row.wasNull() ? signal == null : signal != null && Double.compare(signal, value) == 0;
    // A name that a file gave is another in each cumulative export.
    boolean sameBatch = !reading.batch().delimits() || row.getLong(5) == batch;
    return sameSignal
        && row.getInt(2) == NewRow.state(reading.signal())
        && (concentration.isEmpty() || row.getDouble(3) == concentration.get().value())
        && Sql.text(row, 4).equals(symbol(concentration))
        && sameBatch
        && row.getInt(6) == (reading.batch().delimits() ? 1 : 0);
  }

  private static String symbol(Optional<Quantity> concentration) {
    return concentration.map(quantity -> quantity.unit().symbol()).orElse("");
  }

  private void insert(
      long day,
      Object[] identity,
      long arrival,
      Ids ids,
      BatchReading reading,
      Optional<Quantity> concentration,
      Double signal) {
    Position position = reading.position();
    List<Object> values = new ArrayList<>(List.of(day));
    values.addAll(List.of(identity));
    values.add(arrival);
    values.add(ids.name(reading.batch().name()));
    values.add(reading.batch().delimits() ? 1 : 0);
    values.add(signal);
    values.add(NewRow.state(reading.signal()));
    values.add(reading.signal().text());
    values.add(concentration.map(Quantity::value).orElse(null));
    values.add(symbol(concentration));
    values.add(ids.name(position.source().file()));
    values.add(position.source().sheet().map(ids::name).orElse(Ids.NONE));
    values.add(position.row());
    values.add(position.column());
    sql.run(
        "INSERT INTO batch_reading (day, kind, subject, read_at, batch, ordinal, arrival,"
            + " batch_name, delimits, signal, state, text, concentration, unit, file, sheet,"
            + " line_no, column_no) VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)"
            + " ON CONFLICT (kind, subject, read_at, batch, ordinal, arrival) DO UPDATE SET"
            + " signal = EXCLUDED.signal, state = EXCLUDED.state, text = EXCLUDED.text,"
            + " concentration = EXCLUDED.concentration, unit = EXCLUDED.unit,"
            + " line_no = EXCLUDED.line_no",
        values.toArray());
  }

  /**
   * The timed readings of a span of time and the untimed ones of batches that began on a lab day,
   * by subject, time and order.
   */
  List<BatchReading> of(LocalDate day, DayIndex days, long pauseMillis, long upTo) {
    long epochDay = day.toEpochDay();
    Words words = new Words(sql);
    List<BatchReading> all = new ArrayList<>();
    all.addAll(
        sql.list(
            ROWS + "r.day BETWEEN ? AND ? AND r.read_at >= ? AND r.read_at < ?" + NEWEST,
            row -> read(row, words),
            epochDay - 1,
            epochDay + 1,
            Math.max(1, days.start(epochDay) - pauseMillis),
            days.start(epochDay + 1) + pauseMillis,
            upTo));
    all.addAll(
        sql.list(
            ROWS
                + "r.day BETWEEN ? AND ? AND r.read_at = 0 AND (r.day = ? OR r.batch IN"
                + " (SELECT b.batch FROM untimed_batch b WHERE b.day = ?))"
                + NEWEST,
            row -> read(row, words),
            epochDay - DayNotes.UNTIMED_REACH_DAYS,
            epochDay + DayNotes.UNTIMED_REACH_DAYS,
            epochDay,
            epochDay,
            upTo));
    all.sort(BatchReading.ORDER);
    return List.copyOf(all);
  }

  private static BatchReading read(ResultSet row, Words words) throws SQLException {
    Subject subject =
        new Subject(
            words.name(row.getLong(17)),
            new SampleId(words.name(row.getLong(18))),
            words.name(row.getLong(19)),
            words.name(row.getLong(20)));
    Batch batch = new Batch(words.name(row.getLong(6)), row.getInt(7) != 0);
    long at = row.getLong(3);
    Optional<Instant> time = at == 0 ? Optional.empty() : Optional.of(Instant.ofEpochMilli(at));
    long sheet = row.getLong(14);
    Position position =
        new Position(
            new Source(
                words.name(row.getLong(13)),
                sheet == Ids.NONE ? Optional.empty() : Optional.of(words.name(sheet))),
            row.getLong(15),
            row.getInt(16));
    Signal signal =
        NewRow.signal(row.getInt(9), row.getDouble(8), Sql.text(row, 10), OptionalDouble.empty());
    int ordinal = row.getInt(5);
    return row.getInt(1) == CHECK
        ? new CheckReading(subject, batch, time, ordinal, signal, position)
        : new CalibrationPoint(
            subject,
            batch,
            time,
            ordinal,
            signal,
            position,
            new Quantity(row.getDouble(11), Unit.of(Sql.text(row, 12))));
  }
}
