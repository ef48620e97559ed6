package org.spikewright.decode;

import java.io.IOException;
import java.nio.file.Path;
import java.util.List;
import javax.xml.stream.XMLStreamException;
import org.spikewright.table.RowSink;
import org.spikewright.table.SheetRule;

/** Reads XLSX workbooks, row by row. Macros, formulas' texts and layout are passed over. */
final class XlsxDecoder {
  private XlsxDecoder() {}

  /** Checks every part that is needed, then hands the rows on. */
  static void read(Path file, String shownName, List<SheetRule> wanted, RowSink sink)
      throws IOException, XMLStreamException {
    try (ZipParts parts = new ZipParts(file)) {
      XlsxWorkbook workbook = XlsxWorkbook.in(parts);
      List<XlsxWorkbook.Sheet> sheets =
          SheetChoice.among(
                  workbook.sheets().stream()
                      .map(sheet -> new SheetChoice(sheet.name(), sheet.hidden()))
                      .toList(),
                  wanted)
              .stream()
              .map(workbook.sheets()::get)
              .toList();
      for (XlsxWorkbook.Sheet sheet : sheets) {
        parts.check(sheet.part());
      }
      XlsxCells cells = cells(parts, workbook);
      for (XlsxWorkbook.Sheet sheet : sheets) {
        RowAssembly rows = new RowAssembly(shownName, sheet.name(), sink);
        try (PullXml xml = new PullXml(parts.stream(sheet.part()))) {
          if (!new XlsxSheet(xml, cells, rows).read()) {
            return;
          }
        }
      }
    }
  }

  private static XlsxCells cells(ZipParts parts, XlsxWorkbook workbook)
      throws IOException, XMLStreamException {
    DateStyles styles =
        workbook.styles().isPresent()
            ? DateStyles.in(parts.whole(workbook.styles().get()))
            : DateStyles.none();
    if (workbook.strings().isEmpty()) {
      return new XlsxCells(List.of(), styles, workbook.dates1904());
    }
    parts.check(workbook.strings().get());
    List<String> strings = SharedStrings.in(parts.stream(workbook.strings().get()));
    return new XlsxCells(strings, styles, workbook.dates1904());
  }
}
