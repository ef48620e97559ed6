package org.spikewright.workbook;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.ByteArrayInputStream;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Enumeration;
import java.util.List;
import java.util.zip.ZipEntry;
import java.util.zip.ZipFile;
import org.apache.xmlbeans.XmlError;
import org.apache.xmlbeans.XmlObject;
import org.apache.xmlbeans.XmlOptions;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.openxmlformats.schemas.drawingml.x2006.chart.ChartSpaceDocument;
import org.openxmlformats.schemas.drawingml.x2006.spreadsheetDrawing.WsDrDocument;
import org.openxmlformats.schemas.spreadsheetml.x2006.main.StyleSheetDocument;
import org.openxmlformats.schemas.spreadsheetml.x2006.main.WorkbookDocument;
import org.openxmlformats.schemas.spreadsheetml.x2006.main.WorksheetDocument;
import org.spikewright.summary.SummaryPlan;
import org.spikewright.testkit.PooledNights;

/** A part that breaks the file format's schema makes spreadsheet programs offer a repair. */
class SchemaTest {
  @TempDir Path folder;

  @Test
  void everyPartKeepsTheSchemaOfTheFileFormat() throws Exception {
    Path book = folder.resolve("summary.xlsx");
    new XlsxWriter().write(SummaryPlan.of(PooledNights.closed()), book, folder.resolve("temp"));
    List<String> faults = new ArrayList<>();
    int checked = 0;
    try (ZipFile zip = new ZipFile(book.toFile())) {
      for (Enumeration<? extends ZipEntry> e = zip.entries(); e.hasMoreElements(); ) {
        ZipEntry entry = e.nextElement();
        byte[] bytes = zip.getInputStream(entry).readAllBytes();
        List<XmlObject> parsed = parsed(entry.getName(), bytes);
        checked += parsed.size();
        parsed.forEach(part -> faults.addAll(faults(entry.getName(), part)));
      }
    }
    // Twelve sheets and the cells behind charts, four charts in three drawings, styles, workbook.
    assertThat(checked).as("parts").isEqualTo(21);
    assertThat(faults).isEmpty();
  }

  private static List<XmlObject> parsed(String name, byte[] bytes) throws Exception {
    ByteArrayInputStream in = new ByteArrayInputStream(bytes);
    if (name.matches("xl/worksheets/[^/]+\\.xml")) {
      return List.of(WorksheetDocument.Factory.parse(in));
    } else if (name.matches("xl/charts/[^/]+\\.xml")) {
      return List.of(ChartSpaceDocument.Factory.parse(in));
    } else if (name.matches("xl/drawings/[^/]+\\.xml")) {
      return List.of(WsDrDocument.Factory.parse(in));
    } else if (name.equals("xl/styles.xml")) {
      return List.of(StyleSheetDocument.Factory.parse(in));
    } else if (name.equals("xl/workbook.xml")) {
      return List.of(WorkbookDocument.Factory.parse(in));
    }
    return List.of();
  }

  private static List<String> faults(String name, XmlObject part) {
    List<XmlError> errors = new ArrayList<>();
    part.validate(new XmlOptions().setErrorListener(errors));
    return errors.stream().map(error -> name + ": " + error.getMessage()).distinct().toList();
  }
}
