package org.spikewright.workbook;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.OutputStream;
import java.lang.management.ManagementFactory;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.xssf.streaming.SXSSFWorkbook;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.summary.CellPlan;
import org.spikewright.summary.CsvPlan;
import org.spikewright.summary.Night;
import org.spikewright.summary.SheetPlan;
import org.spikewright.summary.SummaryPlan;
import org.spikewright.testkit.Nights;

/**
 * Writes the largest night beside a bare streaming writer of the same cells, in the same run. Run
 * by itself with {@code -Dgroups=simulation} and a heap of 512 MB; prints what it measures.
 */
@Tag("simulation")
class WritingSpeedTest {
  private static final int SERIES = 20_000;

  @TempDir Path folder;

  @Test
  void theLargestNightTakesAboutAsLongAsItsBareCells() throws Exception {
    Night night = Nights.large(SERIES);
    double ours = Double.POSITIVE_INFINITY;
    double bare = Double.POSITIVE_INFINITY;
    for (int i = 0; i < 3; i++) {
      long start = processor();
      CsvWriter.write(CsvPlan.results(night.results()), folder.resolve("results.csv"));
      long results = processor();
      CsvWriter.write(CsvPlan.flasks(night.outcomes()), folder.resolve("flasks.csv"));
      long flasks = processor();
      SummaryPlan plan = SummaryPlan.of(night);
      long planned = processor();
      new XlsxWriter().write(plan, folder.resolve("summary.xlsx"), folder.resolve("temp"));
      long end = processor();
      long cells = bare(plan, folder.resolve("bare.xlsx"));
      long bareEnd = processor();
      System.out.printf(
          Locale.ROOT,
          "%d series, %d cells: results.csv %.2f s, flasks.csv %.2f s, plan %.2f s, workbook %.2f s"
              + " (%d kB); bare cells %.2f s (%d kB)%n",
          SERIES,
          cells,
          (results - start) / 1e9,
          (flasks - results) / 1e9,
          (planned - flasks) / 1e9,
          (end - planned) / 1e9,
          Files.size(folder.resolve("summary.xlsx")) / 1000,
          (bareEnd - end) / 1e9,
          Files.size(folder.resolve("bare.xlsx")) / 1000);
      ours = Math.min(ours, (end - flasks) / 1e9);
      bare = Math.min(bare, (bareEnd - end) / 1e9);
    }
    assertThat(ours / bare).as("ours over bare").isLessThan(2);
  }

  /** Processor time of this thread, which does not depend on what else the machine does. */
  private static long processor() {
    return ManagementFactory.getThreadMXBean().getCurrentThreadCpuTime();
  }

  /** The same values without styles, links, charts or safe text. */
  private static long bare(SummaryPlan plan, Path target) throws Exception {
    long count = 0;
    try (SXSSFWorkbook book = new SXSSFWorkbook(64);
        OutputStream out = Files.newOutputStream(target)) {
      for (SheetPlan sheet : plan.sheets()) {
        var rows = book.createSheet(sheet.name());
        int number = 0;
        for (List<CellPlan> cells : sheet.rows()) {
          Row row = rows.createRow(number++);
          for (int i = 0; i < cells.size(); i++) {
            count += put(row.createCell(i), cells.get(i));
          }
        }
      }
      book.write(out);
    }
    return count;
  }

  private static int put(Cell cell, CellPlan plan) {
    if (plan instanceof CellPlan.Text text) {
      cell.setCellValue(text.text());
    } else if (plan instanceof CellPlan.Number number) {
      cell.setCellValue(number.value());
    } else if (plan instanceof CellPlan.Link link) {
      cell.setCellValue(link.text());
    } else if (plan instanceof CellPlan.Day day) {
      cell.setCellValue(day.value());
    } else if (plan instanceof CellPlan.Formula formula) {
      cell.setCellFormula(formula.formula());
    }
    return 1;
  }
}
