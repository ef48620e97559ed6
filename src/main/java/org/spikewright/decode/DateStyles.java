package org.spikewright.decode;

import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.util.ArrayList;
import java.util.BitSet;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import javax.xml.stream.XMLStreamException;
import org.apache.poi.ss.usermodel.DateUtil;

/** Which cell styles of an XLSX workbook show a number as a date or time. */
final class DateStyles {
  private final BitSet dates;

  private DateStyles(BitSet dates) {
    this.dates = dates;
  }

  /** Of a workbook without styles. */
  static DateStyles none() {
    return new DateStyles(new BitSet());
  }

  /** Reads the style table. */
  static DateStyles in(byte[] part) throws XMLStreamException, IOException {
    Map<Integer, String> codes = new HashMap<>();
    List<Integer> formats = new ArrayList<>();
    int cellFormatsAt = 0;
    try (PullXml xml = new PullXml(new ByteArrayInputStream(part))) {
      while (xml.nextElement()) {
        if (xml.depth() == 2) {
          cellFormatsAt = xml.name().equals("cellXfs") ? 3 : 0;
        } else if (xml.name().equals("numFmt")) {
          codes.put(number(xml.attribute("numFmtId")), xml.attribute("formatCode"));
        } else if (xml.name().equals("xf") && xml.depth() == cellFormatsAt) {
          formats.add(number(xml.attribute("numFmtId")));
        }
      }
    }
    BitSet dates = new BitSet();
    for (int style = 0; style < formats.size(); style++) {
      int format = formats.get(style);
      dates.set(style, isDate(format, codes.getOrDefault(format, "")));
    }
    return new DateStyles(dates);
  }

  /** Whether a cell's style attribute names a date or time format. */
  boolean isDate(String style) {
    if (style.isEmpty()) {
      return dates.get(0);
    }
    int index = number(style);
    return index >= 0 && dates.get(index);
  }

  /**
   * Whether a number format shows dates or times.
   *
   * @param format its number in the workbook
   * @param code empty for formats that need not be written down
   */
  static boolean isDate(int format, String code) {
    // 27-36 and 50-58 are dates in the East Asian editions, and reserved for them elsewhere.
    boolean eastAsian = format >= 27 && format <= 36 || format >= 50 && format <= 58;
    return code.isEmpty() && eastAsian || DateUtil.isADateFormat(format, code);
  }

  private static int number(String digits) {
    try {
      return digits.isEmpty() ? 0 : Integer.parseInt(digits);
    } catch (NumberFormatException e) {
      return -1;
    }
  }
}
