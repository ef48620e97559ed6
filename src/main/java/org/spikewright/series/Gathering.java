package org.spikewright.series;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.SortedMap;
import java.util.TreeMap;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.Preparation;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Subject;

/**
 * Gathers the readings of one subject into series: divided by batch or by pauses, then by
 * preparation; readings of a flask together. A pure function of the readings, whatever the order in
 * which they arrived.
 */
public final class Gathering {
  private final GatheringRules rules;
  private final Fitting fitting = new Fitting();

  /** Gathers by these rules. */
  public Gathering(GatheringRules rules) {
    this.rules = rules;
  }

  /**
   * Gathers.
   *
   * @param subject whose readings these are
   * @param readings all of them, in any order; each identity once
   * @return series and what could not be one, ordered by key
   */
  public List<Gathered> gather(Subject subject, List<Recorded> readings) {
    List<Gathered> gathered = new ArrayList<>();
    Map<SeriesKey, Integer> ordinals = new HashMap<>();
    for (Cluster cluster : new Clusters(rules).of(readings)) {
      for (Map.Entry<String, List<Recorded>> part : byPreparation(cluster).entrySet()) {
        SeriesKey first =
            new SeriesKey(cluster.labDay(), subject, cluster.batch(), part.getKey(), 1);
        int ordinal = ordinals.merge(first, 1, Integer::sum);
        SeriesKey key = ordinal == 1 ? first : first.withOrdinal(ordinal);
        gathered.add(series(key, cluster, part.getValue()));
      }
    }
    if (gathered.size() > 1) {
      gathered.sort(Comparator.comparing(Gathered::key));
    }
    return gathered;
  }

  private static SortedMap<String, List<Recorded>> byPreparation(Cluster cluster) {
    SortedMap<String, List<Recorded>> parts = new TreeMap<>();
    if (isOfOnePreparation(cluster.readings())) {
      parts.put(
          cluster.readings().get(0).reading().facts().preparation().shown(), cluster.readings());
      return parts;
    }
    for (Recorded recorded : cluster.readings()) {
      String preparation = recorded.reading().facts().preparation().shown();
      parts.computeIfAbsent(preparation, k -> new ArrayList<>()).add(recorded);
    }
    return parts;
  }

  /** As nearly always; then nothing has to be put into words for each reading. */
  private static boolean isOfOnePreparation(List<Recorded> readings) {
    Preparation first = readings.get(0).reading().facts().preparation();
    for (Recorded recorded : readings) {
      Preparation preparation = recorded.reading().facts().preparation();
      if (preparation != first && !preparation.equals(first)) {
        return false;
      }
    }
    return true;
  }

  private Gathered series(SeriesKey key, Cluster cluster, List<Recorded> readings) {
    List<FlaskDraft> drafts = new ArrayList<>();
    SortedMap<String, List<Recorded>> byFlask = new TreeMap<>();
    for (Recorded recorded : readings) {
      byFlask.computeIfAbsent(recorded.reading().flask(), label -> new ArrayList<>()).add(recorded);
    }
    for (Map.Entry<String, List<Recorded>> entry : byFlask.entrySet()) {
      Optional<FlaskFacts> facts = facts(entry.getValue());
      if (facts.isEmpty()) {
        return new Ungrouped(
            key,
            cluster.batchName(),
            "flask " + entry.getKey() + " has readings with different additions or volumes",
            "one addition, aliquot and volume for all readings of a flask",
            readings);
      }
      drafts.add(draft(entry.getKey(), facts.get(), entry.getValue()));
    }
    Optional<AxisCheck.Misfit> misfit =
        fitting.areKnown(drafts) ? Optional.empty() : AxisCheck.misfit(drafts);
    if (misfit.isPresent()) {
      return new Ungrouped(
          key, cluster.batchName(), misfit.get().found(), misfit.get().expected(), readings);
    }
    fitting.add(drafts);
    return new SeriesBuilder(key, cluster, drafts).build();
  }

  /** The facts of a flask: those of its latest delivery; empty when that contradicts itself. */
  private static Optional<FlaskFacts> facts(List<Recorded> readings) {
    Recorded latest = readings.get(0);
    for (Recorded recorded : readings) {
      latest = recorded.arrival() > latest.arrival() ? recorded : latest;
    }
    FlaskFacts facts = latest.reading().facts();
    for (Recorded recorded : readings) {
      FlaskFacts own = recorded.reading().facts();
      if (recorded.arrival() == latest.arrival() && own != facts && !own.equals(facts)) {
        return Optional.empty();
      }
    }
    return Optional.of(facts);
  }

  /**
   * Where replicates are mapped, the same replicate at a later time is a second run: it is never
   * averaged with the first.
   */
  private static FlaskDraft draft(String label, FlaskFacts facts, List<Recorded> readings) {
    List<Recorded> first = new ArrayList<>();
    List<Recorded> second = new ArrayList<>();
    Set<String> replicates = new HashSet<>();
    for (Recorded recorded : readings) {
      Reading reading = recorded.reading();
      if (reading.measuredAt().isEmpty() || !reading.replicateMapped()) {
        first.add(recorded);
      } else if (replicates.add(reading.replicate())) {
        first.add(recorded);
      } else {
        second.add(recorded);
      }
    }
    return new FlaskDraft(label, facts, List.copyOf(first), List.copyOf(second));
  }
}
