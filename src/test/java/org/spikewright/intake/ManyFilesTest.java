package org.spikewright.intake;

import static org.assertj.core.api.Assertions.assertThat;
import static org.spikewright.intake.Folder.AT_ONCE;
import static org.spikewright.intake.Folder.START;
import static org.spikewright.intake.Folder.TEN_SECONDS;
import static org.spikewright.intake.Folder.after;
import static org.spikewright.intake.Folder.put;

import java.nio.file.Files;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.Arrays;
import java.util.Locale;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Very many small files at once. Prints what it measured. */
@Tag("simulation")
class ManyFilesTest {
  private static final int LOOKED_AT = 100_000;
  private static final int FILED = 4_000;

  private static final LocalDate DAY = LocalDate.of(2025, 1, 15);

  @TempDir Path watched;

  @Test
  void aHundredThousandFilesAreLookedAtInLittleMemory() throws Exception {
    for (int i = 0; i < LOOKED_AT; i++) {
      Files.createFile(watched.resolve("run" + i + ".csv"));
    }
    Inbox inbox = new Inbox(watched, TEN_SECONDS);
    long first = time(() -> assertThat(inbox.look(START).settling()).hasSize(LOOKED_AT));
    Look[] ready = new Look[1];
    long second = time(() -> ready[0] = inbox.look(after(10)));
    System.gc();
    long used = (Runtime.getRuntime().totalMemory() - Runtime.getRuntime().freeMemory()) >> 20;
    System.out.printf(
        Locale.ROOT,
        "%d files: first look %d ms, second, with opening, %d ms; heap with inbox and look %d MB%n",
        LOOKED_AT,
        first,
        second,
        used);
    assertThat(ready[0].ready()).hasSize(LOOKED_AT);
    assertThat(used).as("MB").isLessThan(200);
  }

  @Test
  void timeToFileGrowsWithTheNumberOfFiles() throws Exception {
    for (int i = 0; i < FILED; i++) {
      put(watched, "run" + i + ".csv", "id,signal\n" + i + ",1\n");
    }
    Look look = new Inbox(watched, AT_ONCE).look(START);
    Archive archive = new Archive(watched);
    long[] quarters = new long[4];
    for (int quarter = 0; quarter < 4; quarter++) {
      int from = quarter * FILED / 4;
      quarters[quarter] =
          time(
              () -> {
                for (int i = from; i < from + FILED / 4; i++) {
                  file(archive, DAY, i, look.ready().get(i));
                }
              });
    }
    System.out.printf(
        Locale.ROOT, "%d files filed, ms a quarter: %s%n", FILED, Arrays.toString(quarters));
    assertThat(archive.journalOf(DAY)).hasSize(FILED);
    // Waiting for the disk takes most of it and varies; a quadratic step would show as 7 to 1.
    assertThat(quarters[3]).isLessThan(4 * (quarters[0] + quarters[1] + 1000));
  }

  private static void file(Archive archive, LocalDate day, int arrival, Sighting sighting)
      throws Exception {
    String sha256 = FileDigest.of(sighting.path());
    String target = archive.doneName(day, sighting.name(), name -> false);
    assertThat(archive.move(sighting.path(), sighting.fingerprint(), target))
        .isInstanceOf(Filed.Moved.class);
    archive.journal(day, new Journalled(arrival, sha256, sighting.name(), ""));
  }

  private interface Step {
    void run() throws Exception;
  }

  private static long time(Step step) throws Exception {
    long start = System.nanoTime();
    step.run();
    return (System.nanoTime() - start) / 1_000_000;
  }
}
