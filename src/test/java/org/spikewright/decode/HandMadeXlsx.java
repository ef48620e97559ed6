package org.spikewright.decode;

import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.time.LocalDateTime;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.zip.CRC32;
import java.util.zip.ZipEntry;
import java.util.zip.ZipOutputStream;

/** Writes workbooks part by part, also those that no spreadsheet program would write. */
final class HandMadeXlsx {
  private static final String TYPES =
      "http://schemas.openxmlformats.org/officeDocument/2006/relationships/";

  private final Map<String, byte[]> parts = new LinkedHashMap<>();
  private final StringBuilder sheets = new StringBuilder();
  private final StringBuilder links = new StringBuilder();
  private String workbookProperties = "";
  private boolean stored;
  private int count;

  /** A workbook with one sheet called Data. */
  static HandMadeXlsx ofRows(String rows) {
    return new HandMadeXlsx().sheet("Data", "", rows);
  }

  /** A workbook with one sheet with one cell in A1. */
  static HandMadeXlsx ofCell(String cell) {
    return ofRows("<row r=\"1\">" + cell + "</row>");
  }

  HandMadeXlsx sheet(String name, String attributes, String rows) {
    count++;
    String part = "worksheets/sheet" + count + ".xml";
    sheets.append("<sheet name='" + name + "' sheetId='" + count + "' " + attributes);
    sheets.append(" r:id='rId" + count + "'/>");
    link("rId" + count, "worksheet", part);
    return part(
        "xl/" + part,
        "<?xml version='1.0' encoding='UTF-8'?><worksheet><sheetData>"
            + rows
            + "</sheetData></worksheet>");
  }

  HandMadeXlsx strings(String items) {
    link("rIdStrings", "sharedStrings", "/xl/sharedStrings.xml");
    return part("xl/sharedStrings.xml", "<sst>" + items + "</sst>");
  }

  /** Cell styles: style n has the n-th of the number formats. */
  HandMadeXlsx styles(String numberFormats, int... formatOfStyle) {
    StringBuilder cells = new StringBuilder();
    for (int format : formatOfStyle) {
      cells.append("<xf numFmtId='" + format + "'/>");
    }
    link("rIdStyles", "styles", "styles.xml");
    return part(
        "xl/styles.xml",
        "<styleSheet><numFmts>"
            + numberFormats
            + "</numFmts><cellStyleXfs><xf numFmtId='14'/></cellStyleXfs><cellXfs>"
            + cells
            + "</cellXfs></styleSheet>");
  }

  HandMadeXlsx dates1904() {
    workbookProperties = "<workbookPr date1904='1'/>";
    return this;
  }

  /** Parts are stored as they are, not deflated. */
  HandMadeXlsx stored() {
    stored = true;
    return this;
  }

  HandMadeXlsx part(String name, String xml) {
    parts.put(name, xml.getBytes(StandardCharsets.UTF_8));
    return this;
  }

  byte[] bytes() {
    part("_rels/.rels", links(linkText("rId1", "officeDocument", "xl/workbook.xml")));
    part(
        "xl/workbook.xml",
        "<workbook xmlns:r='"
            + TYPES
            + "'>"
            + workbookProperties
            + "<sheets>"
            + sheets
            + "</sheets></workbook>");
    part("xl/_rels/workbook.xml.rels", links(links.toString()));
    return zip(parts, stored);
  }

  /** An archive of parts, in order. */
  static byte[] zip(Map<String, byte[]> parts, boolean stored) {
    ByteArrayOutputStream bytes = new ByteArrayOutputStream();
    try (ZipOutputStream zip = new ZipOutputStream(bytes)) {
      for (Map.Entry<String, byte[]> part : parts.entrySet()) {
        ZipEntry entry = new ZipEntry(part.getKey());
        entry.setTimeLocal(LocalDateTime.of(2025, 1, 15, 18, 0));
        if (stored) {
          entry.setMethod(ZipEntry.STORED);
          entry.setSize(part.getValue().length);
          CRC32 sum = new CRC32();
          sum.update(part.getValue());
          entry.setCrc(sum.getValue());
        }
        zip.putNextEntry(entry);
        zip.write(part.getValue());
      }
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
    return bytes.toByteArray();
  }

  private void link(String id, String type, String target) {
    links.append(linkText(id, type, target));
  }

  private static String linkText(String id, String type, String target) {
    return "<Relationship Id='" + id + "' Type='" + TYPES + type + "' Target='" + target + "'/>";
  }

  private static String links(String items) {
    return "<Relationships>" + items + "</Relationships>";
  }
}
