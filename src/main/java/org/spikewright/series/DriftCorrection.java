package org.spikewright.series;

import java.time.Instant;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.NavigableMap;
import java.util.TreeMap;
import java.util.stream.Collectors;
import org.spikewright.reading.CheckReading;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Signal;

/**
 * The factor that brings signals back to what the instrument showed at the first drift check,
 * linear in time between bracketing check readings. Only for methods that ask for it.
 */
public final class DriftCorrection {
  /** Nothing is corrected. */
  public static final DriftCorrection NONE = new DriftCorrection(new TreeMap<>());

  /** The mean signal of the check at each time. */
  private final NavigableMap<Instant, Double> signals;

  private DriftCorrection(NavigableMap<Instant, Double> signals) {
    this.signals = signals;
  }

  /**
   * A correction by the readings of one instrument, analyte and line. Where several checks were
   * measured, the one with most readings counts, and among those the one whose name sorts first.
   *
   * @param checks in any order; those without a time or that are not above 0 do not count
   * @return a factor of 1 throughout with fewer than two times
   */
  public static DriftCorrection of(List<CheckReading> checks) {
    Map<SampleId, List<CheckReading>> byName =
        checks.stream()
            .filter(check -> check.measuredAt().isPresent() && signal(check) > 0)
            .collect(
                Collectors.groupingBy(
                    check -> check.subject().sample(), TreeMap::new, Collectors.toList()));
    List<CheckReading> most =
        byName.values().stream()
            .max(
                Comparator.comparingInt((List<CheckReading> one) -> one.size())
                    .thenComparing(one -> one.get(0).subject(), Comparator.reverseOrder()))
            .orElse(List.of());
    NavigableMap<Instant, Double> signals =
        most.stream()
            .collect(
                Collectors.groupingBy(
                    check -> check.measuredAt().orElseThrow(),
                    TreeMap::new,
                    Collectors.averagingDouble(DriftCorrection::signal)));
    return signals.size() < 2 ? NONE : new DriftCorrection(signals);
  }

  private static double signal(CheckReading check) {
    return check.signal() instanceof Signal.Value value ? value.value() : Double.NaN;
  }

  /** Whether there is anything to correct by. */
  public boolean isNone() {
    return signals.isEmpty();
  }

  /** Whether a time lies between two check readings. */
  public boolean brackets(Instant time) {
    return !isNone() && !time.isBefore(signals.firstKey()) && !time.isAfter(signals.lastKey());
  }

  /**
   * The factor for a signal after its baseline: first check signal over that interpolated at the
   * time. Before the first check and after the last the nearest one holds; see {@link #brackets}.
   */
  public double factorAt(Instant time) {
    if (isNone()) {
      return 1;
    }
    return signals.firstEntry().getValue() / at(time);
  }

  private double at(Instant time) {
    Map.Entry<Instant, Double> before = signals.floorEntry(time);
    Map.Entry<Instant, Double> after = signals.ceilingEntry(time);
    if (before == null || after == null) {
      return (before == null ? after : before).getValue();
    }
    long whole = after.getKey().toEpochMilli() - before.getKey().toEpochMilli();
    if (whole == 0) {
      return before.getValue();
    }
    double part = (double) (time.toEpochMilli() - before.getKey().toEpochMilli()) / whole;
    return before.getValue() + part * (after.getValue() - before.getValue());
  }
}
