package org.spikewright.ledger;

/**
 * Text as databases keep it. A NUL ends a text in one database and is refused by another, and half
 * a surrogate pair has no UTF-8 form, so that two different words would become one. Both, and the
 * mark itself, are written as the mark and four hexadecimal digits.
 */
final class StoredText {
  private static final char MARK = '\u241b';

  private StoredText() {}

  static String encode(String text) {
    for (int i = 0; i < text.length(); i++) {
      char c = text.charAt(i);
      if (c == 0 || c == MARK || Character.isSurrogate(c)) {
        return encodeFrom(text);
      }
    }
    return text;
  }

  static String decode(String stored) {
    if (stored.indexOf(MARK) < 0) {
      return stored;
    }
    StringBuilder text = new StringBuilder(stored.length());
    for (int i = 0; i < stored.length(); i++) {
      char c = stored.charAt(i);
      if (c == MARK) {
        text.append((char) Integer.parseInt(stored.substring(i + 1, i + 5), 16));
        i += 4;
      } else {
        text.append(c);
      }
    }
    return text.toString();
  }

  private static String encodeFrom(String text) {
    StringBuilder stored = new StringBuilder(text.length() + 8);
    for (int i = 0; i < text.length(); i++) {
      char c = text.charAt(i);
      boolean pair =
          Character.isHighSurrogate(c)
              && i + 1 < text.length()
              && Character.isLowSurrogate(text.charAt(i + 1));
      if (pair) {
        stored.append(c).append(text.charAt(++i));
      } else if (c == 0 || c == MARK || Character.isSurrogate(c)) {
        stored.append(MARK).append(Integer.toHexString(0x10000 | c), 1, 5);
      } else {
        stored.append(c);
      }
    }
    return stored.toString();
  }
}
