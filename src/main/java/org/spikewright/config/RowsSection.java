package org.spikewright.config;

import java.util.ArrayList;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.mapping.Glob;
import org.spikewright.mapping.RowRules;
import org.spikewright.mapping.RowRules.ExtraCells;
import org.spikewright.mapping.SignalWords;
import org.spikewright.reading.Role;

/** Reads {@code [words]}, {@code [skip]}, {@code [roles]} and the role in {@code [fixed]}. */
final class RowsSection {
  private static final String PATTERNS = "a word or a list of words; * stands for any characters";

  private RowsSection() {}

  static SignalWords words(Optional<Section> section) {
    return section
        .map(
            words ->
                new SignalWords(
                    globs(words, "over_range"),
                    globs(words, "below_range"),
                    globs(words, "missing")))
        .orElse(SignalWords.NONE);
  }

  static RowRules rules(Section root, Optional<Section> fixed, ExtraCells extraCells) {
    Optional<Section> roles = root.section("roles", MappingKeys.KEYS.get("roles"));
    Optional<Role> role =
        fixed.flatMap(
            section ->
                section.oneOf(
                    "role",
                    Section.words(new Role[] {Role.SAMPLE, Role.BLANK, Role.CONTROL}, Role::word)));
    if (roles.isPresent() && fixed.isPresent() && fixed.get().has("role")) {
      fixed
          .get()
          .fault(
              "role",
              "role in [fixed] beside [roles]",
              "one of the two: either all rows are" + " of one role, or a column tells");
    }
    return new RowRules(
        skips(root.openSection("skip")),
        roles.flatMap(RowsSection::roles),
        role.orElse(Role.SAMPLE),
        extraCells);
  }

  private static List<RowRules.Skip> skips(Optional<Section> section) {
    List<RowRules.Skip> skips = new ArrayList<>();
    if (section.isPresent()) {
      for (String header : section.get().keys()) {
        skips.add(new RowRules.Skip(header, globs(section.get(), header)));
      }
    }
    return skips;
  }

  private static Optional<RowRules.Roles> roles(Section section) {
    Optional<String> header = section.text("column", "the header of the column that tells roles");
    if (!section.has("column")) {
      section.missing("column", "the header of the column that tells roles");
    }
    Map<Role, List<Glob>> patterns = new EnumMap<>(Role.class);
    for (Role role : Role.values()) {
      List<Glob> globs = globs(section, MappingKeys.key(role));
      if (!globs.isEmpty()) {
        patterns.put(role, globs);
      }
    }
    if (patterns.isEmpty()) {
      section.missing("sample", "patterns for at least one role");
    }
    return header.map(column -> new RowRules.Roles(column, Map.copyOf(patterns)));
  }

  private static List<Glob> globs(Section section, String key) {
    return section.texts(key, PATTERNS).stream().map(text -> new Glob(text.strip())).toList();
  }
}
