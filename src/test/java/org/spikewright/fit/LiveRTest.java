package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import java.io.File;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.concurrent.TimeUnit;
import java.util.stream.Stream;
import org.apache.commons.csv.CSVRecord;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.reference.ReferenceTable;

/** The stored numbers of R are those that its scripts make, where R is installed. */
class LiveRTest {
  private static final Path SCRIPTS = Path.of("src", "test", "r");
  private static final Path STORED = Path.of("src", "test", "resources", "reference");

  @TempDir Path folder;

  @Test
  void the_random_series_are_those_that_the_script_makes() throws Exception {
    assertSame("fit-series.csv", run("fit-series.R"));
  }

  @Test
  void the_fits_are_those_that_the_script_makes() throws Exception {
    assertSame("fit-r.csv", run("fit.R", STORED.resolve("fit-series.csv").toString()));
  }

  @Test
  void the_quantiles_and_factors_are_those_that_the_script_makes() throws Exception {
    assertSame("fit-t.csv", run("fit-t.R"));
  }

  @Test
  void the_further_numbers_are_those_that_the_scripts_make() throws Exception {
    assertSame("numbers-series.csv", run("numbers-series.R"));
    assertSame("numbers-r.csv", run("numbers.R", STORED.resolve("numbers-series.csv").toString()));
  }

  @Test
  void the_priors_and_weighted_fits_are_those_that_the_script_makes() throws Exception {
    assertSame("fit-night.csv", run("fit-night.R"));
  }

  private List<CSVRecord> run(String script, String... arguments) throws Exception {
    assumeTrue(isInstalled(), "Rscript is not on the path: the stored numbers of R are not remade");
    Path out = folder.resolve(script + ".csv");
    Path complaints = folder.resolve(script + ".txt");
    List<String> command = new ArrayList<>();
    command.add("Rscript");
    command.add("--vanilla");
    command.add(SCRIPTS.resolve(script).toString());
    command.addAll(List.of(arguments));
    Process process =
        new ProcessBuilder(command)
            .redirectOutput(out.toFile())
            .redirectError(complaints.toFile())
            .start();
    boolean ended = process.waitFor(120, TimeUnit.SECONDS);
    process.destroyForcibly();
    assertThat(ended).as("%s ends within two minutes", script).isTrue();
    assertThat(process.exitValue()).as(Files.readString(complaints)).isZero();
    return ReferenceTable.rows(Files.newBufferedReader(out, StandardCharsets.UTF_8));
  }

  private static boolean isInstalled() {
    String path = System.getenv().getOrDefault("PATH", "");
    return Stream.of(path.split(File.pathSeparator))
        .anyMatch(folder -> Files.isExecutable(Path.of(folder, "Rscript")));
  }

  /** Names alike, numbers to nine digits: another version of R may round another last digit. */
  private static void assertSame(String stored, List<CSVRecord> made) throws IOException {
    List<CSVRecord> expected = ReferenceTable.rows(stored);
    assertThat(made).hasSameSizeAs(expected);
    for (int i = 0; i < made.size(); i++) {
      String[] ours = made.get(i).values();
      String[] theirs = expected.get(i).values();
      String last = theirs[theirs.length - 1];
      assertThat(Arrays.copyOf(ours, ours.length - 1))
          .isEqualTo(Arrays.copyOf(theirs, theirs.length - 1));
      double number = Double.parseDouble(last);
      assertThat(Math.abs(Double.parseDouble(ours[ours.length - 1]) - number))
          .as("%s row %s", stored, i + 1)
          .isLessThanOrEqualTo(1e-9 * Math.max(Math.abs(number), 1e-12));
    }
  }
}
