package org.spikewright.app;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.testkit.Program;

/** The language, zone and encoding of the machine change no result. */
class MachineTest {
  private static final String EXAMPLE = Path.of("watch-folder-example").toAbsolutePath().toString();

  /** What a machine may be set to. */
  private static final Map<String, List<String>> MACHINES =
      Map.of(
          "Turkish", List.of("-Duser.language=tr", "-Duser.country=TR"),
          "Hindi digits",
              List.of(
                  "-Duser.language=hi",
                  "-Duser.country=IN",
                  "-Duser.extensions=u-nu-deva",
                  "-Duser.timezone=Asia/Kolkata"),
          "Apia", List.of("-Duser.timezone=Pacific/Apia"),
          "Latin-1", List.of("-Dfile.encoding=ISO-8859-1", "-Duser.language=de"));

  @TempDir Path folder;

  @Test
  void everyMachineGivesTheSameResultsByteForByte() throws IOException {
    Map<String, String> plain = demo("plain", List.of());
    assertThat(plain.keySet())
        .contains("results-2026-03-04-r1.csv", "flasks-2026-03-04-r1.csv", "printed");
    assertThat(plain.get("printed"))
        .contains("µg/L")
        .hasLineCount(plain.get("results-2026-03-04-r1.csv").split("\n").length);

    for (Map.Entry<String, List<String>> machine : MACHINES.entrySet()) {
      assertThat(demo(machine.getKey(), machine.getValue())).as(machine.getKey()).isEqualTo(plain);
    }
  }

  /** Every CSV that the demo writes on such a machine, and what results prints there. */
  private Map<String, String> demo(String name, List<String> machine) throws IOException {
    Path copy = folder.resolve(name.replace(' ', '-'));
    Program.Ended ended = Program.run(machine, "demo", "--from", EXAMPLE, "--to", copy.toString());
    assertThat(ended.code()).as(name + ": " + ended).isEqualTo(ExitCode.DONE);
    Map<String, String> texts = new TreeMap<>();
    try (Stream<Path> files = Files.list(copy.resolve("summaries"))) {
      for (Path file : (Iterable<Path>) files::iterator) {
        if (file.toString().endsWith(".csv")) {
          texts.put(file.getFileName().toString(), Files.readString(file));
        }
      }
    }
    Program.Ended printed =
        Program.run(machine, "results", "--conf", copy.resolve("spikewright.toml").toString());
    assertThat(printed.code()).as(name + ": " + printed).isEqualTo(ExitCode.DONE);
    texts.put("printed", printed.out());
    return texts;
  }
}
