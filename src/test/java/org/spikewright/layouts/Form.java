package org.spikewright.layouts;

import java.io.IOException;
import java.io.OutputStream;
import java.io.UncheckedIOException;
import java.math.BigDecimal;
import java.nio.charset.Charset;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import org.apache.poi.hssf.usermodel.HSSFWorkbook;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.ss.usermodel.Sheet;
import org.apache.poi.ss.usermodel.Workbook;
import org.apache.poi.ss.util.CellRangeAddress;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;

/** A kind of file: its rows hold texts, and numbers as {@link BigDecimal}. */
enum Form {
  COMMA_POINT_UTF8(',', '.', StandardCharsets.UTF_8, ""),
  SEMICOLON_COMMA_WINDOWS(';', ',', Charset.forName("windows-1252"), ""),
  TAB_COMMA_UTF16('\t', ',', StandardCharsets.UTF_16LE, "\uFEFF"),
  BAR_POINT_UTF8_MARK('|', '.', StandardCharsets.UTF_8, "\uFEFF"),
  XLSX,
  XLS;

  private final char separator;
  private final char decimal;
  private final Charset charset;
  private final String mark;

  Form() {
    this('\0', '.', StandardCharsets.UTF_8, "");
  }

  Form(char separator, char decimal, Charset charset, String mark) {
    this.separator = separator;
    this.decimal = decimal;
    this.charset = charset;
    this.mark = mark;
  }

  boolean isText() {
    return separator != 0;
  }

  String extension() {
    return isText() ? ".csv" : "." + name().toLowerCase(Locale.ROOT);
  }

  /** Writes sheets by name; of a text file there is one. */
  void write(Path file, Map<String, List<List<Object>>> sheets) {
    try {
      if (isText()) {
        Files.write(file, text(sheets.values().iterator().next()).getBytes(charset));
        return;
      }
      try (Workbook book = this == XLSX ? new XSSFWorkbook() : new HSSFWorkbook();
          OutputStream out = Files.newOutputStream(file)) {
        sheets.forEach((name, rows) -> fill(book.createSheet(name), rows));
        book.write(out);
      }
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
  }

  private String text(List<List<Object>> rows) {
    StringBuilder text = new StringBuilder(mark);
    for (List<Object> row : rows) {
      for (int i = 0; i < row.size(); i++) {
        String cell = row.get(i).toString();
        cell = row.get(i) instanceof BigDecimal ? cell.replace('.', decimal) : cell;
        text.append(i == 0 ? "" : separator);
        text.append(cell.indexOf(separator) < 0 ? cell : '"' + cell + '"');
      }
      text.append("\r\n");
    }
    return text.toString();
  }

  private static void fill(Sheet sheet, List<List<Object>> rows) {
    for (int r = 0; r < rows.size(); r++) {
      Row row = sheet.createRow(r);
      for (int c = 0; c < rows.get(r).size(); c++) {
        Object cell = rows.get(r).get(c);
        if (cell instanceof BigDecimal number) {
          row.createCell(c).setCellValue(number.doubleValue());
        } else if (!cell.toString().isEmpty()) {
          row.createCell(c).setCellValue(cell.toString());
        } else if (r == 0 && c > 0) {
          // A heading over two columns.
          sheet.addMergedRegion(new CellRangeAddress(r, r, c - 1, c));
        }
      }
    }
  }
}
