package org.spikewright.intake;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.fail;
import static org.spikewright.intake.Folder.contents;
import static org.spikewright.intake.Folder.put;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** The program dies before every step that changes the disk, in turn, and starts again. */
class ArchiveCrashTest {
  private static final LocalDate DAY = LocalDate.of(2025, 1, 15);
  private static final String DONE = "done/2025-01-15/furnace/run7.csv";
  private static final String REFUSED = "rejected/furnace/run7.csv";
  private static final String CONTENT = "id,signal\n".repeat(20_000);
  private static final int ENOUGH = 100;

  @TempDir Path parent;

  /** What is done to the archive, on a given disk. */
  private interface Work {
    void on(Archive archive, Path file, Fingerprint fingerprint) throws IOException;
  }

  /** What is looked at after each death and restart. */
  private interface Check {
    void of(Path watched, Path file, String point) throws IOException;
  }

  private int sweep(boolean twoDisks, Work work, Check check) throws IOException {
    for (int step = 1; step < ENOUGH; step++) {
      Path watched = Files.createDirectory(parent.resolve("inbox" + step));
      Path file = put(watched, "furnace/run7.csv", CONTENT);
      DyingDisk disk = new DyingDisk(step, twoDisks);
      boolean died = false;
      try {
        work.on(new Archive(watched, disk), file, Fingerprint.of(file).orElseThrow());
      } catch (DyingDisk.Died expected) {
        died = true;
      }
      check.of(watched, file, "died before step " + step + " of " + disk.steps);
      if (!died) {
        return step - 1;
      }
    }
    return fail("never came to its end");
  }

  private static void nothingHalf(Path watched, String point) throws IOException {
    contents(watched)
        .forEach(
            (name, content) -> {
              if (!name.contains("/.") && name.endsWith("run7.csv")) {
                assertThat(content).as("%s: %s", point, name).isEqualTo(CONTENT);
              }
            });
  }

  @ParameterizedTest
  @ValueSource(booleans = {false, true})
  void aMoveIsFinishedAfterwardsByContent(boolean twoDisks) throws IOException {
    String sha256 = FileDigest.of(put(parent, "same.csv", CONTENT));
    int points =
        sweep(
            twoDisks,
            (archive, file, print) -> archive.move(file, print, DONE),
            (watched, file, point) -> {
              nothingHalf(watched, point);
              assertThat(contents(watched)).as(point).containsValue(CONTENT);
              Filed filed =
                  new Archive(watched, new DyingDisk(0, twoDisks)).resume(file, sha256, DONE);
              assertThat(filed).as(point).isInstanceOf(Filed.Moved.class);
              assertThat(contents(watched)).as(point).isEqualTo(Map.of(DONE, CONTENT));
            });
    assertThat(points).isGreaterThanOrEqualTo(twoDisks ? 17 : 9);
  }

  @ParameterizedTest
  @ValueSource(booleans = {false, true})
  void aMoveIsFinishedAfterwardsByTheSameCall(boolean twoDisks) throws IOException {
    Fingerprint[] expected = new Fingerprint[1];
    sweep(
        twoDisks,
        (archive, file, print) -> {
          expected[0] = print;
          archive.move(file, print, DONE);
        },
        (watched, file, point) -> {
          Archive again = new Archive(watched, new DyingDisk(0, twoDisks));
          assertThat(again.move(file, expected[0], DONE)).as(point).isInstanceOf(Filed.Moved.class);
          assertThat(contents(watched)).as(point).isEqualTo(Map.of(DONE, CONTENT));
        });
  }

  @ParameterizedTest
  @ValueSource(booleans = {false, true})
  void aNewFileUnderTheNameDuringTheOutageIsNeitherLostNorTakenForTheOld(boolean twoDisks)
      throws IOException {
    String sha256 = FileDigest.of(put(parent, "same.csv", CONTENT));
    sweep(
        twoDisks,
        (archive, file, print) -> archive.move(file, print, DONE),
        (watched, file, point) -> {
          boolean overwritten = Folder.exists(file);
          put(watched, "furnace/other.csv", "new content");
          Files.move(
              watched.resolve("furnace/other.csv"),
              file,
              java.nio.file.StandardCopyOption.REPLACE_EXISTING);
          Filed filed = new Archive(watched, new DyingDisk(0, twoDisks)).resume(file, sha256, DONE);
          assertThat(contents(watched).values()).as(point).contains("new content");
          boolean arrived = Folder.exists(watched.resolve(DONE));
          assertThat(filed instanceof Filed.Moved).as(point).isEqualTo(arrived);
          if (arrived) {
            assertThat(contents(watched))
                .as(point)
                .isEqualTo(Map.of(DONE, CONTENT, "furnace/run7.csv", "new content"));
          } else {
            assertThat(filed).as(point).isInstanceOf(Filed.Withdrawn.class);
            // The old content is on the disk still, unless the writer wrote over it himself.
            boolean kept = contents(watched).containsValue(CONTENT);
            assertThat(kept || overwritten).as(point).isTrue();
          }
        });
  }

  @ParameterizedTest
  @ValueSource(booleans = {false, true})
  void aRefusedFileIsNeverSeenWithoutItsReason(boolean twoDisks) throws IOException {
    String sha256 = FileDigest.of(put(parent, "same.csv", CONTENT));
    int points =
        sweep(
            twoDisks,
            (archive, file, print) -> archive.refuse(file, print, REFUSED, "no column 'Conc'"),
            (watched, file, point) -> {
              nothingHalf(watched, point);
              Map<String, String> left = contents(watched);
              if (left.containsKey(REFUSED)) {
                assertThat(left).as(point).containsEntry(REFUSED + ".reason.txt", reason());
              }
              Filed filed =
                  new Archive(watched, new DyingDisk(0, twoDisks))
                      .resumeRefusal(file, sha256, REFUSED, "no column 'Conc'");
              assertThat(filed).as(point).isInstanceOf(Filed.Moved.class);
              Map<String, String> whole = new TreeMap<>();
              whole.put(REFUSED, CONTENT);
              whole.put(REFUSED + ".reason.txt", reason());
              assertThat(contents(watched)).as(point).isEqualTo(whole);
            });
    assertThat(points).isGreaterThanOrEqualTo(twoDisks ? 20 : 12);
  }

  private static String reason() {
    return "no column 'Conc'" + System.lineSeparator();
  }

  @Test
  void theJournalHoldsEachArrivalOnce() throws IOException {
    Journalled first = new Journalled(1, "0".repeat(64), "furnace/run6.csv", "1".repeat(64));
    Journalled second = new Journalled(2, "a".repeat(64), "furnace/run7.csv", "");
    int points =
        sweep(
            false,
            (archive, file, print) -> {
              Files.createDirectories(file.getParent().resolveSibling("done/2025-01-15"));
              archive.journal(DAY, first);
              archive.journal(DAY, second);
            },
            (watched, file, point) -> {
              Archive again = new Archive(watched);
              again.journal(DAY, first);
              again.journal(DAY, second);
              again.journal(DAY, first);
              assertThat(again.journalOf(DAY)).as(point).isEqualTo(List.of(first, second));
            });
    assertThat(points).isEqualTo(7);
  }

  @Test
  void aTornLineOfTheJournalIsCutAtAnyByte() throws IOException {
    Path folder = Files.createDirectories(parent.resolve("inbox/done/2025-01-15"));
    Archive archive = new Archive(parent.resolve("inbox"));
    Journalled first = new Journalled(1, "0".repeat(64), "a \"quoted\", name.csv", "");
    Journalled second = new Journalled(12, "1".repeat(64), "b.csv", "2".repeat(64));
    archive.journal(DAY, first);
    archive.journal(DAY, second);
    byte[] whole = Files.readAllBytes(folder.resolve("spikewright-journal.csv"));
    for (int length = 0; length <= whole.length; length++) {
      Files.write(
          folder.resolve("spikewright-journal.csv"), java.util.Arrays.copyOf(whole, length));
      Archive again = new Archive(parent.resolve("inbox"));
      again.journal(DAY, first);
      again.journal(DAY, second);
      assertThat(again.journalOf(DAY)).as("cut at %d", length).isEqualTo(List.of(first, second));
    }
  }
}
