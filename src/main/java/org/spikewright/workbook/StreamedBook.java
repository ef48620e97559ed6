package org.spikewright.workbook;

import java.io.IOException;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.CellType;
import org.apache.poi.ss.usermodel.FormulaError;
import org.apache.poi.ss.util.CellReference;
import org.apache.poi.xssf.streaming.SXSSFWorkbook;
import org.apache.poi.xssf.streaming.SheetDataWriter;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;

/**
 * A streamed workbook whose formulas may hold an error such as {@code #N/A}: the library's own
 * writer puts a stray character beside it, which makes spreadsheet programs offer a repair.
 */
final class StreamedBook extends SXSSFWorkbook {

  /** A workbook that keeps so many rows of a sheet in memory. */
  StreamedBook(int window) {
    super(new XSSFWorkbook(), window);
    setCompressTempFiles(false);
  }

  @Override
  protected SheetDataWriter createSheetDataWriter() throws IOException {
    return new Rows();
  }

  private static final class Rows extends SheetDataWriter {
    Rows() throws IOException {
      super();
    }

    @Override
    public void writeCell(int column, Cell cell) throws IOException {
      boolean error =
          cell != null
              && cell.getCellType() == CellType.FORMULA
              && cell.getCachedFormulaResultType() == CellType.ERROR;
      if (!error) {
        super.writeCell(column, cell);
        return;
      }
      String place = CellReference.convertNumToColString(column) + (cell.getRowIndex() + 1);
      int style = cell.getCellStyle().getIndex();
      _out.write("<c r=\"" + place + "\" s=\"" + style + "\" t=\"e\"><f>");
      outputEscapedString(cell.getCellFormula());
      String shown = FormulaError.forInt(cell.getErrorCellValue()).getString();
      _out.write("</f><v>" + shown + "</v></c>");
    }
  }
}
