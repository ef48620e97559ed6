package org.spikewright.decode;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.file.Path;
import java.time.LocalDateTime;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Random;
import java.util.function.Consumer;
import java.util.stream.Stream;
import org.apache.poi.hssf.record.BOFRecord;
import org.apache.poi.hssf.record.BlankRecord;
import org.apache.poi.hssf.record.BoundSheetRecord;
import org.apache.poi.hssf.record.CellRecord;
import org.apache.poi.hssf.record.DateWindow1904Record;
import org.apache.poi.hssf.record.EOFRecord;
import org.apache.poi.hssf.record.ExtendedFormatRecord;
import org.apache.poi.hssf.record.FormulaRecord;
import org.apache.poi.hssf.record.LabelSSTRecord;
import org.apache.poi.hssf.record.NumberRecord;
import org.apache.poi.hssf.record.Record;
import org.apache.poi.hssf.record.StringRecord;
import org.apache.poi.hssf.record.crypto.Biff8EncryptionKey;
import org.apache.poi.hssf.usermodel.HSSFCell;
import org.apache.poi.hssf.usermodel.HSSFCellStyle;
import org.apache.poi.hssf.usermodel.HSSFRow;
import org.apache.poi.hssf.usermodel.HSSFWorkbook;
import org.apache.poi.ss.usermodel.FormulaError;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.spikewright.table.Cell;
import org.spikewright.table.TableShape;

class XlsDecoderTest {
  @TempDir Path folder;

  private Decoded decoded(byte[] book) {
    return Decoded.of(folder, book, TableShape.plain());
  }

  private Decoded decoded(Consumer<HSSFWorkbook> content) {
    return decoded(PoiXls.book(content));
  }

  @ParameterizedTest
  @MethodSource
  void a_stored_cell_reads_as(Consumer<HSSFCell> content, Cell expected) {
    Decoded decoded =
        decoded(
            book -> {
              HSSFRow row = book.createSheet("Data").createRow(0);
              content.accept(row.createCell(0));
              row.createCell(1).setCellValue("end");
            });
    assertThat(decoded.faultText()).isEqualTo("no fault");
    assertThat(decoded.rows().get(0).cells()).containsExactly(expected, new Cell.Text("end"));
  }

  static Stream<Arguments> a_stored_cell_reads_as() {
    return Stream.of(
        reads(c -> c.setCellValue(0.1234567890123456), number(0.1234567890123456)),
        reads(c -> c.setCellValue(20), new Cell.Number(20, "20")),
        reads(c -> c.setCellValue(0), new Cell.Number(0, "0")),
        reads(c -> c.setCellValue(1.5e-9), new Cell.Number(1.5e-9, "1.5E-9")),
        reads(c -> c.setCellValue(0.05), new Cell.Number(0.05, "0.05")),
        reads(c -> c.setCellValue("µg \uD83E\uDDEA "), new Cell.Text("µg \uD83E\uDDEA ")),
        reads(c -> c.setCellValue(""), Cell.BLANK),
        reads(HSSFCell::setBlank, Cell.BLANK),
        reads(c -> c.setCellValue(true), new Cell.Unusable("TRUE (a logical value)")),
        reads(c -> c.setCellErrorValue(FormulaError.DIV0), new Cell.Unusable("error #DIV/0!")),
        reads(computed("1+1.5"), number(2.5)),
        reads(computed("\"a\"&\"b\""), new Cell.Text("ab")),
        reads(computed("1/0"), new Cell.Unusable("error #DIV/0!")),
        reads(computed("1=2"), new Cell.Unusable("FALSE (a logical value)")),
        reads(c -> c.setCellFormula("1+1"), new Cell.Unusable("formula without a stored result")),
        reads(dated("yyyy-mm-dd hh:mm", 45672.75), moment("2025-01-15T18:00", "45672.75")),
        reads(dated("m/d/yy", 45672), moment("2025-01-15T00:00", "45672")),
        reads(dated("0.00", 45672), new Cell.Number(45672, "45672")),
        reads(dated("0.0\" mg/d\"", 2.5), number(2.5)),
        reads(
            dated("m/d/yy", -1),
            new Cell.Unusable("-1 (shown as a date, but no day of the calendar)")));
  }

  private static Arguments reads(Consumer<HSSFCell> content, Cell expected) {
    return Arguments.of(content, expected);
  }

  private static Consumer<HSSFCell> computed(String formula) {
    return cell -> {
      cell.setCellFormula(formula);
      cell.getSheet()
          .getWorkbook()
          .getCreationHelper()
          .createFormulaEvaluator()
          .evaluateFormulaCell(cell);
    };
  }

  private static Consumer<HSSFCell> dated(String format, double value) {
    return cell -> {
      HSSFWorkbook book = cell.getSheet().getWorkbook();
      HSSFCellStyle style = book.createCellStyle();
      style.setDataFormat(book.createDataFormat().getFormat(format));
      cell.setCellStyle(style);
      cell.setCellValue(value);
    };
  }

  private static Cell number(double value) {
    return new Cell.Number(value, Double.toString(value));
  }

  private static Cell moment(String value, String raw) {
    return new Cell.Moment(LocalDateTime.parse(value), raw);
  }

  @Test
  void sheets_are_read_by_name_and_the_first_that_a_person_sees_without_one() {
    byte[] bytes =
        PoiXls.book(
            book -> {
              for (String name : List.of("Internal", "One", "Two")) {
                book.createSheet(name).createRow(2).createCell(1).setCellValue(name);
              }
              book.setSheetHidden(0, true);
              book.setActiveSheet(1);
            });
    assertThat(decoded(bytes).shown()).containsExactly("3: |One");
    Decoded both = Decoded.of(folder, bytes, Decoded.sheets("Two", "Internal"));
    assertThat(both.shown()).containsExactly("3: |Internal", "3: |Two");
    assertThat(both.rows().get(1).at(1)).hasToString("run7 sheet Two, cell B3");
    assertThat(Decoded.of(folder, bytes, Decoded.sheets("Four")).faultText())
        .contains("no sheet \"Four\"", "\"Internal\", \"One\", \"Two\"");
  }

  @Test
  void a_protected_workbook_is_refused_with_that_reason() {
    Biff8EncryptionKey.setCurrentUserPassword("secret");
    byte[] bytes;
    try {
      bytes = PoiXls.book(book -> book.createSheet("Data").createRow(0).createCell(0));
    } finally {
      Biff8EncryptionKey.setCurrentUserPassword(null);
    }
    assertThat(decoded(bytes).faultText()).contains("password");
  }

  @Test
  void the_date_system_of_1904_is_followed() {
    var window = new DateWindow1904Record();
    window.setWindowing((short) 1);
    var style = new ExtendedFormatRecord();
    style.setFormatIndex((short) 14);
    Decoded decoded = decoded(book(List.of(window, style), numberAt(0, 0, 44210.75)));
    assertThat(decoded.faultText()).isEqualTo("no fault");
    assertThat(decoded.first()).isEqualTo(moment("2025-01-15T18:00", "44210.75"));
  }

  @Test
  void values_that_a_chart_within_a_sheet_keeps_are_no_cells() {
    Decoded decoded =
        decoded(
            book(
                List.of(),
                numberAt(0, 0, 1),
                begin(BOFRecord.TYPE_CHART),
                numberAt(0, 0, 99),
                numberAt(7, 7, 99),
                EOFRecord.instance,
                numberAt(1, 0, 2)));
    assertThat(decoded.shown()).containsExactly("1: 1", "2: 2");
  }

  @ParameterizedTest
  @MethodSource
  void a_sheet_that_contradicts_itself_is_a_fault_with_its_row(
      Record first, Record second, String words) {
    Decoded decoded = decoded(book(List.of(), first, second));
    assertThat(decoded.faultText()).contains("sheet Data, row 2 |", words);
  }

  static Stream<Arguments> a_sheet_that_contradicts_itself_is_a_fault_with_its_row() {
    return Stream.of(
        Arguments.of(numberAt(1, 1, 1), numberAt(1, 1, 2), "cell B2 a second time"),
        Arguments.of(numberAt(1, 1, 1), numberAt(1, 0, 2), "cell A2 behind cell B2"),
        Arguments.of(numberAt(1, 1, 1), numberAt(0, 0, 2), "row 1 below row 2"));
  }

  @Test
  void what_is_no_value_is_named_and_never_zero() {
    LabelSSTRecord label = at(new LabelSSTRecord(), 0, 1);
    label.setSSTIndex(3);
    FormulaRecord text = at(new FormulaRecord(), 0, 2);
    text.setCachedResultTypeString();
    FormulaRecord empty = at(new FormulaRecord(), 0, 4);
    empty.setCachedResultTypeEmptyString();
    Decoded decoded =
        decoded(
            book(
                List.of(),
                numberAt(0, 0, Double.NaN),
                label,
                text,
                numberAt(0, 3, Double.POSITIVE_INFINITY),
                empty,
                numberAt(0, 5, 1)));
    assertThat(decoded.shown())
        .containsExactly(
            "1: NaN (not a finite number)|text number 3, which the file does not hold"
                + "|formula without a stored result|Infinity (not a finite number)||1");
  }

  @Test
  void the_text_of_a_formula_is_the_record_behind_it_and_blanks_leave_gaps() {
    FormulaRecord text = at(new FormulaRecord(), 0, 0);
    text.setCachedResultTypeString();
    StringRecord string = new StringRecord();
    string.setString("result");
    BlankRecord blank = new BlankRecord();
    blank.setColumn((short) 1);
    Decoded decoded = decoded(book(List.of(), text, string, blank, numberAt(0, 2, 5)));
    assertThat(decoded.shown()).containsExactly("1: result||5");
  }

  @Test
  void a_workbook_of_an_edition_before_1997_is_named() {
    BOFRecord old = begin(BOFRecord.TYPE_WORKBOOK);
    old.setVersion(0x500);
    assertThat(decoded(PoiXls.ofRecords(old, new BoundSheetRecord("A"))).faultText())
        .contains("before 1997");
  }

  @ParameterizedTest
  @ValueSource(ints = {1, 2, 3, 4})
  void a_workbook_whose_records_end_early_is_a_fault(int records) {
    Record[] all = {
      begin(BOFRecord.TYPE_WORKBOOK),
      new BoundSheetRecord("Data"),
      EOFRecord.instance,
      begin(BOFRecord.TYPE_WORKSHEET),
    };
    assertThat(decoded(PoiXls.ofRecords(Arrays.copyOf(all, records))).fault()).isPresent();
  }

  @Test
  void a_flipped_bit_is_never_an_exception() {
    byte[] good =
        PoiXls.book(
            book -> {
              for (int i = 0; i < 20; i++) {
                HSSFRow row = PoiXls.sheet(book, "Data").createRow(i);
                row.createCell(0).setCellValue("S" + i);
                row.createCell(1).setCellValue(i * 1.1);
              }
            });
    long seed = 20250115;
    Random random = new Random(seed);
    int refused = 0;
    for (int i = 0; i < 200; i++) {
      byte[] damaged = good.clone();
      for (int flips = 0; flips <= i % 8; flips++) {
        int bit = random.nextInt(damaged.length * 8);
        damaged[bit / 8] ^= (byte) (1 << bit % 8);
      }
      Decoded decoded = decoded(damaged);
      refused += decoded.fault().isPresent() ? 1 : 0;
      // This kind of file holds no check sum: a value can change, but rows stay in order.
      assertThat(decoded.rows())
          .as("seed %d, file %d", seed, i)
          .extracting(row -> row.number())
          .isSorted()
          .doesNotHaveDuplicates();
    }
    assertThat(refused).isPositive();
  }

  private static byte[] book(List<Record> ofBook, Record... ofSheet) {
    List<Record> records = new ArrayList<>();
    records.add(begin(BOFRecord.TYPE_WORKBOOK));
    records.addAll(ofBook);
    records.add(new BoundSheetRecord("Data"));
    records.add(EOFRecord.instance);
    records.add(begin(BOFRecord.TYPE_WORKSHEET));
    records.addAll(List.of(ofSheet));
    records.add(EOFRecord.instance);
    return PoiXls.ofRecords(records.toArray(Record[]::new));
  }

  private static BOFRecord begin(int type) {
    BOFRecord begin = new BOFRecord();
    begin.setVersion(BOFRecord.VERSION);
    begin.setType(type);
    return begin;
  }

  private static NumberRecord numberAt(int row, int column, double value) {
    NumberRecord number = at(new NumberRecord(), row, column);
    number.setValue(value);
    return number;
  }

  private static <R extends CellRecord> R at(R record, int row, int column) {
    record.setRow(row);
    record.setColumn((short) column);
    record.setXFIndex((short) 0);
    return record;
  }
}
