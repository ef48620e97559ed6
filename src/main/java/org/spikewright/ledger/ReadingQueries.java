package org.spikewright.ledger;

import java.sql.ResultSet;
import java.sql.SQLException;
import java.time.Instant;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.Comparator;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalLong;
import java.util.Set;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Subject;
import org.spikewright.table.Position;

/** Reads readings back, as the ledger stood after a given delivery. */
final class ReadingQueries {
  private static final int REMEMBERED = 65_536;

  /** How many subjects are asked for in one statement. */
  private static final int TOGETHER = 64;

  private static final String SEVERAL = " IN (?" + ", ?".repeat(TOGETHER - 1) + ")";
  private static final String IN_TIME = " AND read_at >= ? AND read_at < ? AND batch = 0";

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
  private final Origins origins;
  private final Map<Subject, Long> subjects = new Recent<>(REMEMBERED);

  ReadingQueries(Sql sql, DayIndex days, long pauseMillis) {
    this.sql = sql;
    this.words = new Words(sql);
    this.origins = new Origins(sql, words);
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
    return readings(List.of(subject), day, upTo).get(0);
  }

  /** The readings of each subject; many are asked for in one statement. */
  List<List<Recorded>> readings(List<Subject> asked, LocalDate day, long upTo) {
    List<List<Recorded>> each = new ArrayList<>(asked.size());
    for (int from = 0; from < asked.size(); from += TOGETHER) {
      few(
          asked.subList(from, Math.min(asked.size(), from + TOGETHER)),
          day.toEpochDay(),
          upTo,
          each);
    }
    return each;
  }

  private void few(List<Subject> asked, long day, long upTo, List<List<Recorded>> each) {
    // A place that is not needed, or whose subject is unknown, asks for a number that is never
    // given.
    Object[] ids = new Object[TOGETHER];
    Arrays.fill(ids, Ids.NONE);
    for (int i = 0; i < asked.size(); i++) {
      ids[i] = id(asked.get(i)).orElse(Ids.NONE);
    }
    Map<Long, List<StoredReading>> windows = windows(ids, day, upTo);
    Map<Long, List<Long>> batches = untimedBatches(ids, day, upTo);
    for (int i = 0; i < asked.size(); i++) {
      Long id = (Long) ids[i];
      List<StoredReading> found = timed(id, day, upTo, windows.getOrDefault(id, List.of()));
      List<Long> untimed = batches.getOrDefault(id, List.of());
      each.add(recorded(asked.get(i), untimed.isEmpty() ? found : with(found, id, untimed, upTo)));
    }
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

  /** For each subject what was read on the day, and a longest pause before and after. */
  private Map<Long, List<StoredReading>> windows(Object[] subjects, long day, long upTo) {
    Object[] arguments = Arrays.copyOf(subjects, TOGETHER + 2);
    arguments[TOGETHER] = days.start(day) - pauseMillis;
    arguments[TOGETHER + 1] = days.start(day + 1) + pauseMillis;
    List<StoredReading> rows = rows(SEVERAL + IN_TIME, upTo, arguments);
    Map<Long, List<StoredReading>> windows = new HashMap<>();
    int from = 0;
    for (int to = 1; to <= rows.size(); to++) {
      if (to == rows.size() || rows.get(to).subject() != rows.get(from).subject()) {
        windows.put(rows.get(from).subject(), rows.subList(from, to));
        from = to;
      }
    }
    return windows;
  }

  /**
   * The day's timed readings, those that no long pause divides from them, and the rest of the
   * batches that delimit any of these.
   */
  private List<StoredReading> timed(long subject, long day, long upTo, List<StoredReading> around) {
    long start = days.start(day);
    long end = days.start(day + 1);
    long from = start - pauseMillis;
    long to = end + pauseMillis;
    List<StoredReading> window = around;
    while (true) {
      List<StoredReading> run = run(window, start, end);
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
      window = between(subject, from, to, upTo);
    }
  }

  /** The part of a window, ordered by time, that is linked to the readings of a day. */
  private List<StoredReading> run(List<StoredReading> window, long start, long end) {
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

  private List<StoredReading> withDelimited(List<StoredReading> run, long subject, long upTo) {
    Set<Long> batches = new HashSet<>();
    for (StoredReading row : run) {
      if (row.origin().batch().delimits()) {
        batches.add(row.origin().batchId());
      }
    }
    if (batches.isEmpty()) {
      return run;
    }
    long first = run.get(0).at();
    long last = run.get(run.size() - 1).at();
    List<StoredReading> all = new ArrayList<>(run);
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

  private Map<Long, List<Long>> untimedBatches(Object[] subjects, long day, long upTo) {
    Object[] arguments = Arrays.copyOf(subjects, TOGETHER + 3);
    arguments[TOGETHER] = day - DayNotes.UNTIMED_REACH_DAYS;
    arguments[TOGETHER + 1] = day + DayNotes.UNTIMED_REACH_DAYS;
    arguments[TOGETHER + 2] = upTo;
    Map<Long, List<Long>> batches = new HashMap<>();
    sql.list(
            "SELECT subject, batch FROM untimed_batch WHERE subject"
                + SEVERAL
                + " AND day BETWEEN ? AND ? AND arrival <= ?",
            row -> new long[] {row.getLong(1), row.getLong(2)},
            arguments)
        .forEach(row -> batches.computeIfAbsent(row[0], id -> new ArrayList<>()).add(row[1]));
    return batches;
  }

  private List<StoredReading> with(
      List<StoredReading> timed, long subject, List<Long> batches, long upTo) {
    List<StoredReading> all = new ArrayList<>(timed);
    for (long batch : batches) {
      all.addAll(rows(" = ? AND read_at = 0 AND batch = ?", upTo, subject, batch));
    }
    return all;
  }

  private List<StoredReading> between(long subject, long from, long to, long upTo) {
    return rows(" = ?" + IN_TIME, upTo, subject, from, to);
  }

  /** Rows in the order of the key, of each reading the newest version. */
  private List<StoredReading> rows(String condition, long upTo, Object... arguments) {
    List<StoredReading> rows =
        sql.list(
            StoredReading.SELECT + condition, row -> StoredReading.read(row, origins), arguments);
    StoredReading.sort(rows);
    return newest(rows, upTo);
  }

  /** The newest version of each reading that a delivery up to the limit brought. */
  private static List<StoredReading> newest(List<StoredReading> rows, long upTo) {
    List<StoredReading> newest = new ArrayList<>(rows.size());
    for (StoredReading row : rows) {
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

  private List<Recorded> recorded(Subject subject, List<StoredReading> rows) {
    List<Recorded> recorded = new ArrayList<>(rows.size());
    boolean inOrder = true;
    long last = Long.MIN_VALUE;
    for (StoredReading row : rows) {
      recorded.add(recorded(subject, row));
      inOrder &= row.at() > last;
      last = row.at();
    }
    if (!inOrder) {
      recorded.sort(ORDER);
    }
    return Collections.unmodifiableList(recorded);
  }

  private Recorded recorded(Subject subject, StoredReading row) {
    Origins.Origin origin = row.origin();
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
}
