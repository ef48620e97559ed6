package org.spikewright.ledger;

import java.sql.ResultSet;
import java.sql.SQLException;
import java.time.Instant;
import java.time.LocalDate;
import java.util.Iterator;
import java.util.List;
import java.util.Optional;
import org.spikewright.summary.FileEntry;
import org.spikewright.summary.RefusedRow;

/** What a lab day's summary says of files and of rows that were not used. */
final class FileQueries {
  private static final int PAGE = 500;
  private static final String OF_DAY =
      " (a.lab_day = ? OR a.number IN (SELECT b.arrival FROM brought b WHERE b.day = ?))"
          + " AND a.number <= ? ";

  private final Sql sql;

  /** A refused row and its number within its delivery. */
  private record Numbered(long nth, RefusedRow row) {}

  FileQueries(Sql sql) {
    this.sql = sql;
  }

  List<FileEntry> files(LocalDate day, long upTo) {
    return sql.list(
        "SELECT a.number, a.name, a.arrived_at, a.size, a.sha256, t.name, t.sha256, a.outcome,"
            + " a.row_count, a.readings, a.rejections, a.skipped, a.repeated, a.reason,"
            + " a.archive_name, a.filed_as, a.checks + a.calibrations"
            + " FROM arrival a LEFT JOIN text_version t ON t.id = a.mapping WHERE"
            + OF_DAY
            + "ORDER BY a.number",
        FileQueries::entry,
        day.toEpochDay(),
        day.toEpochDay(),
        upTo);
  }

  Iterable<RefusedRow> refused(LocalDate day, long upTo) {
    List<Long> arrivals =
        sql.list(
            "SELECT a.number FROM arrival a WHERE" + OF_DAY + "AND a.rejections > 0 ORDER BY 1",
            row -> row.getLong(1),
            day.toEpochDay(),
            day.toEpochDay(),
            upTo);
    Pages<Numbered> pages = new Pages<>(after -> page(arrivals, after));
    return () -> {
      Iterator<Numbered> walk = pages.iterator();
      return new Iterator<>() {
        @Override
        public boolean hasNext() {
          return walk.hasNext();
        }

        @Override
        public RefusedRow next() {
          return walk.next().row();
        }
      };
    };
  }

  private List<Numbered> page(List<Long> arrivals, Optional<Numbered> after) {
    long last = after.map(numbered -> numbered.row().arrival()).orElse(0L);
    for (long arrival : arrivals) {
      if (arrival >= last) {
        long nth = arrival == last ? after.map(Numbered::nth).orElse(0L) : 0;
        List<Numbered> page = page(arrival, nth);
        if (!page.isEmpty()) {
          return page;
        }
      }
    }
    return List.of();
  }

  private List<Numbered> page(long arrival, long afterNth) {
    return sql.list(
        "SELECT r.nth, r.arrival, f.text, s.text, r.line_no, r.column_no, h.text, r.found, w.text,"
            + " r.expected FROM rejection r"
            + " JOIN name f ON f.id = r.file LEFT JOIN name s ON s.id = r.sheet"
            + " JOIN name h ON h.id = r.header JOIN name w ON w.id = r.reason"
            + " WHERE r.arrival = ? AND r.nth > ? ORDER BY r.nth LIMIT "
            + PAGE,
        FileQueries::numbered,
        arrival,
        afterNth);
  }

  private static FileEntry entry(ResultSet row) throws SQLException {
    String mapping = row.getString(6);
    String mappingSha256 = row.getString(7);
    String filedAs = row.getString(16);
    return new FileEntry(
        row.getLong(1),
        Sql.text(row, 2),
        Instant.ofEpochMilli(row.getLong(3)),
        row.getLong(4),
        row.getString(5),
        mapping == null ? "" : StoredText.decode(mapping),
        mappingSha256 == null ? "" : mappingSha256,
        row.getString(8),
        row.getLong(9),
        row.getLong(10),
        row.getLong(11),
        row.getLong(12),
        row.getLong(17),
        row.getLong(13),
        Sql.text(row, 14),
        filedAs == null ? Sql.text(row, 15) : StoredText.decode(filedAs));
  }

  private static Numbered numbered(ResultSet row) throws SQLException {
    String sheet = row.getString(4);
    return new Numbered(
        row.getLong(1),
        new RefusedRow(
            row.getLong(2),
            Sql.text(row, 3),
            sheet == null ? "" : StoredText.decode(sheet),
            row.getLong(5),
            row.getInt(6),
            Sql.text(row, 7),
            Sql.text(row, 8),
            Sql.text(row, 9),
            Sql.text(row, 10)));
  }
}
