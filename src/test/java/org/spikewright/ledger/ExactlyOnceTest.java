package org.spikewright.ledger;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.Collections;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.mapping.Rejection;
import org.spikewright.mapping.Tally;
import org.spikewright.reading.Batch;
import org.spikewright.reading.Preparation;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Spread;
import org.spikewright.reading.Subject;
import org.spikewright.table.Position;
import org.spikewright.table.Source;

class ExactlyOnceTest {
  @TempDir Path folder;

  @Test
  void readingsComeBackAsTheyWereRecorded() {
    List<Reading> readings = new ArrayList<>();
    readings.add(Samples.timed("S1", 0, 1, Samples.MORNING, 0.1));
    readings.add(
        new Reading(
            Samples.subject("=odd\u241b\0 \ud800"),
            new Batch("", true),
            "",
            false,
            "2",
            false,
            Optional.empty(),
            new Signal.NoNumber(Signal.State.OVER_RANGE, " OVER "),
            Samples.facts(
                1 / 3.0,
                new Preparation(
                    Optional.empty(),
                    1.1,
                    Optional.empty(),
                    Optional.empty(),
                    OptionalDouble.of(0.9))),
            new Position(new Source("other.xlsx", Optional.of("Data 1")), 1L << 40, 27)));
    try (Ledger ledger = Samples.open(folder.resolve("a.db"))) {
      Arrived arrived = Samples.deliver(ledger, "run.csv", readings);
      assertThat(arrived.number()).isEqualTo(1);
      assertThat(everything(ledger, Samples.DAY, 1)).containsExactlyInAnyOrderElementsOf(readings);
      assertThat(ledger.subjects(Samples.DAY, 0)).isEmpty();
      assertThat(ledger.known("sha of run.csv")).contains(1L);
    }
  }

  @Test
  void whatComesAgainAsItWasIsCountedAndMakesNothingNew() {
    List<Reading> readings = List.of(Samples.timed("S1", 0, 1, Samples.MORNING, 0.1));
    try (Ledger ledger = Samples.open(folder.resolve("a.db"))) {
      Samples.deliver(ledger, "run1.csv", readings);
      Reading again = Samples.inBatch(readings.get(0), "another file", false);
      Arrived second = Samples.deliver(ledger, "run2.csv", List.of(again, again));
      assertThat(second.repeated()).isEqualTo(2);
      Recorded recorded = only(ledger, "S1", Samples.DAY, 2);
      assertThat(recorded.arrival()).isEqualTo(1);
      assertThat(recorded.superseded()).isZero();
    }
  }

  @Test
  void anotherSignalOrOtherFactsCountFromTheLaterDeliveryOnAndTheEarlierStays() {
    Reading first = Samples.timed("S1", 0, 1, Samples.MORNING, 0.1);
    Reading integrated = Samples.timed("S1", 0, 1, Samples.MORNING, 0.2);
    try (Ledger ledger = Samples.open(folder.resolve("a.db"))) {
      Samples.deliver(ledger, "run1.csv", List.of(first));
      Samples.deliver(ledger, "run2.csv", List.of(integrated));
      Samples.deliver(ledger, "run3.csv", List.of(integrated, first));
      assertThat(only(ledger, "S1", Samples.DAY, 1).reading()).isEqualTo(first);
      assertThat(only(ledger, "S1", Samples.DAY, 2).reading()).isEqualTo(integrated);
      assertThat(only(ledger, "S1", Samples.DAY, 2).superseded()).isEqualTo(1);
      assertThat(only(ledger, "S1", Samples.DAY, 3).reading()).isEqualTo(first);
      assertThat(only(ledger, "S1", Samples.DAY, 3).superseded()).isEqualTo(2);
    }
  }

  private static Reading mean(Reading reading, String text, Spread spread) {
    return new Reading(
        reading.subject(),
        reading.batch(),
        reading.flask(),
        true,
        reading.replicate(),
        true,
        reading.measuredAt(),
        new Signal.Value(0.1, text, OptionalDouble.empty(), Optional.of(spread)),
        reading.facts(),
        reading.position());
  }

  @Test
  void aMeanKeepsItsSpreadAndAnotherSpreadIsACorrection() {
    Reading plain = Samples.timed("S1", 0, 1, Samples.MORNING, 0.1);
    Reading mean = mean(plain, "0.1\u001f\0x", new Spread(0.1 + 0.2, 3));
    Reading other = mean(plain, "0.1", new Spread(0.1 + 0.2, 13));
    try (Ledger ledger = Samples.open(folder.resolve("a.db"))) {
      Samples.deliver(ledger, "run1.csv", List.of(mean));
      assertThat(Samples.deliver(ledger, "run2.csv", List.of(mean)).repeated()).isEqualTo(1);
      Samples.deliver(ledger, "run3.csv", List.of(other));
      Samples.deliver(ledger, "run4.csv", List.of(plain));
      Samples.deliver(ledger, "run5.csv", List.of(other));
      assertThat(only(ledger, "S1", Samples.DAY, 2).reading()).isEqualTo(mean);
      assertThat(only(ledger, "S1", Samples.DAY, 3).reading()).isEqualTo(other);
      assertThat(only(ledger, "S1", Samples.DAY, 4).reading()).isEqualTo(plain);
      assertThat(only(ledger, "S1", Samples.DAY, 5).reading()).isEqualTo(other);
      assertThat(only(ledger, "S1", Samples.DAY, 5).superseded()).isEqualTo(3);
    }
  }

  private record Version(int delivery, Reading reading) {}

  /** What the ledger should hold, said once more in the plainest way. */
  private static final class Model {
    private final Map<List<Object>, Version> newest = new HashMap<>();
    private final List<Version> all = new ArrayList<>();
    private long repeats;

    void take(int delivery, Reading reading) {
      Version before = newest.get(identity(reading));
      if (before != null
          && sameContent(before.reading(), reading)
          && !takesBack(delivery, reading, before)) {
        repeats++;
        return;
      }
      Version version = new Version(delivery, reading);
      newest.put(identity(reading), version);
      all.add(version);
    }

    /** Whether a delivery between the two said something else of the same act of reading. */
    private boolean takesBack(int delivery, Reading reading, Version before) {
      return reading.measuredAt().isPresent()
          && all.stream()
              .filter(v -> v.delivery() > before.delivery() && v.delivery() < delivery)
              .map(Version::reading)
              .filter(other -> other.subject().equals(reading.subject()))
              .filter(other -> other.measuredAt().equals(reading.measuredAt()))
              .filter(other -> other.replicate().equals(reading.replicate()))
              .filter(other -> other.signal().text().equals(reading.signal().text()))
              .anyMatch(other -> !identity(other).equals(identity(reading)));
    }
  }

  @Test
  void theStateIsThatOfTheLastVersionOfEachReadingWhateverTheDeliveries() {
    for (long seed = 1; seed <= 25; seed++) {
      Random random = new Random(seed);
      Model model = new Model();
      long counted = 0;
      try (Ledger ledger = Samples.open(folder.resolve("model" + seed + ".db"))) {
        for (int delivery = 0; delivery < 8; delivery++) {
          List<Reading> readings = someReadings(random);
          for (Reading reading : readings) {
            model.take(delivery, reading);
          }
          counted += Samples.deliver(ledger, "d" + delivery, readings).repeated();
        }
        assertThat(contents(everything(ledger, Samples.DAY, 8)))
            .as("seed %d", seed)
            .isEqualTo(contents(model.newest.values().stream().map(Version::reading).toList()));
        assertThat(counted).as("seed %d", seed).isEqualTo(model.repeats);
      }
    }
  }

  @Test
  void orderAndSplittingAndRepeatsOfDeliveriesDoNotChangeTheState() {
    for (long seed = 1; seed <= 15; seed++) {
      Random random = new Random(seed);
      List<Reading> readings = new ArrayList<>();
      for (int i = 0; i < 60; i++) {
        boolean timed = random.nextBoolean();
        Reading reading = Samples.timed("S" + i % 4, i % 5, i, Samples.MORNING.plusSeconds(i), i);
        readings.add(timed ? reading : Samples.untimed("S" + i % 4, "B" + i % 2, i % 5, i, i));
      }
      List<List<String>> states = new ArrayList<>();
      for (int way = 0; way < 2; way++) {
        Path file = folder.resolve("way" + seed + "-" + way + ".db");
        try (Ledger ledger = Samples.open(file)) {
          deliverSomehow(ledger, random, readings);
          states.add(contents(everything(ledger, Samples.DAY, ledger.newestArrival())));
        }
      }
      assertThat(states.get(1)).as("seed %d", seed).isEqualTo(states.get(0)).hasSize(60);
    }
  }

  @Test
  void whatIsNotCommittedLeavesNothingBehind() {
    Reading kept = Samples.timed("S1", 0, 1, Samples.MORNING, 0.1);
    Reading lost = Samples.timed("lost", 0, 1, Samples.MORNING, 0.5);
    Reading next = Samples.timed("next", 0, 1, Samples.MORNING, 0.6);
    try (Ledger ledger = Samples.open(folder.resolve("a.db"))) {
      Samples.deliver(ledger, "kept.csv", List.of(kept));
      try (Delivery delivery = ledger.receive(Samples.arriving("lost.csv", Samples.DAY))) {
        delivery.reading(lost);
        delivery.rejection(rejection("lost.csv", 3));
        assertThat(delivery.withoutAdditions()).containsExactly(lost.subject());
      }
      assertThat(ledger.known("sha of lost.csv")).isEmpty();
      assertThat(ledger.newestArrival()).isEqualTo(1);
      assertThat(Samples.deliver(ledger, "next.csv", List.of(next)).number()).isEqualTo(2);
      assertThat(everything(ledger, Samples.DAY, 2)).containsExactlyInAnyOrder(kept, next);
      assertThat(ledger.refused(Samples.DAY, 2)).isEmpty();
    }
  }

  @Test
  void oneContentIsReadOnceByOneMapping() {
    try (Ledger ledger = Samples.open(folder.resolve("a.db"))) {
      Samples.deliver(ledger, "run.csv", List.of());
      assertThatThrownBy(() -> ledger.receive(Samples.arriving("run.csv", Samples.DAY)))
          .isInstanceOf(LedgerFault.class);
      assertThat(ledger.again(Samples.arriving("run.csv", Samples.DAY), 1, "done/run-2.csv"))
          .matches(again -> again.outcome() == Arrived.Result.KNOWN)
          .matches(again -> again.reason().contains("delivery 1"));
    }
  }

  @Test
  void aRefusedContentIsNotKnownAndAFileIsFiledOnce() {
    try (Ledger ledger = Samples.open(folder.resolve("a.db"))) {
      Arriving file = Samples.arriving("odd.csv", Samples.DAY);
      Arrived refused = ledger.refuse(file, "no header", "rejected/Odd.csv");
      assertThat(ledger.known(file.sha256())).isEmpty();
      assertThat(ledger.archiveNameTaken("rejected/odd.CSV")).isTrue();
      assertThat(ledger.archiveNameTaken("rejected/odd2.csv")).isFalse();
      assertThat(ledger.unfiled()).extracting(Arrived::number).containsExactly(refused.number());
      ledger.filed(refused.number(), "rejected/Odd.csv");
      assertThat(ledger.unfiled()).isEmpty();
      assertThatThrownBy(() -> ledger.filed(refused.number(), "elsewhere"))
          .isInstanceOf(IllegalStateException.class);
    }
  }

  @Test
  void subjectsWithoutAdditionsAreThoseThatNeverHadOne() {
    try (Ledger ledger = Samples.open(folder.resolve("a.db"))) {
      Samples.deliver(
          ledger, "before.csv", List.of(Samples.timed("known", 2, 1, Samples.MORNING, 0.1)));
      try (Delivery delivery = ledger.receive(Samples.arriving("now.csv", Samples.DAY))) {
        delivery.reading(Samples.timed("zero", 0, 1, Samples.MORNING, 0.1));
        delivery.reading(Samples.timed("known", 0, 1, Samples.MORNING, 0.1));
        delivery.reading(Samples.timed("spiked", 0, 1, Samples.MORNING, 0.1));
        delivery.reading(Samples.timed("spiked", 1, 1, Samples.MORNING, 0.1));
        assertThat(delivery.withoutAdditions()).containsExactly(Samples.subject("zero"));
      }
    }
  }

  @Test
  void rejectionsComeBackInOrderAsOftenAsAsked() {
    try (Ledger ledger = Samples.open(folder.resolve("a.db"))) {
      try (Delivery delivery = ledger.receive(Samples.arriving("bad.csv", Samples.DAY))) {
        for (int i = 1; i <= 1_234; i++) {
          delivery.rejection(rejection("bad.csv", i));
        }
        delivery.refuse(new Tally(1_234, 0, 1_234, 0), "not one reading", "rejected/bad.csv");
      }
      var refused = ledger.refused(Samples.DAY, 1);
      for (int walk = 0; walk < 2; walk++) {
        assertThat(refused).hasSize(1_234);
        assertThat(refused).extracting(row -> row.row()).isSorted().doesNotHaveDuplicates();
      }
      assertThat(refused.iterator().next().reason()).isEqualTo("not a number");
      assertThat(ledger.files(Samples.DAY, 1))
          .extracting(f -> f.outcome())
          .containsExactly("refused");
    }
  }

  static Rejection rejection(String file, long line) {
    return new Rejection(
        Rejection.Reason.NOT_A_NUMBER,
        new Position(new Source(file, Optional.empty()), line, 3),
        "Signal",
        "abc",
        "a number");
  }

  private static void deliverSomehow(Ledger ledger, Random random, List<Reading> readings) {
    List<Reading> shuffled = new ArrayList<>(readings);
    Collections.shuffle(shuffled, random);
    int number = 0;
    for (int from = 0; from < shuffled.size(); ) {
      int to = Math.min(shuffled.size(), from + 1 + random.nextInt(25));
      // A cumulative export: some of what came before, then the new.
      List<Reading> part = new ArrayList<>(shuffled.subList(random.nextInt(from + 1), to));
      Samples.deliver(ledger, "part" + number++, part);
      from = to;
    }
  }

  private static List<Reading> someReadings(Random random) {
    List<Reading> readings = new ArrayList<>();
    for (int i = random.nextInt(40); i >= 0; i--) {
      String sample = "S" + random.nextInt(3);
      int flask = random.nextInt(3);
      double signal = random.nextInt(2);
      readings.add(
          random.nextBoolean()
              ? Samples.timed(
                  sample, flask, 1, Samples.MORNING.plusSeconds(random.nextInt(2)), signal)
              : Samples.untimed(sample, "B" + random.nextInt(2), flask, 1, signal));
    }
    return readings;
  }

  private static List<Object> identity(Reading reading) {
    return List.of(
        reading.subject(),
        reading.flask(),
        reading.replicate(),
        reading.measuredAt(),
        reading.measuredAt().isPresent() ? "" : reading.batch().name());
  }

  private static boolean sameContent(Reading one, Reading other) {
    return one.signal().equals(other.signal()) && one.facts().equals(other.facts());
  }

  private static List<String> contents(Iterable<Reading> readings) {
    List<String> contents = new ArrayList<>();
    for (Reading reading : readings) {
      contents.add(identity(reading) + " " + reading.signal() + " " + reading.facts());
    }
    Collections.sort(contents);
    return contents;
  }

  private static Recorded only(Ledger ledger, String sample, LocalDate day, long upTo) {
    List<Recorded> found = ledger.readings(Samples.subject(sample), day, upTo);
    assertThat(found).hasSize(1);
    return found.get(0);
  }

  private static List<Reading> everything(Ledger ledger, LocalDate day, long upTo) {
    List<Reading> all = new ArrayList<>();
    for (Subject subject : ledger.subjects(day, upTo)) {
      ledger.readings(subject, day, upTo).forEach(recorded -> all.add(recorded.reading()));
    }
    return all;
  }
}
