package org.spikewright.ledger;

import java.sql.ResultSet;
import java.sql.SQLException;
import java.time.Instant;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.Iterator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.PrimitiveIterator;
import java.util.stream.LongStream;
import org.spikewright.reading.LabCalendar;
import org.spikewright.summary.ResultRow;

/** What was summarised, what is owed, and what revisions show. */
final class RevisionQueries {
  private static final String RECORD =
      "SELECT r.day, r.number, l.moment, l.in_progress, l.arrival_limit, t.sha256, t.text,"
          + " r.program, l.waiting_until, r.results, i.workbook, i.workbook_sha256, i.csv,"
          + " i.csv_sha256 FROM revision r"
          + " JOIN day_look l ON l.day = r.day AND l.nth = r.look"
          + " JOIN text_version t ON t.id = r.settings"
          + " LEFT JOIN issue i ON i.day = r.day AND i.revision = r.number ";

  private final Sql sql;

  /** The newest look at a day. */
  private record Look(long moment, boolean inProgress, long arrivalLimit, long waitingUntil) {}

  RevisionQueries(Sql sql) {
    this.sql = sql;
  }

  List<LocalDate> owed(Instant now, LabCalendar calendar, boolean includeInProgress) {
    Map<Long, Look> looks = looks();
    Map<Long, Long> touched = new HashMap<>();
    sql.list(
            "SELECT t.day, MAX(t.arrival) FROM touched t JOIN arrival a ON a.number = t.arrival"
                + " WHERE a.arrived_at <= ? GROUP BY t.day",
            row -> new long[] {row.getLong(1), row.getLong(2)},
            now.toEpochMilli())
        .forEach(row -> touched.put(row[0], row[1]));
    List<LocalDate> owed = new ArrayList<>();
    touched.keySet().stream()
        .sorted()
        .forEach(
            day -> {
              LocalDate date = LocalDate.ofEpochDay(day);
              boolean closed = !calendar.endOf(date).isAfter(now);
              if ((closed || includeInProgress)
                  && isOwed(looks.get(day), touched.get(day), closed, now.toEpochMilli())) {
                owed.add(date);
              }
            });
    return List.copyOf(owed);
  }

  List<LocalDate> summarisedDays() {
    return sql.list(
        "SELECT DISTINCT day FROM revision ORDER BY day",
        row -> LocalDate.ofEpochDay(row.getLong(1)));
  }

  Optional<RevisionRecord> newest(LocalDate day) {
    return sql.first(
        RECORD + "WHERE r.day = ? ORDER BY r.number DESC LIMIT 1",
        RevisionQueries::read,
        day.toEpochDay());
  }

  Optional<RevisionRecord> get(LocalDate day, int revision) {
    return sql.first(
        RECORD + "WHERE r.day = ? AND r.number = ?",
        RevisionQueries::read,
        day.toEpochDay(),
        revision);
  }

  /** Committed and not issued, oldest first. */
  List<RevisionRecord> unissued() {
    return sql.list(
        RECORD + "WHERE i.revision IS NULL ORDER BY r.day, r.number", RevisionQueries::read);
  }

  /** The numbers of the result versions a revision shows, by key. */
  long[] versions(LocalDate day, int revision) {
    return ids("place", day, revision);
  }

  Iterable<ResultRow> results(LocalDate day, int revision, ResultOrder order) {
    return () -> {
      String sorting =
          switch (order) {
            case BY_KEY -> "place";
            case BY_SEVERITY -> "severity, place";
          };
      PrimitiveIterator.OfLong versions = LongStream.of(ids(sorting, day, revision)).iterator();
      return new Iterator<>() {
        @Override
        public boolean hasNext() {
          return versions.hasNext();
        }

        @Override
        public ResultRow next() {
          return result(versions.nextLong());
        }
      };
    };
  }

  /**
   * A day is owed when it was never looked at, when something came after the newest look, when that
   * look was taken before the day closed, or when what it waited for is over.
   */
  private static boolean isOwed(Look look, long lastArrival, boolean closed, long now) {
    if (look == null || lastArrival > look.arrivalLimit() || look.inProgress() && closed) {
      return true;
    }
    return look.waitingUntil() <= now && look.moment() < look.waitingUntil();
  }

  private Map<Long, Look> looks() {
    Map<Long, Look> looks = new HashMap<>();
    sql.list(
        "SELECT l.day, l.moment, l.in_progress, l.arrival_limit, l.waiting_until FROM day_look l"
            + " WHERE l.nth = (SELECT MAX(n.nth) FROM day_look n WHERE n.day = l.day)",
        row -> {
          long waitingUntil = row.getLong(5);
          boolean waits = !row.wasNull();
          return looks.put(
              row.getLong(1),
              new Look(
                  row.getLong(2),
                  row.getInt(3) != 0,
                  row.getLong(4),
                  waits ? waitingUntil : Long.MAX_VALUE));
        });
    return looks;
  }

  private long[] ids(String sorting, LocalDate day, int revision) {
    return sql
        .list(
            "SELECT p.result_version FROM revision_result p"
                + " JOIN result_version v ON v.id = p.result_version"
                + " WHERE p.day = ? AND p.revision = ? ORDER BY "
                + sorting,
            row -> row.getLong(1),
            day.toEpochDay(),
            revision)
        .stream()
        .mapToLong(Long::longValue)
        .toArray();
  }

  private ResultRow result(long version) {
    return sql.first(
            "SELECT content FROM result_version WHERE id = ?",
            row -> ResultCodec.decode(Sql.text(row, 1)),
            version)
        .orElseThrow(() -> new IllegalStateException("the ledger lacks result " + version));
  }

  private static RevisionRecord read(ResultSet row) throws SQLException {
    long waitingUntil = row.getLong(9);
    boolean waits = !row.wasNull();
    String workbook = row.getString(11);
    return new RevisionRecord(
        LocalDate.ofEpochDay(row.getLong(1)),
        row.getInt(2),
        Instant.ofEpochMilli(row.getLong(3)),
        row.getInt(4) != 0,
        row.getLong(5),
        row.getString(6),
        Sql.text(row, 7),
        row.getString(8),
        waits ? Optional.of(Instant.ofEpochMilli(waitingUntil)) : Optional.empty(),
        row.getInt(10),
        workbook == null
            ? Optional.empty()
            : Optional.of(
                new RevisionRecord.Issued(
                    StoredText.decode(workbook),
                    row.getString(12),
                    Sql.text(row, 13),
                    row.getString(14))));
  }
}
