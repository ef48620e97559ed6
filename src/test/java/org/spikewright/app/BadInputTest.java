package org.spikewright.app;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.OutputStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.security.GeneralSecurityException;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Random;
import org.apache.poi.poifs.crypt.EncryptionInfo;
import org.apache.poi.poifs.crypt.EncryptionMode;
import org.apache.poi.poifs.crypt.Encryptor;
import org.apache.poi.poifs.filesystem.POIFSFileSystem;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.testkit.Exports;
import org.spikewright.testkit.Laboratory;
import org.spikewright.testkit.Program;
import org.spikewright.testkit.WorkbookText;

class BadInputTest {
  /** A file that must be refused, and what its reason must say. */
  private record Bad(String name, byte[] bytes, String... says) {}

  @TempDir Path folder;
  private Laboratory lab;

  @BeforeEach
  void makeLaboratory() {
    lab = new Laboratory(folder);
  }

  @Test
  void eachBadFileIsRefusedWithAReasonAndTheGoodOnesGoOn() throws Exception {
    lab.write(
        "mappings/second.toml", Laboratory.mapping("second", "").replace("second/*", "*/two*"));
    List<Bad> bad = badFiles();
    lab.drop("bench/a-first.csv", Exports.of("BW-1"));
    bad.forEach(file -> lab.drop(file.name(), file.bytes()));
    lab.drop("bench/z-last.csv", Exports.of("BW-2"));

    Program.Ended ended = InProcess.once(lab.conf(), "--strict");

    assertThat(ended.code()).as(ended.toString()).isEqualTo(ExitCode.REFUSED);
    assertThat(lab.done()).containsExactly("bench/a-first.csv", "bench/z-last.csv");
    for (Bad file : bad) {
      assertThat(lab.rejected(file.name())).hasBinaryContent(file.bytes());
      String reason = lab.text("inbox/rejected/" + file.name() + ".reason.txt");
      assertThat(reason)
          .as(file.name())
          .contains(file.says())
          .contains(
              "Where: ", "Found: ", "Expected: ", "To do: ", "Nothing of this file was counted");
    }
    assertThat(samples()).containsExactly("BW-1", "BW-2");
    List<String> sheet = newestWorkbooks();
    for (Bad file : bad) {
      assertThat(sheet).as("Files sheet").anyMatch(line -> inFiles(line, file.name()));
    }
    assertThat(sheet)
        .filteredOn(line -> line.matches("Files!D\\d+ text refused"))
        .hasSize(bad.size());
  }

  private static boolean inFiles(String line, String name) {
    return line.matches("Files!B\\d+ text .*") && line.endsWith("text " + name);
  }

  private List<Bad> badFiles() throws Exception {
    byte[] noise = new byte[5000];
    new Random(7).nextBytes(noise);
    byte[] sheet = workbook();
    String good = Exports.of("BW-9");
    return List.of(
        new Bad("elsewhere/run.csv", bytes(good), "the file's name", "no mapping", "bench/*"),
        new Bad("bench/two.csv", bytes(good), "2 mappings", "bench", "second", "differ"),
        new Bad("bench/noise.xlsx", noise, "noise.xlsx"),
        new Bad("bench/noise.csv", noise, "noise.csv"),
        new Bad("bench/empty.csv", new byte[0], "empty (0 bytes)", "export the table again"),
        new Bad("bench/cut.xlsx", Arrays.copyOf(sheet, sheet.length / 2), "cut.xlsx"),
        new Bad("bench/locked.xlsx", encrypted(sheet), "password"),
        new Bad("bench/half.csv", bytes(good + "\"BW-9,Cd,0,0.1"), "quote"),
        new Bad("bench/zeros.csv", bytes(good.replace("BW-9", "BW\0-9")), "NUL"),
        new Bad(
            "bench/other.csv",
            bytes(good.replace("added,signal", "added,height")),
            "signal",
            "sample",
            "analyte",
            "height",
            "time"),
        new Bad(
            "bench/nothing.csv",
            bytes(good.replaceAll("(?m),0\\.\\d+,", ",n/a,")),
            "not one reading in 8 rows",
            "n/a",
            "signal",
            "command try"));
  }

  private static byte[] bytes(String text) {
    return text.getBytes(StandardCharsets.UTF_8);
  }

  private static byte[] workbook() throws IOException {
    try (XSSFWorkbook book = new XSSFWorkbook();
        ByteArrayOutputStream out = new ByteArrayOutputStream()) {
      XSSFSheet sheet = book.createSheet("Readings");
      int number = 0;
      for (String line : Exports.of("BW-9").split("\n")) {
        var row = sheet.createRow(number++);
        String[] cells = line.split(",");
        for (int i = 0; i < cells.length; i++) {
          row.createCell(i).setCellValue(cells[i]);
        }
      }
      book.write(out);
      return out.toByteArray();
    }
  }

  private static byte[] encrypted(byte[] workbook) throws IOException, GeneralSecurityException {
    try (POIFSFileSystem files = new POIFSFileSystem();
        ByteArrayOutputStream out = new ByteArrayOutputStream()) {
      Encryptor encryptor = new EncryptionInfo(EncryptionMode.agile).getEncryptor();
      encryptor.confirmPassword("brackwater");
      try (OutputStream plain = encryptor.getDataStream(files)) {
        plain.write(workbook);
      }
      files.writeFilesystem(out);
      return out.toByteArray();
    }
  }

  @Test
  void unusableRowsAreNamedBesideTheFileAndInTheWorkbook() throws Exception {
    List<String> rows = new ArrayList<>(Exports.rows("BW-1", 5));
    rows.set(2, rows.get(2).replaceFirst(",0\\.\\d+,", ",soon,"));
    rows.set(5, rows.get(5).replaceFirst(",10,", ",10 mL,"));
    lab.drop("bench/run.csv", Exports.text(rows));

    Program.Ended ended = InProcess.once(lab.conf());

    assertThat(ended.code()).isEqualTo(ExitCode.DONE);
    assertThat(lab.done()).containsExactly("bench/run.csv", "bench/run.csv.rows.txt");
    assertThat(lab.doneText("bench/run.csv.rows.txt"))
        .contains("8 rows, 6 readings, 2 rows not used")
        .contains("line 4, column 4", "found 'soon' under signal", "a number")
        .contains("line 7, column 3", "found '10 mL (mL is a volume)' under added")
        .contains("drop the file");
    List<String> sheet = newestWorkbooks();
    assertThat(sheet)
        .anyMatch(line -> line.matches("Refused rows!G\\d+ text '?soon'?"))
        .anyMatch(line -> line.matches("Refused rows!G\\d+ text '?10 mL.*"));
  }

  @Test
  void aSampleWithoutAdditionsIsNamedAndAfterTheWaitItIsToRepeat() {
    String first = Exports.rows("BW-1", 5).get(0);
    lab.drop("bench/run.csv", Exports.text(List.of(first)));

    InProcess.once(lab.conf());

    assertThat(lab.doneText("bench/run.csv.rows.txt"))
        .contains("No flask with an addition so far: BW-1 Cd")
        .contains("Deliver the flasks with additions");
    assertThat(column("verdict")).containsExactly("repeat");
    assertThat(column("flags")).singleElement().asString().contains("no-additions");
  }

  @Test
  void theSameBytesAgainChangeNothingAndGetANote() {
    lab.drop("bench/run.csv", Exports.of("BW-1"));
    InProcess.once(lab.conf());
    String before = InProcess.results(lab.conf());
    lab.drop("bench/copy.csv", Exports.of("BW-1"));
    lab.drop("bench/run.csv", Exports.of("BW-1"));

    Program.Ended ended = InProcess.once(lab.conf());

    assertThat(ended.out()).contains("known    bench/copy.csv: the same content as delivery 1");
    assertThat(InProcess.results(lab.conf())).isEqualTo(before);
    assertThat(lab.done())
        .containsExactly(
            "bench/copy.csv",
            "bench/copy.csv.note.txt",
            "bench/run-2.csv",
            "bench/run-2.csv.note.txt",
            "bench/run.csv");
    assertThat(lab.doneText("bench/copy.csv.note.txt")).contains("Nothing was counted again");
  }

  @Test
  void theSameNameWithNewBytesIsArchivedBesideTheFirstAndCountsToo() {
    lab.drop("bench/run.csv", Exports.of("BW-1"));
    InProcess.once(lab.conf());
    lab.drop("bench/run.csv", Exports.of("BW-2"));

    InProcess.once(lab.conf());

    assertThat(lab.done()).containsExactly("bench/run-2.csv", "bench/run.csv");
    assertThat(samples()).containsExactly("BW-1", "BW-2");
  }

  private List<String> samples() {
    return column("sample");
  }

  private List<String> column(String name) {
    return Results.column(InProcess.results(lab.conf()), name);
  }

  /** The cells of every lab day's newest workbook. */
  private List<String> newestWorkbooks() throws IOException {
    List<String> lines = new ArrayList<>();
    for (String name : lab.files("summaries")) {
      if (name.endsWith(".xlsx")) {
        lines.addAll(WorkbookText.of(lab.summaries().resolve(name)));
      }
    }
    return lines;
  }
}
