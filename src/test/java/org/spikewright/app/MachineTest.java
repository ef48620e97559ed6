package org.spikewright.app;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import java.util.function.Function;
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
          "Turkish, in Apia",
              List.of("-Duser.language=tr", "-Duser.country=TR", "-Duser.timezone=Pacific/Apia"),
          "Hindi digits, Latin-1",
              List.of(
                  "-Duser.language=hi",
                  "-Duser.country=IN",
                  "-Duser.extensions=u-nu-deva",
                  "-Dfile.encoding=ISO-8859-1"));

  @TempDir Path folder;

  @Test
  void everyMachineGivesTheSameResultsByteForByte() throws IOException {
    Map<String, String> plain = demo("plain", args -> InProcess.run(args));
    assertThat(plain.keySet())
        .contains("results-2026-03-04-r1.csv", "flasks-2026-03-04-r1.csv", "printed");
    assertThat(plain.get("printed")).contains("µg/L").hasSizeGreaterThan(1000);

    for (Map.Entry<String, List<String>> machine : MACHINES.entrySet()) {
      Map<String, String> there =
          demo(machine.getKey(), args -> Program.run(machine.getValue(), args));
      assertThat(there).as(machine.getKey()).isEqualTo(plain);
    }
  }

  /** Every CSV that the demo writes on such a machine, and what results prints there. */
  private Map<String, String> demo(String name, Function<String[], Program.Ended> machine)
      throws IOException {
    Path copy = folder.resolve(name.replaceAll("\\W+", "-"));
    Map<String, String> texts = new TreeMap<>();
    said(machine, "demo", "--from", EXAMPLE, "--to", copy.toString());
    try (Stream<Path> files = Files.list(copy.resolve("summaries"))) {
      for (Path file : (Iterable<Path>) files::iterator) {
        if (file.toString().endsWith(".csv")) {
          texts.put(file.getFileName().toString(), Files.readString(file));
        }
      }
    }
    String conf = copy.resolve("spikewright.toml").toString();
    texts.put("printed", said(machine, "results", "--conf", conf));
    return texts;
  }

  private static String said(Function<String[], Program.Ended> machine, String... args) {
    Program.Ended ended = machine.apply(args);
    assertThat(ended.code()).as(ended.toString()).isEqualTo(ExitCode.DONE);
    return ended.out();
  }
}
