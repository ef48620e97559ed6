package org.spikewright.demo;

import java.io.ByteArrayInputStream;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.time.Instant;
import java.time.LocalDateTime;
import java.util.Date;
import java.util.List;
import java.util.Optional;
import java.util.TreeMap;
import java.util.zip.CRC32;
import java.util.zip.ZipEntry;
import java.util.zip.ZipInputStream;
import java.util.zip.ZipOutputStream;
import org.apache.poi.ss.usermodel.CellStyle;
import org.apache.poi.xssf.usermodel.XSSFRow;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;

/**
 * The plasma instrument's export: a workbook whose first sheet tells about the run and whose second
 * holds the readings, with real dates, numbers as numbers and identifiers as text.
 */
final class PlasmaExport {
  static final String WATERS_SHEET = "Readings 0304";
  static final String SEDIMENT_SHEET = "Sediment digests";
  static final List<String> COLUMNS =
      List.of(
          "Sample ID",
          "Element",
          "Wavelength (nm)",
          "Flask",
          "Spike (µL)",
          "Replicate",
          "Intensity",
          "Acquired",
          "Batch",
          "Site",
          "Type");
  static final List<String> SEDIMENT_COLUMNS =
      List.of("Test portion (g)", "Digest (mL)", "Dilution", "Dry mass (%)");

  private static final Instant STAMP = Instant.parse("2026-03-04T18:00:00Z");
  private static final LocalDateTime ZIP_STAMP = LocalDateTime.parse("2026-03-04T18:00:00");

  private PlasmaExport() {}

  /** The workbook of the waters. */
  static byte[] waters(DemoNight.Export export) throws IOException {
    return workbook(export, WATERS_SHEET, 0);
  }

  /** The workbook of the sediment digests, with a title above the header. */
  static byte[] sediment(DemoNight.Export export) throws IOException {
    return workbook(export, SEDIMENT_SHEET, 2);
  }

  private static byte[] workbook(DemoNight.Export export, String name, int headerRow)
      throws IOException {
    try (XSSFWorkbook book = new XSSFWorkbook()) {
      var properties = book.getProperties().getCoreProperties();
      properties.setCreated(Optional.of(Date.from(STAMP)));
      properties.setCreator("Brackwater Trace Laboratory");
      report(book.createSheet("Run report"), export);
      XSSFSheet sheet = book.createSheet(name);
      if (headerRow > 0) {
        sheet.createRow(0).createCell(0).setCellValue("Acid digests, " + export.name());
      }
      readings(sheet, export, headerRow);
      ByteArrayOutputStream out = new ByteArrayOutputStream();
      book.write(out);
      return fixedTimes(out.toByteArray());
    }
  }

  private static void report(XSSFSheet sheet, DemoNight.Export export) {
    String[][] lines = {
      {"Run", export.name()},
      {"Laboratory", "Brackwater Trace Laboratory"},
      {"Analyst", "V.Q."},
      {"Plasma", "radial, 1.2 kW"}
    };
    for (int i = 0; i < lines.length; i++) {
      XSSFRow row = sheet.createRow(i);
      row.createCell(0).setCellValue(lines[i][0]);
      row.createCell(1).setCellValue(lines[i][1]);
    }
  }

  private static void readings(XSSFSheet sheet, DemoNight.Export export, int headerRow) {
    CellStyle date = sheet.getWorkbook().createCellStyle();
    date.setDataFormat(
        sheet
            .getWorkbook()
            .getCreationHelper()
            .createDataFormat()
            .getFormat("yyyy-mm-dd hh:mm:ss"));
    boolean solids = isSolid(export.plans().get(0));
    XSSFRow header = sheet.createRow(headerRow);
    int column = 0;
    for (String title : COLUMNS) {
      header.createCell(column++).setCellValue(title);
    }
    for (String title : solids ? SEDIMENT_COLUMNS : List.<String>of()) {
      header.createCell(column++).setCellValue(title);
    }
    sheet.setColumnWidth(7, 20 * 256);
    int next = headerRow + 1;
    for (ReadingRow reading : export.readings()) {
      XSSFRow row = sheet.createRow(next++);
      reading(row, reading, date);
      if (solids) {
        digest(row, reading.plan().digest());
      }
    }
  }

  private static void reading(XSSFRow row, ReadingRow reading, CellStyle date) {
    SeriesPlan plan = reading.plan();
    row.createCell(0).setCellValue(plan.sample());
    row.createCell(1).setCellValue(plan.recipe().analyte());
    row.createCell(2).setCellValue(isSolid(plan) ? 324.754 : 231.604);
    row.createCell(3).setCellValue(reading.flask());
    row.createCell(4).setCellValue(reading.additionMicrolitres());
    row.createCell(5).setCellValue(reading.replicate());
    row.createCell(6).setCellValue(Double.parseDouble(reading.signal()));
    row.createCell(7).setCellValue(reading.at());
    row.getCell(7).setCellStyle(date);
    row.createCell(8).setCellValue(isSolid(plan) ? plan.digest().batch() : "PW-0304");
    row.createCell(9).setCellValue(plan.site());
    row.createCell(10).setCellValue(plan.scenario().type());
  }

  private static void digest(XSSFRow row, Digest digest) {
    row.createCell(11).setCellValue(digest.portionGrams());
    row.createCell(12).setCellValue(digest.volumeMillilitres());
    row.createCell(13).setCellValue("1 + " + (digest.dilution() - 1));
    row.createCell(14).setCellValue(digest.dryPercent());
  }

  private static boolean isSolid(SeriesPlan plan) {
    return plan.recipe() == Recipe.COPPER;
  }

  /** Entries sorted, stored rather than deflated, and stamped alike, so that the bytes repeat. */
  private static byte[] fixedTimes(byte[] zip) throws IOException {
    TreeMap<String, byte[]> entries = new TreeMap<>();
    try (ZipInputStream in = new ZipInputStream(new ByteArrayInputStream(zip))) {
      for (ZipEntry entry = in.getNextEntry(); entry != null; entry = in.getNextEntry()) {
        entries.put(entry.getName(), wholeNumbers(entry.getName(), in.readAllBytes()));
      }
    }
    ByteArrayOutputStream bytes = new ByteArrayOutputStream();
    try (ZipOutputStream out = new ZipOutputStream(bytes)) {
      for (var entry : entries.entrySet()) {
        out.putNextEntry(stored(entry.getKey(), entry.getValue()));
        out.write(entry.getValue());
      }
    }
    return bytes.toByteArray();
  }

  /** Spreadsheet programs store a flask as 2; the library that writes for us, as 2.0. */
  private static byte[] wholeNumbers(String name, byte[] content) {
    if (!name.startsWith("xl/worksheets/")) {
      return content;
    }
    String xml = new String(content, StandardCharsets.UTF_8);
    return xml.replaceAll("<v>(\\d+)\\.0</v>", "<v>$1</v>").getBytes(StandardCharsets.UTF_8);
  }

  private static ZipEntry stored(String name, byte[] content) {
    CRC32 crc = new CRC32();
    crc.update(content);
    ZipEntry entry = new ZipEntry(name);
    entry.setMethod(ZipEntry.STORED);
    entry.setSize(content.length);
    entry.setCrc(crc.getValue());
    // Local time without a zone: the same bytes wherever this runs.
    entry.setTimeLocal(ZIP_STAMP);
    return entry;
  }
}
