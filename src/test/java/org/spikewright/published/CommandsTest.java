package org.spikewright.published;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.io.StringReader;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import java.util.OptionalDouble;
import java.util.TreeMap;
import org.apache.commons.csv.CSVRecord;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.judgement.Outcome;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.quantity.Numbers;
import org.spikewright.reference.ReferenceTable;
import org.spikewright.testkit.Program;

/** Published cases dropped into a laboratory's folder: what the commands print is the same. */
class CommandsTest {
  private record Dropped(String id, String export, String file) {}

  /** Sources and figures stand beside the checks of the other tests of this package. */
  private static final List<Dropped> CASES =
      List.of(
          new Dropped("sa01", "spectrometer/iron.csv", "iron"),
          new Dropped("sa02", "furnace/gum.csv", "gum"),
          new Dropped("sa03", "flame/serum.tsv", "serum"),
          new Dropped("sb05", "voltammetry/blood.txt", "blood"),
          new Dropped("se02", "vessel/series.csv", "vessel"));

  @TempDir Path lab;

  @Test
  void onceAndResultsGiveThePublishedNumbersToTheBit() throws IOException {
    Files.createDirectories(lab.resolve("mappings"));
    for (Dropped dropped : CASES) {
      Path folder = PublishedCase.FOLDER.resolve(dropped.id());
      Files.copy(folder.resolve("mapping.toml"), mapping(dropped));
      Path export = lab.resolve("watch").resolve(dropped.export());
      Files.createDirectories(export.getParent());
      Files.copy(folder.resolve(dropped.export()), export);
    }
    Path conf = Files.writeString(lab.resolve("spikewright.toml"), CONFIGURATION);
    Program.Ended once =
        Program.run("once", "--strict", "--settle", "0s", "--conf", conf.toString());
    assertThat(once.code()).as(once.out() + once.err()).isZero();
    Program.Ended results = Program.run("results", "--conf", conf.toString());
    assertThat(results.code()).as(results.err()).isZero();
    Map<String, CSVRecord> rows = new TreeMap<>();
    for (CSVRecord row : ReferenceTable.rows(new StringReader(results.out()))) {
      rows.put(row.get("source_files"), row);
    }
    assertThat(rows).hasSize(CASES.size());
    for (Dropped dropped : CASES) {
      Outcome outcome = PublishedCase.of(dropped.id(), dropped.export()).only();
      assertSame(rows.get(dropped.export()), outcome);
    }
  }

  private Path mapping(Dropped dropped) {
    return lab.resolve("mappings").resolve(dropped.file() + ".toml");
  }

  private static void assertSame(CSVRecord row, Outcome outcome) {
    SeriesResult result = outcome.result().orElseThrow();
    assertThat(row.get("value")).isEqualTo(Numbers.plain(result.value()));
    assertThat(row.get("unit")).isEqualTo(result.series().toResult().unit().symbol());
    assertThat(row.get("own_standard_error")).isEqualTo(plain(result.standardError()));
    assertThat(row.get("own_lower95")).isEqualTo(plain(result.lower95()));
    assertThat(row.get("own_upper95")).isEqualTo(plain(result.upper95()));
    assertThat(row.get("r")).isEqualTo(plain(result.line().correlation()));
    assertThat(row.get("slope")).isEqualTo(Numbers.plain(result.line().slope()));
    assertThat(row.get("flasks")).isEqualTo(Integer.toString(result.flasks().size()));
  }

  private static String plain(OptionalDouble number) {
    return number.isPresent() ? Numbers.plain(number.getAsDouble() + 0.0) : "";
  }

  private static final String CONFIGURATION =
      """
      [folders]
      watch     = "watch"
      mappings  = "mappings"
      summaries = "summaries"
      ledger    = "ledger/spikewright.db"

      [laboratory]
      zone = "UTC"
      """;
}
