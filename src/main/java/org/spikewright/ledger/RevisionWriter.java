package org.spikewright.ledger;

import java.time.Instant;
import java.time.temporal.ChronoUnit;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalLong;
import org.spikewright.analysis.ControlPoint;
import org.spikewright.analysis.NightEvidence;
import org.spikewright.analysis.PoolKey;
import org.spikewright.fit.PooledSeries;
import org.spikewright.series.SeriesKey;
import org.spikewright.summary.ResultRow;

/**
 * One revision being recorded, in one transaction. A result that differs from the newest version of
 * its series becomes a new version; the revision lists the versions it shows. Readings of the
 * ledger may be asked for meanwhile; deliveries may not be taken.
 */
public final class RevisionWriter implements AutoCloseable {
  private final Ledger ledger;
  private final Sql sql;
  private final Ids ids;
  private final RevisionStart start;
  private final Optional<RevisionRecord> previous;
  private final long settings;
  private final Batched places;
  private final List<Shown> shown = new ArrayList<>();
  private List<ControlPoint> controls = List.of();
  private boolean open = true;

  private record Shown(SeriesKey key, long version) {}

  private record Newest(long id, int nth, String inputsSha256, String content) {}

  RevisionWriter(Ledger ledger, Sql sql, Ids ids, RevisionStart start) {
    this.ledger = ledger;
    this.sql = sql;
    this.ids = ids;
    this.start = start;
    this.previous = new RevisionQueries(sql).newest(start.labDay());
    this.settings = ids.textVersion("settings", "", start.settingsSha256(), start.settingsText());
    this.places =
        new Batched(
            sql,
            "INSERT INTO revision_result (day, revision, place, result_version)"
                + " VALUES (?, ?, ?, ?)");
  }

  /** The number the revision will have. */
  public int revision() {
    return previous.map(RevisionRecord::revision).orElse(0) + 1;
  }

  /** The instant it stands for, to the millisecond, as it will be read back. */
  public Instant moment() {
    return start.moment().truncatedTo(ChronoUnit.MILLIS);
  }

  /**
   * Takes a result, in any order.
   *
   * @param inputsSha256 of everything it was computed from, in hexadecimal
   */
  public void result(ResultRow row, String inputsSha256) {
    requireOpen();
    if (!row.key().labDay().equals(start.labDay())) {
      throw new IllegalArgumentException("a result of another lab day: " + row.key());
    }
    Object[] identity = identity(row.key());
    OptionalLong fresh = addSeries(identity);
    long series = fresh.orElseGet(() -> knownSeries(identity));
    String content = ResultCodec.encode(row);
    Optional<Newest> newest = fresh.isPresent() ? Optional.empty() : newest(series);
    boolean same =
        newest.isPresent()
            && newest.get().content().equals(content)
            && newest.get().inputsSha256().equals(inputsSha256);
    long version =
        same
            ? newest.get().id()
            : add(series, newest.map(Newest::nth).orElse(0) + 1, inputsSha256, row, content);
    shown.add(new Shown(row.key(), version));
  }

  /**
   * Stores what the pools of a closed day came to, for its later revisions and for later days;
   * {@link IllegalStateException} for a day in progress.
   */
  public void pools(NightEvidence evidence, Map<PoolKey, List<PooledSeries>> toRemember) {
    requireOpen();
    if (start.inProgress()) {
      throw new IllegalStateException("the pools of a day in progress are provisional");
    }
    new PoolStore(sql).store(start.labDay(), start.programVersion(), evidence, toRemember, ids);
  }

  /**
   * Takes what the controls of the day came to; it is recorded where the revision is.
   *
   * @param points in order; of this lab day
   */
  public void controls(List<ControlPoint> points) {
    requireOpen();
    for (ControlPoint point : points) {
      if (!point.labDay().equals(start.labDay())) {
        throw new IllegalArgumentException("a control of another lab day: " + point);
      }
    }
    controls = List.copyOf(points);
  }

  /**
   * Records the revision as owed. When it shows what the previous one shows, no delivery has come
   * that belongs to the day, and the day has not closed since, only a mark is left that the day was
   * looked at.
   *
   * @param waitingUntil when the first of its waiting series has waited long enough
   * @return empty when only a mark was left
   */
  public Optional<RevisionRecord> commit(Optional<Instant> waitingUntil) {
    requireOpen();
    shown.sort(Comparator.comparing(Shown::key));
    for (int i = 1; i < shown.size(); i++) {
      if (shown.get(i).key().equals(shown.get(i - 1).key())) {
        throw new IllegalStateException("two results of one series: " + shown.get(i).key());
      }
    }
    boolean nothingNew = nothingNew();
    int look = look(waitingUntil);
    if (!nothingNew) {
      record(look);
    }
    sql.commit();
    open = false;
    return nothingNew ? Optional.empty() : new RevisionQueries(sql).get(start.labDay(), revision());
  }

  /** Forgets the revision unless it was committed. */
  @Override
  public void close() {
    if (open) {
      open = false;
      ledger.abandon();
    }
  }

  private boolean nothingNew() {
    long[] versions = shown.stream().mapToLong(Shown::version).toArray();
    boolean brought =
        sql.number(
                "SELECT arrival FROM brought WHERE day = ? AND arrival > ? AND arrival <= ? LIMIT 1",
                day(),
                previous.map(RevisionRecord::arrivalLimit).orElse(0L),
                start.arrivalLimit())
            .isPresent();
    if (previous.isEmpty()) {
      return versions.length == 0 && !brought;
    }
    boolean closedSince = previous.get().inProgress() && !start.inProgress();
    return !brought
        && !closedSince
        && Arrays.equals(
            versions, new RevisionQueries(sql).versions(start.labDay(), previous.get().revision()));
  }

  private int look(Optional<Instant> waitingUntil) {
    long nth = sql.number("SELECT MAX(nth) FROM day_look WHERE day = ?", day()).orElse(0) + 1;
    sql.run(
        "INSERT INTO day_look (day, nth, moment, in_progress, arrival_limit, waiting_until)"
            + " VALUES (?, ?, ?, ?, ?, ?)",
        day(),
        nth,
        start.moment().toEpochMilli(),
        start.inProgress() ? 1 : 0,
        start.arrivalLimit(),
        waitingUntil.map(Instant::toEpochMilli).orElse(null));
    return (int) nth;
  }

  private void record(int look) {
    sql.run(
        "INSERT INTO revision (day, number, look, settings, program, results)"
            + " VALUES (?, ?, ?, ?, ?, ?)",
        day(),
        revision(),
        look,
        settings,
        start.programVersion(),
        shown.size());
    for (int place = 0; place < shown.size(); place++) {
      places.add(day(), revision(), place + 1, shown.get(place).version());
    }
    places.flush();
    new ControlPoints(sql).add(ids, start.labDay(), revision(), controls);
  }

  private Object[] identity(SeriesKey key) {
    return new Object[] {
      ids.subject(key.subject()),
      key.labDay().toEpochDay(),
      ids.name(key.batch()),
      ids.name(key.preparation()),
      key.ordinal()
    };
  }

  /** The number of a series that is new; empty when it is known. */
  private OptionalLong addSeries(Object[] identity) {
    return sql.number(
        "INSERT INTO series (subject, day, batch, preparation, ordinal) VALUES (?, ?, ?, ?, ?)"
            + " ON CONFLICT (subject, day, batch, preparation, ordinal) DO NOTHING RETURNING id",
        identity);
  }

  private long knownSeries(Object[] identity) {
    return sql.number(
            "SELECT id FROM series WHERE subject = ? AND day = ? AND batch = ?"
                + " AND preparation = ? AND ordinal = ?",
            identity)
        .orElseThrow();
  }

  private Optional<Newest> newest(long series) {
    return sql.first(
        "SELECT id, nth, inputs_sha256, content FROM result_version WHERE series = ?"
            + " ORDER BY nth DESC LIMIT 1",
        row -> new Newest(row.getLong(1), row.getInt(2), row.getString(3), Sql.text(row, 4)),
        series);
  }

  private long add(long series, int nth, String inputsSha256, ResultRow row, String content) {
    return sql.number(
            "INSERT INTO result_version (series, nth, inputs_sha256, settings, program, verdict,"
                + " severity, content) VALUES (?, ?, ?, ?, ?, ?, ?, ?) RETURNING id",
            series,
            nth,
            inputsSha256,
            settings,
            start.programVersion(),
            row.verdict().word(),
            ResultOrder.severity(row.verdict()),
            content)
        .orElseThrow();
  }

  private long day() {
    return start.labDay().toEpochDay();
  }

  private void requireOpen() {
    if (!open) {
      throw new IllegalStateException("the revision was committed or closed");
    }
  }
}
