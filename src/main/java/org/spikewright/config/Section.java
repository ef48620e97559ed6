package org.spikewright.config;

import java.util.ArrayList;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.mapping.Spelling;
import org.tomlj.TomlArray;
import org.tomlj.TomlTable;

/**
 * One table of a TOML file with the keys it may have. Whoever reads it asks for each key with the
 * type it must have; what does not fit becomes a fault, and the reader goes on without it.
 */
final class Section {
  private final TomlTable table;
  private final String name;
  private final At at;
  private final Faults faults;

  private Section(TomlTable table, String name, At at, Faults faults) {
    this.table = table;
    this.name = name;
    this.at = at;
    this.faults = faults;
  }

  /** A table whose keys are free, such as analytes. */
  static Section open(TomlTable table, String name, At at, Faults faults) {
    return new Section(table, name, at, faults);
  }

  /** A table that may have only these keys; every other one is a fault. */
  static Section of(TomlTable table, String name, At at, Collection<String> known, Faults faults) {
    Section section = new Section(table, name, at, faults);
    section.refuseUnknown(known);
    return section;
  }

  private void refuseUnknown(Collection<String> known) {
    for (String key : table.keySet()) {
      if (!known.contains(key)) {
        faults.unknownKey(
            at(key),
            name,
            "unknown key '" + key + "'" + (name.isEmpty() ? "" : " in " + name),
            "one of " + String.join(", ", known),
            Spelling.nearest(key, known));
      }
    }
  }

  /** The name in messages: {@code [table]}; empty for the file itself. */
  String name() {
    return name;
  }

  At at() {
    return at;
  }

  /** Where a key stands, or where the section begins when it is not there. */
  At at(String key) {
    return has(key) ? At.of(table.inputPositionOf(List.of(key))) : at;
  }

  /** Where a key of an inner table stands; where that table begins, or this one, without it. */
  At at(String inner, String key) {
    return value(inner).orElse(null) instanceof TomlTable below && below.contains(List.of(key))
        ? At.of(below.inputPositionOf(List.of(key)))
        : at(inner);
  }

  /** Whether an inner table has a key. */
  boolean has(String inner, String key) {
    return value(inner).orElse(null) instanceof TomlTable below && below.contains(List.of(key));
  }

  boolean has(String key) {
    return table.contains(List.of(key));
  }

  Collection<String> keys() {
    return table.keySet();
  }

  Optional<Object> value(String key) {
    return Optional.ofNullable(table.get(List.of(key)));
  }

  /** A key's name with its section, for messages. */
  String named(String key) {
    return name.isEmpty() ? key : key + " in " + name;
  }

  /** A text that is not blank. */
  Optional<String> text(String key, String expected) {
    return typed(key, String.class, expected).filter(text -> isFilled(key, text, expected));
  }

  /** A text that may be blank. */
  Optional<String> anyText(String key, String expected) {
    return typed(key, String.class, expected);
  }

  private boolean isFilled(String key, String text, String expected) {
    if (text.isBlank()) {
      faults.add(at(key), "an empty text for " + named(key), expected);
      return false;
    }
    return true;
  }

  Optional<Long> wholeNumber(String key, String expected) {
    return typed(key, Long.class, expected);
  }

  Optional<Boolean> yesOrNo(String key) {
    return typed(key, Boolean.class, "true or false");
  }

  /** A number, whole or not; finite. */
  Optional<Double> number(String key, String expected) {
    Optional<Object> value = value(key);
    if (value.isPresent()
        && value.get() instanceof Number number
        && Double.isFinite(number.doubleValue())) {
      return Optional.of(number.doubleValue());
    }
    value.ifPresent(other -> wrongType(key, other, expected));
    return Optional.empty();
  }

  /** One text, or a list of texts; empty when neither is there. */
  List<String> texts(String key, String expected) {
    Optional<Object> value = value(key);
    if (value.isEmpty()) {
      return List.of();
    }
    if (value.get() instanceof String text) {
      return List.of(text);
    }
    if (!(value.get() instanceof TomlArray array) || array.isEmpty()) {
      wrongType(key, value.get(), expected);
      return List.of();
    }
    List<String> texts = new ArrayList<>();
    for (int i = 0; i < array.size(); i++) {
      if (array.get(i) instanceof String text) {
        texts.add(text);
      } else {
        faults.add(At.of(array.inputPositionOf(i)), inWords(array.get(i)) + " in " + key, expected);
      }
    }
    return texts;
  }

  /** A table with known keys. */
  Optional<Section> section(String key, Collection<String> known) {
    return typed(key, TomlTable.class, "a table")
        .map(inner -> of(inner, within(key), at(key), known, faults));
  }

  /** A table whose keys are free. */
  Optional<Section> openSection(String key) {
    return typed(key, TomlTable.class, "a table")
        .map(inner -> open(inner, within(key), at(key), faults));
  }

  /** One table, or an array of tables: {@code [label]} or {@code [[label]]}. */
  List<Section> sections(String key, Collection<String> known) {
    if (!(value(key).orElse(null) instanceof TomlArray array)) {
      return section(key, known).map(List::of).orElse(List.of());
    }
    List<Section> sections = new ArrayList<>();
    for (int i = 0; i < array.size(); i++) {
      At place = At.of(array.inputPositionOf(i));
      if (array.get(i) instanceof TomlTable inner) {
        sections.add(of(inner, within(key), place, known, faults));
      } else {
        faults.add(place, inWords(array.get(i)) + " in " + key, "a table");
      }
    }
    return sections;
  }

  private String within(String key) {
    return name.isEmpty() ? "[" + key + "]" : key + " in " + name;
  }

  /** One of a few words. */
  <T> Optional<T> oneOf(String key, Map<String, T> words) {
    String expected = "one of " + quoted(words.keySet());
    Optional<String> text = text(key, expected);
    if (text.isPresent() && !words.containsKey(text.get())) {
      faults.add(
          at(key),
          "'" + text.get() + "' for " + named(key),
          expected,
          Spelling.nearest(text.get(), words.keySet()));
    }
    return text.map(words::get);
  }

  /** Words with their meaning, for {@link #oneOf}. */
  static <T> Map<String, T> words(T[] values, java.util.function.Function<T, String> word) {
    Map<String, T> words = new LinkedHashMap<>();
    for (T value : values) {
      words.put(word.apply(value), value);
    }
    return words;
  }

  void missing(String key, String expected) {
    faults.missing(at, name, key, expected);
  }

  void fault(String key, String found, String expected) {
    faults.add(at(key), found, expected);
  }

  Faults faults() {
    return faults;
  }

  private <T> Optional<T> typed(String key, Class<T> type, String expected) {
    Optional<Object> value = value(key);
    if (value.isPresent() && !type.isInstance(value.get())) {
      wrongType(key, value.get(), expected);
      return Optional.empty();
    }
    return value.map(type::cast);
  }

  void wrongType(String key, Object value, String expected) {
    faults.add(at(key), inWords(value) + " for " + named(key), expected);
  }

  static String quoted(Collection<String> words) {
    return "\"" + String.join("\", \"", words) + "\"";
  }

  private static String inWords(Object value) {
    if (value instanceof String text) {
      return "the text \"" + text + "\"";
    }
    if (value instanceof Boolean || value instanceof Number) {
      return "the " + (value instanceof Boolean ? "truth value " : "number ") + value;
    }
    if (value instanceof TomlArray array) {
      return array.isEmpty() ? "an empty list" : "a list";
    }
    return value instanceof TomlTable ? "a table" : "the date or time " + value;
  }
}
