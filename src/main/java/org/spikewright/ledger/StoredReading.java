package org.spikewright.ledger;

import java.sql.ResultSet;
import java.sql.SQLException;
import java.util.Comparator;
import java.util.List;
import java.util.OptionalDouble;

/** One row of the table of readings. */
record StoredReading(
    long subject,
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
    Origins.Origin origin,
    long line,
    OptionalDouble standard) {

  /** Selects rows; a condition on the subject is to follow. */
  static final String SELECT =
      "SELECT subject, read_at, batch, preparation, flask, replicate, nth, signal, state, text,"
          + " facts, origin, line_no, standard FROM reading WHERE subject";

  private static final Comparator<StoredReading> KEY_ORDER =
      Comparator.comparingLong(StoredReading::subject)
          .thenComparingLong(StoredReading::at)
          .thenComparingLong(StoredReading::batch)
          .thenComparingLong(StoredReading::preparation)
          .thenComparingLong(StoredReading::flask)
          .thenComparingLong(StoredReading::replicate)
          .thenComparingInt(StoredReading::nth);

  static StoredReading read(ResultSet row, Origins origins) throws SQLException {
    return new StoredReading(
        row.getLong(1),
        row.getLong(2),
        row.getLong(3),
        row.getLong(4),
        row.getLong(5),
        row.getLong(6),
        row.getInt(7),
        row.getDouble(8),
        row.getInt(9),
        Sql.text(row, 10),
        row.getLong(11),
        origins.get(row.getLong(12)),
        row.getLong(13),
        Sql.optionalDouble(row, 14));
  }

  boolean sameReading(StoredReading other) {
    return subject == other.subject
        && at == other.at
        && batch == other.batch
        && preparation == other.preparation
        && flask == other.flask
        && replicate == other.replicate;
  }

  /**
   * Puts rows into the order of the key. They come in it from the table's own tree, unless a
   * database reads them in another way: asking for it would make this one sort them once more.
   */
  static void sort(List<StoredReading> rows) {
    for (int i = 1; i < rows.size(); i++) {
      StoredReading before = rows.get(i - 1);
      StoredReading row = rows.get(i);
      boolean later =
          before.subject < row.subject || before.subject == row.subject && before.at < row.at;
      if (!later && KEY_ORDER.compare(before, row) > 0) {
        rows.sort(KEY_ORDER);
        return;
      }
    }
  }
}
