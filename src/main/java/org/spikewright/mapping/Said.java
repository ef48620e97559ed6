package org.spikewright.mapping;

/** Keeps what a file says short enough to be shown. */
final class Said {
  private static final int LONGEST = 80;

  private Said() {}

  /** A text of at most {@value #LONGEST} characters on one line. */
  static String briefly(String text) {
    String line = text.strip().replaceAll("\\p{Cntrl}", " ");
    return line.length() <= LONGEST ? line : line.substring(0, LONGEST - 1) + "…";
  }

  /** As {@link #briefly}, in quotes; in words when nothing stands there. */
  static String quoted(String text) {
    return text.isBlank() ? "nothing" : "'" + briefly(text) + "'";
  }
}
