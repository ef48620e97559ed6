package org.spikewright.testkit;

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
import org.spikewright.quantity.NumberGrammar;

/** Another program that opens our workbooks and computes their formulas. */
public final class LibreOffice {
  private static final String CSV =
      "csv:Text - txt - csv (StarCalc):44,34,76,1,,0,false,true,false,false,false,-1";

  private final Path folder;

  /** Works in a folder of the test's own. */
  public LibreOffice(Path folder) {
    this.folder = folder;
  }

  /** Skips the test, with a sentence, where the program is not installed. */
  public static void assumeInstalled() throws InterruptedException {
    boolean there;
    try {
      there = new ProcessBuilder("soffice", "--version").start().waitFor() == 0;
    } catch (IOException absent) {
      there = false;
    }
    assumeTrue(there, "LibreOffice is not installed: formulas are not computed anew");
  }

  /** Each sheet's lines with every formula computed anew, by {@code <book>-<sheet>.csv}. */
  public Map<String, List<String>> computedAnew(Path book) throws Exception {
    return sheets(book, 0);
  }

  /** Each sheet's lines with what its cells hold. */
  public Map<String, List<String>> asStored(Path book) throws Exception {
    return sheets(book, 1);
  }

  /** Asserts equal text, and numbers equal but for the rounding of another arithmetic. */
  public static void assertSame(String sheet, List<String> anew, List<String> stored) {
    assertThat(anew).as(sheet).hasSameSizeAs(stored);
    for (int i = 0; i < anew.size(); i++) {
      String[] fields = anew.get(i).split(",", -1);
      String[] expected = stored.get(i).split(",", -1);
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

  /** Mode 0 computes every formula anew, 1 trusts what the cells hold. */
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
