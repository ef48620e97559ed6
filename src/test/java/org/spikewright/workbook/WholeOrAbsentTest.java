package org.spikewright.workbook;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Iterator;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.judgement.Outcome;
import org.spikewright.summary.CsvPlan;
import org.spikewright.summary.Night;
import org.spikewright.summary.ResultRow;
import org.spikewright.summary.SummaryPlan;
import org.spikewright.testkit.Nights;

class WholeOrAbsentTest {
  @TempDir Path folder;

  @Test
  void aDiskThatFillsUpLeavesTheOldFileAndNothingTorn() throws Exception {
    Path target = Files.writeString(folder.resolve("results.csv"), "old");
    assertThatThrownBy(
            () ->
                Aside.write(
                    target,
                    out -> {
                      out.write(new byte[100_000]);
                      throw new IOException("No space left on device");
                    }))
        .isInstanceOf(WriteFault.class)
        .hasMessageContaining("results.csv")
        .hasMessageContaining("No space left on device")
        .extracting(fault -> ((WriteFault) fault).path())
        .isEqualTo(target);
    assertThat(target).hasContent("old");
    assertThat(names()).containsExactly("results.csv");
  }

  @Test
  void aWorkbookWhoseRowsFailHalfwayDoesNotAppear() throws Exception {
    Night night = failing(Nights.large(400), new UncheckedIOException(new IOException("gone")));
    Path target = folder.resolve("summary.xlsx");
    SummaryPlan plan = SummaryPlan.of(night);
    assertThatThrownBy(() -> new XlsxWriter().write(plan, target, folder.resolve("temp")))
        .isInstanceOf(WriteFault.class)
        .hasMessageContaining("gone");
    assertThat(names()).containsExactly("temp");
    assertThat(folder.resolve("temp")).isEmptyDirectory();
  }

  @Test
  void aBrokenPromiseIsNotTakenForADiskFault() {
    Night night = failing(Nights.large(400), new IllegalStateException("a bug"));
    SummaryPlan plan = SummaryPlan.of(night);
    Path target = folder.resolve("summary.xlsx");
    assertThatThrownBy(() -> new XlsxWriter().write(plan, target, folder.resolve("temp")))
        .isInstanceOf(IllegalStateException.class)
        .hasMessage("a bug");
    assertThat(target).doesNotExist();
  }

  @Test
  void aFolderThatIsGoneIsAWriteFault() {
    Path target = folder.resolve("absent/results.csv");
    assertThatThrownBy(() -> CsvWriter.write(CsvPlan.results(Nights.small().results()), target))
        .isInstanceOf(WriteFault.class)
        .hasMessageContaining("absent");
  }

  @Test
  void aRemainderOfAKilledProgramIsReplaced() throws Exception {
    Files.writeString(folder.resolve(".results.csv.part"), "x".repeat(1_000_000));
    Path target = folder.resolve("results.csv");
    CsvWriter.write(CsvPlan.results(List.of()), target);
    assertThat(Files.readString(target)).startsWith("lab_day,").hasLineCount(1);
    assertThat(names()).containsExactly("results.csv");
  }

  @Test
  void aFileForMachinesIsPlainUtf8WithLineFeeds() throws Exception {
    Path target = folder.resolve("flasks.csv");
    CsvWriter.write(CsvPlan.flasks(Nights.small().outcomes()), target);
    byte[] bytes = Files.readAllBytes(target);
    String text = new String(bytes, StandardCharsets.UTF_8);
    assertThat(text).doesNotContain("\r").contains("µL").contains("=1+1").endsWith("\n");
    assertThat((char) bytes[0]).isEqualTo('l');
    assertThat(text.lines().count()).isEqualTo(1 + 5 * 8 + 2 + 3 + 4 + 1);
  }

  /** The same night, whose outcomes fail on the second walk after 200. */
  private static Night failing(Night night, RuntimeException fault) {
    int[] walks = {0};
    Iterable<Outcome> outcomes =
        () -> {
          Iterator<Outcome> source = night.outcomes().iterator();
          boolean fails = ++walks[0] == 2;
          int[] given = {0};
          return new Iterator<>() {
            @Override
            public boolean hasNext() {
              return source.hasNext();
            }

            @Override
            public Outcome next() {
              if (fails && ++given[0] > 200) {
                throw fault;
              }
              return source.next();
            }
          };
        };
    Iterable<ResultRow> results = night.results();
    return new Night(
        night.labDay(),
        night.revision(),
        night.moment(),
        night.inProgress(),
        night.zone(),
        night.laboratory(),
        night.seriesCount(),
        results,
        outcomes,
        night.files(),
        night.refused(),
        night.settings(),
        night.criteria(),
        night.evidence(),
        night.controls());
  }

  private List<String> names() throws IOException {
    try (Stream<Path> entries = Files.list(folder)) {
      return entries.map(entry -> entry.getFileName().toString()).toList();
    }
  }
}
