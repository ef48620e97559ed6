package org.spikewright.ledger;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.io.RandomAccessFile;
import java.nio.file.Files;
import java.nio.file.Path;
import java.sql.DriverManager;
import java.time.LocalTime;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.TimeUnit;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.mapping.Rejection;
import org.spikewright.reading.LabCalendar;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Subject;
import org.spikewright.table.Position;
import org.spikewright.table.Source;

class OpeningTest {
  @TempDir Path folder;
  private Path file;

  @BeforeEach
  void name() {
    file = folder.resolve("state").resolve("ledger.db");
  }

  @Test
  void aFirstStartMakesTheLedgerAndALaterOneFindsIt() {
    fill();
    try (Ledger ledger = Samples.opened(open(true))) {
      assertThat(ledger.newestArrival()).isEqualTo(1);
    }
  }

  @Test
  void aMissingOrEmptyOrUnusedLedgerIsRefusedWhileTheArchiveHasFiles() throws IOException {
    assertThat(refused(open(true))).contains("missing");
    assertThat(file).doesNotExist();
    Files.createFile(file);
    assertThat(refused(open(true))).contains("empty");
    assertThat(file).isEmptyFile();
    Samples.opened(open(false)).close();
    assertThat(refused(open(true))).contains("knows no delivery");
  }

  @Test
  void aLostLedgerWhoseJournalIsLeftIsRefused() throws IOException {
    Files.createDirectories(file.getParent());
    Files.writeString(file.resolveSibling("ledger.db-wal"), "something");
    assertThat(refused(open(false))).contains("journal");
  }

  @Test
  void whatIsNoLedgerIsRefusedAndLeftAsItIs() throws Exception {
    Files.createDirectories(file.getParent());
    Files.writeString(file, "Dear diary, this is a text and no database at all.");
    refusedUnchanged();
    Files.delete(file);
    try (var connection = DriverManager.getConnection("jdbc:sqlite:" + file);
        var statement = connection.createStatement()) {
      statement.execute("CREATE TABLE shopping (item TEXT)");
    }
    refusedUnchanged();
  }

  @Test
  void aNewerLedgerIsRefusedAndLeftAsItIs() throws Exception {
    fill();
    try (var connection = DriverManager.getConnection("jdbc:sqlite:" + file);
        var statement = connection.createStatement()) {
      statement.execute("INSERT INTO migration (number) VALUES (9999)");
    }
    refusedUnchanged();
    assertThat(refused(open(false))).contains("newer");
  }

  @Test
  void aTruncatedOrDamagedLedgerIsRefusedAndLeftAsItIs() throws IOException {
    fill();
    byte[] whole = Files.readAllBytes(file);
    for (int keep : List.of(20, 4096, whole.length / 2, whole.length - 4096, whole.length - 7)) {
      Files.write(file, Arrays.copyOf(whole, keep));
      refusedUnchanged();
    }
    Files.write(file, Arrays.copyOf(whole, whole.length + 1));
    refusedUnchanged();
    Files.write(file, whole);
    try (RandomAccessFile damaged = new RandomAccessFile(file.toFile(), "rw")) {
      for (long at = 4096; at < whole.length; at += 4096) {
        damaged.seek(at);
        damaged.write(new byte[64]);
      }
    }
    refusedUnchanged();
    Files.write(file, whole);
    try (Ledger ledger = Samples.opened(open(true))) {
      assertThat(ledger.newestArrival()).isEqualTo(1);
    }
  }

  @Test
  void anotherCalendarIsRefusedOnceDeliveriesWereTaken() {
    LabCalendar other = new LabCalendar(ZoneId.of("Europe/Lisbon"), LocalTime.of(7, 0));
    Samples.opened(open(false)).close();
    Samples.opened(Ledger.open(file, other, Samples.PAUSE, false)).close();
    Samples.opened(open(false)).close();
    fill();
    assertThat(refused(Ledger.open(file, other, Samples.PAUSE, true))).contains("07:00", "06:00");
  }

  @Test
  void aSecondOwnerInThisProcessIsToldWho() throws IOException {
    try (Ledger ledger = Samples.opened(open(false))) {
      assertThat(ledger.newestArrival()).isZero();
      assertThat(holder(open(false))).contains("process " + ProcessHandle.current().pid());
      Files.createSymbolicLink(folder.resolve("other"), file.getParent());
      assertThat(
              holder(
                  Ledger.open(
                      folder.resolve("other/ledger.db"), Samples.CALENDAR, Samples.PAUSE, false)))
          .contains("process " + ProcessHandle.current().pid());
      assertThat(holder(open(false))).contains("process ");
    }
    Samples.opened(open(false)).close();
  }

  @Test
  void aViewReadsBesideTheOwnerAndAfterIt() {
    try (Ledger ledger = Samples.opened(open(false))) {
      Samples.deliver(ledger, "run.csv", readings());
      try (LedgerView view = viewed()) {
        assertThat(view.newestArrival()).isEqualTo(1);
        Samples.deliver(ledger, "more.csv", readings());
        assertThat(view.newestArrival()).isEqualTo(2);
        assertThat(view.subjects(Samples.DAY, 2)).hasSize(200);
        assertThat(view.calendar()).isEqualTo(Samples.CALENDAR);
      }
    }
    try (LedgerView view = viewed()) {
      assertThat(view.newestArrival()).isEqualTo(2);
    }
    assertThat(Ledger.openReadOnly(folder.resolve("none.db"), Samples.PAUSE))
        .isInstanceOf(Opening.Refused.class);
  }

  @Test
  void aProcessThatIsKilledInADeliveryLeavesTheStateBeforeItAndFreesTheLedger() throws Exception {
    fill();
    Process child =
        new ProcessBuilder(
                ProcessHandle.current().info().command().orElseThrow(),
                "-cp",
                System.getProperty("java.class.path"),
                Victim.class.getName(),
                file.toString())
            .redirectErrorStream(true)
            .start();
    try (var said = child.inputReader()) {
      String line = said.readLine();
      while (line != null && !line.equals(Victim.DEEP)) {
        line = said.readLine();
      }
      assertThat(line).isEqualTo(Victim.DEEP);
      assertThat(holder(open(true))).contains("process " + child.pid());
      assertThat(Files.size(file.resolveSibling("ledger.db-wal"))).isGreaterThan(1_000_000);
      try (LedgerView view = viewed()) {
        assertThat(view.newestArrival()).isEqualTo(1);
      }
    } finally {
      child.destroyForcibly();
    }
    assertThat(child.waitFor(30, TimeUnit.SECONDS)).isTrue();
    try (Ledger ledger = Samples.opened(open(true))) {
      assertThat(ledger.newestArrival()).isEqualTo(1);
      List<Subject> subjects = ledger.subjects(Samples.DAY, 99);
      assertThat(subjects).hasSize(200);
      assertThat(Samples.deliver(ledger, "next.csv", readings()).repeated()).isEqualTo(200);
    }
  }

  /** Takes a delivery far enough that pages have gone to the journal, and waits to be killed. */
  static final class Victim {
    static final String DEEP = "deep in a delivery";

    private Victim() {}

    public static void main(String[] arguments) throws InterruptedException {
      Ledger ledger = Samples.open(Path.of(arguments[0]));
      Delivery delivery = ledger.receive(Samples.arriving("killed.csv", Samples.DAY));
      for (int i = 0; i < 40_000; i++) {
        delivery.reading(Samples.timed("killed" + i % 7, 1, i, Samples.MORNING.plusMillis(i), i));
        delivery.rejection(
            new Rejection(
                Rejection.Reason.NOT_A_NUMBER,
                new Position(new Source("killed.csv", Optional.empty()), i, 1),
                "Signal",
                "x".repeat(1_000),
                "a number"));
      }
      System.out.println(DEEP);
      Thread.sleep(60_000);
      delivery.close();
    }
  }

  private Opening open(boolean archiveHasFiles) {
    return Ledger.open(file, Samples.CALENDAR, Samples.PAUSE, archiveHasFiles);
  }

  private void fill() {
    try (Ledger ledger = Samples.opened(open(false))) {
      Samples.deliver(ledger, "run.csv", readings());
    }
  }

  private LedgerView viewed() {
    if (Ledger.openReadOnly(file, Samples.PAUSE) instanceof Opening.Viewed viewed) {
      return viewed.view();
    }
    throw new AssertionError("not opened to read");
  }

  private void refusedUnchanged() throws IOException {
    byte[] before = Files.readAllBytes(file);
    assertThat(refused(open(false))).contains("ledger");
    assertThat(Files.readAllBytes(file)).isEqualTo(before);
  }

  private static String refused(Opening opening) {
    assertThat(opening).isInstanceOf(Opening.Refused.class);
    assertThat(((Opening.Refused) opening).advice()).isNotBlank();
    return ((Opening.Refused) opening).found();
  }

  private static String holder(Opening opening) {
    assertThat(opening).isInstanceOf(Opening.OwnedByAnother.class);
    return ((Opening.OwnedByAnother) opening).holder();
  }

  private static List<Reading> readings() {
    List<Reading> readings = new ArrayList<>();
    for (int i = 0; i < 200; i++) {
      readings.add(Samples.timed("S" + i, i % 5, 1, Samples.MORNING.plusSeconds(i), i));
    }
    return readings;
  }
}
