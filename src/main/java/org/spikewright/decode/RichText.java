package org.spikewright.decode;

import javax.xml.stream.XMLStreamConstants;
import javax.xml.stream.XMLStreamException;

/** Collects the text of a string item of a workbook: its runs, without the phonetic ones. */
final class RichText {
  private static final int ESCAPE_LENGTH = 7;

  private final StringBuilder text = new StringBuilder();
  private boolean inText;
  private boolean inPhonetic;

  void clear() {
    text.setLength(0);
    inText = false;
    inPhonetic = false;
  }

  /** Follows one event within the item. */
  void follow(PullXml xml, int event) throws XMLStreamException {
    if (event == XMLStreamConstants.START_ELEMENT) {
      inPhonetic |= xml.name().equals("rPh");
      inText = xml.name().equals("t");
    } else if (event == XMLStreamConstants.END_ELEMENT) {
      inPhonetic &= !xml.name().equals("rPh");
      inText = false;
    } else if (inText && !inPhonetic && isText(event)) {
      xml.appendTo(text);
    }
  }

  String text() {
    return unescaped(text.toString());
  }

  static boolean isText(int event) {
    return event == XMLStreamConstants.CHARACTERS
        || event == XMLStreamConstants.CDATA
        || event == XMLStreamConstants.SPACE;
  }

  /** Workbooks write characters that XML forbids as {@code _x000D_}. */
  static String unescaped(String text) {
    int at = text.indexOf("_x");
    if (at < 0) {
      return text;
    }
    StringBuilder plain = new StringBuilder(text.length());
    int done = 0;
    while (at >= 0) {
      if (isEscape(text, at)) {
        plain.append(text, done, at).append((char) Integer.parseInt(text, at + 2, at + 6, 16));
        done = at + ESCAPE_LENGTH;
        at = text.indexOf("_x", done);
      } else {
        at = text.indexOf("_x", at + 1);
      }
    }
    return plain.append(text, done, text.length()).toString();
  }

  private static boolean isEscape(String text, int at) {
    if (at + ESCAPE_LENGTH > text.length() || text.charAt(at + 6) != '_') {
      return false;
    }
    for (int i = at + 2; i < at + 6; i++) {
      char c = text.charAt(i);
      if (!(c >= '0' && c <= '9' || c >= 'A' && c <= 'F' || c >= 'a' && c <= 'f')) {
        return false;
      }
    }
    return true;
  }
}
