package org.spikewright.app;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.spikewright.testkit.Exports;
import org.spikewright.testkit.Laboratory;
import org.spikewright.testkit.Program;

class CommandsTest {
  @TempDir Path folder;
  private Laboratory lab;

  @BeforeEach
  void makeLaboratory() {
    lab = new Laboratory(folder.resolve("lab"));
  }

  /** Tries an export and makes sure that nothing was written. */
  private Program.Ended tried(Path export, String... more) {
    List<String> args = new ArrayList<>(List.of("try", "--conf", lab.conf()));
    args.addAll(List.of(more));
    args.add(export.toString());
    List<String> before = lab.files(".");
    Program.Ended ended = InProcess.run(args.toArray(String[]::new));
    assertThat(lab.files(".")).isEqualTo(before);
    return ended;
  }

  @Test
  void tryShowsWhatWasUnderstoodOfAnExportThatIsFit() {
    Program.Ended ended = tried(lab.drop("bench/run.csv", Exports.of("BW-1")));

    assertThat(ended.code()).as(ended.toString()).isEqualTo(ExitCode.DONE);
    assertThat(ended.out())
        .contains("Mapping  bench", "8 readings, 0 refused", "BW-1", "Series that would form: 1")
        .contains("Fit for use.");
  }

  @Test
  void tryNamesRefusedRows() {
    String export = Exports.of("BW-1", "BW-2").replaceFirst("(?m),0\\.\\d+,", ",soon,");

    Program.Ended ended = tried(lab.drop("bench/run.csv", export));

    assertThat(ended.code()).isEqualTo(ExitCode.REFUSED);
    assertThat(ended.out())
        .contains("Refused rows", "line 2, column 4", "'soon'", "Not fit for use: 1 refused rows");
  }

  @Test
  void trySaysWhichMappingsThereAreForAFileThatNoneClaims() {
    Path export = lab.drop("elsewhere/run.csv", Exports.of("BW-1"));

    Program.Ended unclaimed = tried(export);

    assertThat(unclaimed.code()).isEqualTo(ExitCode.REFUSED);
    assertThat(unclaimed.err()).contains("elsewhere/run.csv", "bench (bench/*)", "--mapping");
    Program.Ended named = tried(export, "--mapping", lab.root() + "/mappings/bench.toml");
    assertThat(named.code()).isEqualTo(ExitCode.DONE);
    assertThat(named.out()).contains("Fit for use.");
  }

  @Test
  void tryReportsEveryFaultOfAMapping() {
    Path mapping = lab.write("faulty.toml", "name = 3\nfiles = 7\nfoo = 1\n");

    Program.Ended ended =
        tried(lab.drop("bench/run.csv", Exports.of("BW-1")), "--mapping", mapping.toString());

    assertThat(ended.code()).isEqualTo(ExitCode.CONFIGURATION);
    assertThat(ended.err())
        .contains("faulty.toml line 1", "faulty.toml line 2", "faulty.toml line 3");
  }

  @Test
  void everyFaultOfTheConfigurationIsReportedAtOnce() {
    lab.write(
        "spikewright.toml",
        lab.text("spikewright.toml")
            .replace("\"UTC\"", "\"Atlantis\"")
            .replace("\"06:30\"", "\"25:99\"")
            .replace("settle ", "setle "));

    for (String command : List.of("watch", "once")) {
      Program.Ended ended = InProcess.run(command, "--conf", lab.conf());

      assertThat(ended.code()).isEqualTo(ExitCode.CONFIGURATION);
      assertThat(ended.err())
          .contains("spikewright.toml line 7", "Atlantis")
          .contains("spikewright.toml line 9", "25:99")
          .contains("spikewright.toml line 11", "setle", "settle");
    }
  }

  @Test
  void everyFolderThatIsAmissIsReportedWithTheFaultyMappings() throws IOException {
    Files.delete(lab.inbox());
    lab.write("summaries", "in the way");
    lab.write("mappings/furnace.toml", "name = \"furnace\"\nfiles = 7\n");

    Program.Ended ended = InProcess.run("watch", "--conf", lab.conf());

    assertThat(ended.code()).isEqualTo(ExitCode.CONFIGURATION);
    assertThat(ended.err())
        .contains("the watched folder " + lab.inbox() + " is not there")
        .contains("the folder " + lab.summaries() + " cannot be made: a file of that name is there")
        .contains("furnace.toml line 2, column 1");
    assertThat(lab.files("ledger")).isEmpty();
  }

  @Test
  void onceSaysWhatWaitsForAFaultyMappingAndGoesOnWithTheRest() {
    lab.write("mappings/furnace.toml", "name = \"furnace\"\nfiles = 7\n");
    lab.drop("furnace/run.csv", Exports.of("BW-1"));
    lab.drop("bench/run.csv", Exports.of("BW-2"));

    Program.Ended ended = InProcess.once(lab.conf(), "--strict");

    assertThat(ended.code()).isEqualTo(ExitCode.REFUSED);
    assertThat(ended.err())
        .contains("mapping not used until it is corrected", "furnace.toml line 2, column 1");
    assertThat(ended.out()).contains("waiting file=furnace/run.csv", "read     bench/run.csv");
    assertThat(lab.inbox().resolve("furnace/run.csv")).exists();
    lab.write("mappings/furnace.toml", Laboratory.mapping("furnace", ""));
    assertThat(InProcess.once(lab.conf(), "--strict").code()).isEqualTo(ExitCode.DONE);
    assertThat(lab.done()).containsExactly("bench/run.csv", "furnace/run.csv");
  }

  @Test
  void onceIsStrictAboutRefusedRowsOnlyWhenAsked() {
    String export = Exports.of("BW-1").replaceFirst("(?m),0\\.\\d+,", ",soon,");
    lab.drop("bench/run.csv", export);
    assertThat(InProcess.once(lab.conf()).code()).isEqualTo(ExitCode.DONE);
    lab.drop("bench/run2.csv", export.replace("BW-1", "BW-2"));

    assertThat(InProcess.once(lab.conf(), "--strict").code()).isEqualTo(ExitCode.REFUSED);
  }

  @Test
  void onceWithoutAnythingNewSaysSo() {
    Program.Ended ended = InProcess.once(lab.conf(), "--strict");

    assertThat(ended.code()).isEqualTo(ExitCode.DONE);
    assertThat(ended.out()).contains("nothing new: no summary is owed");
    assertThat(lab.files("summaries")).isEmpty();
  }

  @Test
  void resultsOfALedgerThatIsNotThereAreASentenceAndNoFile() {
    List<String> before = lab.files(".");

    Program.Ended ended = InProcess.run("results", "--conf", lab.conf());

    assertThat(ended.code()).isEqualTo(ExitCode.FAULT);
    assertThat(ended.err()).contains("there is no ledger", "Check the configured path");
    assertThat(ended.err()).doesNotContain("Exception");
    assertThat(ended.out()).isEmpty();
    assertThat(lab.files(".")).isEqualTo(before);
    assertThat(lab.root().resolve("ledger")).doesNotExist();
  }

  @Test
  void resultsArePrintedAsBytesAndChangeNothing() throws IOException {
    lab.drop("bench/run.csv", Exports.of("µ-1"));
    InProcess.once(lab.conf());
    List<String> before = filesToKeep();
    Path ledger = lab.root().resolve("ledger/spikewright.db");
    byte[] content = Files.readAllBytes(ledger);

    String results = InProcess.results(lab.conf());

    assertThat(results).isEqualTo(lab.text("summaries/results-2026-03-04-r1.csv"));
    assertThat(Results.column(results, "sample")).containsExactly("µ-1");
    assertThat(filesToKeep()).isEqualTo(before);
    assertThat(ledger).hasBinaryContent(content);
  }

  /** Without the files by which the ledger's readers and writers keep out of each other's way. */
  private List<String> filesToKeep() {
    return lab.files(".").stream().filter(name -> !name.matches(".*-(shm|wal)")).toList();
  }

  @ParameterizedTest
  @ValueSource(strings = {"watch", "once", "try", "results", "demo"})
  void helpShowsAnExample(String command) {
    Program.Ended ended = InProcess.run(command, "--help");

    assertThat(ended.code()).isEqualTo(ExitCode.DONE);
    assertThat(ended.out()).containsPattern("Examples?: spikewright " + command);
  }

  @ParameterizedTest
  @ValueSource(strings = {"watch", "once", "try", "results", "demo"})
  void anUnknownOptionIsAFaultOfTheCommandLine(String command) {
    Program.Ended ended = InProcess.run(command, "run.csv", "--no-such-option");

    assertThat(ended.code()).isEqualTo(ExitCode.CONFIGURATION);
    assertThat(ended.err()).contains("--no-such-option");
  }

  @Test
  void theServiceFileStartsACommandThatThereIs() throws IOException {
    String unit = Files.readString(Path.of("conf/spikewright.service"));
    String start =
        unit.lines().filter(line -> line.startsWith("ExecStart=")).findFirst().orElseThrow();
    String command = start.substring(start.indexOf(".jar ") + 5).split(" ")[0];

    assertThat(InProcess.run(command, "--help").code()).isEqualTo(ExitCode.DONE);
  }
}
