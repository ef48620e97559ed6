package org.spikewright.intake;

import static org.assertj.core.api.Assertions.assertThat;
import static org.spikewright.intake.Folder.AT_ONCE;
import static org.spikewright.intake.Folder.START;
import static org.spikewright.intake.Folder.TEN_SECONDS;
import static org.spikewright.intake.Folder.after;
import static org.spikewright.intake.Folder.names;
import static org.spikewright.intake.Folder.put;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;
import org.junit.jupiter.api.io.TempDir;

/** Folders that vanish, and things in them that are no files. */
class FolderTroubleTest {
  @TempDir Path parent;
  Path watched;
  Path away;

  @BeforeEach
  void folders() throws Exception {
    watched = Files.createDirectory(parent.resolve("inbox"));
    away = parent.resolve("away");
  }

  @Test
  void aShareThatShowsAnEmptyFolderMeanwhileForgetsNothing() throws Exception {
    put(watched, "done/2025-01-15/run1.csv", "a");
    put(watched, "left.csv", "a");
    put(watched, "furnace/new.csv", "b");
    Inbox inbox = new Inbox(watched, TEN_SECONDS);
    inbox.look(START);
    Look before = inbox.look(after(10));
    inbox.handled(before.ready().get(1));
    assertThat(before.ready().get(1).name()).isEqualTo("left.csv");

    Files.move(watched, away);
    Files.createDirectory(watched);
    Look empty = inbox.look(after(15));
    assertThat(empty.ready()).isEmpty();
    assertThat(empty.notices()).hasSize(1);
    assertThat(empty.notices().get(0).text()).contains("suddenly empty").contains("mounted");
    assertThat(inbox.look(after(20)).notices()).isEmpty();

    Files.delete(watched);
    Files.move(away, watched);
    Look back = inbox.look(after(25));
    assertThat(names(back.ready())).containsExactly("furnace/new.csv");
    assertThat(back.notices()).extracting(Notice::phase).containsExactly(Notice.Phase.ENDS);
  }

  @Test
  void aFolderDeletedAndMadeAnewIsFoundAgain() throws Exception {
    put(watched, "run1.csv", "a");
    Inbox inbox = new Inbox(watched, AT_ONCE);
    assertThat(inbox.look(START).ready()).hasSize(1);

    Files.move(watched, away);
    Look gone = inbox.look(after(5));
    assertThat(gone.ready()).isEmpty();
    assertThat(gone.notices()).hasSize(1);
    assertThat(gone.notices().get(0).text()).contains("is not there");
    assertThat(inbox.look(after(10)).notices()).isEmpty();

    Files.createDirectory(watched);
    put(watched, "run2.csv", "b");
    Look again = inbox.look(after(15));
    assertThat(names(again.ready())).containsExactly("run2.csv");
    assertThat(again.notices()).extracting(Notice::phase).containsExactly(Notice.Phase.ENDS);
  }

  @Test
  void anInstrumentsShareThatIsEmptyMeanwhileIsNotReadTwice() throws Exception {
    put(watched, "furnace/run1.csv", "a");
    put(watched, "other.csv", "b");
    Inbox inbox = new Inbox(watched, AT_ONCE);
    inbox.look(START).ready().forEach(inbox::handled);

    Files.move(watched.resolve("furnace"), away);
    Files.createDirectory(watched.resolve("furnace"));
    assertThat(inbox.look(after(5)).ready()).isEmpty();
    Files.delete(watched.resolve("furnace"));
    Files.move(away, watched.resolve("furnace"));
    assertThat(inbox.look(after(10)).ready()).isEmpty();
  }

  @Test
  void aFolderThatWasAlwaysEmptyIsNoTrouble() {
    Look look = new Inbox(watched, AT_ONCE).look(START);
    assertThat(look.notices()).isEmpty();
  }

  @Test
  @Timeout(20)
  void onlyRegularFilesAreOpenedAndTheRestIsNamedOnce() throws Exception {
    Folder.shell(watched, "mkfifo pipe.csv");
    Folder.shell(
        watched,
        "mkdir dir.csv; echo 1 > dir.csv/inside.csv; ln -s nowhere dangling.csv;"
            + " ln -s self.csv self.csv; ln -s /dev/zero zero.csv; ln -s /etc/hostname out.csv;"
            + " ln -s .. up; echo 1 > good.csv");
    Inbox inbox = new Inbox(watched, AT_ONCE);

    Look look = inbox.look(START);

    assertThat(names(look.ready())).containsExactly("good.csv");
    assertThat(look.notices())
        .extracting(notice -> notice.text().split(" ")[0])
        .containsExactly(
            "'dangling.csv'",
            "'dir.csv'",
            "'out.csv'",
            "'pipe.csv'",
            "'self.csv'",
            "'up'",
            "'zero.csv'");
    assertThat(look.notices().get(0).text()).contains("is a link, not a regular file");
    assertThat(look.notices().get(1).text()).contains("folder with the name of a file");
    assertThat(look.notices().get(3).text()).contains("pipe, socket or device");
    assertThat(inbox.look(after(5)).notices()).isEmpty();
    assertThat(inbox.standing()).hasSize(7);

    Files.delete(watched.resolve("pipe.csv"));
    assertThat(inbox.look(after(10)).notices())
        .extracting(Notice::phase)
        .containsExactly(Notice.Phase.ENDS);
    // What empties the folder afterwards would warn of links that lead out of it.
    Folder.shell(watched, "find . -type l -exec rm {} +");
  }

  @Test
  void aNameWithUndecodableBytesIsNamedOnceAndSkipped() throws Exception {
    Folder.shell(watched, "echo 1 > \"$(printf 'a\\377b.csv')\"; echo 1 > good.csv");
    Inbox inbox = new Inbox(watched, AT_ONCE);

    Look look = inbox.look(START);

    assertThat(names(look.ready())).containsExactly("good.csv");
    assertThat(look.notices()).hasSize(1);
    assertThat(look.notices().get(0).text()).contains("no text in this machine's encoding");
    assertThat(inbox.look(after(5)).notices()).isEmpty();
  }

  @Test
  void foldersTooDeepAreNamedAndTheRestGoesOn() {
    put(watched, "a/".repeat(Listing.DEEPEST) + "in.csv", "a");
    put(watched, "b/".repeat(Listing.DEEPEST + 1) + "out.csv", "a");
    put(watched, ("c".repeat(250) + "/").repeat(8) + "long.csv", "a");

    Look look = new Inbox(watched, AT_ONCE).look(START);

    assertThat(names(look.ready())).hasSize(1).allMatch(name -> name.endsWith("in.csv"));
    assertThat(look.notices()).hasSize(2);
    assertThat(look.notices().get(0).text()).contains("more than 16 folders deep");
    assertThat(look.notices().get(1).text()).contains("bytes, more than 2000");
    assertThat(look.notices()).allMatch(notice -> notice.text().length() < 500);
  }

  @Test
  void namesThatWouldForgeALineAreShownEscaped() {
    Folder.needsUnicodeNames();
    List<String> names =
        List.of("a\nb.csv", "tab\tin.csv", "-dash.csv", " blank.csv", "turn\u202e.csv", "µg.CSV");
    names.forEach(name -> put(watched, name, name));
    put(watched, "x".repeat(251) + ".csv", "long");

    Look look = new Inbox(watched, AT_ONCE).look(START);

    assertThat(names(look.ready()))
        .contains(
            "a\\u000ab.csv",
            "tab\\u0009in.csv",
            "-dash.csv",
            " blank.csv",
            "turn\\u202e.csv",
            "µg.CSV")
        .hasSize(7);
    assertThat(look.ready())
        .allSatisfy(each -> assertThat(FileDigest.of(each.path())).hasSize(FileDigest.LENGTH));
  }
}
