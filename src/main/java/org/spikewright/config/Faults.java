package org.spikewright.config;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;

/** Collects the faults of one file. */
final class Faults {
  private final String file;
  private final List<ConfigFault> faults = new ArrayList<>();
  private final Set<String> probablyMeant = new HashSet<>();
  private boolean torn;

  Faults(String file) {
    this.file = file;
  }

  void add(At at, String found, String expected) {
    add(at, found, expected, Optional.empty());
  }

  void add(At at, String found, String expected, Optional<String> nearest) {
    faults.add(new ConfigFault(file, at.line(), at.column(), found, expected, nearest));
  }

  /** A key that nobody knows; the one that was probably meant is not reported as missing too. */
  void unknownKey(At at, String section, String found, String expected, Optional<String> nearest) {
    add(at, found, expected, nearest);
    nearest.ifPresent(key -> probablyMeant.add(section + " " + key));
  }

  /** The file is no whole TOML: what seems to be missing may only be unreadable. */
  void torn(At at, String found, String expected) {
    add(at, found, expected);
    torn = true;
  }

  /** A key that is not there, unless another fault explains it. */
  void missing(At at, String section, String key, String expected) {
    String name = section.isEmpty() ? "" : section.substring(1, section.length() - 1);
    if (!isExplained(section, key) && !isExplained("", name)) {
      add(at, "no " + key + (section.isEmpty() ? "" : " in " + section), expected);
    }
  }

  /** Whether a misspelt key was probably meant to be this one, or the file is torn. */
  boolean isExplained(String section, String key) {
    return torn || probablyMeant.contains(section + " " + key);
  }

  boolean isEmpty() {
    return faults.isEmpty();
  }

  /** All faults in the order of the file. */
  List<ConfigFault> inOrder() {
    return faults.stream()
        .sorted(Comparator.comparingInt(ConfigFault::line).thenComparingInt(ConfigFault::column))
        .toList();
  }
}
