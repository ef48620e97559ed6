package org.spikewright.workbook;

import java.util.regex.Pattern;

/** Text as a cell can hold it, with nothing changed in silence. */
final class CellText {

  /** The most a cell holds, by the file format. */
  static final int LONGEST = 32_767;

  private static final Pattern LOOKS_ESCAPED = Pattern.compile("_(?=x[0-9A-Fa-f]{4}_)");
  private static final Pattern LOOKS_NUMERIC = Pattern.compile("[\\s0-9.,'(].*", Pattern.DOTALL);

  private CellText() {}

  /**
   * The text with characters that XML cannot hold written as {@code \}{@code u0007}, cut with a
   * mark where it is too long, and protected where the file format would read it as an escape.
   */
  static String of(String text) {
    String visible = visible(text);
    return visible.indexOf("_x") < 0
        ? cut(visible)
        : cut(LOOKS_ESCAPED.matcher(cut(visible)).replaceAll("_x005F_"));
  }

  /** Whether a spreadsheet could take the text for something else when a person edits its cell. */
  static boolean needsQuote(String text) {
    if (text.isEmpty()) {
      return false;
    }
    return "=+-@\t".indexOf(text.charAt(0)) >= 0 || LOOKS_NUMERIC.matcher(text).matches();
  }

  private static String cut(String text) {
    if (text.length() <= LONGEST) {
      return text;
    }
    String mark = "… [cut: " + text.length() + " characters]";
    int end = LONGEST - mark.length();
    return text.substring(0, Character.isHighSurrogate(text.charAt(end - 1)) ? end - 1 : end)
        + mark;
  }

  private static String visible(String text) {
    int i = 0;
    while (i < text.length() && isPlain(text.charAt(i))) {
      i++;
    }
    return i == text.length() ? text : escaped(text);
  }

  /** Anything that needs no second look. */
  private static boolean isPlain(char c) {
    return c >= ' ' && c < '\u007f' || c > '\u009f' && c < '\ud800' || c == '\n' || c == '\t';
  }

  private static String escaped(String text) {
    StringBuilder out = new StringBuilder(text.length() + 16);
    for (int i = 0; i < text.length(); i++) {
      char c = text.charAt(i);
      boolean pair =
          Character.isHighSurrogate(c)
              && i + 1 < text.length()
              && Character.isLowSurrogate(text.charAt(i + 1));
      if (pair) {
        out.append(c).append(text.charAt(++i));
      } else if (c == '\r' && i + 1 < text.length() && text.charAt(i + 1) == '\n') {
        // A line break of another system: the line feed that follows says it.
        continue;
      } else if (isPlain(c) || c >= '\ue000' && c < '\ufffe') {
        out.append(c);
      } else {
        out.append("\\u").append(String.format(java.util.Locale.ROOT, "%04X", (int) c));
      }
    }
    return out.toString();
  }
}
