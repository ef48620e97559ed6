package org.spikewright.ledger;

import java.sql.ResultSet;
import java.sql.SQLException;
import java.text.Normalizer;
import java.time.Instant;
import java.time.LocalDate;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalLong;
import org.spikewright.mapping.Tally;

/** The list of deliveries. */
final class Arrivals {
  private static final String COLUMNS =
      "SELECT number, name, sha256, arrived_at, lab_day, outcome, row_count, readings, rejections,"
          + " skipped, checks, calibrations, repeated, reason, archive_name, filed_as,"
          + " (SELECT t.sha256 FROM text_version t WHERE t.id = mapping) FROM arrival ";

  private final Sql sql;

  Arrivals(Sql sql) {
    this.sql = sql;
  }

  /** Adds a delivery about whose rows nothing is known yet. */
  long add(Ids ids, Arriving file, Arrived.Result outcome, String reason, String archiveName) {
    Object mapping =
        file.mappingName().isEmpty() && file.mappingText().isEmpty()
            ? null
            : ids.textVersion(
                "mapping", file.mappingName(), file.mappingSha256(), file.mappingText());
    return sql.number(
            "INSERT INTO arrival (name, size, sha256, arrived_at, lab_day, mapping, outcome,"
                + " row_count, readings, rejections, skipped, repeated, reason, archive_name,"
                + " archive_key) VALUES (?, ?, ?, ?, ?, ?, ?, 0, 0, 0, 0, 0, ?, ?, ?)"
                + " RETURNING number",
            file.name(),
            file.size(),
            file.sha256(),
            file.arrivedAt().toEpochMilli(),
            file.labDay().toEpochDay(),
            mapping,
            outcome.word(),
            reason,
            archiveName,
            folded(archiveName))
        .orElseThrow();
  }

  /** Completes a delivery within the transaction that added it. */
  void complete(
      long number,
      Arrived.Result outcome,
      Tally tally,
      long repeated,
      String reason,
      String archiveName) {
    sql.run(
        "UPDATE arrival SET outcome = ?, row_count = ?, readings = ?, rejections = ?, skipped = ?,"
            + " checks = ?, calibrations = ?, repeated = ?, reason = ?, archive_name = ?, archive_key = ? WHERE number = ?",
        outcome.word(),
        tally.rows(),
        tally.readings(),
        tally.rejections(),
        tally.skipped(),
        tally.checks(),
        tally.calibrations(),
        repeated,
        reason,
        archiveName,
        folded(archiveName),
        number);
  }

  Arrived get(long number) {
    return sql.first(COLUMNS + "WHERE number = ?", Arrivals::read, number)
        .orElseThrow(() -> new IllegalArgumentException("no delivery " + number));
  }

  List<Arrived> unfiled() {
    return sql.list(COLUMNS + "WHERE filed_as IS NULL ORDER BY number", Arrivals::read);
  }

  /** Set once; {@link IllegalStateException} the second time. */
  void filed(long number, String where) {
    int set =
        sql.run(
            "UPDATE arrival SET filed_as = ? WHERE number = ? AND filed_as IS NULL", where, number);
    if (set == 0) {
      throw new IllegalStateException("delivery " + number + " is unknown or was filed already");
    }
  }

  Optional<Long> known(String sha256) {
    return asOptional(
        sql.number(
            "SELECT MIN(number) FROM arrival WHERE sha256 = ? AND outcome = 'read'", sha256));
  }

  boolean archiveNameTaken(String archiveName) {
    return sql.number(
            "SELECT number FROM arrival WHERE archive_key = ? LIMIT 1", folded(archiveName))
        .isPresent();
  }

  long newest() {
    return sql.number("SELECT MAX(number) FROM arrival").orElse(0);
  }

  /** As the most forgetful file system would tell names apart. */
  static String folded(String name) {
    return Normalizer.normalize(name, Normalizer.Form.NFC).toLowerCase(Locale.ROOT);
  }

  private static Arrived read(ResultSet row) throws SQLException {
    return new Arrived(
        row.getLong(1),
        Sql.text(row, 2),
        row.getString(3),
        Optional.ofNullable(row.getString(17)).orElse(""),
        Instant.ofEpochMilli(row.getLong(4)),
        LocalDate.ofEpochDay(row.getLong(5)),
        Arrived.Result.of(row.getString(6)),
        new Tally(
            row.getLong(7),
            row.getLong(8),
            row.getLong(9),
            row.getLong(10),
            row.getLong(11),
            row.getLong(12)),
        row.getLong(13),
        Sql.text(row, 14),
        Sql.text(row, 15),
        Optional.ofNullable(row.getString(16)).map(StoredText::decode));
  }

  private static Optional<Long> asOptional(OptionalLong number) {
    return number.isPresent() ? Optional.of(number.getAsLong()) : Optional.empty();
  }
}
