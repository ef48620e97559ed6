package org.spikewright.app;

import static org.assertj.core.api.Assertions.assertThat;
import static org.awaitility.Awaitility.await;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.testkit.Exports;
import org.spikewright.testkit.Laboratory;
import org.spikewright.testkit.LogLines;
import org.spikewright.testkit.SetClock;

/** The daemon in the test's own process, with a clock that the test sets. */
class DaemonTest {
  private static final Duration CHECK = Duration.ofMillis(100);
  private static final Duration PATIENCE = Duration.ofSeconds(20);

  @TempDir Path folder;
  private final SetClock clock = new SetClock(Instant.parse("2026-03-05T06:29:00Z"));
  private final LogLines log = LogLines.collect();
  private Laboratory lab;
  private Daemon daemon;
  private Thread thread;

  @BeforeEach
  void makeLaboratory() {
    lab = new Laboratory(folder);
  }

  @AfterEach
  void stop() throws InterruptedException {
    try {
      daemon.stop();
      thread.join(PATIENCE.toMillis());
      assertThat(thread.isAlive()).isFalse();
    } finally {
      log.close();
    }
  }

  private void start() {
    daemon = new Daemon(Stations.open(lab, clock), CHECK);
    thread =
        new Thread(
            () -> {
              try {
                daemon.run();
              } catch (InterruptedException interrupted) {
                Thread.currentThread().interrupt();
              }
            },
            "daemon under test");
    thread.start();
  }

  private void awaitDone(String... names) {
    await().atMost(PATIENCE).untilAsserted(() -> assertThat(lab.done()).contains(names));
  }

  private void awaitSummaries(String... names) {
    await()
        .atMost(PATIENCE)
        .untilAsserted(() -> assertThat(lab.files("summaries")).containsExactly(names));
  }

  @Test
  void theNightsResultsAreInTheNextSummaryAndNotBefore() {
    start();
    lab.drop("bench/run.csv", Exports.of("BW-1", "BW-2"));
    lab.drop("bench/broken.csv", "");
    awaitDone("bench/run.csv");
    await()
        .atMost(PATIENCE)
        .untilAsserted(() -> assertThat(lab.rejected("bench/broken.csv.reason.txt")).exists());
    assertThat(lab.files("summaries")).isEmpty();

    clock.set(Instant.parse("2026-03-05T06:30:05Z"));

    awaitSummaries(
        "flasks-2026-03-04-r1.csv", "results-2026-03-04-r1.csv", "summary-2026-03-04-r1.xlsx");
    await().atMost(PATIENCE).until(() -> !log.with("summary written").isEmpty());
    assertThat(Results.column(lab.text("summaries/results-2026-03-04-r1.csv"), "sample"))
        .containsExactly("BW-1", "BW-2");
    // Nothing new by the next nightly time, but for the refusal of the day that has closed since.
    clock.set(Instant.parse("2026-03-06T06:30:05Z"));
    await().atMost(PATIENCE).until(() -> lab.files("summaries").size() == 6);
    clock.set(Instant.parse("2026-03-07T06:30:05Z"));
    await().during(CHECK.multipliedBy(5)).until(() -> lab.files("summaries").size() == 6);
    assertThat(lab.files("summaries")).noneMatch(name -> name.contains("-r2"));
  }

  @Test
  void aSummaryThatCannotBeWrittenIsSaidOnceAndIssuedFromTheSameVersionsWhenItCan()
      throws IOException {
    start();
    lab.drop("bench/run.csv", Exports.of("BW-1"));
    awaitDone("bench/run.csv");
    Files.delete(lab.summaries());
    Files.writeString(lab.summaries(), "not a folder");

    clock.set(Instant.parse("2026-03-05T06:30:05Z"));
    await().atMost(PATIENCE).until(() -> !log.with("cannot be written").isEmpty());
    lab.drop("bench/later.csv", Exports.of("BW-2"));
    awaitDone("bench/later.csv");
    await().during(CHECK.multipliedBy(5)).until(() -> log.with("cannot be written").size() == 1);
    assertThat(log.with("cannot be written").get(0))
        .contains("results-2026-03-04-r1.csv", "will be tried again");

    Files.delete(lab.summaries());
    Files.createDirectory(lab.summaries());

    awaitSummaries(
        "flasks-2026-03-04-r1.csv", "results-2026-03-04-r1.csv", "summary-2026-03-04-r1.xlsx");
    await().atMost(PATIENCE).until(() -> !log.with("over: the summary").isEmpty());
    assertThat(Results.column(lab.text("summaries/results-2026-03-04-r1.csv"), "sample"))
        .containsExactly("BW-1");
    assertThat(lab.text("summaries/flasks-2026-03-04-r1.csv"))
        .contains("BW-1")
        .doesNotContain("BW-2");

    clock.set(Instant.parse("2026-03-06T06:30:05Z"));
    await()
        .atMost(PATIENCE)
        .until(() -> lab.files("summaries").contains("summary-2026-03-04-r2.xlsx"));
    assertThat(Results.column(lab.text("summaries/results-2026-03-04-r2.csv"), "sample"))
        .containsExactly("BW-1", "BW-2");
  }

  @Test
  void filesThatOnlyAFaultyMappingMayClaimWaitAndAreSaidOnce() {
    lab.write("mappings/furnace.toml", "name = \"furnace\"\nfiles = 7\n");
    start();
    lab.drop("furnace/run.csv", Exports.of("BW-1"));
    lab.drop("bench/run.csv", Exports.of("BW-2"));
    awaitDone("bench/run.csv");
    await().atMost(PATIENCE).until(() -> !log.with("waiting file=furnace/run.csv").isEmpty());

    await()
        .during(Duration.ofSeconds(1))
        .until(() -> log.with("furnace/run.csv").equals(log.with("waiting file=furnace/run.csv")));

    assertThat(log.with("furnace/run.csv")).hasSize(1);
    assertThat(log.with("furnace/run.csv").get(0)).contains("furnace.toml", "faulty");
    assertThat(lab.inbox().resolve("furnace/run.csv")).exists();
  }
}
