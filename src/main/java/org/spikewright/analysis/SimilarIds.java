package org.spikewright.analysis;

import java.util.HashMap;
import java.util.HashSet;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeSet;
import org.spikewright.judgement.Flag;
import org.spikewright.judgement.FlagKind;
import org.spikewright.reading.SampleId;

/**
 * Sample IDs of a night that differ only in case or inner blanks: perhaps one sample, perhaps not.
 */
public final class SimilarIds {
  private static final int NAMED = 5;

  private final Set<String> known = new HashSet<>();
  private final Map<String, String> first = new HashMap<>();
  private final Map<String, TreeSet<String>> several = new HashMap<>();

  /** Takes a sample ID, as often as it comes. */
  public void add(SampleId id) {
    if (!known.add(id.text())) {
      return;
    }
    String folded = folded(id);
    String other = first.putIfAbsent(folded, id.text());
    if (other != null) {
      TreeSet<String> all = several.computeIfAbsent(folded, key -> new TreeSet<>());
      all.add(other);
      all.add(id.text());
    }
  }

  /** A note on the sample, where another ID of the night is like its own. */
  public Optional<Flag> flagFor(SampleId id) {
    TreeSet<String> all = several.get(folded(id));
    if (all == null || !all.contains(id.text())) {
      return Optional.empty();
    }
    String others =
        all.stream()
            .filter(text -> !text.equals(id.text()))
            .limit(NAMED)
            .map(text -> "'" + text + "'")
            .reduce((a, b) -> a + ", " + b)
            .orElseThrow();
    return Optional.of(
        Say.plain(
            FlagKind.SIMILAR_ID,
            Flag.Weight.NOTE,
            "The ID '" + id + "' differs only in case or blanks from " + others + ".",
            "If they are one sample, correct the ID in the export and deliver it again."));
  }

  private static String folded(SampleId id) {
    return id.text().replaceAll("\\s", "").toUpperCase(Locale.ROOT).toLowerCase(Locale.ROOT);
  }
}
