package org.spikewright.ledger;

import java.sql.PreparedStatement;
import java.util.ArrayList;
import java.util.BitSet;
import java.util.List;
import java.util.Map;
import java.util.OptionalDouble;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Signal;
import org.spikewright.table.Position;

/**
 * Writes readings: an identity that is new, or that comes again with another signal or other facts,
 * makes a row; one that comes again as it was makes none.
 */
final class ReadingWriter {
  private static final int BATCH = 16_384;
  private static final int ORIGINS = 4096;

  private final Sql sql;
  private final Ids ids;
  private final DayNotes notes;
  private final long arrival;
  private final PreparedStatement insert;
  private final List<NewRow> waiting = new ArrayList<>(BATCH);
  private final Map<Origin, Long> origins = new Recent<>(ORIGINS);
  private final BitSet subjects = new BitSet();
  private final BitSet spiked = new BitSet();
  private Seen last;
  private long taken;
  private long repeated;

  private record Origin(
      long file,
      long sheet,
      int column,
      long batch,
      boolean delimits,
      boolean flaskMapped,
      boolean replicateMapped) {}

  /** A reading, and what stands for its batch and its origin. */
  private record Seen(Reading reading, long batch, long origin) {
    boolean isOf(Reading other) {
      return same(reading.batch(), other.batch())
          && same(reading.position().source(), other.position().source())
          && reading.position().column() == other.position().column()
          && reading.flaskMapped() == other.flaskMapped()
          && reading.replicateMapped() == other.replicateMapped();
    }

    /** Mostly one object, whose content then need not be compared. */
    private static boolean same(Object one, Object other) {
      return one == other || one.equals(other);
    }
  }

  /** The newest version of a reading that is there already. */
  private record Newest(
      int nth,
      double signal,
      int state,
      OptionalDouble standard,
      long facts,
      long batch,
      boolean delimits,
      long arrival,
      String text) {}

  ReadingWriter(Sql sql, Ids ids, DayNotes notes, long arrival) {
    this.sql = sql;
    this.ids = ids;
    this.notes = notes;
    this.arrival = arrival;
    this.insert = sql.preparedForBatches(NewRow.INSERT);
  }

  void add(Reading reading) {
    long subject = ids.subject(reading.subject());
    Ids.FactsId facts = ids.facts(reading.facts());
    Seen seen = seen(reading);
    boolean timed = reading.measuredAt().isPresent();
    taken++;
    subjects.set(Math.toIntExact(subject));
    if (facts.spiked()) {
      spiked.set((int) subject);
    }
    waiting.add(
        new NewRow(
            subject,
            timed ? reading.measuredAt().get().toEpochMilli() : 0,
            timed ? Ids.NONE : seen.batch(),
            facts.preparation(),
            ids.name(reading.flask()),
            ids.name(reading.replicate()),
            reading.signal(),
            facts.facts(),
            seen.origin(),
            reading.position().row(),
            timed && reading.batch().delimits() ? seen.batch() : Ids.NONE));
    if (waiting.size() == BATCH) {
      flush();
    }
  }

  /** Writes what is waiting, in the order of the key; rows of one identity keep their order. */
  void flush() {
    waiting.sort(NewRow::byKey);
    int[] added =
        sql.guarded(
            c -> {
              for (NewRow row : waiting) {
                row.bind(insert, 0);
                insert.addBatch();
              }
              return waiting.isEmpty() ? new int[0] : insert.executeBatch();
            });
    for (int i = 0; i < added.length; i++) {
      NewRow row = waiting.get(i);
      if (added[i] > 0) {
        notes.fresh(row);
      } else {
        again(row);
      }
    }
    waiting.clear();
  }

  /** How many readings were taken. */
  long taken() {
    return taken;
  }

  /** How many of those written so far were known as they are. */
  long repeated() {
    return repeated;
  }

  /** The numbers of the subjects to which no addition was seen in this delivery. */
  BitSet unspiked() {
    BitSet unspiked = (BitSet) subjects.clone();
    unspiked.andNot(spiked);
    return unspiked;
  }

  private void again(NewRow row) {
    Newest newest = newest(row);
    if (same(newest, row) && !isTakenBack(newest, row)) {
      repeated++;
      return;
    }
    sql.guarded(
        c -> {
          row.bind(insert, newest.nth() + 1);
          return insert.executeUpdate();
        });
    notes.fresh(row);
  }

  private Newest newest(NewRow row) {
    return sql.first(
            "SELECT r.nth, r.signal, r.state, r.facts, o.batch, o.delimits, o.arrival,"
                + " r.standard, r.text"
                + " FROM reading r JOIN origin o ON o.id = r.origin"
                + " WHERE r.subject = ? AND r.read_at = ? AND r.batch = ? AND r.preparation = ?"
                + " AND r.flask = ? AND r.replicate = ? ORDER BY r.nth DESC LIMIT 1",
            found ->
                new Newest(
                    found.getInt(1),
                    found.getDouble(2),
                    found.getInt(3),
                    Sql.optionalDouble(found, 8),
                    found.getLong(4),
                    found.getLong(5),
                    found.getInt(6) != 0,
                    found.getLong(7),
                    found.getString(9)),
            row.subject(),
            row.at(),
            row.batch(),
            row.preparation(),
            row.flask(),
            row.replicate())
        .orElseThrow(() -> new IllegalStateException("a reading that was there is not"));
  }

  /**
   * Whether a known reading comes again after a delivery that said another addition or preparation
   * of the same act of reading: then it takes that correction back, and has to be the later one.
   */
  private boolean isTakenBack(Newest newest, NewRow row) {
    return row.timed()
        && sql.number(
                "SELECT r.nth FROM reading r JOIN origin o ON o.id = r.origin"
                    + " WHERE r.subject = ? AND r.read_at = ? AND r.batch = 0 AND r.replicate = ?"
                    + " AND r.text = ? AND (r.flask <> ? OR r.preparation <> ?)"
                    + " AND o.arrival > ? AND o.arrival < ? LIMIT 1",
                row.subject(),
                row.at(),
                row.replicate(),
                NewRow.text(row.signal()),
                row.flask(),
                row.preparation(),
                newest.arrival(),
                arrival)
            .isPresent();
  }

  /**
   * The text of the signal does not count: 0.50 and 0.5 are one signal. The batch counts only where
   * it delimits a timed series, which a corrected mapping can bring about; a name that a file gave
   * is another in each cumulative export.
   */
  private static boolean same(Newest newest, NewRow row) {
    double signal = row.signal() instanceof Signal.Value number ? number.value() : 0;
    long delimitedBy = row.timed() && newest.delimits() ? newest.batch() : Ids.NONE;
    return newest.signal() == signal
        && newest.state() == NewRow.state(row.signal())
        && newest.standard().equals(NewRow.standard(row.signal()))
        && newest.facts() == row.facts()
        && sameSpread(newest, row)
        && delimitedBy == row.delimitedBy();
  }

  private static boolean sameSpread(Newest newest, NewRow row) {
    return !(row.signal() instanceof Signal.Value mean)
        || mean.spread().isEmpty()
        || newest.text().endsWith(NewRow.spread(mean.spread().get()));
  }

  /** Mostly that of the reading before. */
  private Seen seen(Reading reading) {
    if (last == null || !last.isOf(reading)) {
      long batch = ids.name(reading.batch().name());
      last = new Seen(reading, batch, origin(reading, batch));
    }
    return last;
  }

  private long origin(Reading reading, long batch) {
    Position position = reading.position();
    Origin origin =
        new Origin(
            ids.name(position.source().file()),
            position.source().sheet().map(ids::name).orElse(Ids.NONE),
            position.column(),
            batch,
            reading.batch().delimits(),
            reading.flaskMapped(),
            reading.replicateMapped());
    Long known = origins.get(origin);
    if (known == null) {
      known = give(origin);
      origins.put(origin, known);
    }
    return known;
  }

  private long give(Origin origin) {
    return sql.number(
            "INSERT INTO origin (arrival, file, sheet, column_no, batch, delimits, flask_mapped,"
                + " replicate_mapped) VALUES (?, ?, ?, ?, ?, ?, ?, ?) RETURNING id",
            arrival,
            origin.file(),
            origin.sheet(),
            origin.column(),
            origin.batch(),
            origin.delimits() ? 1 : 0,
            origin.flaskMapped() ? 1 : 0,
            origin.replicateMapped() ? 1 : 0)
        .orElseThrow();
  }
}
