package org.spikewright.series;

import java.time.Instant;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.SortedMap;
import java.util.TreeMap;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;

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
    clusters.addAll(UntimedBatches.merge(untimed, rules.calendar()));
    clusters.sort(
        Comparator.comparing(Cluster::labDay)
            .thenComparing(Cluster::batch)
            .thenComparing(cluster -> cluster.readings().get(0), ORDER));
    return clusters;
  }

  private static void add(SortedMap<String, List<Recorded>> batches, Recorded recorded) {
    batches
        .computeIfAbsent(recorded.reading().batch().name(), k -> new ArrayList<>())
        .add(recorded);
  }

  private record Instance(Instant time, String replicate, String signal) {
    static Instance of(Recorded recorded) {
      Reading reading = recorded.reading();
      return new Instance(
          reading.measuredAt().orElseThrow(), reading.replicate(), reading.signal().text());
    }
  }

  /**
   * A timed reading that comes again from another delivery with the same signal but another
   * addition or preparation is the same reading corrected: the later delivery counts.
   */
  private static List<Recorded> newestOfCorrected(List<Recorded> timed) {
    if (timed.stream().mapToLong(Recorded::arrival).distinct().count() < 2) {
      return timed;
    }
    Map<Instance, Long> newest = new HashMap<>();
    Set<Instance> corrected = new HashSet<>();
    for (Recorded recorded : timed) {
      Instance instance = Instance.of(recorded);
      long before = newest.getOrDefault(instance, recorded.arrival());
      newest.put(instance, Math.max(before, recorded.arrival()));
      if (before != recorded.arrival()) {
        corrected.add(instance);
      }
    }
    if (corrected.isEmpty()) {
      return timed;
    }
    List<Recorded> kept = new ArrayList<>();
    for (Recorded recorded : timed) {
      Instance instance = Instance.of(recorded);
      if (!corrected.contains(instance)) {
        kept.add(recorded);
      } else if (recorded.arrival() == newest.get(instance)) {
        kept.add(recorded.replacingOneMore());
      }
    }
    return kept;
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
    return run.stream().map(r -> r.reading().batch().name()).min(String::compareTo).orElse("");
  }
}
