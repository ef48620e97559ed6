package org.spikewright.decode;

import javax.xml.stream.XMLStreamConstants;
import javax.xml.stream.XMLStreamException;

/** Walks through the XML of one sheet. */
final class XlsxSheet {
  private final PullXml xml;
  private final XlsxCells cells;
  private final RowAssembly rows;
  private final RichText inline = new RichText();
  private final StringBuilder value = new StringBuilder();

  /** Depths of the elements that are open; 0 when none is. */
  private int dataAt;

  private int rowAt;
  private int cellAt;
  private boolean inValue;
  private boolean inInline;

  private int column;
  private String type = "";
  private String style = "";
  private boolean hasValue;
  private boolean formula;
  private long inlineCharsOfRow;

  XlsxSheet(PullXml xml, XlsxCells cells, RowAssembly rows) {
    this.xml = xml;
    this.cells = cells;
    this.rows = rows;
  }

  /** Hands the rows on; false when the sink wants no more. */
  boolean read() throws XMLStreamException {
    while (xml.hasNext()) {
      int event = xml.next();
      if (event == XMLStreamConstants.START_ELEMENT) {
        start();
      } else if (event == XMLStreamConstants.END_ELEMENT) {
        if (!end()) {
          return false;
        }
      } else if (inValue && RichText.isText(event)) {
        xml.appendTo(value);
      } else if (inInline) {
        inline.follow(xml, event);
      }
    }
    return true;
  }

  private void start() throws XMLStreamException {
    if (inInline) {
      inline.follow(xml, XMLStreamConstants.START_ELEMENT);
      return;
    }
    int depth = xml.depth();
    switch (xml.name()) {
      case "sheetData" -> dataAt = dataAt == 0 ? depth : dataAt;
      case "row" -> {
        if (dataAt > 0) {
          startRow(depth);
        }
      }
      case "c" -> {
        if (dataAt > 0) {
          startCell(depth);
        }
      }
      case "v" -> {
        inValue = cellAt > 0;
        hasValue |= inValue;
      }
      case "f" -> formula |= cellAt > 0;
      case "is" -> inInline = cellAt > 0;
      default -> {
        // Layout and extensions hold no values.
      }
    }
  }

  private boolean end() throws XMLStreamException {
    if (inInline && !xml.name().equals("is")) {
      inline.follow(xml, XMLStreamConstants.END_ELEMENT);
      return true;
    }
    // The depth is already that of the parent.
    int depth = xml.depth() + 1;
    inInline = false;
    inValue = false;
    if (depth == cellAt) {
      endCell();
    } else if (depth == rowAt) {
      rowAt = 0;
      return rows.end();
    } else if (depth == dataAt) {
      dataAt = 0;
    }
    return true;
  }

  private void startRow(int depth) {
    if (rowAt > 0 || depth != dataAt + 1) {
      throw rows.contradiction("a row within another", "rows one after the other");
    }
    rowAt = depth;
    inlineCharsOfRow = 0;
    String number = xml.attribute("r");
    rows.begin(number.isEmpty() ? rows.row() + 1 : rowNumber(number));
  }

  private void startCell(int depth) {
    if (cellAt > 0 || rowAt == 0 || depth != rowAt + 1) {
      throw rows.contradiction("a cell outside of a row", "cells within rows");
    }
    cellAt = depth;
    String reference = xml.attribute("r");
    column = reference.isEmpty() ? rows.column() + 1 : column(reference);
    type = xml.attribute("t");
    style = xml.attribute("s");
    hasValue = false;
    formula = false;
    value.setLength(0);
    inline.clear();
  }

  private void endCell() {
    cellAt = 0;
    String text = type.equals("inlineStr") ? inline.text() : "";
    inlineCharsOfRow += text.length() + value.length();
    if (inlineCharsOfRow > Limits.RECORD_CHARS) {
      throw rows.contradiction(
          "a row of more than " + Limits.RECORD_CHARS + " characters", "shorter rows");
    }
    rows.put(
        column,
        cells.of(new XlsxCells.Stored(type, style, hasValue, value.toString(), text, formula)));
  }

  private long rowNumber(String digits) {
    if (digits.length() > 9 || !isDigits(digits, 0)) {
      throw rows.contradiction("the row number " + Shown.quoted(digits), "a row number");
    }
    return Long.parseLong(digits);
  }

  /** The column, from 1, of a cell reference such as AB12, whose row must be the current one. */
  private int column(String reference) {
    int letters = 0;
    int number = 0;
    while (letters < reference.length() && letters < 4 && isLetter(reference.charAt(letters))) {
      number = number * 26 + reference.charAt(letters) - 'A' + 1;
      letters++;
    }
    boolean sound =
        letters > 0
            && number <= Limits.SHEET_COLUMNS
            && reference.length() - letters <= 9
            && isDigits(reference, letters)
            && Long.parseLong(reference, letters, reference.length(), 10) == rows.row();
    if (!sound) {
      throw rows.contradiction(
          "the cell reference " + Shown.quoted(reference), "a cell of row " + rows.row());
    }
    return number;
  }

  private static boolean isLetter(char c) {
    return c >= 'A' && c <= 'Z';
  }

  private static boolean isDigits(String text, int from) {
    for (int i = from; i < text.length(); i++) {
      if (text.charAt(i) < '0' || text.charAt(i) > '9') {
        return false;
      }
    }
    return text.length() > from;
  }
}
