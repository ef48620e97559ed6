package org.spikewright.config;

import java.util.Optional;

/**
 * The texts that make up the settings: the configuration and the tables of stocks and glassware. As
 * one text they are kept with each revision; lines that only stand between them tell them apart.
 *
 * @param main the configuration
 * @param stocks the table of stocks, where there is one
 * @param glassware the table of glassware, where there is one
 */
record SettingsText(TomlText main, Optional<TomlText> stocks, Optional<TomlText> glassware) {
  /** No file may have a line that begins like this. */
  static final String MARK = "####:";

  private static final String STOCKS = MARK + " stocks\n";
  private static final String GLASSWARE = MARK + " glassware\n";

  /** Takes a text apart that {@link #joined()} made; a text without marks is the configuration. */
  static SettingsText of(String text) {
    int glassware = lineAt(text, GLASSWARE);
    int stocks = lineAt(text, STOCKS);
    int endOfStocks = glassware < 0 ? text.length() : glassware;
    int endOfMain = stocks < 0 ? endOfStocks : stocks;
    return new SettingsText(
        TomlText.of(text.substring(0, endOfMain)),
        part(text, stocks, STOCKS, endOfStocks),
        part(text, glassware, GLASSWARE, text.length()));
  }

  private static Optional<TomlText> part(String text, int from, String mark, int to) {
    return from < 0
        ? Optional.empty()
        : Optional.of(TomlText.of(text.substring(from + mark.length(), to)));
  }

  private static int lineAt(String text, String mark) {
    int at = text.indexOf("\n" + mark);
    return at < 0 ? -1 : at + 1;
  }

  /** The configuration as it is where it stands alone; else all, each after its mark. */
  TomlText joined() {
    if (stocks.isEmpty() && glassware.isEmpty()) {
      return main;
    }
    StringBuilder all = new StringBuilder(ended(main.text()));
    stocks.ifPresent(text -> all.append(STOCKS).append(ended(text.text())));
    glassware.ifPresent(text -> all.append(GLASSWARE).append(ended(text.text())));
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
