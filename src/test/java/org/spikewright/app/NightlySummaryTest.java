package org.spikewright.app;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.nio.file.Path;
import java.sql.Connection;
import java.sql.DriverManager;
import java.sql.Statement;
import java.time.Clock;
import java.time.Duration;
import java.time.Instant;
import java.time.ZoneOffset;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.intake.Inbox;
import org.spikewright.intake.SettleRule;
import org.spikewright.testkit.Exports;
import org.spikewright.testkit.Laboratory;

class NightlySummaryTest {
  private static final Instant NOW = Instant.parse("2026-03-07T06:30:00Z");
  private static final Clock CLOCK = Clock.fixed(NOW, ZoneOffset.UTC);

  @TempDir Path folder;

  @Test
  void aLabDayThatCannotBeJudgedKeepsNoOtherFromBeingSummarised() throws Exception {
    Laboratory lab = new Laboratory(folder);
    lab.drop("bench/a.csv", Exports.of("BW-1"));
    lab.drop(
        "bench/b.csv",
        Exports.of("BW-2").replace("2026-03-04", "2026-03-05").replace(",Cd,0,", ",Cd,1,"));
    try (Station station = Stations.open(lab, CLOCK)) {
      Stop stop = new Stop();
      Inbox inbox = new Inbox(station.settings().watch(), new SettleRule(Duration.ZERO));
      Reception reception = new Reception(station, stop, Progress.none());
      new Round(inbox, reception::receive, new Filing(station, inbox), stop).run(NOW);
    }
    damageTheFirstFlask(lab.root().resolve("ledger/spikewright.db"));

    try (Station station = Stations.open(lab, CLOCK)) {
      NightlySummary summary = new NightlySummary(station, Progress.none(), new Stop());
      assertThatThrownBy(() -> summary.makeOwed(NOW, false)).isInstanceOf(RuntimeException.class);
    }

    assertThat(lab.files("summaries"))
        .containsExactly(
            "flasks-2026-03-05-r1.csv", "results-2026-03-05-r1.csv", "summary-2026-03-05-r1.xlsx");
    assertThat(Results.column(lab.text("summaries/results-2026-03-05-r1.csv"), "sample"))
        .containsExactly("BW-2");
  }

  private static void damageTheFirstFlask(Path ledger) throws Exception {
    try (Connection connection = DriverManager.getConnection("jdbc:sqlite:" + ledger);
        Statement statement = connection.createStatement()) {
      int damaged = statement.executeUpdate("UPDATE flask_facts SET content = 'x' WHERE id = 1");
      assertThat(damaged).isEqualTo(1);
    }
  }
}
