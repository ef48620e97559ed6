package org.spikewright.config;

import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeSet;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Collectors;
import org.spikewright.mapping.Fact;
import org.spikewright.mapping.LayoutRule;
import org.spikewright.mapping.LayoutRule.Kind;
import org.spikewright.mapping.Places;
import org.spikewright.mapping.Spelling;
import org.tomlj.TomlTable;

/** Reads {@code [layout]}: which columns hold signals. */
final class LayoutSection {
  private static final Pattern IN_BRACES = Pattern.compile("\\{([^{}]*)\\}");

  /**
   * What it says.
   *
   * @param rule which columns hold signals
   * @param groups what their headers say besides
   */
  record Layout(LayoutRule rule, Map<Fact, Places.Group> groups) {}

  private static final String HEADERS = "a list of headers";

  private static final Layout LONG = new Layout(LayoutRule.LONG, Map.of());

  private final Section section;
  private final PlacesSection places;
  private final Named named;

  private LayoutSection(Section section, PlacesSection places, Named named) {
    this.section = section;
    this.places = places;
    this.named = named;
  }

  static Layout read(Section root, PlacesSection places, Named named) {
    return root.section("layout", MappingKeys.KEYS.get("layout"))
        .map(section -> new LayoutSection(section, places, named).read(root))
        .orElse(LONG);
  }

  private Layout read(Section root) {
    Map<String, Kind> kinds = Section.words(Kind.values(), Kind::word);
    if (!section.has("kind")) {
      section.missing("kind", "one of " + Section.quoted(kinds.keySet()));
    }
    Optional<Kind> told = section.oneOf("kind", kinds);
    if (told.isEmpty()) {
      checkTypes(root);
      return LONG;
    }
    Kind kind = told.get();
    if (kind == Kind.LONG) {
      refuseAllBut("kind");
      return LONG;
    }
    // Faulty or not, the signals' columns count as named.
    named.add(Fact.SIGNAL, section.at("kind"));
    if (root.has("columns", Fact.SIGNAL.word())) {
      section
          .faults()
          .add(
              root.at("columns", Fact.SIGNAL.word()),
              "signal in [columns] beside kind = \"" + kind.word() + "\" in [layout]",
              "columns of signals in one of them");
    }
    if (section.has("columns") == section.has("pattern")) {
      section.fault(
          section.has("pattern") ? "pattern" : "kind",
          (section.has("pattern") ? "pattern and columns" : "neither pattern nor columns")
              + " in [layout]",
          "the columns of signals, either listed in columns or found by pattern");
      return LONG;
    }
    return section.has("columns") ? listed(kind, root) : found(kind, root);
  }

  /** Without a kind only this can be said: what is of the wrong type by itself. */
  private void checkTypes(Section root) {
    named.add(Fact.SIGNAL, section.at());
    section.texts("columns", HEADERS);
    Optional<Pattern> pattern =
        section.has("pattern") ? PlacesSection.regex(section) : Optional.empty();
    places.groups(section, pattern);
    beside(root, PlacesSection.groupNames(pattern));
  }

  private void refuseAllBut(String allowed) {
    for (String key : section.keys()) {
      if (!key.equals(allowed)) {
        section.fault(key, key + " in [layout] without a wide kind", "kind alone");
      }
    }
  }

  private Layout listed(Kind kind, Section root) {
    List<String> headers = section.texts("columns", HEADERS);
    if (headers.stream().anyMatch(String::isBlank)) {
      section.fault("columns", "an empty header in columns", "headers");
    }
    for (Fact fact : MappingKeys.inText()) {
      if (section.has(fact.word())) {
        section.fault(
            fact.word(), fact.word() + " in [layout] without pattern", "a group of a pattern");
      }
    }
    Fact told = kind.told().get(0);
    named.add(told, section.at("columns"));
    refuseInColumns(root, told);
    return new Layout(
        new LayoutRule(kind, headers, Optional.empty(), beside(root, Set.of())), Map.of());
  }

  private Layout found(Kind kind, Section root) {
    Optional<Pattern> pattern = PlacesSection.regex(section);
    Map<Fact, Places.Group> groups = places.groups(section, pattern);
    if (pattern.isPresent() && kind.told().stream().noneMatch(groups::containsKey)) {
      section.fault(
          "pattern",
          "no group of the pattern for " + oneOf(kind),
          "a header that says it, as kind = \""
              + kind.word()
              + "\" means: (?<"
              + kind.told().get(0).word()
              + ">…)");
    }
    groups.keySet().forEach(fact -> refuseInColumns(root, fact));
    return new Layout(
        new LayoutRule(kind, List.of(), pattern, beside(root, PlacesSection.groupNames(pattern))),
        groups);
  }

  private static String oneOf(Kind kind) {
    return kind.told().stream().map(Fact::word).collect(Collectors.joining(" or "));
  }

  private void refuseInColumns(Section root, Fact fact) {
    if (root.has("columns", fact.word())) {
      section
          .faults()
          .add(
              root.at("columns", fact.word()),
              fact.word() + " in [columns], which the headers under [layout] tell",
              "it in one of them");
    }
  }

  private Map<Fact, LayoutRule.Beside> beside(Section root, Set<String> groups) {
    Map<Fact, LayoutRule.Beside> beside = new EnumMap<>(Fact.class);
    Optional<Section> inner = section.section("beside", MappingKeys.words(MappingKeys.beside()));
    if (inner.isEmpty()) {
      return beside;
    }
    for (Fact fact : MappingKeys.beside()) {
      if (inner.get().has(fact.word())) {
        named.add(fact, inner.get().at(fact.word()));
        refuseInColumns(root, fact);
        template(inner.get(), fact, groups).ifPresent(found -> beside.put(fact, found));
      }
    }
    return beside;
  }

  private Optional<LayoutRule.Beside> template(Section inner, Fact fact, Set<String> groups) {
    String expected = "a header with groups of the pattern in braces, such as \"{header} sd\"";
    if (!(inner.value(fact.word()).orElse(null) instanceof TomlTable)) {
      Optional<String> text = inner.text(fact.word(), expected);
      text.ifPresent(template -> checkBraces(inner, fact.word(), template, groups));
      return text.map(
          template -> new LayoutRule.Beside(template, places.form(fact, Optional.empty())));
    }
    Section table = inner.section(fact.word(), MappingKeys.placeKeys(fact, "header")).orElseThrow();
    if (!table.has("header")) {
      table.missing("header", expected);
    }
    Optional<String> text = table.text("header", expected);
    text.ifPresent(template -> checkBraces(table, "header", template, groups));
    return text.map(
        template -> new LayoutRule.Beside(template, places.form(fact, Optional.of(table))));
  }

  private static void checkBraces(Section where, String key, String template, Set<String> groups) {
    Set<String> known = new TreeSet<>(groups);
    known.add("header");
    Matcher braces = IN_BRACES.matcher(template);
    boolean any = false;
    while (braces.find()) {
      any = true;
      if (!known.contains(braces.group(1))) {
        where
            .faults()
            .add(
                where.at(key),
                "{" + braces.group(1) + "}, which the pattern does not have",
                "one of " + Section.quoted(known),
                Spelling.nearest(braces.group(1), known));
      }
    }
    if (!any) {
      where.fault(
          key,
          "'" + template + "', the same column beside each column of signals",
          "a header with {header} or a group in braces; or the column in [columns]");
    }
  }
}
