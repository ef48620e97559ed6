package org.spikewright.app;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The jar as it is handed out. */
@Tag("jar")
class JarTest {
  private static final Path JAR = Path.of("target", "spikewright.jar").toAbsolutePath();
  private static final Path EXAMPLE = Path.of("watch-folder-example").toAbsolutePath();

  @TempDir Path folder;

  private record Ended(int code, String said) {}

  private Ended run(String... args) throws IOException, InterruptedException {
    List<String> command = new ArrayList<>();
    command.add(Path.of(System.getProperty("java.home"), "bin", "java").toString());
    command.addAll(List.of("-Xmx256m", "-jar", JAR.toString()));
    command.addAll(List.of(args));
    // From elsewhere, so that nothing is found by chance.
    Process process =
        new ProcessBuilder(command).directory(folder.toFile()).redirectErrorStream(true).start();
    String said = new String(process.getInputStream().readAllBytes(), StandardCharsets.UTF_8);
    return new Ended(process.waitFor(), said);
  }

  @Test
  void itRunsTheDemoAndKnowsItsVersion() throws Exception {
    Path copy = folder.resolve("copy");

    Ended demo = run("demo", "--from", EXAMPLE.toString(), "--to", copy.toString());
    Ended version = run("--version");

    assertThat(demo.code()).as(demo.said()).isEqualTo(ExitCode.DONE);
    Path workbook = copy.resolve("summaries").resolve("summary-2026-03-04-r1.xlsx");
    assertThat(demo.said()).contains("The workbook: " + workbook).doesNotContain("WARN", "ERROR");
    assertThat(workbook).isRegularFile();
    assertThat(version.code()).isEqualTo(ExitCode.DONE);
    assertThat(version.said().strip()).matches("spikewright \\d+\\.\\d+\\.\\d+(-SNAPSHOT)?");
  }
}
