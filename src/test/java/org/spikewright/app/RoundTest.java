package org.spikewright.app;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Path;
import java.time.Clock;
import java.time.Duration;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.atomic.AtomicReference;
import java.util.function.Supplier;
import java.util.stream.Stream;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.spikewright.intake.Inbox;
import org.spikewright.intake.SettleRule;
import org.spikewright.ledger.LedgerFault;
import org.spikewright.testkit.Exports;
import org.spikewright.testkit.Laboratory;
import org.spikewright.testkit.LogLines;

class RoundTest {
  private static final Instant START = Instant.parse("2026-03-05T06:29:00Z");

  @TempDir Path folder;
  private final LogLines log = LogLines.collect();
  private Laboratory lab;
  private Station station;

  @BeforeEach
  void open() {
    lab = new Laboratory(folder);
    station = Stations.open(lab, Clock.fixed(START, java.time.ZoneOffset.UTC));
  }

  @AfterEach
  void close() {
    station.close();
    log.close();
  }

  /** A round in which one file brings out what is thrown; the tries are noted. */
  private Round round(String poison, Supplier<Optional<Throwable>> thrown, List<String> tries) {
    Stop stop = new Stop();
    Inbox inbox = new Inbox(station.settings().watch(), new SettleRule(Duration.ZERO));
    Reception reception = new Reception(station, stop, Progress.none());
    return new Round(
        inbox,
        file -> {
          tries.add(file.name());
          Optional<Throwable> planted =
              file.name().equals(poison) ? thrown.get() : Optional.empty();
          if (planted.isPresent()) {
            Throwable what = planted.get();
            if (what instanceof IOException trouble) {
              throw trouble;
            }
            if (what instanceof Error error) {
              throw error;
            }
            throw (RuntimeException) what;
          }
          return reception.receive(file);
        },
        new Filing(station, inbox),
        stop);
  }

  private static Stream<Throwable> troubles() {
    return Stream.of(
        new IOException("planted"),
        new UncheckedIOException(new IOException("planted")),
        new LedgerFault("planted", "ledger", "Wait", new IOException()),
        new IllegalStateException("planted"),
        new NullPointerException("planted"),
        new StackOverflowError("planted"));
  }

  @ParameterizedTest
  @MethodSource("troubles")
  void oneFileInTroubleIsSaidOnceAndTriedAgainEverLessOftenWhileOthersGoOn(Throwable trouble) {
    lab.drop("bench/a.csv", Exports.of("BW-1"));
    lab.drop("bench/b.csv", Exports.of("BW-2"));
    List<String> tries = new ArrayList<>();
    Round round = round("bench/a.csv", () -> Optional.of(trouble), tries);

    for (int second = 0; second < 600; second++) {
      round.run(START.plusSeconds(second));
    }

    assertThat(lab.done()).containsExactly("bench/b.csv");
    assertThat(lab.inbox().resolve("bench/a.csv")).exists();
    assertThat(log.with("bench/a.csv"))
        .singleElement()
        .asString()
        .contains("could not be taken in and will be tried again", "planted");
    assertThat(round.failing()).hasSize(1);
    // After 1, 2, 4 … 32 s, then each minute.
    assertThat(tries.stream().filter(name -> name.equals("bench/a.csv"))).hasSize(7 + 8);
  }

  @Test
  void aFileThatIsWrittenAnewIsTriedAtOnceAndItsTroubleIsOver() {
    lab.drop("bench/a.csv", Exports.of("BW-1"));
    AtomicReference<Optional<Throwable>> trouble =
        new AtomicReference<>(Optional.of(new IOException("planted")));
    Round round = round("bench/a.csv", trouble::get, new ArrayList<>());
    round.run(START);
    trouble.set(Optional.empty());
    round.run(START);
    assertThat(lab.done()).as("the same file within its pause").isEmpty();

    lab.drop("bench/a.csv", Exports.of("BW-1", "BW-2"));
    round.run(START);

    assertThat(lab.done()).containsExactly("bench/a.csv");
    assertThat(round.failing()).isEmpty();
    assertThat(log.with("over: file=bench/a.csv")).hasSize(1);
  }

  @Test
  void memoryUsedUpIsNotCaught() {
    lab.drop("bench/a.csv", Exports.of("BW-1"));
    Round round =
        round("bench/a.csv", () -> Optional.of(new OutOfMemoryError("planted")), new ArrayList<>());

    assertThatThrownBy(() -> round.run(START)).isInstanceOf(OutOfMemoryError.class);
  }

  @Test
  void whatWasRecordedAndNotFiledIsFiledByTheNextRoundWithItsReason() throws IOException {
    lab.drop("bench/a.csv", Exports.of("BW-1"));
    lab.drop("bench/b.csv", "");
    recordWithoutFiling();

    round("none", Optional::empty, new ArrayList<>()).run(START);

    assertThat(lab.done()).containsExactly("bench/a.csv");
    assertThat(lab.files("inbox/rejected"))
        .containsExactly("bench/b.csv", "bench/b.csv.reason.txt");
    assertThat(station.ledger().newestArrival()).isEqualTo(2);
  }

  @Test
  void whereFilesAreLeftARoundAfterACrashLeavesThemToo() throws IOException {
    station.close();
    lab.write(
        "spikewright.toml",
        lab.text("spikewright.toml").replace("[laboratory]", "leave = true\n[laboratory]"));
    station = Stations.open(lab, Clock.fixed(START, java.time.ZoneOffset.UTC));
    lab.drop("bench/a.csv", Exports.of("BW-1"));
    lab.drop("bench/b.csv", "");
    recordWithoutFiling();

    round("none", Optional::empty, new ArrayList<>()).run(START);

    assertThat(lab.files("inbox")).containsExactly("bench/a.csv", "bench/b.csv");
    assertThat(station.ledger().unfiled()).isEmpty();
  }

  private void recordWithoutFiling() throws IOException {
    Inbox inbox = new Inbox(station.settings().watch(), new SettleRule(Duration.ZERO));
    Reception reception = new Reception(station, new Stop(), Progress.none());
    for (var file : inbox.look(START).ready()) {
      assertThat(reception.receive(file)).isInstanceOf(Reception.Received.Recorded.class);
    }
  }
}
