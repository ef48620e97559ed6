package org.spikewright.demo;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.LinkedHashMap;
import java.util.Locale;
import java.util.Map;

/**
 * Writes the demo's exports and its truth, bit for bit the same every time.
 *
 * <p>From the project's top folder: {@code mvn -q test-compile exec:java -Dexec.classpathScope=test
 * -DmainClass=org.spikewright.demo.DemoFolder}.
 */
public final class DemoFolder {
  /** Where the exports are written by default. */
  static final Path INBOX = Path.of("watch-folder-example", "inbox");

  /** Where the truth is written by default. */
  static final Path TRUTH = Path.of("src", "test", "resources", "reference", "demo-truth.csv");

  private DemoFolder() {}

  /** Writes to the two places in the project, or to a folder and a file given. */
  public static void main(String[] args) throws IOException {
    write(args.length == 2 ? Path.of(args[0]) : INBOX, args.length == 2 ? Path.of(args[1]) : TRUTH);
  }

  static void write(Path inbox, Path truth) throws IOException {
    for (Map.Entry<String, byte[]> file : exports().entrySet()) {
      Path path = inbox.resolve(file.getKey());
      Files.createDirectories(path.getParent());
      Files.write(path, file.getValue());
    }
    Files.createDirectories(truth.toAbsolutePath().getParent());
    Files.writeString(truth, truth(), StandardCharsets.UTF_8);
  }

  /** File name inside the inbox to content. */
  static Map<String, byte[]> exports() throws IOException {
    Map<String, byte[]> files = new LinkedHashMap<>();
    files.put("furnace/run_0304_am.csv", FurnaceExport.bytes(DemoNight.CADMIUM, "FC-0304"));
    files.put("furnace/run_0304_pm.csv", FurnaceExport.bytes(DemoNight.LEAD, "FP-0304"));
    files.put("furnace/run_0305.csv", FurnaceExport.cut(DemoNight.CUT, "FC-0305"));
    files.put("plasma/waters_0304.xlsx", PlasmaExport.waters(DemoNight.NICKEL));
    files.put("plasma/sediment_0304.xlsx", PlasmaExport.sediment(DemoNight.COPPER));
    files.put("stripping/cell2_20260304.tsv", StrippingExport.bytes(DemoNight.ZINC));
    return files;
  }

  private static String truth() {
    StringBuilder text = new StringBuilder();
    text.append("# What the invented samples of watch-folder-example hold. Written by ")
        .append(DemoFolder.class.getName())
        .append(".\n")
        .append("sample,analyte,instrument,true_concentration,unit,scenario,flag,verdict,note\n");
    for (DemoNight.Export export : DemoNight.exports()) {
      for (SeriesPlan plan : export.plans()) {
        text.append(
            String.format(
                Locale.ROOT,
                "%s,%s,%s,%s,%s,%s,%s,%s,\"%s\"\n",
                plan.sample(),
                plan.recipe().analyte(),
                plan.recipe().instrument(),
                plan.truth(),
                plan.recipe().unit(),
                plan.scenario().words(),
                plan.scenario().flag(),
                plan.scenario().verdict(),
                plan.note()));
      }
    }
    return text.toString();
  }
}
