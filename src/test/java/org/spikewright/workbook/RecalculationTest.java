package org.spikewright.workbook;

import static org.assertj.core.api.Assertions.assertThat;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.OptionalDouble;
import java.util.TreeMap;
import java.util.concurrent.TimeUnit;
import java.util.stream.Stream;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.quantity.NumberGrammar;
import org.spikewright.summary.Night;
import org.spikewright.summary.SummaryPlan;
import org.spikewright.testkit.Nights;

/** Another program opens the workbook and computes every formula anew. */
class RecalculationTest {
  private static final String CSV =
      "csv:Text - txt - csv (StarCalc):44,34,76,1,,0,false,true,false,false,false,-1";

  @TempDir Path folder;

  @BeforeEach
  void needsASpreadsheetProgram() throws Exception {
    boolean there;
    try {
      there = new ProcessBuilder("soffice", "--version").start().waitFor() == 0;
    } catch (IOException absent) {
      there = false;
    }
    assumeTrue(there, "LibreOffice is not installed: formulas are not computed anew");
  }

  @Test
  void whatTheCellsHoldIsWhatTheirFormulasGive() throws Exception {
    Path book = folder.resolve("summary.xlsx");
    new XlsxWriter().write(SummaryPlan.of(Nights.small()), book, folder.resolve("temp"));
    Map<String, List<String>> anew = sheets(book, 0);
    Map<String, List<String>> cached = sheets(book, 1);
    assertThat(anew.keySet()).contains("summary-Series.csv", "summary-Plot.csv");
    anew.forEach((sheet, lines) -> assertSame(sheet, lines, cached.get(sheet)));
    List<String> checks =
        anew.get("summary-Series.csv").stream().filter(l -> l.startsWith("check,")).toList();
    assertThat(checks).hasSize(11).allSatisfy(line -> assertThat(line).contains("agrees"));
    assertThat(String.join("\n", anew.get("summary-Series.csv"))).doesNotContain("DIFFERS");
  }

  @Test
  void everyLiveCheckAgreesOnALongerNight() throws Exception {
    Path book = folder.resolve("summary.xlsx");
    Night night = Nights.large(200);
    new XlsxWriter().write(SummaryPlan.of(night), book, folder.resolve("temp"));
    String series = String.join("\n", sheets(book, 0).get("summary-Series.csv"));
    assertThat(series).doesNotContain("DIFFERS").doesNotContain("#");
    assertThat(series.split("agrees", -1)).hasSize(1 + 200 * 11);
  }

  /** Equal text, and numbers equal but for the rounding of another arithmetic. */
  private static void assertSame(String sheet, List<String> anew, List<String> cached) {
    assertThat(anew).as(sheet).hasSameSizeAs(cached);
    for (int i = 0; i < anew.size(); i++) {
      String[] fields = anew.get(i).split(",", -1);
      String[] expected = cached.get(i).split(",", -1);
      assertThat(fields).as(sheet + " line " + (i + 1)).hasSameSizeAs(expected);
      for (int j = 0; j < fields.length; j++) {
        if (!isClose(fields[j], expected[j])) {
          assertThat(fields[j]).as(sheet + " line " + (i + 1)).isEqualTo(expected[j]);
        }
      }
    }
  }

  private static boolean isClose(String a, String b) {
    OptionalDouble x = NumberGrammar.POINT.parse(a);
    OptionalDouble y = NumberGrammar.POINT.parse(b);
    return x.isPresent()
        && y.isPresent()
        && Math.abs(x.getAsDouble() - y.getAsDouble())
            <= 1e-9 * Math.max(1e-3, Math.abs(y.getAsDouble()));
  }

  /** Each sheet's lines; mode 0 computes every formula anew, 1 trusts what the cells hold. */
  private Map<String, List<String>> sheets(Path book, int mode) throws Exception {
    Path profile = Files.createDirectories(folder.resolve("profile" + mode + "/user"));
    Files.writeString(profile.resolve("registrymodifications.xcu"), registry(mode));
    Path out = Files.createDirectories(folder.resolve("out" + mode));
    List<String> command = new ArrayList<>();
    command.add("soffice");
    command.add("-env:UserInstallation=" + profile.getParent().toUri());
    command.addAll(List.of("--headless", "--convert-to", CSV, "--outdir", out.toString()));
    command.add(book.toString());
    Process process =
        new ProcessBuilder(command)
            .redirectErrorStream(true)
            .redirectOutput(folder.resolve("soffice.log").toFile())
            .start();
    assertThat(process.waitFor(180, TimeUnit.SECONDS)).as("LibreOffice finished").isTrue();
    Map<String, List<String>> sheets = new TreeMap<>();
    try (Stream<Path> files = Files.list(out)) {
      for (Path file : files.toList()) {
        sheets.put(file.getFileName().toString(), Files.readAllLines(file));
      }
    }
    assertThat(sheets).as("sheets written by LibreOffice").isNotEmpty();
    return sheets;
  }

  private static String registry(int mode) {
    return """
        <?xml version="1.0" encoding="UTF-8"?>
        <oor:items xmlns:oor="http://openoffice.org/2001/registry"
            xmlns:xs="http://www.w3.org/2001/XMLSchema"
            xmlns:xsi="http://www.w3.org/2001/XMLSchema-instance">
          <item oor:path="/org.openoffice.Office.Calc/Formula/Load">
            <prop oor:name="OOXMLRecalcMode" oor:op="fuse"><value>%d</value></prop>
          </item>
        </oor:items>
        """
        .formatted(mode);
  }
}
