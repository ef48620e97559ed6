package org.spikewright.mapping;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.reading.BatchReading;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Signal;
import org.spikewright.table.Cell;
import org.spikewright.table.Row;
import org.spikewright.table.Source;

/** The decimal mark that a mapping leaves open. */
class MarkSearchTest {
  private static final String HEADER = "ID;El;Abs;Added;Dil";

  private static Mapping mapping(String table) {
    return Trial.mapping(
        """
        name = "open"
        files = "*.csv"
        [table]
        """
            + table
            + """

            [columns]
            sample = "ID"
            analyte = "El"
            signal = "Abs"
            addition_volume = { header = "Added", unit = "mL" }
            dilution = "Dil"
            [fixed]
            design = "made up"
            aliquot_volume = "10 mL"
            final_volume = "50 mL"
            stock = "10 mg/L"
            dilution = 1
            addition_volume = "0 mL"
            [words]
            missing = ["", "1,999"]
            [skip]
            "ID" = "Rinse"
            [result]
            unit = "mg/L"
            """);
  }

  private static Trial read(String table, String... rows) {
    List<String> lines = new ArrayList<>(List.of(HEADER));
    lines.addAll(List.of(rows));
    return Trial.text(mapping(table), "a.csv", ";", lines.toArray(String[]::new));
  }

  private static List<Double> signals(Trial trial) {
    return trial.readings.stream()
        .map(Reading::signal)
        .map(signal -> ((Signal.Value) signal).value())
        .toList();
  }

  /** A number by itself: the value it gets, or nothing where it can be read two ways. */
  @ParameterizedTest
  @CsvSource({
    "0.5, 0.5",
    "'0,5', 0.5",
    "12.25, 12.25",
    "'12,25', 12.25",
    "0.123, 0.123",
    "'0,123', 0.123",
    "1234.567, 1234.567",
    "'-1234,567', -1234.567",
    "42, 42",
    "1e3, 1000",
    "'1,5e3', 1500",
    "'1,234', ",
    "1.234, ",
    "-12.345, ",
    "'123,456', ",
    "'1,234,567', refused row",
    "'1,234.5', refused row",
    "'1.234,5', refused row"
  })
  void a_number_tells_the_mark_or_is_refused(String number, String value) {
    Trial trial = read("", "W;Cd;" + number + ";;");
    if (value == null) {
      assertThat(trial.unmappable().place()).isEqualTo("line 2, column 3");
      assertThat(trial.unmappable().found()).startsWith("'" + number + "', which is ");
      assertThat(trial.unmappable().advice()).contains("declare decimal");
    } else if (value.equals("refused row")) {
      // Grouping has to be declared; the mark is told all the same.
      assertThat(trial.rejections).hasSize(1);
    } else {
      assertThat(signals(trial)).containsExactly(Double.parseDouble(value));
    }
  }

  @Test
  void both_readings_of_an_open_number_are_shown() {
    assertThat(read("", "W;Cd;1,234;;").unmappable().found())
        .contains("1234 with a decimal point and 1.234 with a decimal comma");
  }

  @Test
  void numbers_wait_for_the_one_that_tells_and_keep_their_order() {
    Trial trial = read("", "W;Cd;7;;", "W;Cd;1,234;;", "W;Cd;8;;", "W;Cd;2,345;1,5;", "W;Cd;1.5;;");
    assertThat(signals(trial)).containsExactly(7.0, 1.234, 8.0, 2.345);
    assertThat(trial.readings).extracting(Reading::replicate).containsExactly("1", "2", "3", "1");
    assertThat(trial.rejections.get(0).expected()).contains("decimal comma");
    assertThat(((MappedFile.Mapped) trial.file).workedOut())
        .contains("decimal comma (worked out: '1,5' in line 5, column 4)");
  }

  @ParameterizedTest
  @CsvSource({
    "'W;Cd;1,234;0,5;'",
    "'W;Cd;1,234;;1 + 1,5'",
    "'W;Cd;1,234;0,5 mL;'",
    "'W;Cd;0,5;;'",
    "'Rinse;Cd;0.5;;|W;Cd;0,5;;'",
    "'W;Cd;1,999;;|W;Cd;0,5;;'"
  })
  void every_kind_of_number_tells_and_skipped_rows_and_words_do_not(String rows) {
    Trial trial = read("", rows.split("\\|"));
    assertThat(((MappedFile.Mapped) trial.file).workedOut().get(0)).contains("decimal comma");
  }

  private static final String BESIDE =
      """
      name = "beside"
      files = "*.csv"
      [columns]
      analyte = "El"
      signal = "Abs"
      internal_standard = "Y"
      addition_volume = { header = "Added", unit = "mL" }
      calibration_concentration = { header = "Std", unit = "mg/L" }
      stock = "Stock"
      [[label]]
      column = "ID"
      pattern = '(?<sample>W\\d+)'
      [roles]
      column = "Type"
      sample = "S"
      drift_check = "D"
      calibration = "C"
      [fixed]
      design = "made up"
      aliquot_volume = "10 mL"
      final_volume = "50 mL"
      addition_volume = "0 mL"
      internal_standard_given = "on line"
      [result]
      unit = "mg/L"
      """;

  /** Rows tell by the numbers that they are read for, and by no others. */
  @ParameterizedTest
  @CsvSource({
    "'S;W1;Cd;7;5,5;;;10 mg/L', comma",
    "'S;W1;Cd;7;5;;1.5;10 mg/L|S;W1;Cd;7;5;0,5;;10 mg/L', comma",
    "'D;Check;Cd;0,5;5;1.5;1.5;1.5|S;W1;Cd;7;5;;;10 mg/L', comma",
    "'D;Check;Cd;7;0.5;;;|S;W1;Cd;7;5;;;10 mg/L', point",
    "'C;Std 1;Cd;7;5;1.5;0,5;1.5|S;W1;Cd;7;5;;;10 mg/L', comma",
    "'S;no label;Cd;0,5;5;;;10 mg/L|S;W1;Cd;7;5.5;;;10 mg/L', point"
  })
  void the_role_of_a_row_says_which_of_its_numbers_tell(String rows, String mark) {
    Mapping mapping = Trial.mapping(BESIDE);
    List<String> lines = new ArrayList<>(List.of("Type;ID;El;Abs;Y;Added;Std;Stock"));
    lines.addAll(List.of(rows.split("\\|")));
    Trial trial = Trial.text(mapping, "a.csv", ";", lines.toArray(String[]::new));
    assertThat(((MappedFile.Mapped) trial.file).workedOut().get(0)).contains("decimal " + mark);
  }

  @Test
  void a_declared_mark_wins_whatever_the_numbers_look_like() {
    assertThat(signals(read("decimal = \",\"", "W;Cd;1,234;;"))).containsExactly(1.234);
    assertThat(signals(read("decimal = \".\"", "W;Cd;1.234;;"))).containsExactly(1.234);
    Trial other = read("decimal = \".\"", "W;Cd;0,5;;");
    assertThat(other.rejections).hasSize(1);
    assertThat(((MappedFile.Mapped) other.file).workedOut()).noneMatch(s -> s.contains("decimal"));
  }

  @Test
  void a_declared_thousands_mark_leaves_the_decimal_mark_open() {
    assertThat(signals(read("thousands = \" \"", "W;Cd;1 234,5;;"))).containsExactly(1234.5);
    assertThat(signals(read("thousands = \".\"", "W;Cd;1.234;;"))).containsExactly(1234.0);
    assertThat(signals(read("thousands = \",\"", "W;Cd;1,234;;"))).containsExactly(1234.0);
  }

  @Test
  void rows_are_not_held_back_without_end() {
    Mapping mapping = mapping("");
    Source source = new Source("a.csv", Optional.empty());
    RowMapper mapper =
        mapping.open(
            "a.csv",
            new MappedSink() {
              @Override
              public void reading(Reading reading) {
                throw new AssertionError("a number that can be read two ways");
              }

              @Override
              public void batchReading(BatchReading beside) {
                throw new AssertionError("nothing beside the samples is expected: " + beside);
              }

              @Override
              public void rejection(Rejection rejection) {
                throw new AssertionError("nothing is wrong with the row");
              }
            });
    assertThat(mapper.accept(row(source, 1, HEADER))).isTrue();
    int taken = 0;
    while (mapper.accept(row(source, taken + 2, "W;Cd;1.234;;"))) {
      taken++;
    }
    assertThat(taken).isBetween(9_000, 11_000);
    assertThat(mapper.finish()).isInstanceOf(MappedFile.Unmappable.class);
  }

  private static Row row(Source source, long number, String cells) {
    return new Row(
        source,
        number,
        List.of(cells.split(";", -1)).stream()
            .map(cell -> cell.isEmpty() ? Cell.BLANK : new Cell.Text(cell))
            .toList());
  }

  /** In a sheet numbers are numbers; only those that stand as text tell anything. */
  @Test
  void numbers_that_a_sheet_stores_as_numbers_need_no_mark() {
    Source source = new Source("a.xlsx", Optional.of("S"));
    List<Cell> numbers =
        List.of(
            new Cell.Text("W"),
            new Cell.Text("Cd"),
            new Cell.Number(1.234, "1.234"),
            new Cell.Number(0, "0"));
    Trial trial =
        Trial.rows(
            mapping(""), "a.xlsx", List.of(row(source, 1, HEADER), new Row(source, 2, numbers)));
    assertThat(signals(trial)).containsExactly(1.234);
  }
}
