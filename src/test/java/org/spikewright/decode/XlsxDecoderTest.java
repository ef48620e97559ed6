package org.spikewright.decode;

import static java.nio.charset.StandardCharsets.UTF_8;
import static org.assertj.core.api.Assertions.assertThat;

import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Random;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.spikewright.table.Position;
import org.spikewright.table.TableShape;

class XlsxDecoderTest {
  private static final String CELL = "<row r='1'><c r='A1'><v>13.75</v></c></row>";

  @TempDir Path folder;

  private Decoded decoded(byte[] book) {
    return Decoded.of(folder, book, TableShape.plain());
  }

  private Decoded rows(String rows) {
    return decoded(HandMadeXlsx.ofRows(rows).bytes());
  }

  @ParameterizedTest
  @MethodSource
  void rows_and_gaps_are_placed_by_their_references(String rows, List<String> shown) {
    Decoded decoded = rows(rows);
    assertThat(decoded.faultText()).isEqualTo("no fault");
    assertThat(decoded.shown()).isEqualTo(shown);
  }

  static Stream<Arguments> rows_and_gaps_are_placed_by_their_references() {
    return Stream.of(
        Arguments.of(
            "<row r='2'><c r='B2'><v>1</v></c><c r='D2'><v>2</v></c></row>", List.of("2: |1||2")),
        Arguments.of(
            "<row><c><v>1</v></c></row><row r='5'><c r='C5'><v>2</v></c><c><v>3</v></c></row>"
                + "<row><c><v>4</v></c></row>",
            List.of("1: 1", "5: ||2|3", "6: 4")),
        Arguments.of(
            "<row r='1'/><row r='2'><c r='A2' s='1'/></row><row r='3'><c><v>1</v></c></row>",
            List.of("3: 1")),
        Arguments.of(
            "<row r='1048576'><c r='AA1048576'><v>1</v></c></row>",
            List.of("1048576: " + "|".repeat(26) + "1")),
        Arguments.of("", List.of()),
        // Prefixed names, and parts of a cell that hold no value.
        Arguments.of(
            "<x:row xmlns:x='u'><x:c><x:extLst><x:v2>9</x:v2></x:extLst><x:v>1</x:v></x:c></x:row>",
            List.of("1: 1")));
  }

  @Test
  void a_cell_knows_its_place() {
    Position position = rows("<row r='12'><c r='C12'><v>1</v></c></row>").rows().get(0).at(2);
    assertThat(position).hasToString("run7 sheet Data, cell C12");
  }

  @Test
  void the_last_column_of_a_sheet_can_be_reached() {
    assertThat(rows("<row><c r='XFD1'><v>1</v></c></row>").rows().get(0).cells()).hasSize(16_384);
  }

  @ParameterizedTest
  @MethodSource
  void a_sheet_that_contradicts_itself_is_a_fault_with_its_row(String rows, String... parts) {
    assertThat(rows(rows).faultText()).contains(parts);
  }

  static Stream<Arguments> a_sheet_that_contradicts_itself_is_a_fault_with_its_row() {
    String[] row2 = {"sheet Data, row 2 |"};
    return Stream.of(
        fault("<row r='2'><c r='ZZZZ99999999'><v>1</v></c></row>", row2[0], "ZZZZ99999999"),
        fault("<row r='2'><c r='XFE2'><v>1</v></c></row>", row2[0], "XFE2"),
        fault("<row r='2'><c r='B3'><v>1</v></c></row>", row2[0], "\"B3\""),
        fault("<row r='2'><c r='2'><v>1</v></c></row>", row2[0], "\"2\""),
        fault("<row r='2'><c r='B'><v>1</v></c></row>", row2[0], "\"B\""),
        fault("<row r='2'><c r='b2'><v>1</v></c></row>", row2[0], "\"b2\""),
        fault("<row r='2'><c r='B2'/><c r='B2'/></row>", row2[0], "cell B2 a second time"),
        fault("<row r='2'><c r='B2'/><c r='A2'/></row>", row2[0], "cell A2 behind cell B2"),
        fault("<row r='2'/><row r='2'/>", row2[0], "row 2 a second time"),
        fault("<row r='2'/><row r='1'/>", row2[0], "row 1 below row 2"),
        fault("<row r='0'/>", "sheet Data |", "row 0"),
        fault("<row r='-1'/>", "sheet Data |", "\"-1\""),
        fault("<row r='1048577'/>", "sheet Data |", "1048577"),
        fault("<row r='99999999999999999999'/>", "sheet Data |", "99999"),
        fault("<row r='2'><row r='3'/></row>", row2[0], "a row within another"),
        fault("<c r='A1'><v>1</v></c>", "sheet Data |", "a cell outside of a row"),
        fault("<row r='2'><c><c/></c></row>", row2[0], "a cell outside of a row"),
        fault("<row><c><v>1</v></c></row><row><c>", "after sheet Data, row 1 |", "damaged"));
  }

  private static Arguments fault(String rows, String... parts) {
    return Arguments.of(rows, parts);
  }

  @Test
  void sheets_are_read_by_name_in_the_order_of_the_workbook() {
    byte[] book =
        new HandMadeXlsx()
            .sheet("One", "", CELL)
            .sheet("Two &amp; more", "", CELL)
            .sheet("Three", "state='hidden'", CELL)
            .bytes();
    Decoded decoded = Decoded.of(folder, book, Decoded.sheets("Three", "Two & more"));
    assertThat(decoded.rows())
        .extracting(row -> row.source().sheet().orElseThrow())
        .containsExactly("Two & more", "Three");
    assertThat(Decoded.of(folder, book, Decoded.sheets("Two & more", "Four")).faultText())
        .contains("no sheet \"Four\"", "\"One\", \"Two & more\", \"Three\"");
  }

  @Test
  void without_a_name_the_first_sheet_that_a_person_sees_is_read() {
    byte[] book =
        new HandMadeXlsx()
            .sheet("Internal", "state='veryHidden'", "<row><c><v>1</v></c></row>")
            .sheet("Data", "state='visible'", CELL)
            .bytes();
    assertThat(decoded(book).shown()).containsExactly("1: 13.75");
  }

  @Test
  void two_sheets_of_one_name_are_a_fault() {
    byte[] book = new HandMadeXlsx().sheet("A", "", CELL).sheet("A", "", CELL).bytes();
    assertThat(Decoded.of(folder, book, Decoded.sheets("A")).faultText()).contains("2 sheets");
  }

  @Test
  void a_sheet_whose_part_is_missing_is_a_fault_that_names_the_part() {
    Map<String, byte[]> parts = new LinkedHashMap<>();
    parts.put(
        "_rels/.rels",
        "<R><Relationship Id='a' Type='/officeDocument' Target='./xl/../Book.XML'/></R>"
            .getBytes(UTF_8));
    parts.put(
        "book.xml",
        "<workbook><sheets><sheet name='A' id='r'/></sheets></workbook>".getBytes(UTF_8));
    parts.put(
        "_rels/book.xml.rels",
        "<R><Relationship Id='r' Type='/worksheet' Target='..\\s\\1.xml'/></R>".getBytes(UTF_8));
    assertThat(decoded(HandMadeXlsx.zip(parts, false)).faultText()).contains("\"s/1.xml\"");
    parts.put("S/1.xml", ("<w><sheetData>" + CELL + "</sheetData></w>").getBytes(UTF_8));
    assertThat(decoded(HandMadeXlsx.zip(parts, false)).shown()).containsExactly("1: 13.75");
  }

  @Test
  void a_digit_changed_under_its_check_sum_is_a_fault_and_no_row_is_handed_on() {
    HandMadeXlsx good = new HandMadeXlsx().stored().sheet("A", "", CELL);
    byte[] book = good.sheet("B", "", CELL.replace("13.75", "13.80")).bytes();
    byte[] changed = replaced(book, "13.80", "93.80");
    Decoded decoded = Decoded.of(folder, changed, Decoded.sheets("A", "B"));
    assertThat(decoded.faultText()).contains("check sum", "sheet2.xml");
    assertThat(decoded.rows()).isEmpty();
    assertThat(decoded(changed).shown()).containsExactly("1: 13.75");
  }

  @ParameterizedTest
  @ValueSource(strings = {"shared text", "numFmtId='14'", "name='Data'", "Target='xl/workbook"})
  void a_change_in_any_part_that_is_used_is_a_fault(String found) {
    byte[] book =
        HandMadeXlsx.ofRows("<row><c t='s'><v>0</v></c></row>")
            .stored()
            .strings("<si><t>shared text</t></si>")
            .styles("", 14)
            .bytes();
    assertThat(decoded(book).shown()).containsExactly("1: shared text");
    String other = found.substring(0, found.length() - 1) + "_";
    Decoded decoded = decoded(replaced(book, found, other));
    assertThat(decoded.faultText()).contains("check sum");
    assertThat(decoded.rows()).isEmpty();
  }

  private static byte[] replaced(byte[] bytes, String found, String other) {
    String text = new String(bytes, StandardCharsets.ISO_8859_1);
    assertThat(text).contains(found);
    return text.replace(found, other).getBytes(StandardCharsets.ISO_8859_1);
  }

  @Test
  void a_flipped_bit_never_changes_a_value_and_is_never_an_exception() {
    long seed = 20250115;
    Random random = new Random(seed);
    StringBuilder rows = new StringBuilder();
    for (int i = 0; i < 40; i++) {
      rows.append("<row><c t='s'><v>0</v></c><c><v>" + random.nextDouble() + "</v></c></row>");
    }
    HandMadeXlsx book = HandMadeXlsx.ofRows(rows.toString()).strings("<si><t>S</t></si>");
    byte[] deflated = book.bytes();
    byte[] stored = book.stored().bytes();
    List<String> truth = decoded(deflated).shown();
    assertThat(truth).hasSize(40).isEqualTo(decoded(stored).shown());
    int refused = 0;
    for (int i = 0; i < 400; i++) {
      byte[] damaged = (i % 2 == 0 ? deflated : stored).clone();
      int bit = random.nextInt(damaged.length * 8);
      damaged[bit / 8] ^= (byte) (1 << bit % 8);
      Decoded decoded = decoded(damaged);
      refused += decoded.fault().isPresent() ? 1 : 0;
      String at = "seed " + seed + ", flip " + i + ", bit " + bit + ": " + decoded.faultText();
      if (decoded.fault().isPresent()) {
        assertThat(decoded.shown()).as(at).isEmpty();
      } else {
        assertThat(decoded.shown()).as(at).isEqualTo(truth);
      }
    }
    assertThat(refused).isGreaterThan(200);
  }

  @Test
  void noise_behind_the_first_bytes_is_a_fault_and_never_an_exception() {
    Random random = new Random(7);
    for (int i = 0; i < 100; i++) {
      byte[] noise = new byte[random.nextInt(3000) + 30];
      random.nextBytes(noise);
      System.arraycopy("PK\u0003\u0004".getBytes(UTF_8), 0, noise, 0, 4);
      assertThat(decoded(noise).fault()).as("noise %d of seed 7", i).isPresent();
    }
  }

  @ParameterizedTest
  @MethodSource
  void document_types_and_entities_are_refused(String prologue, String value) {
    byte[] book =
        HandMadeXlsx.ofRows("")
            .part(
                "xl/worksheets/sheet1.xml",
                prologue
                    + "<w><sheetData><row><c t='str'><v>"
                    + value
                    + "</v></c></row></sheetData></w>")
            .bytes();
    Decoded decoded = decoded(book);
    assertThat(decoded.fault()).as(decoded.toString()).isPresent();
    assertThat(decoded.rows()).isEmpty();
  }

  static Stream<Arguments> document_types_and_entities_are_refused() {
    return Stream.of(
        Arguments.of("<!DOCTYPE w [<!ENTITY a 'ha'><!ENTITY b '&a;&a;'>]>", "&b;"),
        Arguments.of("<!DOCTYPE w [<!ENTITY a SYSTEM 'file:///etc/hostname'>]>", "&a;"),
        Arguments.of("<!DOCTYPE w SYSTEM 'http://127.0.0.1:9/x.dtd'>", "1"),
        Arguments.of("", "&undeclared;"));
  }

  @ParameterizedTest
  @MethodSource
  void what_would_fill_the_memory_is_refused(String sheet, String words) {
    byte[] book = HandMadeXlsx.ofRows("").part("xl/worksheets/sheet1.xml", sheet).bytes();
    assertThat(decoded(book).faultText()).contains(words);
  }

  static Stream<Arguments> what_would_fill_the_memory_is_refused() {
    String start = "<w><sheetData>";
    String end = "</sheetData></w>";
    String text = "x".repeat(1_100_000);
    StringBuilder names = new StringBuilder();
    for (int i = 0; i <= Limits.XML_NAMES; i++) {
      names.append("<n").append(i).append("/>");
    }
    return Stream.of(
        Arguments.of(start + "<a>".repeat(5000), "nested more than 100 deep"),
        Arguments.of(start + names + end, "different names"),
        Arguments.of(start + "<row><c><v>" + text + "</v></c></row>" + end, "1048576 characters"),
        Arguments.of("<w><!--" + "x".repeat(9_000_000) + "--></w>", "8388608 bytes"),
        Arguments.of("<w a='" + "x".repeat(9_000_000) + "'></w>", "8388608 bytes"),
        Arguments.of(
            start
                + "<row>"
                + ("<c t='inlineStr'><is><t>" + text.substring(0, 1_000_000) + "</t></is></c>")
                    .repeat(5)
                + "</row>"
                + end,
            "a row of more than 4194304 characters"),
        Arguments.of(start + "<row/>".repeat(12_000_000) + end, "times the packed size"));
  }

  @Test
  void a_directory_that_would_fill_the_memory_is_refused_before_it_is_read() {
    byte[] book = HandMadeXlsx.ofRows(CELL).bytes();
    int end = book.length - 22;
    book[end + 15] = 0x40;
    assertThat(decoded(book).faultText()).contains("directory takes");
  }

  @Test
  void two_parts_of_one_name_are_a_fault() {
    byte[] book =
        HandMadeXlsx.ofRows(CELL).part("xl/worksheets/SHEET1.xml", "<w><sheetData/></w>").bytes();
    assertThat(decoded(book).faultText()).contains("two parts of the name");
  }

  @Test
  void a_part_may_be_written_in_utf_16() {
    byte[] utf16 =
        ("\uFEFF<w><sheetData>" + CELL + "</sheetData></w>").getBytes(StandardCharsets.UTF_16LE);
    Map<String, byte[]> parts = new LinkedHashMap<>();
    parts.put(
        "_rels/.rels",
        "<R><Relationship Id='a' Type='/officeDocument' Target='b'/></R>".getBytes(UTF_8));
    parts.put(
        "b", "<workbook><sheets><sheet name='A' id='r'/></sheets></workbook>".getBytes(UTF_8));
    parts.put(
        "_rels/b.rels",
        "<R><Relationship Id='r' Type='/worksheet' Target='s'/></R>".getBytes(UTF_8));
    parts.put("s", utf16);
    assertThat(decoded(HandMadeXlsx.zip(parts, false)).shown()).containsExactly("1: 13.75");
  }

  @Test
  void a_main_part_that_is_no_workbook_is_named() {
    Map<String, byte[]> parts = new LinkedHashMap<>();
    parts.put(
        "_rels/.rels",
        "<R><Relationship Id='a' Type='/officeDocument' Target='b'/></R>".getBytes(UTF_8));
    parts.put("b", "<drawing/>".getBytes(UTF_8));
    parts.put("_rels/b.rels", "<R/>".getBytes(UTF_8));
    assertThat(decoded(HandMadeXlsx.zip(parts, false)).faultText()).contains("no workbook");
  }
}
