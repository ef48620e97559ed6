package org.spikewright.workbook;

import java.io.IOException;
import java.io.OutputStream;
import java.nio.file.Path;
import java.util.Date;
import java.util.Iterator;
import java.util.List;
import java.util.Optional;
import java.util.function.LongConsumer;
import org.apache.poi.ooxml.POIXMLProperties.CoreProperties;
import org.apache.poi.ss.SpreadsheetVersion;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.spikewright.summary.CellPlan;
import org.spikewright.summary.SheetPlan;
import org.spikewright.summary.SummaryPlan;
import org.spikewright.workbook.StreamedBook.StreamedSheet;

/** Writes a planned workbook, row by row, in memory that does not grow with the night. */
public final class XlsxWriter {

  private final int mostRows;

  /** A writer that fills a sheet as far as the file format allows. */
  public XlsxWriter() {
    this(SpreadsheetVersion.EXCEL2007.getMaxRows());
  }

  /** A writer that continues on a second sheet after so many rows. */
  XlsxWriter(int mostRows) {
    this.mostRows = mostRows;
  }

  /**
   * Writes a workbook, whole or not at all.
   *
   * @param plan what it says
   * @param target its place; a file that is there is replaced
   * @param temporaryFolder for POI's temporary files; best on the same disk
   * @param progress called now and then with the series written so far
   * @return the SHA-256 of its bytes, in hexadecimal
   */
  public String write(SummaryPlan plan, Path target, Path temporaryFolder, LongConsumer progress)
      throws WriteFault {
    return Aside.write(
        target,
        out -> {
          try (PoiFolder folder = PoiFolder.under(temporaryFolder)) {
            folder.adopt();
            write(plan, out, progress);
          }
        });
  }

  /** The same without telling progress. */
  public String write(SummaryPlan plan, Path target, Path temporaryFolder) throws WriteFault {
    return write(plan, target, temporaryFolder, series -> {});
  }

  /** Deletes what a killed program left in the temporary folder. */
  public static void sweep(Path temporaryFolder) throws IOException {
    PoiFolder.sweep(temporaryFolder);
  }

  private void write(SummaryPlan plan, OutputStream out, LongConsumer progress) throws IOException {
    try (StreamedBook book = new StreamedBook()) {
      properties(plan, book.getXSSFWorkbook());
      Styles styles = new Styles(book.getXSSFWorkbook());
      for (SheetPlan sheet : plan.sheets()) {
        write(
            sheet,
            book,
            styles,
            sheet.layout().kind() == SheetPlan.Kind.SERIES_ROWS ? progress : series -> {});
      }
      book.setActiveSheet(0);
      book.write(out);
    }
  }

  private static void properties(SummaryPlan plan, XSSFWorkbook book) {
    CoreProperties core = book.getProperties().getCoreProperties();
    Optional<Date> moment = Optional.of(Date.from(plan.moment()));
    core.setTitle(plan.title());
    core.setCreator(plan.creator());
    core.setLastModifiedByUser(plan.creator());
    core.setCreated(moment);
    core.setModified(moment);
  }

  private void write(SheetPlan plan, StreamedBook book, Styles styles, LongConsumer progress)
      throws IOException {
    Iterator<List<CellPlan>> rows = plan.rows().iterator();
    long written = 0;
    int part = 1;
    do {
      String name = part == 1 ? plan.name() : plan.name() + " " + part;
      StreamedSheet sheet = book.newSheet(name);
      SheetFiller filler = new SheetFiller(plan, sheet, styles);
      for (List<CellPlan> row : plan.head()) {
        filler.add(row);
      }
      while (rows.hasNext() && filler.rows() < mostRows) {
        filler.add(rows.next());
        if (++written % 256 == 0) {
          progress.accept(written);
        }
      }
      new SheetPage(plan, book, sheet).layOut(filler.rows(), part);
      part++;
    } while (rows.hasNext());
    progress.accept(written);
  }
}
