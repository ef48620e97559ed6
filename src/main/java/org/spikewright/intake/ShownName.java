package org.spikewright.intake;

import java.nio.file.Path;
import java.util.Locale;

/**
 * Names of files as they may be shown in a log, a workbook or a note. A name may hold line ends,
 * controls and marks that turn the direction of text round; shown as they stand they would forge
 * lines.
 */
public final class ShownName {
  private ShownName() {}

  /** A path's parts, separated by {@code /} on every machine, made safe. */
  public static String of(Path relative) {
    StringBuilder shown = new StringBuilder();
    for (Path part : relative) {
      shown.append(shown.isEmpty() ? "" : "/").append(part);
    }
    return of(shown.toString());
  }

  /** Text with every unseen character written as {@code \}{@code u000a}. */
  public static String of(String text) {
    if (text.codePoints().noneMatch(ShownName::isUnseen)) {
      return text;
    }
    StringBuilder shown = new StringBuilder();
    text.codePoints()
        .forEach(
            point -> {
              if (isUnseen(point)) {
                shown.append(String.format(Locale.ROOT, "\\u%04x", point));
              } else {
                shown.appendCodePoint(point);
              }
            });
    return shown.toString();
  }

  /** Controls, direction marks and other formatting, line and paragraph ends, half characters. */
  static boolean isUnseen(int point) {
    return switch (Character.getType(point)) {
      case Character.CONTROL,
          Character.FORMAT,
          Character.LINE_SEPARATOR,
          Character.PARAGRAPH_SEPARATOR,
          Character.SURROGATE ->
          true;
      default -> false;
    };
  }
}
