package org.spikewright.ledger;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.lang.management.ManagementFactory;
import java.nio.file.Files;
import java.nio.file.Path;
import java.sql.Connection;
import java.sql.DriverManager;
import java.sql.PreparedStatement;
import java.sql.SQLException;
import java.time.LocalDate;
import java.util.Locale;
import java.util.Optional;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.reading.Batch;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Subject;
import org.spikewright.table.Position;
import org.spikewright.table.Source;

/**
 * How fast and how small the ledger is, as ratios to a floor measured in the same run: the same
 * number of rows in one transaction into a table of eight integers. Set {@code -Dsubjects=200000}
 * for a night ten times as long.
 */
@Tag("simulation")
class LedgerSpeed {
  private static final int SUBJECTS = Integer.getInteger("subjects", 20_000);
  private static final int FLASKS = 5;
  private static final int REPLICATES = 3;
  private static final int ANALYTES = 20;

  private static final String[] ELEMENTS = numbered("element ", ANALYTES);
  private static final String[] LINES = numbered("line ", ANALYTES);
  private static final String[] LABELS = numbered("F", FLASKS);
  private static final Signal[] SIGNALS =
      IntStream.range(0, 9973)
          .mapToObj(i -> new Signal.Value(0.1 + i / 1e4, Double.toString(0.1 + i / 1e4)))
          .toArray(Signal[]::new);

  @TempDir Path folder;

  @Test
  void aNightIsTakenAndReadBackNearTheSpeedOfTheDatabase() throws Exception {
    floor("warm", 50_000);
    double floor = floor("floor", SUBJECTS * FLASKS * REPLICATES);
    Path file = folder.resolve("night.db");
    FlaskFacts[] facts = new FlaskFacts[FLASKS];
    for (int flask = 0; flask < FLASKS; flask++) {
      facts[flask] = Samples.facts(flask * 50);
    }
    try (Ledger ledger = Samples.open(file)) {
      double warm = deliver(ledger, "warm.csv", 2_000, facts);
      double taken = deliver(ledger, "night.csv", SUBJECTS, facts);
      ledger.checkpoint();
      say("taken", taken, floor);
      System.out.printf(
          Locale.ROOT,
          "size %.1f MB, floor %.1f MB, warm-up %.2f s%n",
          Files.size(file) / 1e6,
          Files.size(folder.resolve("floor.db")) / 1e6,
          warm);
      double again = deliver(ledger, "again.csv", SUBJECTS, facts);
      say("taken again, all repeated", again, floor);
      say("read back", readBack(ledger, "night.csv"), floor);
    }
  }

  /**
   * Seconds of processor time of this thread, which other work on the machine does not lengthen.
   */
  private static double cpu() {
    return ManagementFactory.getThreadMXBean().getCurrentThreadCpuTime() / 1e9;
  }

  private static String[] numbered(String word, int count) {
    return IntStream.range(0, count).mapToObj(i -> word + i).toArray(String[]::new);
  }

  private static void say(String what, double seconds, double floor) {
    System.out.printf(
        Locale.ROOT,
        "%s: %.2f s of processor time for %d readings, %.2f times the floor of %.2f s%n",
        what,
        seconds,
        SUBJECTS * FLASKS * REPLICATES,
        seconds / floor,
        floor);
  }

  private static double deliver(Ledger ledger, String name, int subjects, FlaskFacts[] facts) {
    String prefix = name.equals("warm.csv") ? "W-" : "S-";
    Source source = new Source(name, Optional.empty());
    Batch batch = new Batch(name, false);
    double start = cpu();
    long line = 1;
    try (Delivery delivery = ledger.receive(Samples.arriving(name, Samples.DAY))) {
      // As a multi-element instrument writes: a sample's flask and replicate, then its analytes.
      for (int sample = 0; sample < subjects / ANALYTES; sample++) {
        SampleId id = new SampleId(prefix + sample);
        for (int reading = 0; reading < FLASKS * REPLICATES; reading++) {
          for (int analyte = 0; analyte < ANALYTES; analyte++) {
            delivery.reading(
                new Reading(
                    new Subject("plasma", id, ELEMENTS[analyte], LINES[analyte]),
                    batch,
                    LABELS[reading / REPLICATES],
                    true,
                    LABELS[reading % REPLICATES],
                    true,
                    Optional.of(Samples.MORNING.plusMillis(line % 60_000_000)),
                    SIGNALS[(int) (line % SIGNALS.length)],
                    facts[reading / REPLICATES],
                    new Position(source, ++line, 5)));
          }
        }
      }
      delivery.commit(Samples.tally(line - 1), "", "done/" + name);
    }
    return cpu() - start;
  }

  private static double readBack(Ledger ledger, String name) {
    double start = cpu();
    LocalDate day = Samples.DAY;
    long newest = ledger.newestArrival();
    long readings = 0;
    for (Subject subject : ledger.subjects(day, newest)) {
      for (Recorded recorded : ledger.readings(subject, day, newest)) {
        readings += recorded.reading().position().source().file().equals(name) ? 1 : 0;
      }
    }
    assertThat(readings).isEqualTo((long) SUBJECTS * FLASKS * REPLICATES);
    return cpu() - start;
  }

  private double floor(String name, int rows) throws SQLException, IOException {
    Path file = folder.resolve(name + ".db");
    try (Connection connection = DriverManager.getConnection("jdbc:sqlite:" + file)) {
      run(connection, "PRAGMA journal_mode = WAL");
      run(
          connection,
          "CREATE TABLE r (a INTEGER, b INTEGER, c INTEGER, d INTEGER, v REAL, f INTEGER,"
              + " PRIMARY KEY (a, b, c, d)) WITHOUT ROWID");
      double start = cpu();
      connection.setAutoCommit(false);
      try (PreparedStatement insert =
          connection.prepareStatement("INSERT INTO r VALUES (?, ?, ?, ?, ?, ?)")) {
        for (int row = 0; row < rows; row++) {
          insert.setLong(1, row / 15);
          insert.setLong(2, row % 15 / 3);
          insert.setLong(3, row % 3);
          insert.setLong(4, 1_736_000_000_000L + row);
          insert.setDouble(5, row / 9973.0);
          insert.setLong(6, row % 5);
          insert.addBatch();
          if (row % 16_384 == 16_383) {
            insert.executeBatch();
          }
        }
        insert.executeBatch();
      }
      connection.commit();
      double seconds = cpu() - start;
      connection.setAutoCommit(true);
      run(connection, "PRAGMA wal_checkpoint(TRUNCATE)");
      return seconds;
    }
  }

  private static void run(Connection connection, String sql) throws SQLException {
    try (var statement = connection.createStatement()) {
      statement.execute(sql);
    }
  }
}
