package org.spikewright.demo;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import org.apache.commons.csv.CSVRecord;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.testkit.LibreOffice;

/** Another program opens the demo's workbook, computes it anew and agrees. */
class DemoWorkbookTest {
  @TempDir Path folder;

  @Test
  void every_check_agrees_and_every_cell_holds_what_its_formula_gives() throws Exception {
    LibreOffice.assumeInstalled();
    DemoRun demo = DemoRun.in(folder);
    Map<String, List<String>> anew = new LibreOffice(folder).computedAnew(demo.workbook());
    Map<String, List<String>> stored = new LibreOffice(folder).asStored(demo.workbook());
    assertThat(anew.keySet()).isEqualTo(stored.keySet());
    anew.forEach((sheet, lines) -> LibreOffice.assertSame(sheet, lines, stored.get(sheet)));

    List<String> series = anew.get("summary-2026-03-04-r1-Series.csv");
    List<String> checks = series.stream().filter(line -> line.startsWith("check,")).toList();
    assertThat(checks).hasSize(demo.results().size());
    assertThat(checks)
        .allSatisfy(
            line ->
                assertThat(line).contains("agrees").doesNotContain("DIFFERS").doesNotContain("#"));

    String results = String.join("\n", anew.get("summary-2026-03-04-r1-Results.csv"));
    for (CSVRecord row : demo.results()) {
      assertThat(results).contains(row.get("sample") + "," + row.get("analyte"));
    }
  }
}
