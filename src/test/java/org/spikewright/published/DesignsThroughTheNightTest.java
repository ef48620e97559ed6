package org.spikewright.published;

import static org.assertj.core.api.Assertions.assertThat;
import static org.spikewright.published.Agreement.isAbout;

import java.io.IOException;
import java.io.StringReader;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Map;
import java.util.TreeMap;
import org.apache.commons.csv.CSVRecord;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.reference.ReferenceTable;
import org.spikewright.testkit.Laboratory;
import org.spikewright.testkit.Program;

/**
 * The shipped example of each newer design, from the watched folder through the ledger to the
 * workbook and the printed results. The exports are made from the bench's physics.
 */
class DesignsThroughTheNightTest {
  @TempDir Path folder;

  @Test
  void theExamplesGiveBackWhatWasPutIn() throws IOException {
    Laboratory lab = new Laboratory(folder);
    for (String example : new String[] {"weighed", "internal-standard", "electrode"}) {
      lab.write(
          "mappings/" + example + ".toml",
          Files.readString(Path.of("mappings", example + ".toml")));
    }
    lab.drop("weighed/lead.csv", weighed());
    lab.drop("yttrium/copper.csv", onLine());
    lab.drop("electrode/nitrate.csv", electrode());
    Program.Ended once = Program.run("once", "--strict", "--settle", "0s", "--conf", lab.conf());
    assertThat(once.code()).as(once.out() + once.err()).isZero();
    assertThat(lab.files("summaries")).anyMatch(name -> name.endsWith(".xlsx"));
    Program.Ended results = Program.run("results", "--conf", lab.conf());
    Map<String, CSVRecord> rows = new TreeMap<>();
    for (CSVRecord row : ReferenceTable.rows(new StringReader(results.out()))) {
      rows.put(row.get("source_files"), row);
    }
    assertThat(rows).hasSize(3);
    isAbout(20, value(rows, "weighed/lead.csv"), 1e-9);
    isAbout(0.5, value(rows, "yttrium/copper.csv"), 1e-9);
    isAbout(6, value(rows, "electrode/nitrate.csv"), 1e-7);
    CSVRecord nitrate = rows.get("electrode/nitrate.csv");
    assertThat(nitrate.get("design")).isEqualTo("electrode");
    assertThat(nitrate.get("detection_limit")).isEmpty();
    isAbout(-58.2, Double.parseDouble(nitrate.get("slope")), 1e-7);
  }

  private static double value(Map<String, CSVRecord> rows, String file) {
    return Double.parseDouble(rows.get(file).get("value"));
  }

  /** 20 µg/kg of lead; thallium weighed in; the detector fades. */
  private static String weighed() {
    StringBuilder export =
        new StringBuilder("Sample,Flask,Run,Counts Pb,Counts Tl,Aliquot g,Spike g,Tl solution g\n");
    double[] aliquot = {10.003, 9.998, 10.001, 10.005};
    double[] thallium = {0.1002, 0.1001, 0.0999, 0.1003};
    for (int i = 0; i < 4; i++) {
      double spike = 0.15 * i;
      double total = 50 + i;
      double fading = 1 - 0.02 * i;
      double lead = (20e-3 * aliquot[i] + spike) / total;
      export.append(
          String.join(
              ",",
              "K-1",
              "" + i,
              "1",
              "" + (40 + fading * 1e6 * lead),
              "" + (25 + fading * 5e5 * thallium[i] / total),
              "" + aliquot[i],
              "" + spike,
              "" + thallium[i] + "\n"));
    }
    return export.toString();
  }

  /** 0.5 mg/L of copper; yttrium on line; the plasma fades. */
  private static String onLine() {
    StringBuilder export = new StringBuilder("Sample,Element,Intensity,Y 371.029,Time,Spike\n");
    for (int i = 0; i < 4; i++) {
      double fading = 1 - 0.03 * i;
      double copper = (0.5 * 20 + 10 * i) / 50;
      export.append(
          String.join(
              ",",
              "W-1",
              "Cu",
              "" + fading * 1000 * copper,
              "" + fading * 4321,
              "2026-03-04 18:3" + i + ":00",
              i + "\n"));
    }
    return export.toString();
  }

  /** 6 mg/L of nitrate in 25 of 50 mL; the electrode has 98 % of the slope of theory. */
  private static String electrode() {
    StringBuilder export = new StringBuilder("Sample,Step,E / mV,Time,Added / mL\n");
    for (int i = 0; i < 5; i++) {
      double potential = 310 - 58.2 * Math.log10((6 * 25 + 1000 * 0.1 * i) / (50 + 0.1 * i));
      export.append(
          String.join(
              ",",
              "W-2",
              "" + i,
              "" + potential,
              "2026-03-04 18:3" + i + ":00",
              (i == 0 ? "0" : "0.1") + "\n"));
    }
    return export.toString();
  }
}
