package org.spikewright.workbook;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.InputStream;
import java.nio.file.Files;
import java.nio.file.Path;
import java.security.MessageDigest;
import java.util.ArrayList;
import java.util.HexFormat;
import java.util.List;
import java.util.stream.Stream;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.CellType;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.summary.Night;
import org.spikewright.summary.RefusedRow;
import org.spikewright.summary.SummaryPlan;
import org.spikewright.testkit.Nights;
import org.spikewright.testkit.WorkbookText;

class XlsxWriterTest {
  private static final Path GOLDEN = Path.of("src/test/resources/golden/workbook-small.txt");

  @TempDir Path folder;

  /** After a wanted change, run with {@code -Dgolden=write} and read the difference. */
  @Test
  void aSmallNightIsWrittenCellByCellAsBefore() throws Exception {
    Path file = folder.resolve("summary.xlsx");
    new XlsxWriter().write(SummaryPlan.of(Nights.small()), file, folder.resolve("temp"));
    List<String> lines = WorkbookText.of(file);
    if ("write".equals(System.getProperty("golden"))) {
      Files.createDirectories(GOLDEN.getParent());
      Files.write(GOLDEN, lines);
    }
    assertThat(lines).containsExactlyElementsOf(Files.readAllLines(GOLDEN));
  }

  @Test
  void theDigestIsThatOfTheFileAndNothingElseIsLeft() throws Exception {
    Path file = folder.resolve("summary.xlsx");
    Path temp = folder.resolve("temp");
    String digest = new XlsxWriter().write(SummaryPlan.of(Nights.small()), file, temp);
    byte[] bytes = Files.readAllBytes(file);
    byte[] expected = MessageDigest.getInstance("SHA-256").digest(bytes);
    assertThat(digest).isEqualTo(HexFormat.of().formatHex(expected));
    assertThat(names(folder)).containsExactlyInAnyOrder("summary.xlsx", "temp");
    assertThat(names(temp)).isEmpty();
  }

  @Test
  void progressEndsWithTheNumberOfSeries() throws Exception {
    List<Long> told = new ArrayList<>();
    new XlsxWriter()
        .write(SummaryPlan.of(Nights.large(600)), folder.resolve("a.xlsx"), folder, told::add);
    assertThat(told).containsExactly(256L, 512L, 600L);
  }

  @Test
  void aSheetThatIsFullContinuesOnASecondOneUnderTheSameHead() throws Exception {
    List<RefusedRow> refused = new ArrayList<>();
    for (int i = 1; i <= 250; i++) {
      refused.add(new RefusedRow(1, "a.csv", "", i, 2, "Added", "x", "not a number", "a number"));
    }
    Night night = Nights.night(List.of(), List.of(), refused);
    Path file = folder.resolve("long.xlsx");
    new XlsxWriter(101).write(SummaryPlan.of(night), file, folder);
    try (InputStream in = Files.newInputStream(file);
        XSSFWorkbook book = new XSSFWorkbook(in)) {
      List<String> sheets = new ArrayList<>();
      book.forEach(sheet -> sheets.add(sheet.getSheetName()));
      assertThat(sheets).contains("Refused rows", "Refused rows 2", "Refused rows 3");
      assertThat(book.getSheet("Refused rows").getLastRowNum()).isEqualTo(100);
      assertThat(book.getSheet("Refused rows 3").getLastRowNum()).isEqualTo(50);
      assertThat(book.getSheet("Refused rows 3").getRow(0).getCell(1).getStringCellValue())
          .isEqualTo("File");
      assertThat(book.getSheet("Refused rows 3").getRow(50).getCell(3).getNumericCellValue())
          .isEqualTo(250);
      assertThat(book.getName("RefusedRowsTable3").getRefersToFormula())
          .isEqualTo("'Refused rows 3'!$A$1:$I$51");
    }
  }

  @Test
  void namesThatLookLikeSomethingElseStayTextAsTyped() throws Exception {
    List<String> hostile =
        List.of(
            "=1+1",
            "+A1",
            "@x",
            "-2",
            "007",
            "1e5",
            "2025-01-15",
            "TRUE",
            "=HYPERLINK(\"http://x\")",
            "_x0041_",
            "<b>&amp;\"'",
            "Ωμ😀 نص",
            "a\nb\tc",
            "'quoted");
    assertThat(writtenNames(hostile)).containsExactlyElementsOf(hostile);
  }

  @Test
  void charactersThatNoCellCanHoldAreShownAndLongTextIsCutWithAMark() throws Exception {
    List<String> written =
        writtenNames(List.of("bell\u0007", "lone \ud83d half", "\ufffe", "x".repeat(40_000)));
    assertThat(written.subList(0, 3))
        .containsExactly("bell\\u0007", "lone \\uD83D half", "\\uFFFE");
    assertThat(written.get(3)).hasSize(CellText.LONGEST).endsWith("… [cut: 40000 characters]");
  }

  /** What stands in the header column of Refused rows for rows with these headers. */
  private List<String> writtenNames(List<String> headers) throws Exception {
    List<RefusedRow> refused =
        headers.stream()
            .map(header -> new RefusedRow(1, "a.csv", "", 1, 1, header, "", "because", "else"))
            .toList();
    Path file = folder.resolve("names.xlsx");
    Night night = Nights.night(List.of(), List.of(), refused);
    new XlsxWriter().write(SummaryPlan.of(night), file, folder);
    List<String> written = new ArrayList<>();
    try (InputStream in = Files.newInputStream(file);
        XSSFWorkbook book = new XSSFWorkbook(in)) {
      for (int row = 1; row <= headers.size(); row++) {
        Cell cell = book.getSheet("Refused rows").getRow(row).getCell(5);
        assertThat(cell.getCellType()).isEqualTo(CellType.STRING);
        written.add(cell.getStringCellValue());
      }
    }
    return written;
  }

  @Test
  void whatAKilledProgramLeftIsSwept() throws Exception {
    Path left = Files.createDirectories(folder.resolve("temp/workbook-123/poifiles"));
    Files.writeString(left.resolve("poi-sxssf-sheet.xml"), "half");
    Files.writeString(folder.resolve("temp/other.txt"), "not ours");
    XlsxWriter.sweep(folder.resolve("temp"));
    XlsxWriter.sweep(folder.resolve("absent"));
    assertThat(names(folder.resolve("temp"))).containsExactly("other.txt");
  }

  private static List<String> names(Path folder) throws Exception {
    try (Stream<Path> entries = Files.list(folder)) {
      return entries.map(entry -> entry.getFileName().toString()).toList();
    }
  }
}
