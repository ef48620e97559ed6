package org.spikewright.intake;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.spikewright.intake.Folder.AT_ONCE;
import static org.spikewright.intake.Folder.START;
import static org.spikewright.intake.Folder.TEN_SECONDS;
import static org.spikewright.intake.Folder.after;
import static org.spikewright.intake.Folder.names;
import static org.spikewright.intake.Folder.put;

import java.io.RandomAccessFile;
import java.nio.file.AccessDeniedException;
import java.nio.file.FileSystemException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.nio.file.StandardOpenOption;
import java.nio.file.attribute.FileTime;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class InboxTest {
  @TempDir Path watched;

  @Test
  void aFileIsReadyOnceItHeldStillForTheSettleTime() {
    put(watched, "run7.csv", "a");
    Inbox inbox = new Inbox(watched, TEN_SECONDS);

    assertThat(inbox.look(START).settling()).hasSize(1);
    assertThat(inbox.look(after(9)).ready()).isEmpty();
    assertThat(names(inbox.look(after(10)).ready())).containsExactly("run7.csv");
    assertThat(names(inbox.look(after(15)).ready())).containsExactly("run7.csv");
  }

  @Test
  void aSlowWriterIsWaitedForHoweverLongItTakes() throws Exception {
    Path file = put(watched, "run7.csv", "");
    Inbox inbox = new Inbox(watched, TEN_SECONDS);
    for (int second = 0; second < 300; second += 5) {
      Files.writeString(file, "line\n", StandardOpenOption.APPEND);
      assertThat(inbox.look(after(second)).ready()).as("second %d", second).isEmpty();
    }
    assertThat(inbox.look(after(304)).ready()).isEmpty();
    assertThat(inbox.look(after(305)).ready()).hasSize(1);
  }

  @Test
  void aWriterThatPausesLongerThanTheSettleTimeIsTakenAndThenSeenAnew() throws Exception {
    Path file = put(watched, "run7.csv", "half");
    Inbox inbox = new Inbox(watched, TEN_SECONDS);
    inbox.look(START);
    Sighting half = inbox.look(after(10)).ready().get(0);
    inbox.handled(half);

    Files.writeString(file, "other half", StandardOpenOption.APPEND);

    assertThat(inbox.look(after(15)).settling()).hasSize(1);
    assertThat(inbox.look(after(25)).ready()).hasSize(1).doesNotContain(half);
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "1970-01-01T00:00:00Z",
        "1969-07-20T20:17:40Z",
        "1901-12-14T00:00:00Z",
        "2020-01-01T00:00:00Z",
        "2037-12-31T00:00:00Z",
        "2099-01-01T00:00:00Z"
      })
  void aFileSettlesByChangeAndNotByItsAge(Instant age) throws Exception {
    Path file = put(watched, "run7.csv", "a");
    Inbox inbox = new Inbox(watched, TEN_SECONDS);
    for (int second = 0; second < 30; second += 5) {
      Files.writeString(file, "more", StandardOpenOption.APPEND);
      Files.setLastModifiedTime(file, FileTime.from(age));
      assertThat(inbox.look(after(second)).ready()).isEmpty();
    }
    assertThat(inbox.look(after(36)).ready()).hasSize(1);
  }

  @Test
  void aFileThatHasItsFullSizeAtOnceIsWaitedForWhileItIsFilled() throws Exception {
    Path file = watched.resolve("run7.csv");
    try (RandomAccessFile writer = new RandomAccessFile(file.toFile(), "rw")) {
      writer.setLength(40);
      Inbox inbox = new Inbox(watched, TEN_SECONDS);
      for (int i = 0; i < 8; i++) {
        writer.seek(5L * i);
        writer.write("12.5\n".getBytes(java.nio.charset.StandardCharsets.US_ASCII));
        Files.setLastModifiedTime(file, FileTime.from(after(i)));
        assertThat(inbox.look(after(8L * i)).ready()).isEmpty();
      }
      assertThat(inbox.look(after(70)).ready()).hasSize(1);
    }
  }

  @Test
  void aFileTruncatedAndReplacedUnderItsNameStartsAnew() throws Exception {
    Path file = put(watched, "run7.csv", "old");
    Inbox inbox = new Inbox(watched, TEN_SECONDS);
    inbox.look(START);
    Files.writeString(file, "");
    assertThat(inbox.look(after(10)).ready()).isEmpty();
    Path other = put(watched, ".new", "new");
    Files.move(other, file, StandardCopyOption.REPLACE_EXISTING);
    assertThat(inbox.look(after(15)).ready()).isEmpty();
    assertThat(inbox.look(after(25)).ready().get(0).size()).isEqualTo(3);
  }

  @Test
  void aReplacementWithTheSameSizeAndTimeIsSeenByItsKey() throws Exception {
    Path file = put(watched, "run7.csv", "old");
    FileTime time = Files.getLastModifiedTime(file);
    Inbox inbox = new Inbox(watched, TEN_SECONDS);
    Sighting old = inbox.look(START).settling().get(0).sighting();
    org.junit.jupiter.api.Assumptions.assumeFalse(
        old.fileKey().equals(Fingerprint.NO_KEY), "files have no key here");
    Path other = put(watched, ".new", "new");
    Files.setLastModifiedTime(other, time);
    Files.move(other, file, StandardCopyOption.ATOMIC_MOVE);

    assertThat(inbox.look(after(10)).ready()).isEmpty();
  }

  @Test
  void aSettleTimeOfZeroTakesTheFolderAsItStands() {
    put(watched, "b.csv", "b");
    put(watched, "a.csv", "a");
    put(watched, "furnace/c.csv", "c");
    put(watched, "furnace/deep/d.csv", "d");

    Look look = new Inbox(watched, AT_ONCE).look(START);

    assertThat(names(look.ready()))
        .containsExactly("a.csv", "b.csv", "furnace/c.csv", "furnace/deep/d.csv");
    assertThat(look.notices()).isEmpty();
  }

  @Test
  void aNegativeSettleTimeIsRefused() {
    assertThatThrownBy(() -> new SettleRule(Duration.ofSeconds(-1)))
        .isInstanceOf(IllegalArgumentException.class)
        .hasMessageContaining("below 0");
  }

  @Test
  void aClockSetBackDelaysAFileByNoMoreThanTheSettleTime() {
    put(watched, "run7.csv", "a");
    Inbox inbox = new Inbox(watched, TEN_SECONDS);
    inbox.look(START);
    inbox.look(after(-7200));
    assertThat(inbox.look(after(-7191)).ready()).isEmpty();
    assertThat(inbox.look(after(-7190)).ready()).hasSize(1);
  }

  @Test
  void theArchiveIsNeverLookedInto() {
    put(watched, "done/2025-01-15/run1.csv", "a");
    put(watched, "rejected/run2.csv", "b");
    put(watched, "furnace/done/run3.csv", "c");

    Look look = new Inbox(watched, AT_ONCE).look(START);

    assertThat(names(look.ready())).containsExactly("furnace/done/run3.csv");
    assertThat(look.notices()).isEmpty();
  }

  @Test
  void aNameThatTheArchiveNeedsIsNamed() {
    put(watched, "Done/run1.csv", "a");
    put(watched, "rejected", "a file");

    Look look = new Inbox(watched, AT_ONCE).look(START);

    assertThat(look.ready()).isEmpty();
    assertThat(look.notices()).extracting(Notice::text).hasSize(2);
    assertThat(look.notices().get(0).text()).contains("'Done'").contains("Rename it");
    assertThat(look.notices().get(1).text()).contains("'rejected'").contains("keeps a folder");
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        ".hidden.csv",
        "~$run7.xlsx",
        "run7.csv.tmp",
        "run7.TMP",
        "run7.part",
        "run7.Part",
        "run7.csv.crdownload",
        ".sync/run7.csv",
        "copy.part/run7.csv"
      })
  void temporaryNamesArePassedOverWithoutAWord(String name) {
    put(watched, name, "a");
    Look look = new Inbox(watched, AT_ONCE).look(START);
    assertThat(look).isEqualTo(new Look(List.of(), List.of(), List.of(), List.of()));
  }

  @Test
  void aFileThatDoesNotOpenWaitsAndIsToldOnceUntilItOpens() {
    put(watched, "locked.csv", "a");
    put(watched, "open.csv", "a");
    List<String> trouble = new ArrayList<>(List.of("locked"));
    Inbox inbox =
        new Inbox(
            watched,
            AT_ONCE,
            file -> {
              if (file.endsWith("locked.csv") && trouble.contains("locked")) {
                throw new AccessDeniedException(file.toString());
              }
              if (file.endsWith("locked.csv") && trouble.contains("disk")) {
                throw new FileSystemException(file.toString(), null, "Input/output error");
              }
            });

    Look first = inbox.look(START);
    assertThat(names(first.ready())).containsExactly("open.csv");
    assertThat(first.waiting()).hasSize(1);
    assertThat(first.waiting().get(0).reason()).isEqualTo("permission denied");
    assertThat(first.notices()).hasSize(1);
    assertThat(first.notices().get(0).phase()).isEqualTo(Notice.Phase.BEGINS);

    Look second = inbox.look(after(5));
    assertThat(second.notices()).isEmpty();
    assertThat(second.waiting().get(0).since()).isEqualTo(START);

    trouble.set(0, "disk");
    Look changed = inbox.look(after(10));
    assertThat(changed.notices()).hasSize(1);
    assertThat(changed.notices().get(0).text()).contains("Input/output error");
    assertThat(changed.notices().get(0).key()).isEqualTo(first.notices().get(0).key());

    trouble.clear();
    Look over = inbox.look(after(15));
    assertThat(names(over.ready())).containsExactly("locked.csv", "open.csv");
    assertThat(over.waiting()).isEmpty();
    assertThat(over.notices()).extracting(Notice::phase).containsExactly(Notice.Phase.ENDS);
    assertThat(inbox.standing()).isEmpty();
  }

  @Test
  void aFileLeftWhereItLiesIsReadyOnceForEachContent() throws Exception {
    Path file = put(watched, "run7.csv", "a");
    Inbox inbox = new Inbox(watched, AT_ONCE);
    Sighting sighting = inbox.look(START).ready().get(0);
    inbox.handled(sighting);
    assertThat(inbox.look(after(5)).ready()).isEmpty();

    Files.writeString(file, "another");
    Sighting changed = inbox.look(after(10)).ready().get(0);
    // The answer for the old content comes late: it says nothing about the new one.
    inbox.handled(sighting);
    assertThat(inbox.look(after(15)).ready()).containsExactly(changed);
  }

  @Test
  void whatAFileIsCalledInTheListDependsOnNothingButItsName() throws Exception {
    long seed = 20250115L;
    Random random = new Random(seed);
    List<String> expected = new ArrayList<>();
    for (int i = 0; i < 500; i++) {
      expected.add((i % 7 == 0 ? "furnace/" : "") + Integer.toString(random.nextInt(1 << 30), 36));
    }
    for (String name : expected) {
      put(watched, name, name);
    }
    expected.sort(null);
    assertThat(names(new Inbox(watched, AT_ONCE).look(START).ready()))
        .as("seed %d", seed)
        .isEqualTo(expected.stream().distinct().toList());
  }
}
