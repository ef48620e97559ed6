package org.spikewright.workbook;

import java.nio.file.Path;
import org.spikewright.summary.*;
import org.spikewright.testkit.Nights;

public class LookAtIt {
  public static void main(String[] a) throws Exception {
    Path dir = Path.of("target/look");
    java.nio.file.Files.createDirectories(dir);
    new XlsxWriter().write(SummaryPlan.of(Nights.small()), dir.resolve("small.xlsx"), dir);
    var odd =
        Nights.night(
            java.util.List.of(
                Nights.water("BW-0414", "Pb", 8.1, Nights.Shape.ODD), Nights.sediment("Mud", "Pb")),
            Nights.files(),
            Nights.refused());
    new XlsxWriter().write(SummaryPlan.of(odd), dir.resolve("odd.xlsx"), dir);
    CsvWriter.write(CsvPlan.results(Nights.small().results()), dir.resolve("results.csv"));
    CsvWriter.write(CsvPlan.flasks(Nights.small().outcomes()), dir.resolve("flasks.csv"));
  }
}
