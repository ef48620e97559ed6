package org.spikewright.mapping;

import java.text.Normalizer;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.table.Cell;

/** Reads the facts that are names: trimmed, in NFC, case and inner blanks count. */
final class NameReader {
  private static final int LONGEST = 256;
  private static final int MOST_KEPT = 20_000;

  private final RowLookup lookup;
  private final Places places;
  private final Map<String, String> normal = new HashMap<>();

  NameReader(Places places, RowLookup lookup) {
    this.places = places;
    this.lookup = lookup;
  }

  /**
   * The name that the lookup's row gives, or {@code [fixed]} does. Empty, with a trouble added,
   * where the mapping names the fact and neither gives it.
   */
  Optional<String> read(Fact fact, List<Trouble> troubles) {
    Optional<Given> given = lookup.find(fact);
    if (given.isEmpty()) {
      Optional<String> fixed = Optional.ofNullable(places.fixedNames().get(fact));
      if (fixed.isEmpty()) {
        troubles.add(lookup.missing(fact, fact.expectation(), true));
      }
      return fixed;
    }
    if (given.get().cell() instanceof Cell.Unusable unusable) {
      troubles.add(trouble(Reason.UNUSABLE_CELL, given.get(), unusable.found(), fact));
      return Optional.empty();
    }
    String text = given.get().text();
    if (text.length() > LONGEST) {
      troubles.add(trouble(Reason.OUT_OF_BOUNDS, given.get(), text, fact));
      return Optional.empty();
    }
    return Optional.of(normal(text));
  }

  private static Trouble trouble(Reason reason, Given given, String found, Fact fact) {
    String expected = fact.expectation() + " of at most " + LONGEST + " characters";
    return new Trouble(reason, given.index(), given.column(), Said.quoted(found), expected);
  }

  /** The same object for the same text, so that equal names of a file are stored once. */
  private String normal(String text) {
    if (normal.size() >= MOST_KEPT) {
      normal.clear();
    }
    return normal.computeIfAbsent(text, same -> Normalizer.normalize(same, Normalizer.Form.NFC));
  }
}
