package org.spikewright.config;

import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.spikewright.mapping.ToolChoice;
import org.spikewright.quantity.PlusMinus;
import org.spikewright.quantity.PlusMinus.Meaning;

/** What the tables of stocks and of glassware have in common: names, and what ± means. */
final class ShelfNames {
  private static final Map<String, Meaning> MEANINGS =
      Section.words(Meaning.values(), Meaning::word);

  private ShelfNames() {}

  /** The name as it is compared; a fault where mappings could not use it. */
  static String checked(Section root, String key, Set<String> taken) {
    String name = ToolChoice.normal(key);
    String expected = "a name without commas and without the word \"to\" between blanks";
    if (name.isEmpty() || name.contains(",") || name.contains(" to ")) {
      root.fault(key, "the name '" + key + "'", expected);
    }
    if (taken.contains(name)) {
      root.fault(key, "the name '" + name + "' again", "each name once");
    }
    return name;
  }

  /** What the number after ± is; rectangular where nothing is said. */
  static PlusMinus means(Section section) {
    Optional<Meaning> meaning = section.oneOf("means", MEANINGS);
    String expected = "the coverage factor of means = \"expanded\", above 0, such as 2";
    Optional<Double> k = section.number("k", expected);
    if (meaning.equals(Optional.of(Meaning.EXPANDED))) {
      if (!section.has("k")) {
        section.missing("k", expected);
      }
      if (k.isPresent() && !(k.get() > 0)) {
        section.fault("k", k.get() + " for " + section.named("k"), expected);
        return PlusMinus.of(Meaning.EXPANDED);
      }
      return k.map(PlusMinus::expanded).orElse(PlusMinus.of(Meaning.EXPANDED));
    }
    if (section.has("k")) {
      section.fault("k", "k without means = \"expanded\"", "it only there");
    }
    return meaning.map(PlusMinus::of).orElse(PlusMinus.RECTANGULAR);
  }
}
