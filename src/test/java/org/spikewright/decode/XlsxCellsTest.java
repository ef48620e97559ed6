package org.spikewright.decode;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.file.Path;
import java.time.LocalDateTime;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.spikewright.table.Cell;
import org.spikewright.table.TableShape;

class XlsxCellsTest {
  private static final String STRINGS =
      "<si><t>plain</t></si>"
          + "<si><r><t xml:space='preserve'>two </t></r><r><rPr><b/></rPr><t>runs</t></r></si>"
          + "<si><t>base</t><rPh sb='0' eb='1'><t>phonetic</t></rPh><phoneticPr/></si>"
          + "<si/>"
          + "<si><t>a_x000D_b_x005F_x0041_ _xZZZZ_</t></si>"
          + "<si><t>&lt;0.01 &amp; <![CDATA[<raw>]]></t></si>";

  private static final String FORMATS =
      "<numFmt numFmtId='164' formatCode='dd\\.mm\\.yyyy\\ hh:mm'/>"
          + "<numFmt numFmtId='165' formatCode='0.00&quot; mg/d&quot;'/>"
          + "<numFmt numFmtId='166' formatCode='[$-409]h:mm:ss AM/PM;@'/>"
          + "<numFmt numFmtId='30' formatCode='0.000'/>";

  /**
   * Styles 0 to 7: general, built-in date, custom date, unit, custom time, East Asian, decimals.
   */
  private static final int[] STYLES = {0, 14, 164, 165, 166, 31, 30, 2};

  @TempDir Path folder;

  private Cell cell(String xml) {
    return cell(HandMadeXlsx.ofCell(xml));
  }

  private Cell cell(HandMadeXlsx book) {
    byte[] bytes = book.strings(STRINGS).styles(FORMATS, STYLES).bytes();
    Decoded decoded = Decoded.of(folder, bytes, TableShape.plain());
    assertThat(decoded.faultText()).isEqualTo("no fault");
    return decoded.rows().isEmpty() ? Cell.BLANK : decoded.first();
  }

  @ParameterizedTest
  @MethodSource
  void a_stored_cell_reads_as(String xml, Cell expected) {
    assertThat(cell(xml)).isEqualTo(expected);
  }

  static Stream<Arguments> a_stored_cell_reads_as() {
    return Stream.of(
        Arguments.of("<c><v>0.1234567890123456</v></c>", number("0.1234567890123456")),
        Arguments.of("<c t='n'><v>1.5E-3</v></c>", number("1.5E-3")),
        Arguments.of("<c><v> -12 </v></c>", number("-12")),
        Arguments.of("<c><v>0</v></c>", number("0")),
        Arguments.of("<c><v>0.00e5</v></c>", number("0.00e5")),
        Arguments.of("<c><v>13<!-- -->.75</v></c>", number("13.75")),
        Arguments.of("<c><f>A2+1</f><v>7</v></c>", number("7")),
        Arguments.of("<c t='s'><v>0</v></c>", new Cell.Text("plain")),
        Arguments.of("<c t='s'><v>1</v></c>", new Cell.Text("two runs")),
        Arguments.of("<c t='s'><v>2</v></c>", new Cell.Text("base")),
        Arguments.of("<c t='s'><v>3</v></c>", Cell.BLANK),
        Arguments.of("<c t='s'><v>4</v></c>", new Cell.Text("a\rb_x0041_ _xZZZZ_")),
        Arguments.of("<c t='s'><v>5</v></c>", new Cell.Text("<0.01 & <raw>")),
        Arguments.of("<c t='inlineStr'><is><t> in</t></is></c>", new Cell.Text(" in")),
        Arguments.of(
            "<c t='inlineStr'><is><r><t>in</t></r><r><t>line</t></r><rPh><t>x</t></rPh></is></c>",
            new Cell.Text("inline")),
        Arguments.of("<c t='inlineStr'><is><t/></is></c>", Cell.BLANK),
        Arguments.of("<c t='str'><f>A2</f><v>text</v></c>", new Cell.Text("text")),
        Arguments.of("<c t='str'><f>A2</f><v></v></c>", Cell.BLANK),
        Arguments.of("<c t='str'><v>007</v></c>", new Cell.Text("007")),
        Arguments.of("<c/>", Cell.BLANK),
        Arguments.of("<c s='2'/>", Cell.BLANK),
        Arguments.of("<c s='1'><v>45672.75</v></c>", moment("2025-01-15T18:00", "45672.75")),
        Arguments.of("<c s='2'><v>45672.75</v></c>", moment("2025-01-15T18:00", "45672.75")),
        Arguments.of("<c s='4'><v>0.5</v></c>", moment("1899-12-31T12:00", "0.5")),
        Arguments.of("<c s='5'><v>61</v></c>", moment("1900-03-01T00:00", "61")),
        // Binary fractions of a day come out on the millisecond that was meant.
        Arguments.of(
            "<c s='1'><v>45673.138877314814</v></c>",
            moment("2025-01-16T03:19:59", "45673.138877314814")),
        Arguments.of("<c s='3'><v>2.5</v></c>", number("2.5")),
        Arguments.of("<c s='6'><v>2.5</v></c>", number("2.5")),
        Arguments.of("<c s='7'><v>2.5</v></c>", number("2.5")),
        Arguments.of("<c s='99'><v>2.5</v></c>", number("2.5")),
        Arguments.of("<c s='x'><v>2.5</v></c>", number("2.5")),
        Arguments.of(
            "<c t='d'><v>2025-01-15T18:00:01.5</v></c>",
            moment("2025-01-15T18:00:01.500", "2025-01-15T18:00:01.5")),
        Arguments.of("<c t='d'><v>2025-01-15</v></c>", moment("2025-01-15T00:00", "2025-01-15")));
  }

  private static Cell number(String raw) {
    return new Cell.Number(Double.parseDouble(raw), raw);
  }

  private static Cell moment(String value, String raw) {
    return new Cell.Moment(LocalDateTime.parse(value), raw);
  }

  @ParameterizedTest
  @MethodSource
  void what_is_no_value_is_named_and_never_zero(String xml, String words) {
    assertThat(cell(xml)).isInstanceOf(Cell.Unusable.class);
    assertThat(cell(xml).shown()).contains(words);
  }

  static Stream<Arguments> what_is_no_value_is_named_and_never_zero() {
    return Stream.of(
        Arguments.of("<c><v></v></c>", "without digits"),
        Arguments.of("<c t='n'><v/></c>", "without digits"),
        Arguments.of("<c><f>A2</f></c>", "formula without a stored result"),
        Arguments.of("<c><f>A2</f><v></v></c>", "formula without a stored result"),
        Arguments.of("<c t='str'><f>A2</f></c>", "formula without a stored result"),
        Arguments.of("<c t='b'><f>A2</f></c>", "formula without a stored result"),
        Arguments.of("<c t='e'><v>#DIV/0!</v></c>", "error #DIV/0!"),
        Arguments.of("<c t='e'><f>1/0</f><v>#N/A</v></c>", "error #N/A"),
        Arguments.of("<c t='b'><v>1</v></c>", "TRUE (a logical value)"),
        Arguments.of("<c t='b'><v>0</v></c>", "FALSE (a logical value)"),
        Arguments.of("<c t='b'><v>2</v></c>", "no logical value"),
        Arguments.of("<c><v>NaN</v></c>", "NaN (not a finite number)"),
        Arguments.of("<c><v>-Infinity</v></c>", "not a finite number"),
        Arguments.of("<c><v>1e400</v></c>", "1e400 (a number too large to be held)"),
        Arguments.of("<c><v>1e-400</v></c>", "too small"),
        Arguments.of("<c><v>1d</v></c>", "not a finite number"),
        Arguments.of("<c><v>0x1p3</v></c>", "not a finite number"),
        Arguments.of("<c><v>1,5</v></c>", "not a finite number"),
        Arguments.of("<c><v>\u0661\u0662</v></c>", "not a finite number"),
        Arguments.of("<c t='s'><v>6</v></c>", "\"6\", which the file does not hold"),
        Arguments.of("<c t='s'><v>-1</v></c>", "which the file does not hold"),
        Arguments.of("<c t='s'><v></v></c>", "which the file does not hold"),
        Arguments.of("<c t='s'><v>99999999999</v></c>", "which the file does not hold"),
        Arguments.of("<c t='zz'><v>1</v></c>", "unknown kind"),
        Arguments.of("<c t='d'><v>yesterday</v></c>", "not a date"),
        Arguments.of("<c s='1'><v>-1</v></c>", "no day of the calendar"),
        Arguments.of("<c s='1'><v>2958466</v></c>", "no day of the calendar"),
        Arguments.of("<c s='1'><v>1e300</v></c>", "no day of the calendar"));
  }

  @Test
  void the_date_system_of_1904_is_followed() {
    HandMadeXlsx book = HandMadeXlsx.ofCell("<c s='1'><v>44210.75</v></c>").dates1904();
    assertThat(cell(book)).isEqualTo(moment("2025-01-15T18:00", "44210.75"));
  }

  @Test
  void a_workbook_without_styles_and_strings_is_read() {
    byte[] book =
        HandMadeXlsx.ofRows("<row><c s='1'><v>1</v></c><c t='s'><v>0</v></c></row>").bytes();
    assertThat(Decoded.of(folder, book, TableShape.plain()).rows().get(0).cells())
        .containsExactly(
            number("1"), new Cell.Unusable("text number \"0\", which the file does not hold"));
  }

  @ParameterizedTest
  @ValueSource(
      strings = {"1", "-1", "+1", "1.", ".5", "1.5", "1e5", "1E+05", "-.5e-3", "007", "0", "-0.0"})
  void a_plain_decimal_is_recognised(String text) {
    assertThat(NumberCells.isPlainDecimal(text)).isTrue();
    assertThat(Double.parseDouble(text)).isFinite();
  }

  @ParameterizedTest
  @ValueSource(
      strings = {
        "",
        " ",
        ".",
        "-",
        "+",
        "e5",
        ".e5",
        "1e",
        "1e+",
        "1e5.0",
        "--1",
        "1 ",
        " 1",
        "1f",
        "1d",
        "NaN",
        "Infinity",
        "0x10",
        "1_000",
        "1,5",
        "1e5e5",
        "\uFF11",
        "\u0661",
        "1-",
        "1.2.3"
      })
  void anything_else_is_no_plain_decimal(String text) {
    assertThat(NumberCells.isPlainDecimal(text)).isFalse();
  }
}
