package org.spikewright.ledger;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.nio.file.Path;
import java.time.Instant;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.judgement.Verdict;
import org.spikewright.series.SeriesKey;
import org.spikewright.summary.ResultRow;
import org.spikewright.summary.RowEvidence;

class RevisionTest {
  private static final LocalDate DAY = Samples.DAY;
  private static final Instant CLOSED = Samples.CALENDAR.endOf(DAY).plusSeconds(1800);

  @TempDir Path folder;
  private Ledger ledger;

  @BeforeEach
  void open() {
    ledger = Samples.open(folder.resolve("a.db"));
    deliver("run.csv", "S1");
  }

  @AfterEach
  void close() {
    ledger.close();
  }

  @Test
  void aRevisionIsOwedFromItsCommitUntilItIsIssued() {
    RevisionRecord made = revise(CLOSED, row("S1", 1.5, Verdict.REPORT)).orElseThrow();
    assertThat(made.revision()).isEqualTo(1);
    assertThat(made.moment()).isEqualTo(CLOSED);
    assertThat(made.arrivalLimit()).isEqualTo(1);
    assertThat(made.settingsText()).isEqualTo("limits = 1");
    assertThat(ledger.owed(CLOSED, true)).isEmpty();
    assertThat(ledger.owedRevisions()).containsExactly(made);
    RevisionRecord.Issued files = new RevisionRecord.Issued("s.xlsx", "aa", "r.csv", "bb");
    ledger.issued(DAY, 1, files);
    assertThat(ledger.owedRevisions()).isEmpty();
    assertThat(ledger.newest(DAY).orElseThrow().issued()).contains(files);
    assertThat(ledger.summarisedDays()).containsExactly(DAY);
  }

  @Test
  void resultsComeBackInBothOrdersAndMoreThanOnce() {
    List<ResultRow> rows =
        List.of(
            row("S3", 3, Verdict.REPEAT),
            row("S1", 1, Verdict.REPORT),
            row("S4", 4, Verdict.WAITING),
            row("S2", 2, Verdict.REVIEW),
            row("S0", 0, Verdict.REPEAT));
    revise(CLOSED, rows.toArray(ResultRow[]::new));
    var byKey = ledger.results(DAY, 1, ResultOrder.BY_KEY);
    var bySeverity = ledger.results(DAY, 1, ResultOrder.BY_SEVERITY);
    for (int walk = 0; walk < 2; walk++) {
      assertThat(byKey)
          .extracting(RevisionTest::sample)
          .containsExactly("S0", "S1", "S2", "S3", "S4");
      assertThat(bySeverity)
          .extracting(RevisionTest::sample)
          .containsExactly("S0", "S3", "S2", "S4", "S1");
    }
    assertThat(byKey).containsExactlyInAnyOrderElementsOf(rows);
  }

  @Test
  void onlyWhatChangedBecomesANewVersionAndTheOldRevisionShowsTheOld() {
    revise(CLOSED, row("S1", 1, Verdict.REPORT), row("S2", 2, Verdict.REPORT));
    deliver("late.csv", "S2");
    assertThat(ledger.owed(CLOSED, false)).containsExactly(DAY);
    revise(CLOSED.plusSeconds(1), row("S1", 1, Verdict.REPORT), row("S2", 2.5, Verdict.REVIEW));
    assertThat(values(1)).containsExactly(1.0, 2.0);
    assertThat(values(2)).containsExactly(1.0, 2.5);
  }

  @Test
  void theSameAgainLeavesAMarkAndNoRevision() {
    revise(CLOSED, row("S1", 1, Verdict.REPORT));
    assertThat(revise(CLOSED.plusSeconds(9), row("S1", 1, Verdict.REPORT))).isEmpty();
    assertThat(ledger.newest(DAY).orElseThrow().revision()).isEqualTo(1);
    assertThat(revise(CLOSED.plusSeconds(9), row("S1", 1.1, Verdict.REPORT))).isPresent();
  }

  @Test
  void aDeliveryThatBelongsToTheDayMakesARevisionThoughNoResultChanged() {
    revise(CLOSED, row("S1", 1, Verdict.REPORT));
    ledger.refuse(Samples.arriving("odd.csv", DAY), "no header", "rejected/odd.csv");
    assertThat(ledger.owed(CLOSED, false)).containsExactly(DAY);
    assertThat(revise(CLOSED, row("S1", 1, Verdict.REPORT))).isPresent();
    assertThat(ledger.owed(CLOSED, false)).isEmpty();
  }

  @Test
  void aDayThatWasSummarisedInProgressIsOwedOnceMoreWhenItCloses() {
    Instant evening = CLOSED.minusSeconds(36_000);
    revise(evening, true, Optional.empty(), row("S1", 1, Verdict.REPORT));
    assertThat(ledger.owed(evening.plusSeconds(60), true)).isEmpty();
    assertThat(revise(evening, true, Optional.empty(), row("S1", 1, Verdict.REPORT))).isEmpty();
    assertThat(ledger.owed(CLOSED, false)).containsExactly(DAY);
    assertThat(revise(CLOSED, row("S1", 1, Verdict.REPORT))).isPresent();
    assertThat(ledger.owed(CLOSED, false)).isEmpty();
  }

  @Test
  void theEndOfAWaitIsSomethingNewOnce() {
    Instant until = CLOSED.plusSeconds(3600);
    revise(CLOSED, false, Optional.of(until), row("S1", 1, Verdict.WAITING));
    assertThat(ledger.newest(DAY).orElseThrow().waitingUntil()).contains(until);
    assertThat(ledger.owed(until.minusMillis(1), false)).isEmpty();
    assertThat(ledger.owed(until, false)).containsExactly(DAY);
    assertThat(revise(until, row("S1", 1, Verdict.REVIEW))).isPresent();
    assertThat(ledger.owed(until.plusSeconds(9999), false)).isEmpty();
  }

  @Test
  void aRevisionThatIsNotCommittedLeavesNothing() {
    try (RevisionWriter writer = ledger.startRevision(start(CLOSED, false))) {
      writer.result(row("S1", 1, Verdict.REPORT), "inputs");
      assertThatThrownBy(() -> ledger.startRevision(start(CLOSED, false)))
          .isInstanceOf(IllegalStateException.class);
      assertThatThrownBy(() -> ledger.filed(1, "x")).isInstanceOf(IllegalStateException.class);
    }
    assertThat(ledger.newest(DAY)).isEmpty();
    assertThat(ledger.owed(CLOSED, false)).containsExactly(DAY);
  }

  @Test
  void twoResultsOfOneSeriesAreABrokenPromise() {
    try (RevisionWriter writer = ledger.startRevision(start(CLOSED, false))) {
      writer.result(row("S1", 1, Verdict.REPORT), "inputs");
      writer.result(row("S1", 2, Verdict.REPORT), "inputs");
      assertThatThrownBy(() -> writer.commit(Optional.empty()))
          .isInstanceOf(IllegalStateException.class);
    }
    assertThat(ledger.newest(DAY)).isEmpty();
  }

  /** Looks at a day that shows no results. */
  static void mark(Ledger ledger, LocalDate day, Instant moment) {
    RevisionStart start =
        new RevisionStart(day, moment, false, ledger.newestArrival(), "sha", "limits = 1", "test");
    try (RevisionWriter writer = ledger.startRevision(start)) {
      writer.commit(Optional.empty());
    }
  }

  private void deliver(String name, String sample) {
    Samples.deliver(ledger, name, List.of(Samples.timed(sample, 0, 1, Samples.MORNING, 0.1)));
  }

  private Optional<RevisionRecord> revise(Instant moment, ResultRow... rows) {
    return revise(moment, false, Optional.empty(), rows);
  }

  private Optional<RevisionRecord> revise(
      Instant moment, boolean inProgress, Optional<Instant> waitingUntil, ResultRow... rows) {
    try (RevisionWriter writer = ledger.startRevision(start(moment, inProgress))) {
      for (ResultRow row : rows) {
        writer.result(row, "inputs");
      }
      return writer.commit(waitingUntil);
    }
  }

  private RevisionStart start(Instant moment, boolean inProgress) {
    return new RevisionStart(
        DAY, moment, inProgress, ledger.newestArrival(), "sha", "limits = 1", "0.1.0");
  }

  private List<Double> values(int revision) {
    List<Double> values = new ArrayList<>();
    ledger
        .results(DAY, revision, ResultOrder.BY_KEY)
        .forEach(row -> values.add(row.value().orElseThrow()));
    return values;
  }

  private static String sample(ResultRow row) {
    return row.key().subject().sample().text();
  }

  private static ResultRow row(String sample, double value, Verdict verdict) {
    OptionalDouble none = OptionalDouble.empty();
    return new ResultRow(
        new SeriesKey(DAY, Samples.subject(sample), "", "", 1),
        "run",
        "sample",
        OptionalDouble.of(value),
        "µg/L",
        "1.5",
        none,
        none,
        none,
        none,
        none,
        none,
        none,
        none,
        "pool",
        none,
        verdict,
        List.of("bent"),
        List.of("The line is bent."),
        4,
        12,
        none,
        none,
        none,
        OptionalInt.of(2),
        none,
        "made up",
        List.of("run.csv"),
        RowEvidence.EMPTY);
  }
}
