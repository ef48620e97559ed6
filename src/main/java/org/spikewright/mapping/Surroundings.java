package org.spikewright.mapping;

import java.util.ArrayList;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.regex.Matcher;
import org.spikewright.table.Cell;
import org.spikewright.table.Row;
import org.spikewright.table.Source;

/** What names around the rows of one sheet say: the title of a block, the sheet, the file. */
final class Surroundings {
  private final Places places;
  private final Map<Fact, String> fromFileName;
  private final Map<Fact, String> fromSheetName = new EnumMap<>(Fact.class);
  private Map<Fact, String> fromTitle = Map.of();

  Surroundings(Places places, Source source, Map<Fact, String> fromFileName) {
    this.places = places;
    this.fromFileName = fromFileName;
    for (Places.Named rule : places.sheetName()) {
      source.sheet().flatMap(name -> said(rule, name)).ifPresent(fromSheetName::putAll);
    }
  }

  /** Whether a row is the title of a block; then what it says holds from here on. */
  boolean takeTitle(Row row) {
    for (Places.Named rule : places.titles()) {
      Optional<Map<Fact, String>> said = said(rule, text(row));
      if (said.isPresent()) {
        fromTitle = said.get();
        return true;
      }
    }
    return false;
  }

  /** The block has come to an end. */
  void forgetTitle() {
    fromTitle = Map.of();
  }

  /** What is said, by fact, the nearest name first. */
  Map<Fact, List<Outside>> around() {
    Map<Fact, List<Outside>> around = new EnumMap<>(Fact.class);
    add(around, places.titles(), fromTitle, "the title of its block");
    add(around, places.sheetName(), fromSheetName, "the sheet's name");
    add(around, places.fileName(), fromFileName, "the file's name");
    return around;
  }

  private static void add(
      Map<Fact, List<Outside>> around,
      List<Places.Named> rules,
      Map<Fact, String> said,
      String words) {
    for (Places.Named rule : rules) {
      rule.groups()
          .forEach(
              (fact, group) ->
                  around
                      .computeIfAbsent(fact, key -> new ArrayList<>())
                      .add(new Outside(said.getOrDefault(fact, ""), group.form(), words)));
    }
  }

  /** A row's cells that are not blank, one behind the other. */
  private static String text(Row row) {
    StringBuilder text = new StringBuilder();
    for (Cell cell : row.cells()) {
      if (!cell.isBlank()) {
        text.append(text.isEmpty() ? "" : " ").append(cell.shown().strip());
      }
    }
    return text.toString();
  }

  private static Optional<Map<Fact, String>> said(Places.Named rule, String name) {
    Matcher matcher = rule.pattern().matcher(name);
    if (name.length() > Outside.LONGEST_NAME || !matcher.matches()) {
      return Optional.empty();
    }
    Map<Fact, String> said = new EnumMap<>(Fact.class);
    rule.groups()
        .forEach(
            (fact, group) -> {
              String text = matcher.group(group.name());
              if (text != null && !text.isBlank()) {
                said.put(fact, text);
              }
            });
    return Optional.of(said);
  }
}
