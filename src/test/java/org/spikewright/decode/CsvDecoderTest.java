package org.spikewright.decode;

import static java.nio.charset.StandardCharsets.ISO_8859_1;
import static java.nio.charset.StandardCharsets.UTF_16BE;
import static java.nio.charset.StandardCharsets.UTF_16LE;
import static java.nio.charset.StandardCharsets.UTF_8;
import static org.assertj.core.api.Assertions.assertThat;

import java.nio.charset.Charset;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.spikewright.table.Cell;
import org.spikewright.table.TableShape;

class CsvDecoderTest {
  private static final Charset WINDOWS_1252 = Charset.forName("windows-1252");

  @TempDir Path folder;

  private Decoded decoded(String text) {
    return Decoded.of(folder, text.getBytes(UTF_8), TableShape.plain());
  }

  @ParameterizedTest
  @MethodSource
  void text_is_cut_into_rows_by_the_rules(String text, List<String> rows) {
    Decoded decoded = decoded(text);
    assertThat(decoded.faultText()).isEqualTo("no fault");
    assertThat(decoded.shown()).isEqualTo(rows);
  }

  static Stream<Arguments> text_is_cut_into_rows_by_the_rules() {
    return Stream.of(
        // Row numbers are the lines of a person's text editor.
        Arguments.of("a,b\n1,2\n", List.of("1: a|b", "2: 1|2")),
        Arguments.of("a,b\r\n1,2\r\n", List.of("1: a|b", "2: 1|2")),
        Arguments.of("a,b\r1,2\r", List.of("1: a|b", "2: 1|2")),
        Arguments.of("\n\na\n\r\nb\n\n", List.of("3: a", "5: b")),
        Arguments.of("\"a\nb\",c\nd\n", List.of("1: a\nb|c", "3: d")),
        Arguments.of("\"a\r\nb\r\n\r\nc\"\r\nd", List.of("1: a\r\nb\r\n\r\nc", "5: d")),
        // The last row needs no line end.
        Arguments.of("a\nb", List.of("1: a", "2: b")),
        Arguments.of("a\nb,\"c\"", List.of("1: a", "2: b|c")),
        Arguments.of("a\nb,", List.of("1: a", "2: b|")),
        // Rows in which nothing stands are passed over, and counted.
        Arguments.of("a\n,,\n  , \nb", List.of("1: a", "4: b")),
        // Blanks belong to the field.
        Arguments.of(" a , b\t\n", List.of("1:  a | b\t")),
        Arguments.of("a,,\"\",b", List.of("1: a|||b")),
        // Quotation marks.
        Arguments.of("\"5\"\" tube\",b", List.of("1: 5\" tube|b")),
        Arguments.of("5\" tube,7\"", List.of("1: 5\" tube|7\"")),
        Arguments.of(" \"a\",b", List.of("1:  \"a\"|b")),
        Arguments.of("\"a,b\"  ,c", List.of("1: a,b|c")),
        // A backslash, a number sign and a NULL are characters like any others.
        Arguments.of("\\,#,NULL\n#x", List.of("1: \\|#|NULL", "2: #x")),
        Arguments.of("µg/L,\uD83E\uDDEA,ß", List.of("1: µg/L|\uD83E\uDDEA|ß")),
        Arguments.of("\n\n\n", List.of()));
  }

  @Test
  void an_empty_field_is_blank_and_any_other_is_text() {
    assertThat(decoded(",\"\", ,0\n").rows().get(0).cells())
        .containsExactly(Cell.BLANK, Cell.BLANK, new Cell.Text(" "), new Cell.Text("0"));
  }

  @ParameterizedTest
  @MethodSource
  void a_table_that_contradicts_itself_is_a_fault_with_its_line(String text, String... parts) {
    assertThat(decoded(text).faultText()).contains(parts);
  }

  static Stream<Arguments> a_table_that_contradicts_itself_is_a_fault_with_its_line() {
    return Stream.of(
        Arguments.of("a\nb,\"c\nd\n", new String[] {"line 2 |", "never closed"}),
        Arguments.of("a\n\"b\nc\",\"d\ne", new String[] {"line 3 |", "never closed"}),
        Arguments.of("a\r\n\r\n\"b\r\nc\",\"d\r\n\"\"", new String[] {"line 4 |", "never closed"}),
        Arguments.of("\"", new String[] {"line 1 |", "never closed"}),
        Arguments.of("a\n\"b\"c\n", new String[] {"line 2 |", "character c behind"}),
        Arguments.of("a\n\"b\" \"c\"\n", new String[] {"line 2 |", "character \" behind"}),
        Arguments.of("a\n\"b\nc\" x,\n", new String[] {"line 3 |", "character x behind"}),
        Arguments.of("a,b\n1,\u0000\u0000\n", new String[] {"line 2 |", "NUL"}));
  }

  @ParameterizedTest
  @ValueSource(strings = {"hi-IN-u-nu-deva", "tr-TR", "ar-EG-u-nu-arab"})
  void the_locale_of_the_machine_changes_no_line_number(String locale) {
    Locale before = Locale.getDefault();
    Locale.setDefault(Locale.forLanguageTag(locale));
    try {
      String rows = "a\n".repeat(1233);
      assertThat(decoded(rows + "\"b\n").faultText()).startsWith("line 1234 |");
    } finally {
      Locale.setDefault(before);
    }
  }

  @Test
  void rows_before_the_fault_were_handed_on() {
    assertThat(decoded("a\n" + "b\n".repeat(10_000) + "\"c").rows()).hasSize(10_001);
  }

  @ParameterizedTest
  @MethodSource
  void a_byte_order_mark_goes_before_what_is_declared(byte[] content) {
    Decoded decoded = Decoded.of(folder, content, Decoded.encodedIn(WINDOWS_1252));
    assertThat(decoded.faultText()).isEqualTo("no fault");
    assertThat(decoded.shown()).containsExactly("1: µg/L|ß");
  }

  static Stream<byte[]> a_byte_order_mark_goes_before_what_is_declared() {
    return Stream.of(
        "\uFEFFµg/L,ß\n".getBytes(UTF_8),
        "\uFEFFµg/L,ß\n".getBytes(UTF_16LE),
        "\uFEFFµg/L,ß\n".getBytes(UTF_16BE),
        "µg/L,ß\n".getBytes(WINDOWS_1252));
  }

  @Test
  void a_byte_that_is_no_character_is_a_fault_with_line_and_byte_and_the_choices() {
    byte[] content = "a,b\nM\u00FC,1\n".getBytes(ISO_8859_1);
    assertThat(Decoded.of(folder, content, TableShape.plain()).faultText())
        .contains("line 2 |", "byte FC", "(byte 6 of the file)", "UTF-8", "windows-1252");
    assertThat(Decoded.of(folder, content, Decoded.encodedIn(ISO_8859_1)).shown())
        .containsExactly("1: a|b", "2: Mü|1");
  }

  @Test
  void the_place_of_a_bad_byte_is_right_far_into_a_large_file() {
    StringBuilder text = new StringBuilder();
    for (int line = 1; line <= 30_000; line++) {
      text.append("µ").append(line).append('\n');
    }
    byte[] good = text.toString().getBytes(UTF_8);
    byte[] content = java.util.Arrays.copyOf(good, good.length + 3);
    content[good.length] = 'x';
    content[good.length + 1] = (byte) 0xB5;
    content[good.length + 2] = '\n';
    Decoded decoded = Decoded.of(folder, content, TableShape.plain());
    assertThat(decoded.faultText())
        .startsWith("line 30001 |")
        .contains("byte B5 (byte " + (good.length + 2) + " of the file)");
    assertThat(decoded.rows()).hasSizeGreaterThan(25_000);
  }

  @ParameterizedTest
  @MethodSource
  void half_a_character_at_the_end_is_a_fault(byte[] content, Charset declared) {
    assertThat(Decoded.of(folder, content, Decoded.encodedIn(declared)).faultText())
        .contains("line 1 |", "of the file)");
  }

  static Stream<Arguments> half_a_character_at_the_end_is_a_fault() {
    return Stream.of(
        Arguments.of(new byte[] {'a', (byte) 0xC2}, UTF_8),
        Arguments.of(new byte[] {'a', 0, 'b'}, UTF_16LE),
        Arguments.of(new byte[] {'a', (byte) 0x81}, WINDOWS_1252));
  }

  @Test
  void utf_16_without_a_mark_is_a_fault_that_says_what_to_declare() {
    byte[] content = "a,b\n1,2\n".getBytes(UTF_16LE);
    assertThat(Decoded.of(folder, content, TableShape.plain()).faultText())
        .contains("NUL", "UTF-16LE");
    assertThat(Decoded.of(folder, content, Decoded.encodedIn(UTF_16LE)).shown())
        .containsExactly("1: a|b", "2: 1|2");
  }

  @ParameterizedTest
  @ValueSource(strings = {";", "\t", ",", "|"})
  void the_separator_is_the_one_under_which_a_row_holds_all_headers(String separator) {
    String text =
        "Report; of, the | night\tshift\n\nSample,Peak area (a.u.),Rep\nS1,\"1,5\",2\n"
            .replace(
                "Sample,Peak area (a.u.),Rep", "Sample,  Peak area ,Rep".replace(",", separator))
            .replace("S1,\"1,5\",2", "S1,\"1;5\",2".replace(",", separator));
    Decoded decoded =
        Decoded.of(folder, text.getBytes(UTF_8), Decoded.withHeader("Rep", "Sample ", "Peak area"));
    assertThat(decoded.faultText()).isEqualTo("no fault");
    assertThat(decoded.shown()).endsWith("3: Sample|  Peak area |Rep", "4: S1|1;5|2");
  }

  @Test
  void a_separator_that_no_row_bears_out_is_a_fault_that_shows_what_was_tried() {
    byte[] content = "Sample;Rep;Area\n1;2;3\n".getBytes(UTF_8);
    assertThat(Decoded.of(folder, content, Decoded.withHeader("Sample", "Peak area")).faultText())
        .contains("; (line 1 lacks \"Peak area\")", "TAB (no header found)", "| (no header found)");
  }

  @Test
  void two_separators_that_fit_are_a_fault_that_names_both() {
    byte[] content = "Sample,Rep\nSample;Rep\n".getBytes(UTF_8);
    assertThat(Decoded.of(folder, content, Decoded.withHeader("Sample", "Rep")).faultText())
        .contains("; (line 2)", ", (line 1)", "declare the separator");
  }

  @Test
  void a_header_below_the_first_200_rows_is_not_found() {
    String preamble = "x\n".repeat(199);
    byte[] within = (preamble + "Sample;Rep\n").getBytes(UTF_8);
    byte[] below = (preamble + "x\nSample;Rep\n").getBytes(UTF_8);
    TableShape shape = Decoded.withHeader("Sample", "Rep");
    assertThat(Decoded.of(folder, within, shape).faultText()).isEqualTo("no fault");
    assertThat(Decoded.of(folder, below, shape).faultText()).contains("first 200");
  }

  @Test
  void without_a_header_the_separator_must_be_declared() {
    byte[] content = "a;b\n".getBytes(UTF_8);
    assertThat(Decoded.of(folder, content, Decoded.withHeader()).faultText())
        .contains("declare the separator");
    assertThat(Decoded.of(folder, content, Decoded.separatedBy(';')).shown())
        .containsExactly("1: a|b");
  }

  @Test
  void a_lone_quote_in_a_separator_that_does_not_apply_is_no_obstacle() {
    byte[] content = "Sample;Rep\nS1,\"2\" x;1\n".getBytes(UTF_8);
    assertThat(Decoded.of(folder, content, Decoded.withHeader("Sample", "Rep")).shown())
        .containsExactly("1: Sample|Rep", "2: S1,\"2\" x|1");
  }

  @Test
  void a_file_that_fails_under_every_separator_is_named_by_that_fault() {
    byte[] content = "\"Sample;Rep\n".getBytes(UTF_8);
    assertThat(Decoded.of(folder, content, Decoded.withHeader("Sample", "Rep")).faultText())
        .contains("line 1 |", "never closed");
  }

  @Test
  void a_line_without_end_is_a_fault_and_the_row_before_it_was_handed_on() {
    Decoded decoded = decoded("a,b\n" + "x,".repeat(3_000_000));
    assertThat(decoded.faultText()).contains("line 2 |", "more than 4194304 characters");
    assertThat(decoded.rows()).hasSize(1);
  }

  @Test
  void an_open_quote_in_a_large_file_is_named_without_reading_it_all() {
    assertThat(decoded("a,b\n\"x\n" + "1,2\n".repeat(1_500_000)).faultText())
        .contains("line 2 |", "over several lines", "quotation mark");
  }

  @Test
  void a_field_of_a_million_characters_is_a_fault() {
    assertThat(decoded("a,b\n1," + "x".repeat(Limits.FIELD_CHARS)).faultText())
        .isEqualTo("no fault");
    assertThat(decoded("a,b\n1,x" + "x".repeat(Limits.FIELD_CHARS)).faultText())
        .contains("line 2 |", "column 2");
  }

  @Test
  void another_quote_can_be_declared() {
    TableShape shape =
        new TableShape(
            java.util.Optional.of(','), '\'', java.util.Optional.empty(), List.of(), List.of());
    assertThat(Decoded.of(folder, "'a,b',\"c\n".getBytes(UTF_8), shape).shown())
        .containsExactly("1: a,b|\"c");
  }
}
