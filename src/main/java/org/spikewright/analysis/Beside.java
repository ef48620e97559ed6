package org.spikewright.analysis;

import java.time.Instant;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import java.util.stream.Collectors;
import org.spikewright.reading.BatchReading;
import org.spikewright.reading.CalibrationPoint;
import org.spikewright.reading.CheckReading;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Subject;
import org.spikewright.series.AdditionSeries;

/** Which drift checks and calibration solutions speak of which series. */
final class Beside {
  /** What a reading can speak of. */
  private record Channel(String instrument, String analyte, String line) {
    static Channel of(Subject subject) {
      return new Channel(subject.instrument(), subject.analyte(), subject.line());
    }
  }

  private final Map<Channel, List<CheckReading>> checks;
  private final Map<Channel, List<CalibrationPoint>> calibration;

  /** Only numbers count; a reading out of range says nothing here. */
  Beside(List<BatchReading> readings) {
    List<BatchReading> numbers =
        readings.stream()
            .filter(reading -> reading.signal() instanceof Signal.Value)
            .sorted(
                Comparator.comparing(
                        (BatchReading reading) -> reading.measuredAt().orElse(Instant.MIN))
                    .thenComparing(BatchReading.ORDER)
                    .thenComparing(reading -> reading.position().row()))
            .toList();
    this.checks = byChannel(numbers, CheckReading.class);
    this.calibration = byChannel(numbers, CalibrationPoint.class);
  }

  private static <T extends BatchReading> Map<Channel, List<T>> byChannel(
      List<BatchReading> readings, Class<T> type) {
    return readings.stream()
        .filter(type::isInstance)
        .map(type::cast)
        .collect(Collectors.groupingBy(reading -> Channel.of(reading.subject())));
  }

  static double signal(BatchReading reading) {
    return ((Signal.Value) reading.signal()).value();
  }

  /** The drift checks by check and batch, in order; a batch that delimits nothing is empty. */
  List<List<CheckReading>> runs() {
    Map<String, List<CheckReading>> runs = new TreeMap<>();
    checks
        .values()
        .forEach(
            list ->
                list.forEach(
                    check ->
                        runs.computeIfAbsent(runKey(check), key -> new ArrayList<>()).add(check)));
    return runs.values().stream().map(List::copyOf).toList();
  }

  private static String runKey(CheckReading check) {
    Subject subject = check.subject();
    return String.join(
        "\n",
        subject.instrument(),
        subject.analyte(),
        subject.line(),
        batchOf(check),
        subject.sample().text());
  }

  /** The batch that divides a reading from others; empty where time alone does. */
  static String batchOf(BatchReading reading) {
    return isDivided(reading) ? reading.batch().name() : "";
  }

  private static boolean isDivided(BatchReading reading) {
    return reading.measuredAt().isEmpty() || reading.batch().delimits();
  }

  private static boolean isOf(BatchReading reading, AdditionSeries series) {
    return isDivided(reading) || !series.timed()
        ? reading.batch().name().equals(series.batchName())
        : true;
  }

  /** The calibration of a series. */
  List<CalibrationPoint> calibrationOf(AdditionSeries series) {
    return calibration.getOrDefault(Channel.of(series.key().subject()), List.of()).stream()
        .filter(point -> isOf(point, series))
        .toList();
  }

  /**
   * The drift checks of a series, by check, each in order. Of timed ones those from the last before
   * its first reading to the first after its last.
   */
  List<List<CheckReading>> checksOf(AdditionSeries series) {
    List<CheckReading> all =
        checks.getOrDefault(Channel.of(series.key().subject()), List.of()).stream()
            .filter(check -> isOf(check, series))
            .toList();
    return all.stream()
        .collect(
            Collectors.groupingBy(
                check -> check.subject().sample(), TreeMap::new, Collectors.toList()))
        .values()
        .stream()
        .map(run -> bracketing(run, series))
        .toList();
  }

  private static List<CheckReading> bracketing(List<CheckReading> run, AdditionSeries series) {
    if (series.startedAt().isEmpty()
        || run.stream().anyMatch(check -> check.measuredAt().isEmpty())) {
      return run;
    }
    Instant start = series.startedAt().get();
    Instant end = series.lastReadingAt();
    int from = 0;
    int to = run.size();
    for (int i = 0; i < run.size(); i++) {
      Instant time = run.get(i).measuredAt().orElseThrow();
      if (!time.isAfter(start)) {
        from = i;
      }
      if (!time.isBefore(end)) {
        to = Math.min(to, i + 1);
      }
    }
    return run.subList(Math.min(from, to), to);
  }
}
