package org.spikewright.published;

import java.io.IOException;
import java.io.OutputStream;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.OptionalDouble;
import org.apache.poi.hssf.usermodel.HSSFWorkbook;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.ss.usermodel.Sheet;
import org.apache.poi.ss.usermodel.Workbook;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.spikewright.quantity.NumberGrammar;

/**
 * Lines of comma-separated cells as a spreadsheet file; what reads as a number is stored as one.
 */
final class Spreadsheet {
  private Spreadsheet() {}

  static Path xls(Path lines, Path file) throws IOException {
    try (Workbook book = new HSSFWorkbook()) {
      return write(book, Files.readAllLines(lines), file);
    }
  }

  static Path xlsx(List<String> lines, Path file) throws IOException {
    try (Workbook book = new XSSFWorkbook()) {
      return write(book, lines, file);
    }
  }

  private static Path write(Workbook book, List<String> lines, Path file) throws IOException {
    Sheet sheet = book.createSheet("Readings");
    for (int i = 0; i < lines.size(); i++) {
      Row row = sheet.createRow(i);
      String[] cells = lines.get(i).split(",");
      for (int j = 0; j < cells.length; j++) {
        fill(row.createCell(j), cells[j]);
      }
    }
    try (OutputStream out = Files.newOutputStream(file)) {
      book.write(out);
    }
    return file;
  }

  private static void fill(Cell cell, String text) {
    OptionalDouble number = NumberGrammar.POINT.parse(text);
    if (number.isPresent()) {
      cell.setCellValue(number.getAsDouble());
    } else {
      cell.setCellValue(text);
    }
  }
}
