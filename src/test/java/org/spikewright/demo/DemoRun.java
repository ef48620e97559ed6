package org.spikewright.demo;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.io.Reader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.apache.commons.csv.CSVFormat;
import org.apache.commons.csv.CSVRecord;
import org.spikewright.testkit.Program;

/** The example folder, evaluated by the command that a newcomer starts. */
record DemoRun(Path folder) {
  private static final CSVFormat FORMAT =
      CSVFormat.DEFAULT.builder().setHeader().setSkipHeaderRecord(true).get();

  /** Runs the demo on a copy of the example below {@code folder}. */
  static DemoRun in(Path folder) {
    DemoRun demo = new DemoRun(folder.resolve("demo"));
    Program.Ended run =
        Program.run("demo", "--from", "watch-folder-example", "--to", demo.folder().toString());
    assertThat(run.code()).as(run.out() + run.err()).isZero();
    return demo;
  }

  Path workbook() {
    return folder.resolve("summaries").resolve("summary-2026-03-04-r1.xlsx");
  }

  List<CSVRecord> results() {
    return rows("results-2026-03-04-r1.csv");
  }

  List<CSVRecord> flasks() {
    return rows("flasks-2026-03-04-r1.csv");
  }

  private List<CSVRecord> rows(String name) {
    Path file = folder.resolve("summaries").resolve(name);
    try (Reader text = Files.newBufferedReader(file, StandardCharsets.UTF_8)) {
      return FORMAT.parse(text).getRecords();
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
  }
}
