package org.spikewright.decode;

import java.util.ArrayList;
import java.util.List;
import java.util.SortedSet;
import java.util.TreeSet;
import java.util.stream.Collectors;
import org.spikewright.table.SheetRule;

/**
 * Which sheets of a workbook are read.
 *
 * @param name as it stands on the tab
 * @param hidden whether the spreadsheet program hides it
 */
record SheetChoice(String name, boolean hidden) {

  /**
   * Places, from 0 and rising, of the sheets to read.
   *
   * @param sheets all sheets of the workbook, in order
   * @param wanted empty means the first sheet that a person sees
   * @throws Unreadable when a wanted sheet is missing, or a wanted name stands twice
   */
  static List<Integer> among(List<SheetChoice> sheets, List<SheetRule> wanted) {
    if (sheets.isEmpty()) {
      throw new Unreadable(
          "the file",
          "a workbook without a sheet of cells",
          "at least one sheet",
          "export the table again");
    }
    if (wanted.isEmpty()) {
      return List.of(firstVisible(sheets));
    }
    SortedSet<Integer> chosen = new TreeSet<>();
    for (SheetRule rule : wanted) {
      chosen.addAll(fitting(sheets, rule));
    }
    return List.copyOf(chosen);
  }

  private static List<Integer> fitting(List<SheetChoice> sheets, SheetRule rule) {
    List<Integer> fitting = new ArrayList<>();
    int seen = 0;
    for (int i = 0; i < sheets.size(); i++) {
      seen += sheets.get(i).hidden() ? 0 : 1;
      if (sheets.get(i).fits(rule, seen)) {
        fitting.add(i);
      }
    }
    // Only a pattern means several.
    if (fitting.isEmpty() || fitting.size() > 1 && !(rule instanceof SheetRule.Matching)) {
      List<String> names = sheets.stream().map(SheetChoice::name).toList();
      throw new Unreadable(
          "the file",
          (fitting.isEmpty() ? "no sheet " : fitting.size() + " sheets ") + words(rule),
          "one of the sheets of this file: " + listed(names),
          "correct the sheet's name in the mapping, or in the file");
    }
    return fitting;
  }

  private boolean fits(SheetRule rule, int number) {
    if (rule instanceof SheetRule.Named named) {
      return name.equals(named.name());
    }
    return !hidden
        && (rule instanceof SheetRule.Numbered wanted
            ? wanted.number() == number
            : ((SheetRule.Matching) rule).pattern().matcher(name).matches());
  }

  private static String words(SheetRule rule) {
    if (rule instanceof SheetRule.Named named) {
      return Shown.quoted(named.name());
    }
    return rule instanceof SheetRule.Numbered numbered
        ? "number " + numbered.number()
        : "that matches " + Shown.quoted(((SheetRule.Matching) rule).shown());
  }

  private static int firstVisible(List<SheetChoice> sheets) {
    for (int i = 0; i < sheets.size(); i++) {
      if (!sheets.get(i).hidden()) {
        return i;
      }
    }
    return 0;
  }

  private static String listed(List<String> names) {
    String first = names.stream().limit(20).map(Shown::quoted).collect(Collectors.joining(", "));
    return names.size() > 20 ? first + " and " + (names.size() - 20) + " more" : first;
  }
}
