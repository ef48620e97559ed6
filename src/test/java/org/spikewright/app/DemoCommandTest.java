package org.spikewright.app;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.stream.Stream;
import org.apache.poi.ss.usermodel.SheetVisibility;
import org.apache.poi.ss.usermodel.Workbook;
import org.apache.poi.ss.usermodel.WorkbookFactory;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.spikewright.testkit.Program;

class DemoCommandTest {
  private static final Path EXAMPLE = Path.of("watch-folder-example").toAbsolutePath();

  @TempDir Path folder;

  private static Program.Ended demo(Path from, Path to) {
    return InProcess.run("demo", "--from", from.toString(), "--to", to.toString());
  }

  @Test
  void theDemoWorksOnACopyAndReplacesItTheNextTime() throws IOException {
    Path copy = folder.resolve("copy");
    List<String> before = files(EXAMPLE);

    Program.Ended first = demo(EXAMPLE, copy);
    List<String> made = files(copy);
    Program.Ended second = demo(EXAMPLE, copy);

    for (Program.Ended ended : List.of(first, second)) {
      assertThat(ended.code()).as(ended.toString()).isEqualTo(ExitCode.DONE);
      assertThat(ended.out())
          .contains("The workbook: " + copy.resolve("summaries/summary-2026-03-04-r1.xlsx"));
    }
    assertThat(copy.resolve("summaries/summary-2026-03-04-r1.xlsx")).isRegularFile();
    assertThat(files(copy)).isEqualTo(made);
    assertThat(files(EXAMPLE)).isEqualTo(before);
  }

  @Test
  void theClosingLinesNameEverySheetOfTheWorkbook() throws IOException {
    Path copy = folder.resolve("copy");
    String said = demo(EXAMPLE, copy).out();
    String named = said.substring(said.indexOf("The workbook: "));
    Path workbook = copy.resolve("summaries/summary-2026-03-04-r1.xlsx");
    try (Workbook book = WorkbookFactory.create(workbook.toFile(), null, true)) {
      List<String> visible = new ArrayList<>();
      for (int i = 0; i < book.getNumberOfSheets(); i++) {
        if (book.getSheetVisibility(i) == SheetVisibility.VISIBLE) {
          visible.add(book.getSheetName(i));
        }
      }
      assertThat(visible)
          .hasSizeGreaterThan(6)
          .allSatisfy(name -> assertThat(named).contains(name));
    }
  }

  @Test
  void aLaboratorysOwnFolderIsNeverReplaced() throws IOException {
    Path own = Files.createDirectory(folder.resolve("own"));
    Files.copy(EXAMPLE.resolve("spikewright.toml"), own.resolve("spikewright.toml"));

    Program.Ended ended = demo(EXAMPLE, own);

    assertThat(ended.code()).isEqualTo(ExitCode.CONFIGURATION);
    assertThat(ended.err()).contains(own + " is there and is no demo; it is left as it is");
    assertThat(files(own)).containsExactly("spikewright.toml");
  }

  @ParameterizedTest
  @ValueSource(strings = {"example", "example/copy", "."})
  void theCopyLiesApartFromTheExample(String to) throws IOException {
    Path example = Files.createDirectory(folder.resolve("example"));
    Files.copy(EXAMPLE.resolve("spikewright.toml"), example.resolve("spikewright.toml"));
    Files.writeString(folder.resolve("made-by-demo.txt"), "");

    Program.Ended ended = demo(example, folder.resolve(to));

    assertThat(ended.code()).isEqualTo(ExitCode.CONFIGURATION);
    assertThat(ended.err()).contains("must lie apart from the example");
    assertThat(files(example)).containsExactly("spikewright.toml");
  }

  @Test
  void withoutAnExampleItSaysWhereToStart() {
    Program.Ended ended = demo(folder.resolve("nothing"), folder.resolve("copy"));

    assertThat(ended.code()).isEqualTo(ExitCode.CONFIGURATION);
    assertThat(ended.err()).contains("no example in", "run the demo from the project's folder");
  }

  private static List<String> files(Path top) throws IOException {
    try (Stream<Path> below = Files.walk(top)) {
      return below
          .filter(Files::isRegularFile)
          .map(path -> top.relativize(path).toString())
          .sorted()
          .toList();
    }
  }
}
