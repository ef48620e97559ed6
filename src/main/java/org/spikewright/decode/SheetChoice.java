package org.spikewright.decode;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.stream.Collectors;

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
   * @param wanted names; empty means the first sheet that a person sees
   * @throws Unreadable when a wanted name is missing or stands twice
   */
  static List<Integer> among(List<SheetChoice> sheets, List<String> wanted) {
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
    List<String> names = sheets.stream().map(SheetChoice::name).toList();
    List<Integer> chosen = new ArrayList<>();
    for (String name : wanted.stream().distinct().toList()) {
      int count = Collections.frequency(names, name);
      if (count != 1) {
        throw new Unreadable(
            "the file",
            (count == 0 ? "no sheet " : count + " sheets ") + Shown.quoted(name),
            "one of the sheets of this file: " + listed(names),
            "correct the sheet's name in the mapping, or in the file");
      }
      chosen.add(names.indexOf(name));
    }
    Collections.sort(chosen);
    return List.copyOf(chosen);
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
