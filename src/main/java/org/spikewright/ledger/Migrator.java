package org.spikewright.ledger;

import java.io.IOException;
import java.io.InputStream;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;

/**
 * Brings a ledger's tables up to date by numbered scripts, each in a transaction of its own with
 * the note that it was done.
 */
final class Migrator {
  private Migrator() {}

  /** The number of the newest script this program has. */
  static int newest() {
    int number = 0;
    while (Migrator.class.getResource(name(number + 1)) != null) {
      number++;
    }
    return number;
  }

  /** The number of the last script that was run; 0 for a new file. */
  static int reached(Sql sql) {
    boolean begun =
        sql.guarded(
            c -> {
              try (var tables = c.getMetaData().getTables(null, null, "migration", null)) {
                return tables.next();
              }
            });
    return begun ? (int) sql.number("SELECT MAX(number) FROM migration").orElse(0) : 0;
  }

  /** Runs what is missing. */
  static void run(Sql sql) {
    for (int number = reached(sql) + 1; number <= newest(); number++) {
      sql.begin();
      try {
        if (number == 1) {
          sql.script(List.of("CREATE TABLE migration (number INTEGER PRIMARY KEY)"));
        }
        sql.script(statements(number));
        sql.run("INSERT INTO migration (number) VALUES (?)", number);
        sql.commit();
      } finally {
        if (sql.inTransaction()) {
          sql.rollback();
        }
      }
    }
  }

  private static List<String> statements(int number) {
    try (InputStream script = Migrator.class.getResourceAsStream(name(number))) {
      String text = new String(script.readAllBytes(), StandardCharsets.UTF_8);
      List<String> statements = new ArrayList<>();
      for (String statement : text.replaceAll("(?m)--.*$", "").split(";")) {
        if (!statement.isBlank()) {
          statements.add(statement.strip());
        }
      }
      return statements;
    } catch (IOException unreadable) {
      throw new UncheckedIOException(unreadable);
    }
  }

  private static String name(int number) {
    return String.format(Locale.ROOT, "%04d.sql", number);
  }
}
