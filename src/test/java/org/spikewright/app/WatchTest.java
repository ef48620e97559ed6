package org.spikewright.app;

import static org.assertj.core.api.Assertions.assertThat;
import static org.awaitility.Awaitility.await;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Random;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.testkit.Exports;
import org.spikewright.testkit.Laboratory;
import org.spikewright.testkit.Program;

/** The daemon as a process that is watched from outside, told to end, and killed. */
class WatchTest {
  private static final Duration PATIENCE = Duration.ofSeconds(30);
  private static final Duration STOPS_WITHIN = Duration.ofSeconds(10);
  private static final int TOLD_TO_END = 143;

  @TempDir Path folder;
  private Laboratory lab;

  @BeforeEach
  void makeLaboratory() {
    lab = new Laboratory(folder.resolve("lab"));
  }

  private static void awaitSaid(Program program, String text) {
    await()
        .atMost(PATIENCE)
        .pollInterval(Duration.ofMillis(20))
        .untilAsserted(() -> assertThat(program.err()).contains(text));
  }

  @Test
  void aDayOfTheDaemon() throws Exception {
    try (Program daemon = Program.start(List.of(), "watch", "--conf", lab.conf())) {
      awaitSaid(daemon, "watching folder=");
      lab.drop("bench/good.csv", Exports.of("BW-1"));
      lab.drop("bench/broken.csv", "");
      writeSlowly(lab.inbox().resolve("bench/slow.csv"), Exports.of("BW-2"));
      awaitSaid(daemon, "read file=bench/slow.csv readings=8 refused_rows=0");
      await().atMost(PATIENCE).until(() -> lab.done().contains("bench/slow.csv"));

      assertThat(lab.done()).containsExactly("bench/good.csv", "bench/slow.csv");
      assertThat(lab.rejected("bench/broken.csv.reason.txt")).exists();
      assertThat(lab.doneText("bench/slow.csv")).isEqualTo(Exports.of("BW-2"));
      othersAreTurnedAway(daemon.pid());
      assertThat(InProcess.run("results", "--conf", lab.conf()).code()).isEqualTo(ExitCode.DONE);

      daemon.terminate();
      Program.Ended ended = daemon.ended(STOPS_WITHIN);

      assertThat(ended.code()).isEqualTo(TOLD_TO_END);
      assertThat(ended.err()).contains("stopped").doesNotContain("did not stop in time");
    }
    assertThat(InProcess.once(lab.conf()).code()).isEqualTo(ExitCode.DONE);
    assertThat(Results.column(InProcess.results(lab.conf()), "sample"))
        .containsExactly("BW-1", "BW-2");
  }

  private void othersAreTurnedAway(long pid) {
    for (String command : List.of("watch", "once")) {
      Program.Ended second = Program.run(command, "--conf", lab.conf());
      assertThat(second.code()).as(command).isEqualTo(ExitCode.OTHER_OWNER);
      assertThat(second.err())
          .contains("belongs to process " + pid + " on ", "stop that one first");
    }
  }

  /** Piece by piece, with pauses shorter than the settle time; longer in all than several of it. */
  private static void writeSlowly(Path file, String text) throws Exception {
    int piece = text.length() / 12 + 1;
    for (int from = 0; from < text.length(); from += piece) {
      Files.writeString(
          file,
          text.substring(from, Math.min(text.length(), from + piece)),
          StandardOpenOption.CREATE,
          StandardOpenOption.APPEND);
      Thread.sleep(100);
    }
  }

  @Test
  void toldToEndWhileItReadsALargeFileItEndsInTimeAndTheFileIsWhole() throws IOException {
    String large = manyReadings("BW-", 10, 8000);
    lab.drop("bench/a-small.csv", Exports.of("BW-X"));
    try (Program daemon = Program.start(List.of(), "watch", "--conf", lab.conf())) {
      awaitSaid(daemon, "read file=bench/a-small.csv");
      lab.drop("bench/large.csv", large);
      awaitSaid(daemon, "arrived file=bench/large.csv");

      daemon.terminate();
      Program.Ended ended = daemon.ended(STOPS_WITHIN);

      assertThat(ended.code()).isEqualTo(TOLD_TO_END);
      assertThat(ended.err()).contains("stopped");
      boolean read = ended.err().contains("read file=bench/large.csv");
      assertThat(read ? lab.doneText("bench/large.csv") : lab.text("inbox/bench/large.csv"))
          .isEqualTo(large);
      assertThat(lab.done().contains("bench/large.csv")).isEqualTo(read);
    }
    InProcess.once(lab.conf());
    assertThat(lab.done()).containsExactly("bench/a-small.csv", "bench/large.csv");
    assertThat(
            Results.column(InProcess.results(lab.conf()), "readings").stream()
                .mapToInt(Integer::parseInt)
                .sum())
        .isEqualTo(80_000 + 8);
  }

  @Test
  void onceIsToldToEndWhileItWaitsForAFileToSettle() throws IOException {
    Files.createSymbolicLink(lab.inbox().resolve("link.csv"), folder);
    lab.drop("bench/run.csv", Exports.of("BW-1"));
    try (Program once = Program.start(List.of(), "once", "--settle", "1h", "--conf", lab.conf())) {
      // Told of at its first look.
      awaitSaid(once, "is a link");
      once.terminate();

      Program.Ended ended = once.ended(STOPS_WITHIN);

      assertThat(ended.code()).isEqualTo(TOLD_TO_END);
      assertThat(ended.out()).contains("stopped before the end");
    }
    assertThat(lab.inbox().resolve("bench/run.csv")).hasContent(Exports.of("BW-1"));
  }

  /** An export of few series with very many readings each. */
  private static String manyReadings(String stem, int samples, int readings) {
    StringBuilder text = new StringBuilder(Exports.HEADER).append('\n');
    for (int sample = 0; sample < samples; sample++) {
      for (int reading = 0; reading < readings; reading++) {
        int added = 5 * (reading % 4);
        text.append(stem).append(sample).append(",Cd,").append(added).append(",0.");
        text.append(10000 + 2000 * added + 37 * reading % 101).append(',');
        text.append(Exports.DAY.atTime(9, 0).plusNanos(1_000_000L * reading)).append('\n');
      }
    }
    return text.toString();
  }

  @Test
  void killedAtAnyMomentItLosesNothingAndCountsNothingTwice() {
    long seed = 20260304;
    Random random = new Random(seed);
    Laboratory undisturbed = new Laboratory(folder.resolve("undisturbed"));
    List<String> names = new ArrayList<>();
    int killedAtWork = 0;
    for (int kill = 0; kill < 6; kill++) {
      for (int i = 0; i < 8; i++) {
        String name = "bench/run" + kill + "-" + i + ".csv";
        String export = manyReadings("BW-" + kill + "-" + i + "-", 2, 200);
        names.add(name);
        lab.drop(name, export);
        undisturbed.drop(name, export);
      }
      String[] command =
          kill % 2 == 0
              ? new String[] {"watch", "--conf", lab.conf()}
              : new String[] {"once", "--settle", "0s", "--conf", lab.conf()};
      try (Program program = Program.start(List.of(), command)) {
        awaitSaid(program, "arrived file=");
        sleep(random.nextInt(kill % 2 == 0 ? 150 : 800));
        boolean running = program.isRunning();
        program.kill();
        boolean atWork = running && !program.err().contains("summary written") && kill % 2 == 1;
        atWork |= lab.files("inbox").stream().anyMatch(name -> name.startsWith("bench/"));
        killedAtWork += atWork ? 1 : 0;
      }
    }

    Program.Ended ended = InProcess.once(lab.conf());

    InProcess.once(undisturbed.conf());
    assertThat(ended.code()).as("seed %d: %s", seed, ended).isEqualTo(ExitCode.DONE);
    assertThat(InProcess.results(lab.conf()))
        .as("seed %d", seed)
        .isEqualTo(InProcess.results(undisturbed.conf()));
    assertThat(lab.done()).as("seed %d", seed).containsExactlyElementsOf(names);
    assertThat(lab.files("inbox").stream().filter(name -> !name.startsWith("done/"))).isEmpty();
    assertThat(killedAtWork).as("kills at work").isPositive();
  }

  private static void sleep(long millis) {
    try {
      Thread.sleep(millis);
    } catch (InterruptedException interrupted) {
      throw new IllegalStateException(interrupted);
    }
  }

  @Test
  void memoryUsedUpEndsTheProcessAsAFault() {
    try (Program program = Program.start(List.of(), UsedUp.class.getName(), Map.of(), "planted")) {
      Program.Ended ended = program.ended(STOPS_WITHIN);

      assertThat(ended.code()).isEqualTo(ExitCode.FAULT);
      assertThat(ended.err()).contains("OutOfMemoryError", "not to be trusted");
    }
  }
}
