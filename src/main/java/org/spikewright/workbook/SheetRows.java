package org.spikewright.workbook;

import java.io.IOException;
import java.util.ArrayList;
import java.util.List;
import org.apache.poi.ss.usermodel.CellStyle;
import org.apache.poi.ss.util.CellReference;
import org.apache.poi.xssf.streaming.SheetDataWriter;

/**
 * The rows of one sheet, written as they come: the elements that the library's own writer makes,
 * without its objects for each row and cell, which take most of the time of a long sheet. A formula
 * may hold an error such as {@code #N/A} here; the library puts a stray character beside it, which
 * makes spreadsheet programs offer a repair.
 */
final class SheetRows extends SheetDataWriter {
  private final StringBuilder xml = new StringBuilder(4096);
  private final List<String> columns = new ArrayList<>();
  private String row = "";

  SheetRows() throws IOException {
    super();
  }

  /**
   * Begins a row.
   *
   * @param number from 1
   */
  void begin(int number) {
    row = Integer.toString(number);
    xml.setLength(0);
    xml.append("<row r=\"").append(row).append("\">\n");
  }

  /**
   * Begins a row of a height of its own.
   *
   * @param number from 1
   * @param points its height
   */
  void begin(int number, float points) {
    row = Integer.toString(number);
    xml.setLength(0);
    xml.append("<row r=\"").append(row).append("\" customHeight=\"1\" ht=\"");
    xml.append(points).append("\">\n");
  }

  /** Ends the row. */
  void end() throws IOException {
    _out.append(xml.append("</row>\n"));
  }

  /** Puts a text into a column counted from 0. */
  void text(int column, CellStyle style, String text) {
    open(column, style, "inlineStr").append("><is><t");
    boolean blankEnds =
        !text.isEmpty()
            && (Character.isWhitespace(text.charAt(0))
                || Character.isWhitespace(text.charAt(text.length() - 1)));
    xml.append(blankEnds ? " xml:space=\"preserve\">" : ">");
    escaped(text);
    xml.append("</t></is></c>");
  }

  /** Puts a number. */
  void number(int column, CellStyle style, double value) {
    open(column, style, "n").append("><v>").append(value).append("</v></c>");
  }

  /** Puts a formula that gives a number. */
  void formula(int column, CellStyle style, String formula, double cached) {
    begin(column, style, "n", formula);
    xml.append("<v>").append(cached).append("</v></c>");
  }

  /** Puts a formula that gives a text. */
  void formula(int column, CellStyle style, String formula, String cached) {
    begin(column, style, "str", formula);
    if (!cached.isEmpty()) {
      xml.append("<v>");
      escaped(cached);
      xml.append("</v>");
    }
    xml.append("</c>");
  }

  /** Puts a formula that gives an error, such as {@code #N/A}. */
  void failing(int column, CellStyle style, String formula, String error) {
    begin(column, style, "e", formula);
    xml.append("<v>").append(error).append("</v></c>");
  }

  private void begin(int column, CellStyle style, String type, String formula) {
    open(column, style, type).append("><f>");
    escaped(formula);
    xml.append("</f>");
  }

  private StringBuilder open(int column, CellStyle style, String type) {
    while (columns.size() <= column) {
      columns.add(CellReference.convertNumToColString(columns.size()));
    }
    xml.append("<c r=\"").append(columns.get(column)).append(row).append('"');
    // The library gives the index as a signed number, of which all 16 bits count.
    int index = style.getIndex() & 0xffff;
    if (index != 0) {
      xml.append(" s=\"").append(index).append('"');
    }
    return xml.append(" t=\"").append(type).append('"');
  }

  /** The text without what XML reads as its own; what XML cannot hold is not in it any more. */
  private void escaped(String text) {
    for (int i = 0; i < text.length(); i++) {
      char c = text.charAt(i);
      switch (c) {
        case '<' -> xml.append("&lt;");
        case '>' -> xml.append("&gt;");
        case '&' -> xml.append("&amp;");
        case '"' -> xml.append("&quot;");
        case '\n' -> xml.append("&#xa;");
        case '\t' -> xml.append("&#x9;");
        case '\u00a0' -> xml.append("&#xa0;");
        default -> xml.append(c);
      }
    }
  }
}
