package org.spikewright.ledger;

import java.sql.ResultSet;
import java.sql.SQLException;
import java.time.Instant;
import java.util.Map;
import java.util.Optional;
import org.spikewright.reading.Batch;
import org.spikewright.table.Source;

/** What the readings of one table of one delivery have in common, remembered. */
final class Origins {
  private static final int REMEMBERED = 65_536;

  private final Sql sql;
  private final Words words;
  private final Map<Long, Origin> known = new Recent<>(REMEMBERED);
  private long lastId;
  private Origin last;

  /** One table of one delivery, read for one batch. */
  record Origin(
      long arrival,
      Instant arrivedAt,
      Source source,
      int column,
      long batchId,
      Batch batch,
      boolean flaskMapped,
      boolean replicateMapped) {}

  Origins(Sql sql, Words words) {
    this.sql = sql;
    this.words = words;
  }

  /** The origin with a number, mostly that of the reading before. */
  Origin get(long id) {
    if (last == null || id != lastId) {
      last = known.computeIfAbsent(id, this::read);
      lastId = id;
    }
    return last;
  }

  private Origin read(long id) {
    return sql.first(
            "SELECT o.arrival, a.arrived_at, o.file, o.sheet, o.column_no, o.batch,"
                + " o.delimits, o.flask_mapped, o.replicate_mapped FROM origin o"
                + " JOIN arrival a ON a.number = o.arrival WHERE o.id = ?",
            this::origin,
            id)
        .orElseThrow(() -> new IllegalStateException("the ledger lacks origin " + id));
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
