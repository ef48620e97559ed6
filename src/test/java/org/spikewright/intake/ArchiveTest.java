package org.spikewright.intake;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.junit.jupiter.api.Assumptions.assumeTrue;
import static org.spikewright.intake.Folder.contents;
import static org.spikewright.intake.Folder.exists;
import static org.spikewright.intake.Folder.put;

import java.io.IOException;
import java.nio.file.FileSystemException;
import java.nio.file.Files;
import java.nio.file.LinkOption;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.nio.file.attribute.FileTime;
import java.time.Instant;
import java.time.LocalDate;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class ArchiveTest {
  private static final LocalDate DAY = LocalDate.of(2025, 1, 15);
  private static final String TARGET = "done/2025-01-15/run7.csv";

  @TempDir Path watched;
  Archive archive;

  @BeforeEach
  void open() {
    archive = new Archive(watched);
  }

  private static Fingerprint print(Path file) throws IOException {
    return Fingerprint.of(file).orElseThrow();
  }

  @Test
  void aFileIsMovedWithItsBytesAndTime() throws IOException {
    Path file = put(watched, "run7.csv", "a");
    Files.setLastModifiedTime(file, FileTime.from(Instant.parse("1969-07-20T20:17:40Z")));
    Fingerprint before = print(file);

    assertThat(archive.move(file, before, TARGET))
        .isEqualTo(new Filed.Moved(watched.resolve(TARGET)));

    assertThat(contents(watched)).isEqualTo(Map.of(TARGET, "a"));
    assertThat(print(watched.resolve(TARGET))).isEqualTo(before);
  }

  @Test
  void aFileThatChangedAfterItWasReadStays() throws IOException {
    Path file = put(watched, "run7.csv", "a");
    Fingerprint before = print(file);
    Files.writeString(file, "longer");

    assertThat(archive.move(file, before, TARGET)).isInstanceOf(Filed.Withdrawn.class);
    assertThat(contents(watched)).isEqualTo(Map.of("run7.csv", "longer"));

    Files.delete(file);
    assertThat(archive.move(file, before, TARGET)).isInstanceOf(Filed.Withdrawn.class);
  }

  @Test
  void nothingInTheArchiveIsEverOverwritten() throws IOException {
    Path file = put(watched, "run7.csv", "new");
    put(watched, TARGET, "old");

    assertThat(archive.move(file, print(file), TARGET)).isInstanceOf(Filed.Occupied.class);
    assertThat(contents(watched)).isEqualTo(Map.of(TARGET, "old", "run7.csv", "new"));
    assertThat(archive.resume(file, FileDigest.of(file), TARGET))
        .isInstanceOf(Filed.Occupied.class);
    assertThat(contents(watched)).isEqualTo(Map.of(TARGET, "old", "run7.csv", "new"));
  }

  /** Swaps the source for another file at the last moment before a step. */
  private static Disk swapping(String step, Path file, boolean twoDisks) {
    return new DyingDisk(0, twoDisks) {
      @Override
      void before(String next) {
        super.before(next);
        if (next.equals(step)) {
          try {
            Path other = put(file.getParent(), ".other", "another content");
            Files.move(other, file, StandardCopyOption.ATOMIC_MOVE);
          } catch (IOException trouble) {
            throw new IllegalStateException(trouble);
          }
        }
      }
    };
  }

  @Test
  void aFileThatTakesTheNameAtTheLastMomentGoesBack() throws IOException {
    Path file = put(watched, "run7.csv", "a");
    Fingerprint before = print(file);
    Archive raced = new Archive(watched, swappingOnce("rename", file, false));

    assertThat(raced.move(file, before, TARGET)).isInstanceOf(Filed.Withdrawn.class);
    assertThat(contents(watched)).isEqualTo(Map.of("run7.csv", "another content"));
  }

  @Test
  void aFileReplacedWhileItIsCopiedToAnotherDiskIsNotFiled() throws IOException {
    Path file = put(watched, "run7.csv", "a");
    Fingerprint before = print(file);
    Archive raced = new Archive(watched, swapping("sync file", file, true));

    assertThat(raced.move(file, before, TARGET)).isInstanceOf(Filed.Withdrawn.class);
    assertThat(contents(watched)).isEqualTo(Map.of("run7.csv", "another content"));
  }

  @Test
  void aFileReplacedBeforeItsRemovalAfterACopyStaysAsANewDelivery() throws IOException {
    Path file = put(watched, "run7.csv", "a");
    Fingerprint before = print(file);
    Archive raced = new Archive(watched, swappingOnce("rename", file, true));

    assertThat(raced.move(file, before, TARGET)).isInstanceOf(Filed.Moved.class);
    assertThat(contents(watched)).isEqualTo(Map.of(TARGET, "a", "run7.csv", "another content"));
  }

  private static Disk swappingOnce(String step, Path file, boolean twoDisks) {
    boolean[] swapped = new boolean[1];
    Disk swapping = swapping(step, file, twoDisks);
    return new DyingDisk(0, twoDisks) {
      @Override
      void before(String next) {
        if (next.equals(step) && !swapped[0]) {
          swapped[0] = true;
          swapping.before(next);
        }
      }
    };
  }

  @Test
  void anArchiveOnAnotherDiskIsCopiedTo() throws IOException {
    Path other = secondDisk();
    try {
      Files.createSymbolicLink(watched.resolve("done"), other);
      Path file = put(watched, "run7.csv", "a".repeat(200_000));
      FileTime time = FileTime.from(Instant.parse("2024-12-24T18:00:00.123Z"));
      Files.setLastModifiedTime(file, time);

      assertThat(archive.move(file, print(file), TARGET)).isInstanceOf(Filed.Moved.class);

      assertThat(exists(file)).isFalse();
      assertThat(contents(other)).isEqualTo(Map.of("2025-01-15/run7.csv", "a".repeat(200_000)));
      assertThat(Files.getLastModifiedTime(other.resolve("2025-01-15/run7.csv"))).isEqualTo(time);
      assertThat(archive.hasFiles()).isTrue();
    } finally {
      Files.deleteIfExists(other.resolve("2025-01-15/run7.csv"));
      Files.deleteIfExists(other.resolve("2025-01-15"));
      Files.delete(other);
    }
  }

  private Path secondDisk() throws IOException {
    Path memory = Path.of("/dev/shm");
    boolean there =
        Files.isWritable(memory) && !Files.getFileStore(memory).equals(Files.getFileStore(watched));
    assumeTrue(there, "no second file system at /dev/shm");
    return Files.createTempDirectory(memory, "second-disk");
  }

  @Test
  void aFullDiskLeavesTheFileWhereItIsAndNothingHalfBeside() throws IOException {
    Path file = put(watched, "run7.csv", "a");
    boolean[] full = {true};
    Disk disk =
        new DyingDisk(0, true) {
          @Override
          void copy(Path from, Path to, FileTime modified) throws IOException {
            if (full[0]) {
              Files.writeString(to, "ha");
              throw new FileSystemException(to.toString(), null, "No space left on device");
            }
            super.copy(from, to, modified);
          }
        };
    Archive small = new Archive(watched, disk);

    assertThat(small.move(file, print(file), TARGET))
        .isEqualTo(new Filed.Failed("No space left on device"));
    assertThat(contents(watched)).isEqualTo(Map.of("run7.csv", "a"));

    full[0] = false;
    assertThat(small.move(file, print(file), TARGET)).isInstanceOf(Filed.Moved.class);
    assertThat(contents(watched)).isEqualTo(Map.of(TARGET, "a"));
  }

  @Test
  void anUnmountedShareDoesNotGetAnArchiveOfItsOwn() throws IOException {
    Path file = put(watched, "run7.csv", "a");
    Fingerprint before = print(file);
    Files.delete(file);

    archive.move(file, before, TARGET);
    archive.refuse(file, before, "rejected/run7.csv", "no rows");
    archive.resume(file, "0".repeat(64), TARGET);

    try (var left = Files.list(watched)) {
      assertThat(left).isEmpty();
    }
  }

  @Test
  void aLinkBelowTheArchiveIsNotFollowed() throws IOException {
    Path elsewhere = Files.createDirectory(watched.resolve("elsewhere"));
    Files.createDirectory(watched.resolve("done"));
    Files.createSymbolicLink(watched.resolve("done/2025-01-15"), elsewhere);
    Path file = put(watched, "run7.csv", "a");

    assertThat(archive.move(file, print(file), TARGET))
        .isEqualTo(new Filed.Failed("it is not a folder"));
    assertThat(contents(elsewhere)).isEmpty();
  }

  @Test
  void aFileDoesNotGoToRejectedWithoutAReason() throws IOException {
    Path file = put(watched, "run7.csv", "a");
    Fingerprint before = print(file);
    assertThatThrownBy(() -> archive.move(file, before, "rejected/run7.csv"))
        .isInstanceOf(IllegalStateException.class)
        .hasMessageContaining("no reason");
  }

  @Test
  void theReasonOfAFileThatWasWithdrawnIsTakenAway() throws IOException {
    Path file = put(watched, "run7.csv", "a");
    Fingerprint before = print(file);
    Files.writeString(file, "mended");

    assertThat(archive.refuse(file, before, "rejected/run7.csv", "no rows"))
        .isInstanceOf(Filed.Withdrawn.class);
    assertThat(contents(watched)).isEqualTo(Map.of("run7.csv", "mended"));
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "run7.csv",
        "done",
        "done/../run7.csv",
        "/etc/passwd",
        "rejected/../../x",
        "done/./x"
      })
  void aTargetOutsideTheArchiveIsABrokenPromise(String target) {
    assertThatThrownBy(() -> archive.at(target))
        .isInstanceOf(IllegalArgumentException.class)
        .hasMessageContaining("outside the archive");
  }

  @Test
  void aTextBesideAFileIsWrittenLineByLineAndReplaced() throws IOException {
    archive.note(TARGET, Beside.ROWS, List.of("line 12: 'n.a.'", "µg"));
    archive.note(TARGET, Beside.ROWS, "line 13\r\nline 14");
    String end = System.lineSeparator();
    assertThat(contents(watched))
        .isEqualTo(Map.of(TARGET + ".rows.txt", "line 13" + end + "line 14" + end));
  }

  @Test
  void onlyFilesInDoneTellOfAnEarlierLife() throws IOException {
    assertThat(archive.hasFiles()).isFalse();
    put(watched, "rejected/run1.csv", "a");
    Files.createDirectories(watched.resolve("done/2025-01-15/furnace"));
    assertThat(archive.hasFiles()).isFalse();
    put(watched, "done/2025-01-16/furnace/run7.csv", "a");
    Files.createDirectory(watched.resolve("done/notes"));
    assertThat(archive.hasFiles()).isTrue();
    assertThat(archive.days()).containsExactly(DAY, LocalDate.of(2025, 1, 16));
  }

  @Test
  void aDamagedJournalSaysWhere() throws IOException {
    put(watched, "done/2025-01-15/spikewright-journal.csv", "arrival\n");
    assertThatThrownBy(() -> archive.journalOf(DAY))
        .isInstanceOf(IOException.class)
        .hasMessageContaining("spikewright-journal.csv line 1 is damaged");
    assertThat(archive.journalOf(LocalDate.of(2025, 1, 16))).isEmpty();
  }

  @Test
  void aDigestIsOfTheBytesAndOfRegularFilesOnly() throws IOException {
    assertThat(FileDigest.of(put(watched, "abc", "abc")))
        // FIPS 180-2, appendix B.1
        .isEqualTo("ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
    assertThatThrownBy(() -> FileDigest.of(watched)).hasMessageContaining("not a regular file");
    Files.createSymbolicLink(watched.resolve("link"), watched.resolve("abc"));
    assertThatThrownBy(() -> FileDigest.of(watched.resolve("link")))
        .hasMessageContaining("not a regular file");
    assertThat(Fingerprint.of(watched.resolve("link"))).isEqualTo(Optional.empty());
    assertThat(Files.isSymbolicLink(watched.resolve("link"))).isTrue();
    assertThat(Files.exists(watched.resolve("nothing"), LinkOption.NOFOLLOW_LINKS)).isFalse();
    assertThatThrownBy(() -> FileDigest.of(watched.resolve("nothing")))
        .isInstanceOf(IOException.class);
  }
}
