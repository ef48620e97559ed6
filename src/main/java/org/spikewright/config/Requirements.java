package org.spikewright.config;

import java.util.List;
import org.spikewright.mapping.Fact;

/** Says which facts and keys a mapping lacks, and which have no business beside the others. */
final class Requirements {
  private final Section root;
  private final Faults faults;
  private final Named named;

  Requirements(Section root, Named named) {
    this.root = root;
    this.faults = root.faults();
    this.named = named;
  }

  boolean has(Fact fact) {
    return named.has(fact);
  }

  boolean fixedHas(String key) {
    return root.has("fixed", key);
  }

  boolean methodHas(String key) {
    return root.has("method", key);
  }

  /** A fact must stand somewhere. */
  void require(Fact fact, String why) {
    boolean explained =
        List.of("[columns]", "[fixed]", "[label]", "[layout]", "[block]", "[sheet]", "[file]")
            .stream()
            .anyMatch(section -> faults.isExplained(section, fact.word()));
    if (!named.has(fact) && !explained) {
      faults.add(
          root.at("columns"),
          "no "
              + fact.word()
              + " in [columns], [layout], [label], [block], [sheet], [file]"
              + (MappingKeys.fixable().contains(fact) ? " or [fixed]" : ""),
          fact.expectation() + "; " + why);
    }
  }

  /** A fact must not stand anywhere. */
  void refuse(Fact fact, String found, String expected) {
    if (named.has(fact)) {
      faults.add(named.at(fact), fact.word() + " " + found, expected);
    }
  }

  /** Two facts stand together or not at all. */
  void together(Fact one, Fact other) {
    if (!named.has(other)) {
      refuse(one, "without " + other.word(), other.word() + " beside it");
    }
  }

  /** A key must stand in {@code [fixed]} or {@code [method]}. */
  void missingKey(String section, String key, String expected) {
    faults.missing(root.at(section), "[" + section + "]", key, expected);
  }

  /** A key must not stand there. */
  void refuseKey(String section, String key, String found, String expected) {
    if (root.has(section, key)) {
      faults.add(root.at(section, key), key + " " + found, expected);
    }
  }
}
