package org.spikewright.intake;

import static org.assertj.core.api.Assertions.assertThat;
import static org.spikewright.intake.Folder.put;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.HashSet;
import java.util.List;
import java.util.Random;
import java.util.Set;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class ArchiveNameTest {
  private static final LocalDate DAY = LocalDate.of(2025, 1, 15);

  @TempDir Path watched;
  Archive archive;

  @BeforeEach
  void open() {
    archive = new Archive(watched);
  }

  private String done(String name) throws IOException {
    return archive.doneName(DAY, name, target -> false);
  }

  @ParameterizedTest
  @CsvSource(
      delimiter = '|',
      ignoreLeadingAndTrailingWhitespace = false,
      value = {
        "run7.csv|run7.csv",
        "furnace/run7.csv|furnace/run7.csv",
        "µg L.XLSX|µg L.XLSX",
        "../../etc/passwd|__/__/etc/passwd",
        "/run7.csv|_/run7.csv",
        "./run7.csv|_/run7.csv",
        "a\\b.csv|a_b.csv",
        "10:30?.csv|10_30_.csv",
        "run7.csv. .|run7.csv___",
        "con.csv|_con.csv",
        "COM1|_COM1",
        "lpt².x.y|_lpt².x.y",
        "nul/aux.txt|_nul/_aux.txt",
        "console.csv|console.csv",
        "run7.csv.reason.txt|run7.csv.reason_.txt",
        "RUN7.ROWS.TXT|RUN7.ROWS_.TXT",
        "spikewright-journal.csv|_spikewright-journal.csv",
        "-rf|-rf",
        " lead.csv| lead.csv",
        ".hidden|_hidden",
        "a\\u000ab.csv|a_u000ab.csv",
      })
  void aNameIsMadeSafeAndOtherwiseKept(String name, String safe) throws IOException {
    assertThat(done(name)).isEqualTo("done/2025-01-15/" + safe);
  }

  @Test
  void controlCharactersAndDirectionMarksAreReplaced() throws IOException {
    assertThat(done("a\n\t\u0000b\u202e.csv")).isEqualTo("done/2025-01-15/a___b_.csv");
    assertThat(done("")).isEqualTo("done/2025-01-15/_");
  }

  @Test
  void theSameNameIsNumberedAlsoAfterARestart() throws IOException {
    assertThat(List.of(done("run7.csv"), done("run7.csv"), done("RUN7.csv")))
        .containsExactly(
            "done/2025-01-15/run7.csv", "done/2025-01-15/run7-2.csv", "done/2025-01-15/RUN7-3.csv");
    put(watched, "done/2025-01-15/run8.csv", "a");
    put(watched, "done/2025-01-15/run8-2.csv", "a");
    assertThat(new Archive(watched).doneName(DAY, "run8.csv", target -> false))
        .isEqualTo("done/2025-01-15/run8-3.csv");
  }

  @Test
  void namesThatDifferInCompositionOnlyAreNumbered() throws IOException {
    assertThat(done("Prüfung.csv")).isEqualTo("done/2025-01-15/Prüfung.csv");
    assertThat(done("Pru\u0308fung.csv")).isEqualTo("done/2025-01-15/Pru\u0308fung-2.csv");
    assertThat(done("STRASSE.csv")).isEqualTo("done/2025-01-15/STRASSE.csv");
    assertThat(done("straße.csv")).isEqualTo("done/2025-01-15/straße-2.csv");
  }

  @Test
  void aPromisedNameIsNotGivenToAnother() throws IOException {
    String promised = "done/2025-01-15/run7.csv";
    assertThat(archive.doneName(DAY, "run7.csv", promised::equals))
        .isEqualTo("done/2025-01-15/run7-2.csv");
  }

  @Test
  void aFolderAndAFileDoNotShareAName() throws IOException {
    assertThat(done("furnace")).isEqualTo("done/2025-01-15/furnace");
    assertThat(done("Furnace/run7.csv")).isEqualTo("done/2025-01-15/Furnace-2/run7.csv");
    assertThat(done("furnace-2")).isEqualTo("done/2025-01-15/furnace-2-2");
  }

  @Test
  void aTextLeftBesideADoneFileIsNotToBeWrittenOver() throws IOException {
    put(watched, "done/2025-01-15/run7.csv.rows.txt", "evidence");
    assertThat(done("run7.csv")).isEqualTo("done/2025-01-15/run7-2.csv");
  }

  @Test
  void aRefusedFileThatWasTakenAwayAndMendedKeepsItsName() throws IOException {
    for (int round = 0; round < 3; round++) {
      Path file = put(watched, "run7.csv", "round " + round);
      String target = archive.rejectedName("run7.csv", name -> false);
      assertThat(target).isEqualTo("rejected/run7.csv");
      Fingerprint print = Fingerprint.of(file).orElseThrow();
      assertThat(archive.refuse(file, print, target, "no rows")).isInstanceOf(Filed.Moved.class);
      if (round < 2) {
        // The reason is left lying by some, and taken away by others.
        Files.delete(watched.resolve(target));
        if (round == 0) {
          Files.delete(watched.resolve(target + ".reason.txt"));
        }
      }
    }
    assertThat(archive.rejectedName("run7.csv", name -> false)).isEqualTo("rejected/run7-2.csv");
  }

  @Test
  void longNamesAreShortenedKeepTheirExtensionAndLeaveRoom() throws IOException {
    Folder.needsUnicodeNames();
    Random random = new Random(15);
    Set<String> seen = new HashSet<>();
    for (int i = 0; i < 300; i++) {
      String letter = List.of("a", "µ", "試", "🧪", ".", " ").get(random.nextInt(6));
      String name = "x" + letter.repeat(60 + random.nextInt(200)) + ".xlsx";
      String target = done(name);
      assertThat(seen.add(Archive.folded(target))).as(target).isTrue();
      assertThat(target).endsWith(".xlsx");
      String last = target.substring(target.lastIndexOf('/') + 1);
      assertThat((last + ".reason.txt").getBytes(StandardCharsets.UTF_8))
          .as(target)
          .hasSizeLessThanOrEqualTo(255);
      archive.note(target, Beside.REASON, "it fits");
    }
    Path longest = put(watched, "y".repeat(251) + ".csv", "long");
    String target = done(longest.getFileName().toString());
    assertThat(archive.move(longest, Fingerprint.of(longest).orElseThrow(), target))
        .isInstanceOf(Filed.Moved.class);
    assertThat(target).endsWith("yy.csv");
  }

  @Test
  void aThousandContentsUnderOneNameAllHaveTheirPlace() throws IOException {
    Set<String> targets = new HashSet<>();
    for (int i = 0; i < 1000; i++) {
      Path file = put(watched, "run7.csv", "content " + i);
      String target = done("run7.csv");
      targets.add(target);
      assertThat(archive.move(file, Fingerprint.of(file).orElseThrow(), target))
          .isInstanceOf(Filed.Moved.class);
    }
    assertThat(targets).hasSize(1000).contains("done/2025-01-15/run7-1000.csv");
    assertThat(Set.copyOf(Folder.contents(watched).values())).hasSize(1000);
  }

  @Test
  void anyNameAtAllBecomesASafeOne() throws IOException {
    Folder.needsUnicodeNames();
    long seed = 77;
    Random random = new Random(seed);
    Set<String> seen = new HashSet<>();
    for (int i = 0; i < 20_000; i++) {
      StringBuilder name = new StringBuilder();
      for (int j = random.nextInt(12); j >= 0; j--) {
        name.append((char) (random.nextInt(5) == 0 ? random.nextInt(0xffff) : random.nextInt(128)));
      }
      String target = done(name.toString());
      assertThat(archive.at(target).startsWith(watched)).as("seed %d, %s", seed, name).isTrue();
      assertThat(seen.add(Archive.folded(target))).as("seed %d, %s", seed, target).isTrue();
      for (String part : target.split("/")) {
        assertThat(part)
            .as("seed %d, %s", seed, target)
            .doesNotMatch("(?s).*[\\p{Cntrl}\\\\:*?\"<>|].*")
            .doesNotMatch("(?s).*[. ]")
            .isNotEmpty();
      }
    }
  }
}
