package org.spikewright.decode;

/** Texts from a file as messages show them: on one line, of bounded length. */
final class Shown {
  private static final int MOST = 60;

  private Shown() {}

  /** The text in quotation marks, without control characters, cut to a readable length. */
  static String quoted(String text) {
    return '"' + plain(text, MOST) + '"';
  }

  /** The text without control characters, cut to a length. */
  static String plain(String text, int most) {
    StringBuilder shown = new StringBuilder();
    for (int i = 0; i < text.length() && shown.length() < most; i++) {
      char c = text.charAt(i);
      shown.append(Character.isISOControl(c) ? ' ' : c);
    }
    return text.length() > most ? shown + "…" : shown.toString();
  }
}
