package org.spikewright.ledger;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import java.time.LocalDate;
import java.util.List;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.mapping.Tally;
import org.spikewright.reading.Reading;
import org.spikewright.summary.FileEntry;

class LabDayTest {
  private static final LocalDate DAY = Samples.DAY;
  private static final Instant CUT_OFF = Samples.CALENDAR.endOf(DAY);
  private static final Instant LATER = CUT_OFF.plus(Duration.ofDays(90));

  @TempDir Path folder;
  private Ledger ledger;

  @BeforeEach
  void open() {
    ledger = Samples.open(folder.resolve("a.db"));
  }

  @AfterEach
  void close() {
    ledger.close();
  }

  @Test
  void aSeriesThatCrossesTheCutOffComesWholeOnBothDays() {
    deliver("run.csv", at(-300), at(-100), at(100), at(330), at(900));
    assertThat(times(DAY))
        .containsExactly(minutes(-300), minutes(-100), minutes(100), minutes(330));
    assertThat(times(DAY.plusDays(1)))
        .containsExactly(minutes(-300), minutes(-100), minutes(100), minutes(330), minutes(900));
    assertThat(ledger.readings(Samples.subject("S1"), DAY.plusDays(5), 1)).isEmpty();
  }

  @Test
  void aSeriesOfManyDaysComesWhole() {
    Reading[] readings = new Reading[30];
    for (int i = 0; i < readings.length; i++) {
      readings[i] = at(i * 200);
    }
    deliver("run.csv", readings);
    for (int day = 1; day <= 5; day++) {
      assertThat(times(DAY.plusDays(day))).hasSize(30);
    }
    assertThat(times(DAY)).isEmpty();
  }

  @Test
  void aBatchThatDelimitsComesWholeHoweverLongItPauses() {
    Reading early = Samples.inBatch(at(-4000), "B1", true);
    Reading late = Samples.inBatch(at(-10), "B1", true);
    Reading other = Samples.inBatch(at(-3990), "B2", true);
    deliver("run.csv", early, late, other);
    assertThat(times(DAY)).containsExactly(minutes(-4000), minutes(-10));
    assertThat(times(DAY.minusDays(2)))
        .containsExactly(minutes(-4000), minutes(-3990), minutes(-10));
  }

  @Test
  void anUntimedBatchBelongsToTheDayOfItsFirstDeliveryAndReachesThirtyDays() {
    Samples.deliver(
        ledger, Samples.arriving("b1", DAY), List.of(Samples.untimed("S1", "B1", 0, 1, 1)));
    Samples.deliver(
        ledger,
        Samples.arriving("b1 again", DAY.plusDays(3)),
        List.of(Samples.untimed("S1", "B1", 1, 1, 2)));
    assertThat(ledger.subjects(DAY, 2)).containsExactly(Samples.subject("S1"));
    assertThat(ledger.subjects(DAY.plusDays(3), 2)).isEmpty();
    assertThat(ledger.readings(Samples.subject("S1"), DAY.plusDays(30), 2)).hasSize(2);
    assertThat(ledger.readings(Samples.subject("S1"), DAY.plusDays(31), 2)).isEmpty();
    assertThat(ledger.readings(Samples.subject("S1"), DAY.plusDays(30), 1)).hasSize(1);
    assertThat(ledger.owed(LATER, false)).containsExactly(DAY);
  }

  @Test
  void aDayIsOwedOnceItClosedOrAtOnceWhenAsked() {
    deliver("run.csv", at(-100));
    assertThat(ledger.owed(CUT_OFF.minusMillis(1), false)).isEmpty();
    assertThat(ledger.owed(CUT_OFF.minusMillis(1), true)).containsExactly(DAY);
    assertThat(ledger.owed(CUT_OFF, false)).containsExactly(DAY);
  }

  @Test
  void lateReadingsTouchTheDaysThatASeriesReachesAndNoOthers() {
    deliver("old.csv", at(-4000), at(-1000), at(-1500), at(-200), at(200), at(3000));
    settleAll();
    deliver("late.csv", at(-10));
    assertThat(ledger.owed(LATER, false)).containsExactly(DAY, DAY.plusDays(1));
    settleAll();
    deliver("later.csv", at(400));
    assertThat(ledger.owed(LATER, false)).containsExactly(DAY, DAY.plusDays(1));
    settleAll();
    deliver("next.csv", at(900));
    assertThat(ledger.owed(LATER, false)).containsExactly(DAY.plusDays(1));
  }

  @Test
  void aControlThatIsMeasuredEveryDayDoesNotTouchItsHistory() {
    for (int day = 0; day < 10; day++) {
      deliver("run" + day, at(-600 + day * 1440));
      assertThat(ledger.owed(LATER, false)).containsExactly(DAY.plusDays(day));
      settleAll();
    }
  }

  @Test
  void aControlThatIsMeasuredAcrossEveryCutOffTouchesOnlyTheNightItBelongsTo() {
    for (int night = 1; night < 6; night++) {
      long base = night * 1440L;
      deliver("night" + night, at(base - 200), at(base - 60), at(base + 60), at(base + 200));
      assertThat(ledger.owed(LATER, false))
          .containsExactly(DAY.plusDays(night), DAY.plusDays(night + 1));
      settleAll();
      deliver("noon" + night, at(base + 700));
      assertThat(ledger.owed(LATER, false)).containsExactly(DAY.plusDays(night + 1));
      settleAll();
    }
  }

  @Test
  void aLateFlaskOfADelimitedBatchTouchesEveryDayOfTheBatch() {
    deliver("early", Samples.inBatch(at(-10_000), "B1", true));
    settleAll();
    deliver("late", Samples.inBatch(at(-10), "B1", true));
    assertThat(ledger.owed(LATER, false)).containsExactly(dayOf(-10_000), DAY);
  }

  @Test
  void anUntimedSeriesThatComesUnderAnotherNameTouchesTheDayOfTheFirst() {
    Samples.deliver(ledger, Samples.arriving("b1", DAY), batch("B1", 3, 0));
    Samples.deliver(ledger, Samples.arriving("c1", DAY.plusDays(1)), batch("C1", 3, 100));
    settleAll();
    Samples.deliver(ledger, Samples.arriving("b2", DAY.plusDays(4)), batch("A1", 4, 0));
    assertThat(ledger.owed(LATER, false)).containsExactly(DAY, DAY.plusDays(4));
  }

  @Test
  void refusalsTouchTheDayOfArrivalAndRepeatsAndKnownFilesTouchNothing() {
    deliver("run.csv", at(-100));
    settleAll();
    LocalDate next = DAY.plusDays(1);
    Samples.deliver(ledger, Samples.arriving("again.csv", next), List.of(at(-100)));
    ledger.again(Samples.arriving("run.csv", next), 1, "done/known");
    assertThat(ledger.owed(LATER, false)).isEmpty();
    ledger.refuse(Samples.arriving("odd.csv", next), "no header", "rejected/odd.csv");
    assertThat(ledger.owed(LATER, false)).containsExactly(next);
    settleAll();
    try (Delivery delivery = ledger.receive(Samples.arriving("rows.csv", next.plusDays(1)))) {
      delivery.reading(at(-100));
      delivery.rejection(ExactlyOnceTest.rejection("rows.csv", 7));
      delivery.commit(new Tally(2, 1, 1, 0), "", "done/rows.csv");
    }
    assertThat(ledger.owed(LATER, false)).containsExactly(next.plusDays(1));
  }

  @Test
  void filesOfADayAreThoseThatArrivedAndThoseThatBroughtReadings() {
    Samples.deliver(ledger, Samples.arriving("late.csv", DAY.plusDays(3)), List.of(at(-100)));
    ledger.refuse(Samples.arriving("odd.csv", DAY), "no header", "rejected/odd.csv");
    ledger.filed(2, "rejected/odd-2.csv");
    Samples.deliver(ledger, Samples.arriving("else.csv", DAY.plusDays(3)), List.of(at(9000)));
    List<FileEntry> files = ledger.files(DAY, 3);
    assertThat(files).extracting(FileEntry::name).containsExactly("late.csv", "odd.csv");
    assertThat(files).extracting(FileEntry::mapping).containsOnly("furnace");
    assertThat(files.get(1).archivedAs()).isEqualTo("rejected/odd-2.csv");
    assertThat(ledger.files(DAY, 1)).hasSize(1);
  }

  private void settleAll() {
    for (LocalDate day : ledger.owed(LATER, true)) {
      RevisionTest.mark(ledger, day, LATER);
    }
    assertThat(ledger.owed(LATER, true)).isEmpty();
  }

  private void deliver(String name, Reading... readings) {
    Samples.deliver(ledger, name, List.of(readings));
  }

  private List<Instant> times(LocalDate day) {
    return ledger.readings(Samples.subject("S1"), day, ledger.newestArrival()).stream()
        .map(recorded -> recorded.reading().measuredAt().orElseThrow())
        .toList();
  }

  private static List<Reading> batch(String batch, int flasks, double base) {
    List<Reading> readings = new java.util.ArrayList<>();
    for (int flask = 0; flask < flasks; flask++) {
      readings.add(Samples.untimed("S1", batch, flask, 1, base + flask));
    }
    return readings;
  }

  /** A reading some minutes after the cut-off that ends {@link Samples#DAY}. */
  private static Reading at(long minutes) {
    return Samples.timed("S1", 1, 1, minutes(minutes), minutes);
  }

  private static LocalDate dayOf(long minutes) {
    return Samples.CALENDAR.dayOf(minutes(minutes));
  }

  private static Instant minutes(long minutes) {
    return CUT_OFF.plus(Duration.ofMinutes(minutes));
  }
}
