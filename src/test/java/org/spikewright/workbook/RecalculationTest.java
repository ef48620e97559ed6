package org.spikewright.workbook;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.summary.Night;
import org.spikewright.summary.SummaryPlan;
import org.spikewright.testkit.LibreOffice;
import org.spikewright.testkit.Nights;
import org.spikewright.testkit.PooledNights;

/** Another program opens the workbook and computes every formula anew. */
class RecalculationTest {
  @TempDir Path folder;

  @BeforeEach
  void needsASpreadsheetProgram() throws Exception {
    LibreOffice.assumeInstalled();
  }

  @Test
  void whatTheCellsHoldIsWhatTheirFormulasGive() throws Exception {
    Path book = folder.resolve("summary.xlsx");
    new XlsxWriter().write(SummaryPlan.of(Nights.small()), book, folder.resolve("temp"));
    Map<String, List<String>> anew = new LibreOffice(folder).computedAnew(book);
    Map<String, List<String>> stored = new LibreOffice(folder).asStored(book);
    assertThat(anew.keySet()).contains("summary-Series.csv", "summary-Plot.csv");
    anew.forEach((sheet, lines) -> LibreOffice.assertSame(sheet, lines, stored.get(sheet)));
    List<String> checks =
        anew.get("summary-Series.csv").stream().filter(l -> l.startsWith("check,")).toList();
    assertThat(checks).hasSize(11).allSatisfy(line -> assertThat(line).contains("agrees"));
    assertThat(String.join("\n", anew.get("summary-Series.csv"))).doesNotContain("DIFFERS");
  }

  @Test
  void everyLiveCheckAgreesOnWeightedLinesAndOnTheIntervalsOfPools() throws Exception {
    Path book = folder.resolve("summary.xlsx");
    new XlsxWriter().write(SummaryPlan.of(PooledNights.closed()), book, folder.resolve("temp"));
    Map<String, List<String>> anew = new LibreOffice(folder).computedAnew(book);
    Map<String, List<String>> stored = new LibreOffice(folder).asStored(book);
    anew.forEach((sheet, lines) -> LibreOffice.assertSame(sheet, lines, stored.get(sheet)));
    String series = String.join("\n", anew.get("summary-Series.csv"));
    assertThat(series).doesNotContain("DIFFERS").doesNotContain("#");
    assertThat(series.split("agrees", -1)).hasSize(1 + PooledNights.LINES * (11 + 7));
  }

  @Test
  void everyLiveCheckAgreesOnALongerNight() throws Exception {
    Path book = folder.resolve("summary.xlsx");
    Night night = Nights.large(200);
    new XlsxWriter().write(SummaryPlan.of(night), book, folder.resolve("temp"));
    Map<String, List<String>> anew = new LibreOffice(folder).computedAnew(book);
    String series = String.join("\n", anew.get("summary-Series.csv"));
    assertThat(series).doesNotContain("DIFFERS").doesNotContain("#");
    assertThat(series.split("agrees", -1)).hasSize(1 + 200 * 11);
  }
}
