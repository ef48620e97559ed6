package org.spikewright.testkit;

import java.io.IOException;
import java.io.InputStream;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.CellType;
import org.apache.poi.ss.usermodel.FormulaError;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.ss.usermodel.Sheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.spikewright.quantity.Numbers;

/** A workbook as text, one line a cell, for comparison with what was expected. */
public final class WorkbookText {
  private WorkbookText() {}

  /** Every cell that is not empty: sheet, address, type, content, and the format of numbers. */
  public static List<String> of(Path file) throws IOException {
    List<String> lines = new ArrayList<>();
    try (InputStream in = Files.newInputStream(file);
        XSSFWorkbook book = new XSSFWorkbook(in)) {
      for (Sheet sheet : book) {
        for (Row row : sheet) {
          for (Cell cell : row) {
            lines.add(sheet.getSheetName() + "!" + cell.getAddress() + " " + shown(cell));
          }
        }
      }
    }
    return lines;
  }

  private static String shown(Cell cell) {
    CellType type = cell.getCellType();
    if (type == CellType.FORMULA) {
      String cached = value(cell, cell.getCachedFormulaResultType());
      return "= " + cell.getCellFormula() + " -> " + cached;
    }
    return value(cell, type);
  }

  private static String value(Cell cell, CellType type) {
    return switch (type) {
      case NUMERIC -> {
        String format = cell.getCellStyle().getDataFormatString();
        yield "number " + digits(cell.getNumericCellValue()) + " as " + format;
      }
      case STRING -> "text " + cell.getStringCellValue().replace("\n", "\\n");
      case ERROR -> "error " + FormulaError.forInt(cell.getErrorCellValue()).getString();
      default -> type.name();
    };
  }

  /** Twelve digits: the last ones of a sum may differ from one processor to the next. */
  private static String digits(double value) {
    return Numbers.plain(
        value == 0
            ? 0
            : new java.math.BigDecimal(value).round(new java.math.MathContext(12)).doubleValue());
  }
}
