package org.spikewright.ledger;

import java.time.Instant;
import java.util.Arrays;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalLong;
import java.util.Set;

/**
 * Notes, while a delivery is taken, which lab days each new reading belongs to, and at its end
 * which days are to be looked at again because a series that reaches them may have changed.
 */
final class DayNotes {
  /** Untimed series of one subject are compared this many lab days back and forth. */
  static final int UNTIMED_REACH_DAYS = 30;

  /** Two untimed series are one when this many of their common flasks agree. */
  private static final int AGREEING_FLASKS = 3;

  private static final int REMEMBERED = 65_536;
  private static final String OF_DAY_BROUGHT =
      " FROM reading r JOIN origin o ON o.id = r.origin WHERE r.subject = ? AND r.read_at >= ?"
          + " AND r.read_at < ? AND r.batch = 0 AND o.arrival = ?";
  private static final String FIRST_BROUGHT = "SELECT MIN(r.read_at)" + OF_DAY_BROUGHT;
  private static final String LAST_BROUGHT = "SELECT MAX(r.read_at)" + OF_DAY_BROUGHT;

  private final Sql sql;
  private final DayIndex days;
  private final long pauseMillis;
  private final long arrival;
  private final long arrivalDay;
  private final long lastKnownSubject;
  private final Batched subjectDays;
  private final Batched delimitedDays;
  private final Batched brought;
  private final Batched touched;
  private final Map<Noted, Boolean> noted = new Recent<>(REMEMBERED);
  private final Map<Untimed, Long> untimedDays = new Recent<>(REMEMBERED);
  private Noted lastNote;
  private final Set<Long> daysBrought = new HashSet<>();
  private final Pairs timedToFollow = new Pairs();
  private final Pairs delimitedToFollow = new Pairs();
  private final Pairs untimedToFollow = new Pairs();

  /** That a subject has readings on a day: of an untimed batch, or timed in a batch or none. */
  private record Noted(boolean timed, long subject, long day, long delimitedBy) {
    boolean isOf(NewRow row, long itsDay) {
      return subject == row.subject()
          && day == itsDay
          && timed == row.timed()
          && delimitedBy == row.delimitedBy();
    }
  }

  private record Untimed(long subject, long batch) {}

  DayNotes(Sql sql, DayIndex days, long pauseMillis, long arrival, long arrivalDay) {
    this.sql = sql;
    this.days = days;
    this.pauseMillis = pauseMillis;
    this.arrival = arrival;
    this.arrivalDay = arrivalDay;
    this.lastKnownSubject = sql.number("SELECT MAX(id) FROM subject").orElse(0);
    this.subjectDays = inserts("subject_day (day, subject, arrival) VALUES (?, ?, ?)");
    this.delimitedDays =
        inserts("delimited_day (subject, batch, day, arrival) VALUES (?, ?, ?, ?)");
    this.brought = inserts("brought (day, arrival) VALUES (?, ?)");
    this.touched = inserts("touched (day, arrival) VALUES (?, ?)");
  }

  /** Takes a reading that is new, or a new version of one. */
  void fresh(NewRow row) {
    long day = row.timed() ? days.of(row.at()) : untimedDay(row);
    if (lastNote != null && lastNote.isOf(row, day)) {
      return;
    }
    lastNote = new Noted(row.timed(), row.subject(), day, row.delimitedBy());
    if (noted.putIfAbsent(lastNote, true) != null) {
      return;
    }
    subjectDays.add(day, row.subject(), arrival);
    bring(day);
    boolean known = row.subject() <= lastKnownSubject;
    if (row.delimitedBy() != Ids.NONE) {
      delimitedDays.add(row.subject(), row.delimitedBy(), day, arrival);
    }
    if (known && row.timed()) {
      timedToFollow.add(row.subject(), day);
    }
    if (known && row.delimitedBy() != Ids.NONE) {
      delimitedToFollow.add(row.subject(), row.delimitedBy());
    }
  }

  /** The lab day of a reading beside the samples: that of its time, else of its arrival. */
  long dayOf(Optional<Instant> measuredAt) {
    return measuredAt.map(time -> days.of(time.toEpochMilli())).orElse(arrivalDay);
  }

  /**
   * A reading beside the samples tells something about series that no long pause divides from it.
   */
  void freshBesideSamples(long day, Optional<Instant> measuredAt) {
    bring(day);
    if (measuredAt.isPresent()) {
      touch(days.of(measuredAt.get().toEpochMilli() - pauseMillis));
      touch(days.of(measuredAt.get().toEpochMilli() + pauseMillis));
    }
  }

  /** The day on which the delivery itself arrived has something to say of it. */
  void bringToArrivalDay() {
    bring(arrivalDay);
  }

  /** Writes what is still waiting and follows series to the other days they reach. */
  void finish() {
    subjectDays.flush();
    delimitedDays.flush();
    timedToFollow.forEach(this::followTimed);
    delimitedToFollow.forEach(this::followDelimited);
    untimedToFollow.forEach(this::followUntimed);
    brought.flush();
    touched.flush();
  }

  private long untimedDay(NewRow row) {
    Untimed key = new Untimed(row.subject(), row.batch());
    Long known = untimedDays.get(key);
    if (known != null) {
      return known;
    }
    int added =
        sql.run(
            "INSERT INTO untimed_batch (subject, batch, day, arrival) VALUES (?, ?, ?, ?)"
                + " ON CONFLICT DO NOTHING",
            row.subject(),
            row.batch(),
            arrivalDay,
            arrival);
    long day = added > 0 ? arrivalDay : dayOfUntimed(row.subject(), row.batch());
    untimedDays.put(key, day);
    if (row.subject() <= lastKnownSubject) {
      untimedToFollow.add(row.subject(), row.batch());
    }
    return day;
  }

  private long dayOfUntimed(long subject, long batch) {
    return sql.number(
            "SELECT day FROM untimed_batch WHERE subject = ? AND batch = ?", subject, batch)
        .orElseThrow();
  }

  private void bring(long day) {
    if (daysBrought.size() < REMEMBERED && !daysBrought.add(day)) {
      return;
    }
    brought.add(day, arrival);
    touch(day);
  }

  private void touch(long day) {
    touched.add(day, arrival);
  }

  /**
   * A series without a long pause that holds a new reading of this day may have begun on an earlier
   * day, or have taken over what began the next. Only series that cross a cut-off are followed,
   * reading by reading: a control that is measured every night must not touch its whole history.
   */
  private void followTimed(long subject, long day) {
    long start = days.start(day);
    long end = days.start(day + 1);
    if (linked(last(subject, start), first(subject, start))) {
      followBack(subject, brought(FIRST_BROUGHT, subject, start, end), day);
    }
    if (linked(last(subject, end), first(subject, end))) {
      followOn(subject, brought(LAST_BROUGHT, subject, start, end), end);
    }
  }

  private void followBack(long subject, long from, long day) {
    long touchedLast = day;
    OptionalLong at = OptionalLong.of(from);
    OptionalLong before = last(subject, from);
    while (linked(before, at)) {
      long dayBefore = days.of(before.getAsLong());
      if (dayBefore != touchedLast) {
        touch(dayBefore);
        touchedLast = dayBefore;
      }
      at = before;
      before = last(subject, at.getAsLong());
    }
  }

  private void followOn(long subject, long from, long end) {
    OptionalLong at = OptionalLong.of(from);
    while (at.getAsLong() < end) {
      OptionalLong next = first(subject, at.getAsLong() + 1);
      if (!linked(at, next)) {
        return;
      }
      at = next;
    }
    touch(days.of(at.getAsLong()));
  }

  private long brought(String which, long subject, long from, long to) {
    return sql.number(which, subject, from, to, arrival).orElseThrow();
  }

  private boolean linked(OptionalLong earlier, OptionalLong later) {
    return earlier.isPresent()
        && later.isPresent()
        && later.getAsLong() - earlier.getAsLong() <= pauseMillis;
  }

  private OptionalLong last(long subject, long before) {
    return sql.number(
        "SELECT read_at FROM reading WHERE subject = ? AND read_at < ? AND batch = 0"
            + " ORDER BY read_at DESC LIMIT 1",
        subject,
        before);
  }

  private OptionalLong first(long subject, long from) {
    return sql.number(
        "SELECT read_at FROM reading WHERE subject = ? AND read_at >= ? AND batch = 0"
            + " ORDER BY read_at LIMIT 1",
        subject,
        from);
  }

  private void followDelimited(long subject, long batch) {
    sql.list(
            "SELECT day FROM delimited_day WHERE subject = ? AND batch = ?",
            row -> row.getLong(1),
            subject,
            batch)
        .forEach(this::touch);
  }

  /** Other batches of the subject that are, or were before a correction, the same series. */
  private void followUntimed(long subject, long batch) {
    long day = dayOfUntimed(subject, batch);
    List<long[]> others =
        sql.list(
            "SELECT batch, day FROM untimed_batch WHERE subject = ? AND batch <> ?"
                + " AND day BETWEEN ? AND ?",
            row -> new long[] {row.getLong(1), row.getLong(2)},
            subject,
            batch,
            day - UNTIMED_REACH_DAYS,
            day + UNTIMED_REACH_DAYS);
    for (long[] other : others) {
      long agreeing =
          sql.number(
                  "SELECT COUNT(DISTINCT a.flask) FROM reading a JOIN reading b"
                      + " ON b.subject = a.subject AND b.read_at = 0 AND b.batch = ?"
                      + " AND b.preparation = a.preparation AND b.flask = a.flask"
                      + " AND b.replicate = a.replicate AND b.signal = a.signal"
                      + " WHERE a.subject = ? AND a.read_at = 0 AND a.batch = ?",
                  other[0],
                  subject,
                  batch)
              .orElse(0);
      if (agreeing >= AGREEING_FLASKS) {
        touch(other[1]);
      }
    }
  }

  private Batched inserts(String into) {
    return new Batched(sql, "INSERT INTO " + into + " ON CONFLICT DO NOTHING");
  }

  /** Pairs of numbers in little room. */
  private static final class Pairs {
    private long[] values = new long[64];
    private int size;

    interface Each {
      void take(long first, long second);
    }

    void add(long first, long second) {
      if (size == values.length) {
        values = Arrays.copyOf(values, size * 2);
      }
      values[size++] = first;
      values[size++] = second;
    }

    void forEach(Each each) {
      for (int i = 0; i < size; i += 2) {
        each.take(values[i], values[i + 1]);
      }
    }
  }
}
