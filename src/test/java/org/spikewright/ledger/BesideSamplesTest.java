package org.spikewright.ledger;

import static org.assertj.core.api.Assertions.assertThat;
import static org.spikewright.ledger.Samples.DAY;
import static org.spikewright.ledger.Samples.MORNING;

import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import java.time.LocalDate;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.analysis.ControlHistory;
import org.spikewright.analysis.ControlKey;
import org.spikewright.analysis.ControlPoint;
import org.spikewright.analysis.ControlRule.Kind;
import org.spikewright.mapping.Tally;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Batch;
import org.spikewright.reading.BatchReading;
import org.spikewright.reading.CalibrationPoint;
import org.spikewright.reading.CheckReading;
import org.spikewright.reading.Signal;
import org.spikewright.table.Position;
import org.spikewright.table.Source;

/** Drift checks and calibration solutions in the ledger, and the history of controls. */
class BesideSamplesTest {
  private static final Position CELL =
      new Position(new Source("run.xlsx", Optional.of("Data")), 7, 4);

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

  private static CheckReading check(Instant at, double signal) {
    return new CheckReading(
        Samples.subject("CCV"),
        new Batch("run", false),
        Optional.of(at),
        1,
        new Signal.Value(signal, Double.toString(signal)),
        CELL);
  }

  private static CalibrationPoint untimed(String batch, int ordinal, double concentration) {
    return new CalibrationPoint(
        Samples.subject("Std 1"),
        new Batch(batch, true),
        Optional.empty(),
        ordinal,
        new Signal.NoNumber(Signal.State.OVER_RANGE, "OVER"),
        CELL,
        new Quantity(concentration, Unit.of("µg/L")));
  }

  private long deliver(String name, LocalDate day, BatchReading... readings) {
    try (Delivery delivery = ledger.receive(Samples.arriving(name, day))) {
      for (BatchReading reading : readings) {
        delivery.batchReading(reading);
      }
      long checks = List.of(readings).stream().filter(CheckReading.class::isInstance).count();
      Tally tally = new Tally(readings.length, 0, 0, 0, checks, readings.length - checks);
      Arrived arrived = delivery.commit(tally, "", "done/" + name);
      assertThat(arrived.tally()).isEqualTo(tally);
      return arrived.number();
    }
  }

  @Test
  void whatWasRecordedComesBackAsItWas() {
    CheckReading check = check(MORNING, 0.5);
    CalibrationPoint point = untimed("batch", 1, 5);
    long number = deliver("a.csv", DAY, check, point);
    assertThat(ledger.besideSamples(DAY, number)).containsExactlyInAnyOrder(check, point);
    assertThat(ledger.besideSamples(DAY.plusDays(2), number)).isEmpty();
  }

  @Test
  void theSameAgainCountsOnceAndBringsNothingNew() {
    long first = deliver("a.csv", DAY, check(MORNING, 0.5));
    ledger.owed(Samples.CALENDAR.endOf(DAY), false);
    long again = deliver("b.csv", DAY, check(MORNING, 0.5), check(MORNING.plusSeconds(9), 0.6));
    assertThat(ledger.besideSamples(DAY, again)).hasSize(2);
    assertThat(ledger.besideSamples(DAY, first)).hasSize(1);
  }

  @Test
  void aLaterSignalCountsAndAnEarlierRevisionStillSeesTheEarlierOne() {
    long first = deliver("a.csv", DAY, check(MORNING, 0.5));
    long second = deliver("b.csv", DAY, check(MORNING, 0.7));
    assertThat(ledger.besideSamples(DAY, first)).containsExactly(check(MORNING, 0.5));
    assertThat(ledger.besideSamples(DAY, second)).containsExactly(check(MORNING, 0.7));
  }

  @Test
  void aCheckShortlyAfterTheCutOffSpeaksOfBothDays() {
    Instant after = Samples.CALENDAR.endOf(DAY).plus(Duration.ofMinutes(30));
    long number = deliver("a.csv", DAY, check(after, 0.5));
    assertThat(ledger.besideSamples(DAY, number)).hasSize(1);
    assertThat(ledger.besideSamples(DAY.plusDays(1), number)).hasSize(1);
    assertThat(ledger.owed(after.plus(Duration.ofDays(2)), false)).contains(DAY, DAY.plusDays(1));
  }

  @Test
  void aDeliveryThatIsRefusedInTheEndLeavesNothingBesideTheSamples() {
    try (Delivery delivery = ledger.receive(Samples.arriving("a.csv", DAY))) {
      delivery.batchReading(check(MORNING, 0.5));
      delivery.refuse(new Tally(3, 0, 2, 0, 1, 0), "not one reading", "rejected/a.csv");
    }
    assertThat(ledger.besideSamples(DAY, 1)).isEmpty();
    assertThat(ledger.files(DAY, 1).get(0).besideSamples()).isEqualTo(1);
  }

  private static final ControlKey KEY =
      new ControlKey("QC*", Kind.CONTROL_SAMPLE, "furnace", "Pb", "283.3");

  private static ControlPoint point(LocalDate day, double value) {
    return new ControlPoint(
        day,
        KEY,
        "µg/L",
        value,
        OptionalDouble.of(12),
        OptionalDouble.of(9.6),
        OptionalDouble.empty());
  }

  private void revise(LocalDate day, Instant moment, boolean inProgress, double value) {
    long upTo =
        deliver(
            day + " " + moment + ".csv",
            day,
            check(
                Samples.CALENDAR.startOf(day).plusMillis(moment.toEpochMilli() % 1000 + 1), value));
    RevisionStart start =
        new RevisionStart(day, moment, inProgress, upTo, "sha", "limits = 1", "1.0");
    try (RevisionWriter writer = ledger.startRevision(start)) {
      writer.controls(List.of(point(day, value)));
      assertThat(writer.commit(Optional.empty())).isPresent();
    }
  }

  private static List<Double> values(ControlHistory history) {
    return history.of(KEY, "µg/L").stream().map(ControlPoint::value).toList();
  }

  @Test
  void theHistoryIsThatOfEarlierClosedDaysByTheirNewestRevision() {
    Instant closed = Samples.CALENDAR.endOf(DAY.plusDays(2)).plusSeconds(60);
    revise(DAY, closed, false, 11);
    revise(DAY, closed.plusMillis(1), false, 11.5);
    revise(DAY.plusDays(1), closed.plusMillis(2), true, 99);
    revise(DAY.plusDays(2), closed.plusMillis(3), false, 12.5);
    ControlHistory history = ledger.controlHistory(DAY.plusDays(3), closed.plusMillis(4));
    assertThat(values(history)).containsExactly(11.5, 12.5);
    assertThat(history.of(KEY, "µg/L").get(0)).isEqualTo(point(DAY, 11.5));
    assertThat(history.of(KEY, "mg/L")).isEmpty();
    assertThat(values(ledger.controlHistory(DAY, closed.plusMillis(4)))).isEmpty();
  }

  @Test
  void lateDataOfAnEarlierDayNeverMoveALaterOne() {
    Instant closed = Samples.CALENDAR.endOf(DAY.plusDays(2)).plusSeconds(60);
    revise(DAY, closed, false, 11);
    revise(DAY.plusDays(1), closed.plusMillis(1), false, 12);
    revise(DAY, closed.plusMillis(2), false, 77);
    Instant later = closed.plusMillis(3);
    assertThat(values(ledger.controlHistory(DAY.plusDays(1), later))).containsExactly(11.0);
    assertThat(values(ledger.controlHistory(DAY.plusDays(2), later))).containsExactly(77.0, 12.0);
  }
}
