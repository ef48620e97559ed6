package org.spikewright.ledger;

import java.sql.ResultSet;
import java.sql.SQLException;
import java.time.Instant;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.OptionalDouble;
import java.util.OptionalLong;
import org.spikewright.analysis.ControlHistory;
import org.spikewright.analysis.ControlKey;
import org.spikewright.analysis.ControlPoint;
import org.spikewright.analysis.ControlRule;

/** Writes what controls came to in a revision, and reads the history of all of them back. */
final class ControlPoints {
  private final Sql sql;

  ControlPoints(Sql sql) {
    this.sql = sql;
  }

  /** Adds the points of a revision, in their order. */
  void add(Ids ids, LocalDate day, int revision, List<ControlPoint> points) {
    int place = 0;
    for (ControlPoint point : points) {
      ControlKey key = point.key();
      sql.run(
          "INSERT INTO control_point (day, revision, place, name, kind, instrument, analyte, line,"
              + " unit, value, reference, lower_limit, upper_limit)"
              + " VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)",
          day.toEpochDay(),
          revision,
          ++place,
          ids.name(key.name()),
          key.kind().word(),
          ids.name(key.instrument()),
          ids.name(key.analyte()),
          ids.name(key.line()),
          point.unit(),
          point.value(),
          orNull(point.reference()),
          orNull(point.lower()),
          orNull(point.upper()));
    }
  }

  /**
   * The points of earlier lab days that had closed: of each day the newest revision. What the first
   * summary of a day after its close could know holds for its later revisions too, so that late
   * data of an earlier day never move it.
   *
   * @param day whose controls are to be judged
   * @param moment of the revision that asks
   */
  ControlHistory before(LocalDate day, Instant moment) {
    OptionalLong firstClosed =
        sql.number(
            "SELECT MIN(l.moment) FROM revision r JOIN day_look l ON l.day = r.day"
                + " AND l.nth = r.look WHERE r.day = ? AND l.in_progress = 0",
            day.toEpochDay());
    long asOf = Math.min(firstClosed.orElse(Long.MAX_VALUE), moment.toEpochMilli());
    Words words = new Words(sql);
    Map<ControlKey, List<ControlPoint>> points = new HashMap<>();
    for (ControlPoint point :
        sql.list(
            "SELECT c.day, c.name, c.kind, c.instrument, c.analyte, c.line, c.unit, c.value,"
                + " c.reference, c.lower_limit, c.upper_limit FROM control_point c"
                + " WHERE c.day < ? AND c.revision = (SELECT MAX(r.number) FROM revision r"
                + " JOIN day_look l ON l.day = r.day AND l.nth = r.look"
                + " WHERE r.day = c.day AND l.in_progress = 0 AND l.moment <= ?)"
                + " ORDER BY c.day, c.place",
            row -> read(row, words),
            day.toEpochDay(),
            asOf)) {
      points.computeIfAbsent(point.key(), key -> new ArrayList<>()).add(point);
    }
    return new ControlHistory(points);
  }

  private static ControlPoint read(ResultSet row, Words words) throws SQLException {
    String kind = row.getString(3);
    ControlRule.Kind known =
        java.util.Arrays.stream(ControlRule.Kind.values())
            .filter(one -> one.word().equals(kind))
            .findFirst()
            .orElseThrow(() -> new IllegalStateException("no kind of control '" + kind + "'"));
    return new ControlPoint(
        LocalDate.ofEpochDay(row.getLong(1)),
        new ControlKey(
            words.name(row.getLong(2)),
            known,
            words.name(row.getLong(4)),
            words.name(row.getLong(5)),
            words.name(row.getLong(6))),
        Sql.text(row, 7),
        row.getDouble(8),
        optional(row, 9),
        optional(row, 10),
        optional(row, 11));
  }

  private static OptionalDouble optional(ResultSet row, int column) throws SQLException {
    double value = row.getDouble(column);
    return row.wasNull() ? OptionalDouble.empty() : OptionalDouble.of(value);
  }

  private static Double orNull(OptionalDouble value) {
    return value.isPresent() ? value.getAsDouble() : null;
  }
}
