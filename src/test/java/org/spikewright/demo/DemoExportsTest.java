package org.spikewright.demo;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.charset.CharacterCodingException;
import java.nio.charset.StandardCharsets;
import java.time.LocalDateTime;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.stream.StreamSupport;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.CellType;
import org.apache.poi.ss.usermodel.DateUtil;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;

/** Each export keeps the traits it is there to show. */
class DemoExportsTest {
  private static Map<String, byte[]> exports;

  @BeforeAll
  static void generate() throws IOException {
    exports = DemoFolder.exports();
  }

  @Test
  void the_furnace_writes_windows_1252_that_is_not_utf_8() {
    byte[] bytes = exports.get("furnace/run_0304_am.csv");
    assertThatThrownBy(
            () -> StandardCharsets.UTF_8.newDecoder().decode(ByteBuffer.wrap(bytes)).toString())
        .isInstanceOf(CharacterCodingException.class);
    assertThat(new String(bytes, FurnaceExport.ENCODING)).contains("Spike (µL)", "21,4 °C");
  }

  @Test
  void the_furnace_header_stands_below_six_lines_and_lines_end_in_crlf() {
    for (String name : List.of("furnace/run_0304_am.csv", "furnace/run_0304_pm.csv")) {
      String text = new String(exports.get(name), FurnaceExport.ENCODING);
      assertThat(text.split("\r\n")[6]).isEqualTo(FurnaceExport.HEADER);
      assertThat(text.replace("\r\n", "")).doesNotContain("\n", "\r");
    }
  }

  @Test
  void the_furnace_puts_calibration_checks_and_rinses_among_the_samples() {
    List<String> lines =
        new String(exports.get("furnace/run_0304_am.csv"), FurnaceExport.ENCODING).lines().toList();
    assertThat(lines.stream().filter(line -> line.startsWith("Cal "))).hasSize(4);
    assertThat(lines.stream().filter(line -> line.startsWith("Rinse;"))).hasSize(12);
    assertThat(lines.stream().filter(line -> line.contains(";Check;"))).hasSize(2);
  }

  @Test
  void only_the_cut_file_ends_inside_a_quoted_field() {
    exports.forEach(
        (name, bytes) -> {
          if (name.startsWith("furnace/")) {
            String text = new String(bytes, FurnaceExport.ENCODING);
            long quotes = text.chars().filter(c -> c == '"').count();
            assertThat(quotes % 2 == 1).as(name).isEqualTo(name.equals("furnace/run_0305.csv"));
          }
        });
  }

  @Test
  void the_stripping_export_is_utf_16_with_its_mark() {
    byte[] bytes = exports.get("stripping/cell2_20260304.tsv");
    assertThat(Arrays.copyOf(bytes, 2)).isEqualTo(new byte[] {(byte) 0xFF, (byte) 0xFE});
    String text = new String(bytes, 2, bytes.length - 2, StandardCharsets.UTF_16LE);
    assertThat(text.lines().findFirst()).hasValue(StrippingExport.HEADER);
    assertThat(text.lines()).allMatch(line -> line.split("\t", -1).length == 8);
  }

  @Test
  void the_plasma_workbook_holds_dates_numbers_and_text_identifiers() throws IOException {
    try (XSSFWorkbook book = open("plasma/waters_0304.xlsx")) {
      assertThat(book.getSheetName(1)).isEqualTo("Readings 0304");
      boolean sawTextId = false;
      for (Row row : book.getSheetAt(1)) {
        if (row.getRowNum() > 0) {
          assertThat(row.getCell(0).getCellType()).isEqualTo(CellType.STRING);
          assertThat(row.getCell(6).getCellType()).isEqualTo(CellType.NUMERIC);
          assertThat(DateUtil.isCellDateFormatted(row.getCell(7))).isTrue();
          sawTextId |= row.getCell(0).getStringCellValue().equals("007-B");
        }
      }
      assertThat(sawTextId).isTrue();
    }
  }

  @Test
  void the_sediment_sheet_says_how_each_digest_was_made() throws IOException {
    try (XSSFWorkbook book = open("plasma/sediment_0304.xlsx")) {
      Row header = book.getSheet("Sediment digests").getRow(2);
      List<String> titles =
          StreamSupport.stream(header.spliterator(), false).map(Cell::getStringCellValue).toList();
      assertThat(titles)
          .containsSubsequence(PlasmaExport.COLUMNS)
          .containsSubsequence(PlasmaExport.SEDIMENT_COLUMNS);
    }
  }

  @Test
  void every_reading_of_the_night_was_taken_in_working_hours() {
    LocalDateTime opens = LocalDateTime.parse("2026-03-04T07:05:00");
    LocalDateTime closes = LocalDateTime.parse("2026-03-04T17:30:00");
    for (DemoNight.Export export : DemoNight.exports()) {
      if (export != DemoNight.CUT) {
        assertThat(export.readings())
            .as(export.name())
            .allMatch(row -> !row.at().isBefore(opens) && !row.at().isAfter(closes));
      }
    }
  }

  private static XSSFWorkbook open(String name) throws IOException {
    return new XSSFWorkbook(new ByteArrayInputStream(exports.get(name)));
  }
}
