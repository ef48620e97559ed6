package org.spikewright.ledger;

import java.sql.ResultSet;
import java.sql.SQLException;
import java.time.Instant;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalLong;
import java.util.Set;
import java.util.stream.Stream;
import org.spikewright.reading.Batch;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Subject;
import org.spikewright.table.Position;
import org.spikewright.table.Source;

/** Reads readings back, as the ledger stood after a given delivery. */
final class ReadingQueries {
  private static final int REMEMBERED = 65_536;
  private static final String ROWS =
      "SELECT read_at, batch, preparation, flask, replicate, nth, signal, state, text, facts,"
          + " origin, line_no, standard FROM reading WHERE subject = ? ";
  private static final String KEY_ORDER =
      " ORDER BY read_at, batch, preparation, flask, replicate, nth";

  private static final Comparator<Recorded> ORDER =
      Comparator.comparing(
              (Recorded r) -> r.reading().measuredAt().map(Instant::toEpochMilli).orElse(0L))
          .thenComparing(r -> r.reading().batch().name())
          .thenComparing(r -> r.reading().facts().preparation().shown())
          .thenComparing(r -> r.reading().flask())
          .thenComparing(r -> r.reading().replicate());

  private final Sql sql;
  private final Words words;
  private final DayIndex days;
  private final long pauseMillis;
  private final Map<Long, Origin> origins = new Recent<>(REMEMBERED);
  private final Map<Subject, Long> subjects = new Recent<>(REMEMBERED);

  /** What the readings of one table of one delivery have in common. */
  private record Origin(
      long arrival,
      Instant arrivedAt,
      Source source,
      int column,
      long batchId,
      Batch batch,
      boolean flaskMapped,
      boolean replicateMapped) {}

  /** One row of the table of readings. */
  private record Stored(
      long at,
      long batch,
      long preparation,
      long flask,
      long replicate,
      int nth,
      double signal,
      int state,
      String text,
      long facts,
      Origin origin,
      long line,
      OptionalDouble standard) {

    boolean sameReading(Stored other) {
      return at == other.at
          && batch == other.batch
          && preparation == other.preparation
          && flask == other.flask
          && replicate == other.replicate;
    }
  }

  ReadingQueries(Sql sql, DayIndex days, long pauseMillis) {
    this.sql = sql;
    this.words = new Words(sql);
    this.days = days;
    this.pauseMillis = pauseMillis;
  }

  /** Subjects with a reading on a lab day, in order. */
  List<Subject> subjects(LocalDate day, long upTo) {
    return sql
        .list(
            "SELECT u.id, u.instrument, s.text, u.analyte, u.line FROM subject_day d"
                + " JOIN subject u ON u.id = d.subject JOIN name s ON s.id = u.sample"
                + " WHERE d.day = ? AND d.arrival <= ?",
            this::subject,
            day.toEpochDay(),
            upTo)
        .stream()
        .sorted()
        .toList();
  }

  List<Recorded> readings(Subject subject, LocalDate day, long upTo) {
    OptionalLong id = id(subject);
    if (id.isEmpty()) {
      return List.of();
    }
    long epochDay = day.toEpochDay();
    List<Stored> found = timed(id.getAsLong(), epochDay, upTo);
    return Stream.concat(found.stream(), untimed(id.getAsLong(), epochDay, upTo).stream())
        .map(row -> recorded(subject, row))
        .sorted(ORDER)
        .toList();
  }

  private Subject subject(ResultSet row) throws SQLException {
    Subject subject =
        new Subject(
            words.name(row.getLong(2)),
            new SampleId(Sql.text(row, 3)),
            words.name(row.getLong(4)),
            words.name(row.getLong(5)));
    subjects.put(subject, row.getLong(1));
    return subject;
  }

  private OptionalLong id(Subject subject) {
    Long known = subjects.get(subject);
    return known != null
        ? OptionalLong.of(known)
        : sql.number(
            "SELECT u.id FROM subject u"
                + " JOIN name s ON s.id = u.sample JOIN name a ON a.id = u.analyte"
                + " JOIN name l ON l.id = u.line JOIN name i ON i.id = u.instrument"
                + " WHERE s.text = ? AND a.text = ? AND l.text = ? AND i.text = ?",
            subject.sample().text(),
            subject.analyte(),
            subject.line(),
            subject.instrument());
  }

  /**
   * The day's timed readings, those that no long pause divides from them, and the rest of the
   * batches that delimit any of these.
   */
  private List<Stored> timed(long subject, long day, long upTo) {
    long start = days.start(day);
    long end = days.start(day + 1);
    long from = start - pauseMillis;
    long to = end + pauseMillis;
    while (true) {
      List<Stored> window = between(subject, from, to, upTo);
      List<Stored> run = run(window, start, end);
      if (run.isEmpty()) {
        return run;
      }
      long first = run.get(0).at();
      long last = run.get(run.size() - 1).at();
      if (first - pauseMillis >= from && last + pauseMillis < to) {
        return withDelimited(run, subject, upTo);
      }
      // The run reaches the edge of what was looked at: look twice as far.
      long width = to - from;
      from = first - pauseMillis < from ? from - width : from;
      to = last + pauseMillis >= to ? to + width : to;
    }
  }

  /** The part of a window, ordered by time, that is linked to the readings of a day. */
  private List<Stored> run(List<Stored> window, long start, long end) {
    int low = 0;
    while (low < window.size() && window.get(low).at() < start) {
      low++;
    }
    int high = low;
    while (high < window.size() && window.get(high).at() < end) {
      high++;
    }
    if (low == high) {
      return List.of();
    }
    while (low > 0 && window.get(low).at() - window.get(low - 1).at() <= pauseMillis) {
      low--;
    }
    while (high < window.size()
        && window.get(high).at() - window.get(high - 1).at() <= pauseMillis) {
      high++;
    }
    return window.subList(low, high);
  }

  private List<Stored> withDelimited(List<Stored> run, long subject, long upTo) {
    Set<Long> batches = new HashSet<>();
    for (Stored row : run) {
      if (row.origin().batch().delimits()) {
        batches.add(row.origin().batchId());
      }
    }
    if (batches.isEmpty()) {
      return run;
    }
    long first = run.get(0).at();
    long last = run.get(run.size() - 1).at();
    List<Stored> all = new ArrayList<>(run);
    for (long batch : batches) {
      for (long day : delimitedDays(subject, batch, upTo)) {
        between(subject, days.start(day), days.start(day + 1), upTo).stream()
            .filter(row -> row.at() < first || row.at() > last)
            .filter(row -> row.origin().batch().delimits() && row.origin().batchId() == batch)
            .forEach(all::add);
      }
    }
    return all;
  }

  private List<Long> delimitedDays(long subject, long batch, long upTo) {
    return sql.list(
        "SELECT day FROM delimited_day WHERE subject = ? AND batch = ? AND arrival <= ?",
        row -> row.getLong(1),
        subject,
        batch,
        upTo);
  }

  private List<Stored> untimed(long subject, long day, long upTo) {
    List<Long> batches =
        sql.list(
            "SELECT batch FROM untimed_batch WHERE subject = ? AND day BETWEEN ? AND ?"
                + " AND arrival <= ?",
            row -> row.getLong(1),
            subject,
            day - DayNotes.UNTIMED_REACH_DAYS,
            day + DayNotes.UNTIMED_REACH_DAYS,
            upTo);
    List<Stored> all = new ArrayList<>();
    for (long batch : batches) {
      List<Stored> rows =
          sql.list(
              ROWS + "AND read_at = 0 AND batch = ?" + KEY_ORDER, this::stored, subject, batch);
      all.addAll(newest(rows, upTo));
    }
    return all;
  }

  private List<Stored> between(long subject, long from, long to, long upTo) {
    List<Stored> rows =
        sql.list(
            ROWS + "AND read_at >= ? AND read_at < ? AND batch = 0" + KEY_ORDER,
            this::stored,
            subject,
            from,
            to);
    return newest(rows, upTo);
  }

  /** The newest version of each reading that a delivery up to the limit brought. */
  private static List<Stored> newest(List<Stored> rows, long upTo) {
    List<Stored> newest = new ArrayList<>(rows.size());
    for (Stored row : rows) {
      if (row.origin().arrival() > upTo) {
        continue;
      }
      int last = newest.size() - 1;
      if (last >= 0 && newest.get(last).sameReading(row)) {
        newest.set(last, row);
      } else {
        newest.add(row);
      }
    }
    return newest;
  }

  private Stored stored(ResultSet row) throws SQLException {
    return new Stored(
        row.getLong(1),
        row.getLong(2),
        row.getLong(3),
        row.getLong(4),
        row.getLong(5),
        row.getInt(6),
        row.getDouble(7),
        row.getInt(8),
        Sql.text(row, 9),
        row.getLong(10),
        origin(row.getLong(11)),
        row.getLong(12),
        Sql.optionalDouble(row, 13));
  }

  private Recorded recorded(Subject subject, Stored row) {
    Origin origin = row.origin();
    Reading reading =
        new Reading(
            subject,
            origin.batch(),
            words.name(row.flask()),
            origin.flaskMapped(),
            words.name(row.replicate()),
            origin.replicateMapped(),
            row.batch() == Ids.NONE
                ? Optional.of(Instant.ofEpochMilli(row.at()))
                : Optional.empty(),
            NewRow.signal(row.state(), row.signal(), row.text(), row.standard()),
            words.facts(row.facts()),
            new Position(origin.source(), row.line(), origin.column()));
    return new Recorded(reading, origin.arrival(), origin.arrivedAt(), row.nth());
  }

  private Origin origin(long id) {
    Origin known = origins.get(id);
    if (known == null) {
      known =
          sql.first(
                  "SELECT o.arrival, a.arrived_at, o.file, o.sheet, o.column_no, o.batch,"
                      + " o.delimits, o.flask_mapped, o.replicate_mapped FROM origin o"
                      + " JOIN arrival a ON a.number = o.arrival WHERE o.id = ?",
                  this::origin,
                  id)
              .orElseThrow(() -> new IllegalStateException("the ledger lacks origin " + id));
      origins.put(id, known);
    }
    return known;
  }

  private Origin origin(ResultSet row) throws SQLException {
    long sheet = row.getLong(4);
    Optional<String> sheetName =
        sheet == Ids.NONE ? Optional.empty() : Optional.of(words.name(sheet));
    return new Origin(
        row.getLong(1),
        Instant.ofEpochMilli(row.getLong(2)),
        new Source(words.name(row.getLong(3)), sheetName),
        row.getInt(5),
        row.getLong(6),
        new Batch(words.name(row.getLong(6)), row.getInt(7) != 0),
        row.getInt(8) != 0,
        row.getInt(9) != 0);
  }
}
