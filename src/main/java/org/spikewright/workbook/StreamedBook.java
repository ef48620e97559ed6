package org.spikewright.workbook;

import java.io.IOException;
import org.apache.poi.xssf.streaming.SXSSFSheet;
import org.apache.poi.xssf.streaming.SXSSFWorkbook;
import org.apache.poi.xssf.streaming.SheetDataWriter;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;

/** A streamed workbook whose rows are written by {@link SheetRows}. */
final class StreamedBook extends SXSSFWorkbook {
  private SheetRows newest;

  /**
   * A sheet.
   *
   * @param streamed the sheet as the library streams it, of which no row may be asked
   * @param underlying what lies around its rows
   * @param rows where its rows go
   */
  record StreamedSheet(SXSSFSheet streamed, XSSFSheet underlying, SheetRows rows) {}

  StreamedBook() {
    super(new XSSFWorkbook(), 1);
    setCompressTempFiles(false);
    setShouldCalculateSheetDimensions(false);
  }

  /** Adds a sheet at the end. */
  StreamedSheet newSheet(String name) {
    SXSSFSheet sheet = createSheet(name);
    return new StreamedSheet(sheet, getXSSFWorkbook().getSheet(name), newest);
  }

  /** The library asks for it while it makes a sheet. */
  @Override
  protected SheetDataWriter createSheetDataWriter() throws IOException {
    newest = new SheetRows();
    return newest;
  }
}
