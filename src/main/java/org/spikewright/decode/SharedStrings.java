package org.spikewright.decode;

import java.io.IOException;
import java.io.InputStream;
import java.util.ArrayList;
import java.util.List;
import javax.xml.stream.XMLStreamConstants;
import javax.xml.stream.XMLStreamException;

/** The texts that the cells of an XLSX workbook share, in memory. */
final class SharedStrings {
  private SharedStrings() {}

  /**
   * Reads the table: runs of one text joined, readings aids (phonetic runs) left out.
   *
   * @throws Unreadable when it outgrows its bounds
   */
  static List<String> in(InputStream part) throws XMLStreamException, IOException {
    List<String> strings = new ArrayList<>();
    RichText text = new RichText();
    long total = 0;
    try (PullXml xml = new PullXml(part)) {
      while (xml.hasNext()) {
        int event = xml.next();
        if (event == XMLStreamConstants.START_ELEMENT && xml.name().equals("si")) {
          text.clear();
        } else if (event == XMLStreamConstants.END_ELEMENT && xml.name().equals("si")) {
          strings.add(text.text());
          total += text.text().length();
          checkSize(strings.size(), total);
        } else {
          text.follow(xml, event);
        }
      }
    }
    return strings;
  }

  private static void checkSize(int count, long total) {
    if (count > Limits.STRINGS || total > Limits.STRINGS_CHARS) {
      throw new Unreadable(
          "the file",
          "more than " + (count - 1) + " different texts",
          "at most "
              + Limits.STRINGS
              + " different texts of together at most "
              + Limits.STRINGS_CHARS
              + " characters",
          "split the table into several files, or export it as CSV");
    }
  }
}
