package org.spikewright.config;

import java.time.ZoneId;
import java.util.ArrayList;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeSet;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.regex.PatternSyntaxException;
import org.spikewright.mapping.Fact;
import org.spikewright.mapping.Fact.Kind;
import org.spikewright.mapping.Form;
import org.spikewright.mapping.Notation;
import org.spikewright.mapping.Places;
import org.spikewright.mapping.Spelling;
import org.spikewright.mapping.TimeForm;
import org.spikewright.quantity.Unit;
import org.tomlj.TomlTable;

/** Reads {@code [columns]}, {@code [label]} and sections of names: where facts stand. */
final class PlacesSection {
  private static final Pattern GROUP_NAME = Pattern.compile("\\(\\?<([a-zA-Z][a-zA-Z0-9]*)>");

  private final Notation notation;
  private final ZoneId defaultZone;
  private final Named named;

  PlacesSection(Notation notation, ZoneId defaultZone, Named named) {
    this.notation = notation;
    this.defaultZone = defaultZone;
    this.named = named;
  }

  Map<Fact, Places.Column> columns(Section section) {
    Map<Fact, Places.Column> columns = new EnumMap<>(Fact.class);
    for (Fact fact : Fact.values()) {
      if (section.has(fact.word())) {
        named.add(fact, section.at(fact.word()));
        column(section, fact).ifPresent(column -> columns.put(fact, column));
      }
    }
    return columns;
  }

  private Optional<Places.Column> column(Section section, Fact fact) {
    String expected = "a header, or a table such as " + example(fact, "header");
    if (!(section.value(fact.word()).orElse(null) instanceof TomlTable)) {
      return section
          .text(fact.word(), expected)
          .map(header -> new Places.Column(List.of(header), form(fact, Optional.empty())));
    }
    Section inner =
        section.section(fact.word(), MappingKeys.placeKeys(fact, "header")).orElseThrow();
    List<String> headers = inner.texts("header", expected);
    if (!inner.has("header")) {
      inner.missing("header", "the column's header");
    }
    if (headers.size() > 1 && fact.kind() != Kind.TIME) {
      inner.fault("header", headers.size() + " headers for " + fact.word(), "one header");
    }
    if (headers.stream().anyMatch(String::isBlank)) {
      inner.fault("header", "an empty header for " + fact.word(), expected);
    }
    Form form = form(fact, Optional.of(inner));
    return headers.isEmpty() ? Optional.empty() : Optional.of(new Places.Column(headers, form));
  }

  private static String example(Fact fact, String key) {
    return fact.kind() == Kind.AMOUNT || fact == Fact.SIGNAL_SD
        ? "{ " + key + " = \"…\", unit = \"…\" }"
        : "{ " + key + " = \"…\" }";
  }

  /** How a fact is written: its unit, or its format and zone. */
  Form form(Fact fact, Optional<Section> inner) {
    if (fact.kind() == Kind.TIME) {
      Optional<ZoneId> zone = inner.flatMap(section -> Zones.zone(section, "zone"));
      return new Form(
          Optional.empty(),
          Optional.of(new TimeForm(inner.flatMap(this::pattern), zone.orElse(defaultZone))));
    }
    if (fact.kind() != Kind.AMOUNT && fact != Fact.SIGNAL_SD) {
      return Form.PLAIN;
    }
    Optional<Unit> unit = inner.flatMap(section -> unit(section, fact));
    return new Form(unit, Optional.empty());
  }

  private Optional<Unit> unit(Section section, Fact fact) {
    Optional<Unit> unit =
        UnitsSection.unit(section, "unit", notation, "a unit of " + fact.expectation());
    if (unit.isPresent() && !fact.fits(unit.get().dimension())) {
      section.fault(
          "unit",
          "'"
              + unit.get()
              + "', which is "
              + unit.get().dimension().words()
              + ", for "
              + fact.word(),
          "a unit of " + fact.expectation());
      return Optional.empty();
    }
    unit.ifPresent(
        known -> named.unit(fact, new Named.Known(known, section.at("unit"), Optional.empty())));
    return unit;
  }

  private Optional<String> pattern(Section section) {
    String expected = "a pattern with date and time of day, such as \"dd.MM.yyyy HH:mm:ss\"";
    Optional<String> pattern = section.text("format", expected);
    Optional<String> fault = pattern.flatMap(TimeForm::fault);
    fault.ifPresent(
        why -> section.fault("format", "'" + pattern.get() + "' (" + why + ")", expected));
    return fault.isPresent() ? Optional.empty() : pattern;
  }

  List<Places.Label> labels(List<Section> sections) {
    List<Places.Label> labels = new ArrayList<>();
    for (Section section : sections) {
      Optional<String> header = section.text("column", "the header of the label's column");
      if (!section.has("column")) {
        section.missing("column", "the header of the label's column");
      }
      Optional<Pattern> pattern = regex(section);
      Map<Fact, Places.Group> groups = groups(section, pattern);
      if (header.isPresent() && pattern.isPresent()) {
        labels.add(new Places.Label(header.get(), pattern.get(), groups));
      }
    }
    return labels;
  }

  /** Facts in a name: {@code [file]}, {@code [sheet]} or {@code [block]}. */
  List<Places.Named> name(Optional<Section> section) {
    if (section.isEmpty()) {
      return List.of();
    }
    Optional<Pattern> pattern = regex(section.get());
    Map<Fact, Places.Group> groups = groups(section.get(), pattern);
    return pattern.map(found -> List.of(new Places.Named(found, groups))).orElse(List.of());
  }

  /** The pattern of a section that must have one; empty, with a fault, where it has none. */
  static Optional<Pattern> regex(Section section) {
    String expected = "a regular expression with named groups, such as '(?<id>[A-Z]+-\\d+).*'";
    Optional<String> text = section.text("pattern", expected);
    if (!section.has("pattern")) {
      section.missing("pattern", expected);
    }
    try {
      return text.map(Pattern::compile);
    } catch (PatternSyntaxException e) {
      section.fault(
          "pattern",
          "'"
              + text.get()
              + "' ("
              + e.getDescription()
              + " near character "
              + (e.getIndex() + 1)
              + ")",
          expected);
      return Optional.empty();
    }
  }

  /**
   * The facts in the groups of a pattern: those that the section names, and those whose word is the
   * name of a group.
   */
  Map<Fact, Places.Group> groups(Section section, Optional<Pattern> pattern) {
    Map<Fact, Places.Group> groups = new EnumMap<>(Fact.class);
    for (String group : groupNames(pattern)) {
      Optional<Fact> fact = Fact.of(group).filter(MappingKeys.inText()::contains);
      if (fact.isPresent() && !section.has(group)) {
        named.add(fact.get(), section.at("pattern"));
        Form form = form(fact.get(), Optional.empty());
        groups.put(fact.get(), new Places.Group(group, form));
      }
    }
    for (Fact fact : MappingKeys.inText()) {
      if (section.has(fact.word())) {
        named.add(fact, section.at(fact.word()));
        group(section, fact, pattern).ifPresent(group -> groups.put(fact, group));
      }
    }
    return groups;
  }

  private Optional<Places.Group> group(Section section, Fact fact, Optional<Pattern> pattern) {
    String expected = "a group of the pattern, or a table such as " + example(fact, "group");
    if (!(section.value(fact.word()).orElse(null) instanceof TomlTable)) {
      Optional<String> name = section.text(fact.word(), expected);
      name.ifPresent(group -> checkGroup(section, fact.word(), group, pattern));
      return name.map(group -> new Places.Group(group, form(fact, Optional.empty())));
    }
    Section inner =
        section.section(fact.word(), MappingKeys.placeKeys(fact, "group")).orElseThrow();
    Optional<String> name = inner.text("group", expected);
    if (!inner.has("group")) {
      inner.missing("group", "the group's name");
    }
    name.ifPresent(group -> checkGroup(inner, "group", group, pattern));
    Form form = form(fact, Optional.of(inner));
    return name.map(group -> new Places.Group(group, form));
  }

  /** The names of a pattern's groups. */
  static Set<String> groupNames(Optional<Pattern> pattern) {
    Set<String> known = new TreeSet<>();
    if (pattern.isPresent()) {
      Matcher names = GROUP_NAME.matcher(pattern.get().pattern());
      while (names.find()) {
        known.add(names.group(1));
      }
    }
    return known;
  }

  private static void checkGroup(
      Section section, String key, String group, Optional<Pattern> pattern) {
    if (pattern.isEmpty()) {
      return;
    }
    Set<String> known = groupNames(pattern);
    if (!known.contains(group)) {
      section
          .faults()
          .add(
              section.at(key),
              "'" + group + "', which the pattern does not have",
              known.isEmpty()
                  ? "named groups in the pattern: (?<name>…)"
                  : "one of " + Section.quoted(known),
              Spelling.nearest(group, known));
    }
  }
}
