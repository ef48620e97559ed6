package org.spikewright.series;

import java.time.Instant;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.SortedMap;
import java.util.TreeMap;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Signal;

/** Divides the readings of one subject by batch, or by pauses where nothing else delimits them. */
final class Clusters {
  /** The fixed order of readings: by time, then by what else makes their identity. */
  static final Comparator<Recorded> ORDER =
      Comparator.comparing((Recorded r) -> r.reading().measuredAt().orElse(Instant.MIN))
          .thenComparing(r -> r.reading().batch().name())
          .thenComparing(r -> r.reading().facts().preparation().shown())
          .thenComparing(r -> r.reading().flask())
          .thenComparing(r -> r.reading().replicate());

  private final GatheringRules rules;

  Clusters(GatheringRules rules) {
    this.rules = rules;
  }

  /** The clusters of one subject's readings, ordered by lab day, batch and time. */
  List<Cluster> of(List<Recorded> readings) {
    if (isOneRun(readings)) {
      return List.of(
          new Cluster(dayOfFirst(readings), "", firstName(readings), List.of(), readings));
    }
    List<Recorded> timed = new ArrayList<>();
    SortedMap<String, List<Recorded>> untimed = new TreeMap<>();
    for (Recorded recorded : readings.stream().sorted(ORDER).toList()) {
      if (recorded.reading().measuredAt().isPresent()) {
        timed.add(recorded);
      } else {
        add(untimed, recorded);
      }
    }
    List<Cluster> clusters = new ArrayList<>(timed(newestOfCorrected(timed)));
    UntimedBatches.merge(untimed, rules.calendar())
        .forEach(cluster -> clusters.add(cluster.with(newestOfCorrected(cluster.readings()))));
    clusters.sort(
        Comparator.comparing(Cluster::labDay)
            .thenComparing(Cluster::batch)
            .thenComparing(cluster -> cluster.readings().get(0), ORDER));
    return clusters;
  }

  /**
   * Whether readings are one run as they stand, as nearly always: timed, in order, of one delivery,
   * all within the longest pause.
   */
  private boolean isOneRun(List<Recorded> readings) {
    Instant last = Instant.MIN;
    for (Recorded recorded : readings) {
      Reading reading = recorded.reading();
      Optional<Instant> time = reading.measuredAt();
      if (time.isEmpty()
          || reading.batch().delimits()
          || recorded.arrival() != readings.get(0).arrival()
          || !time.get().isAfter(last)) {
        return false;
      }
      last = time.get();
    }
    return !readings.isEmpty()
        && !last.isAfter(readings.get(0).reading().measuredAt().get().plus(rules.longestPause()));
  }

  private static void add(SortedMap<String, List<Recorded>> batches, Recorded recorded) {
    batches
        .computeIfAbsent(recorded.reading().batch().name(), k -> new ArrayList<>())
        .add(recorded);
  }

  /** What tells one act of reading from another, whatever the bench said was in the flask. */
  private record Instance(String when, String replicate, String signal) {
    /** Empty where nothing tells: the flask's own label then makes the identity. */
    static Optional<Instance> of(Recorded recorded) {
      Reading reading = recorded.reading();
      Optional<Instant> time = reading.measuredAt();
      if (time.isPresent()) {
        return Optional.of(
            new Instance(time.get().toString(), reading.replicate(), reading.signal().text()));
      }
      if (reading.flaskMapped() || !(reading.signal() instanceof Signal.Value)) {
        return Optional.empty();
      }
      // An order in the file counts within an addition, so that it moves when that is corrected.
      String replicate = reading.replicateMapped() ? reading.replicate() : "";
      String preparation = reading.facts().preparation().shown();
      return Optional.of(new Instance(preparation, replicate, reading.signal().text()));
    }
  }

  /**
   * A reading that comes again from another delivery with the same signal but another addition or
   * preparation is the same reading corrected: the later delivery counts. Without a time, readings
   * of one batch and preparation are told apart by their signals alone where no flask is named.
   */
  private static List<Recorded> newestOfCorrected(List<Recorded> readings) {
    if (readings.stream().mapToLong(Recorded::arrival).distinct().count() < 2) {
      return readings;
    }
    Map<Instance, List<Recorded>> instances = new HashMap<>();
    for (Recorded recorded : readings) {
      Instance.of(recorded)
          .ifPresent(i -> instances.computeIfAbsent(i, k -> new ArrayList<>()).add(recorded));
    }
    List<Recorded> kept = new ArrayList<>();
    for (Recorded recorded : readings) {
      List<Recorded> same =
          Instance.of(recorded).map(instances::get).orElseGet(() -> List.of(recorded));
      if (same.stream().noneMatch(other -> corrects(other, recorded))) {
        boolean corrects = same.stream().anyMatch(other -> corrects(recorded, other));
        kept.add(corrects ? recorded.replacingOneMore() : recorded);
      }
    }
    return kept;
  }

  private static boolean corrects(Recorded later, Recorded earlier) {
    return later.arrival() > earlier.arrival() && !flaskOf(later).equals(flaskOf(earlier));
  }

  private static String flaskOf(Recorded recorded) {
    Reading reading = recorded.reading();
    return reading.facts().preparation().shown() + '\n' + reading.flask();
  }

  private List<Cluster> timed(List<Recorded> readings) {
    List<Recorded> byTime = new ArrayList<>();
    SortedMap<String, List<Recorded>> batches = new TreeMap<>();
    for (Recorded recorded : readings) {
      if (recorded.reading().batch().delimits()) {
        add(batches, recorded);
      } else {
        byTime.add(recorded);
      }
    }
    List<Cluster> clusters = new ArrayList<>();
    for (List<Recorded> run : splitAtPauses(byTime)) {
      clusters.add(new Cluster(dayOfFirst(run), "", firstName(run), List.of(), run));
    }
    batches.forEach(
        (name, run) -> clusters.add(new Cluster(dayOfFirst(run), name, name, List.of(), run)));
    return clusters;
  }

  private List<List<Recorded>> splitAtPauses(List<Recorded> byTime) {
    List<List<Recorded>> runs = new ArrayList<>();
    Instant last = Instant.MIN;
    for (Recorded recorded : byTime) {
      Instant time = recorded.reading().measuredAt().orElseThrow();
      if (runs.isEmpty() || time.isAfter(last.plus(rules.longestPause()))) {
        runs.add(new ArrayList<>());
      }
      runs.get(runs.size() - 1).add(recorded);
      last = time;
    }
    return runs;
  }

  private LocalDate dayOfFirst(List<Recorded> run) {
    return rules.calendar().dayOf(run.get(0).reading().measuredAt().orElseThrow());
  }

  private static String firstName(List<Recorded> run) {
    String first = run.get(0).reading().batch().name();
    for (Recorded recorded : run) {
      String name = recorded.reading().batch().name();
      first = name.compareTo(first) < 0 ? name : first;
    }
    return first;
  }
}
