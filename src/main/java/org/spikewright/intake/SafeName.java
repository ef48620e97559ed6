package org.spikewright.intake;

import java.nio.charset.StandardCharsets;
import java.text.Normalizer;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Set;

/**
 * One part of a path in the archive: a name that every common file system accepts, that says
 * nothing but itself, and that leaves room for what is written beside it.
 *
 * @param stem the name up to its extension
 * @param extension with its dot; may be empty
 */
record SafeName(String stem, String extension) {
  /** Bytes of UTF-8 that common file systems accept in one part of a path. */
  static final int LONGEST = 255;

  private static final int LONGEST_EXTENSION = 17;
  private static final int ROOM =
      Arrays.stream(Beside.values()).mapToInt(each -> each.ending().length()).max().orElseThrow();

  /** Characters that some file system gives a meaning. */
  private static final String MEANT = "\\/:*?\"<>|";

  /** Names that are devices on Windows, whatever their extension. */
  private static final Set<String> DEVICES =
      Set.of("con", "prn", "aux", "nul", "clock$", "conin$", "conout$");

  /** Endings under which the archive itself writes. */
  private static final List<String> OURS =
      Arrays.stream(Beside.values()).map(Beside::ending).toList();

  /** Makes a part safe; parts that are safe already stay as they are. */
  static SafeName of(String part) {
    StringBuilder safe = new StringBuilder();
    part.codePoints()
        .map(point -> ShownName.isUnseen(point) || MEANT.indexOf(point) >= 0 ? '_' : point)
        .forEach(safe::appendCodePoint);
    for (int end = safe.length() - 1; end >= 0 && " .".indexOf(safe.charAt(end)) >= 0; end--) {
      safe.setCharAt(end, '_');
    }
    if (safe.isEmpty() || safe.charAt(0) == '.') {
      safe.replace(0, Math.min(1, safe.length()), "_");
    }
    return split(keepClearOfOurs(safe.toString())).keepClearOfDevices();
  }

  /** Names that differ here differ on every file system. */
  static String folded(String name) {
    String composed = Normalizer.normalize(name, Normalizer.Form.NFC);
    String caseless = composed.toUpperCase(Locale.ROOT).toLowerCase(Locale.ROOT);
    return Normalizer.normalize(caseless, Normalizer.Form.NFC);
  }

  /**
   * The name, shortened where it and the longest ending would not fit.
   *
   * @param number from 1; above 1 it is part of the name, as in {@code run7-2.csv}
   */
  String numbered(int number) {
    String tail = (number > 1 ? "-" + number : "") + extension;
    String kept = cut(stem, LONGEST - ROOM - bytes(tail));
    return kept + tail;
  }

  private static String keepClearOfOurs(String name) {
    String lower = name.toLowerCase(Locale.ROOT);
    if (lower.equals(Journal.FILE_NAME)) {
      return "_" + name;
    }
    for (String ending : OURS) {
      if (lower.endsWith(ending)) {
        int dot = name.length() - ".txt".length();
        return name.substring(0, dot) + "_" + name.substring(dot);
      }
    }
    return name;
  }

  private static SafeName split(String name) {
    int dot = name.lastIndexOf('.');
    boolean hasExtension = dot > 0 && bytes(name.substring(dot)) <= LONGEST_EXTENSION;
    return hasExtension
        ? new SafeName(name.substring(0, dot), name.substring(dot))
        : new SafeName(name, "");
  }

  private SafeName keepClearOfDevices() {
    int dot = stem.indexOf('.');
    String first = (dot < 0 ? stem : stem.substring(0, dot)).strip().toLowerCase(Locale.ROOT);
    boolean device = DEVICES.contains(first) || first.matches("(com|lpt)[0-9¹²³]");
    return device ? new SafeName("_" + stem, extension) : this;
  }

  private static String cut(String text, int room) {
    if (bytes(text) <= room) {
      return text;
    }
    int end = 0;
    for (int used = 0; end < text.length(); ) {
      int next = text.offsetByCodePoints(end, 1);
      used += bytes(text.substring(end, next));
      if (used > room) {
        break;
      }
      end = next;
    }
    // A stem that now ends in a dot or blank would be trouble where nothing follows it.
    return text.substring(0, end).replaceAll("[. ]+$", "_");
  }

  private static int bytes(String text) {
    return text.getBytes(StandardCharsets.UTF_8).length;
  }
}
