package org.spikewright.series;

import java.time.Instant;
import java.time.LocalDate;
import java.time.temporal.ChronoUnit;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.SortedMap;
import org.spikewright.reading.LabCalendar;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;

/**
 * Where no time is mapped, a series exported again under another batch name (mostly the file's) can
 * only be known by its signals.
 */
final class UntimedBatches {
  /** How many lab days apart the same series may come again under another name. */
  private static final int DAYS_APART = 30;

  /** How many common flasks, all equal digit for digit, make two batches one. */
  private static final int COMMON_FLASKS = 3;

  private UntimedBatches() {}

  /** One cluster for each batch, but for batches that are the same again. */
  static List<Cluster> merge(SortedMap<String, List<Recorded>> batches, LabCalendar calendar) {
    List<Cluster> clusters = new ArrayList<>();
    batches.forEach(
        (name, readings) -> {
          Cluster next = new Cluster(firstDay(readings, calendar), name, name, List.of(), readings);
          for (int i = 0; i < clusters.size(); i++) {
            if (isSameAgain(clusters.get(i), next)) {
              clusters.set(i, union(clusters.get(i), next));
              return;
            }
          }
          clusters.add(next);
        });
    return clusters;
  }

  private static LocalDate firstDay(List<Recorded> readings, LabCalendar calendar) {
    return readings.stream()
        .map(Recorded::firstArrivedAt)
        .min(Instant::compareTo)
        .map(calendar::dayOf)
        .orElseThrow();
  }

  private record Place(String preparation, String flask, String replicate) {
    static Place of(Recorded recorded) {
      Reading reading = recorded.reading();
      return new Place(reading.facts().preparation().shown(), reading.flask(), reading.replicate());
    }
  }

  private static Map<Place, String> signals(Cluster cluster) {
    Map<Place, String> signals = new HashMap<>();
    cluster.readings().forEach(r -> signals.put(Place.of(r), r.reading().signal().text()));
    return signals;
  }

  private static boolean isSameAgain(Cluster one, Cluster other) {
    if (Math.abs(ChronoUnit.DAYS.between(one.labDay(), other.labDay())) > DAYS_APART) {
      return false;
    }
    Map<Place, String> known = signals(one);
    Set<String> common = new HashSet<>();
    for (Map.Entry<Place, String> entry : signals(other).entrySet()) {
      String signal = known.get(entry.getKey());
      if (signal != null && !signal.equals(entry.getValue())) {
        return false;
      }
      if (signal != null) {
        common.add(entry.getKey().preparation() + '\n' + entry.getKey().flask());
      }
    }
    return common.size() >= COMMON_FLASKS;
  }

  private static Cluster union(Cluster one, Cluster other) {
    Set<Place> known = signals(one).keySet();
    List<Recorded> readings = new ArrayList<>(one.readings());
    other.readings().stream().filter(r -> !known.contains(Place.of(r))).forEach(readings::add);
    readings.sort(Clusters.ORDER);
    List<String> names = new ArrayList<>(one.alsoNamed());
    names.add(other.batchName());
    LocalDate day = one.labDay().isBefore(other.labDay()) ? one.labDay() : other.labDay();
    return new Cluster(day, one.batch(), one.batchName(), names, readings);
  }
}
