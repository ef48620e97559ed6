package org.spikewright.config;

import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * The texts that make up the settings: the configuration and the tables beside it. As one text they
 * are kept with each revision; lines that only stand between them tell them apart.
 *
 * @param main the configuration
 * @param tables by name, those that are there
 */
record SettingsText(TomlText main, Map<String, TomlText> tables) {
  static final String STOCKS = "stocks";
  static final String GLASSWARE = "glassware";
  static final String CONTROLS = "controls";

  /** The tables that may stand beside the configuration, each also the key of its file's name. */
  static final List<String> TABLES = List.of(STOCKS, GLASSWARE, CONTROLS);

  /** No file may have a line that begins like this. */
  static final String MARK = "####:";

  /** Takes a copy in order. */
  SettingsText {
    tables = Collections.unmodifiableMap(new LinkedHashMap<>(tables));
  }

  /** Takes a text apart that {@link #joined()} made; a text without marks is the configuration. */
  static SettingsText of(String text) {
    Map<String, TomlText> tables = new LinkedHashMap<>();
    int end = text.length();
    for (int i = TABLES.size() - 1; i >= 0; i--) {
      String mark = mark(TABLES.get(i));
      int at = text.lastIndexOf("\n" + mark, end - 1);
      if (at >= 0) {
        tables.put(TABLES.get(i), TomlText.of(text.substring(at + 1 + mark.length(), end)));
        end = at + 1;
      }
    }
    return new SettingsText(TomlText.of(text.substring(0, end)), tables);
  }

  private static String mark(String table) {
    return MARK + " " + table + "\n";
  }

  Optional<TomlText> table(String name) {
    return Optional.ofNullable(tables.get(name));
  }

  /** The configuration as it is where it stands alone; else all, each after its mark. */
  TomlText joined() {
    if (tables.isEmpty()) {
      return main;
    }
    StringBuilder all = new StringBuilder(ended(main.text()));
    for (String name : TABLES) {
      table(name).ifPresent(text -> all.append(mark(name)).append(ended(text.text())));
    }
    return TomlText.of(all.toString());
  }

  private static String ended(String text) {
    return text.endsWith("\n") ? text : text + "\n";
  }

  /** A fault where a file has a line that would be taken for a mark. */
  static void refuseMarks(TomlText text, Faults faults) {
    int line = 1;
    for (String each : text.text().split("\n", -1)) {
      if (each.startsWith(MARK)) {
        faults.add(new At(line, 1), "a line that begins with " + MARK, "another comment");
      }
      line++;
    }
  }
}
