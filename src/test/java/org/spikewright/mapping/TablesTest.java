package org.spikewright.mapping;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.reading.Reading;
import org.spikewright.table.Cell;
import org.spikewright.table.Position;
import org.spikewright.table.Row;
import org.spikewright.table.Source;

/** How tables lie in files: units, headers of two rows or come again, ends, several, blocks. */
class TablesTest {
  private static final String REST =
      """
      [fixed]
      design = "made up"
      aliquot_volume = "10 mL"
      final_volume = "50 mL"
      stock = "10 mg/L"
      [result]
      unit = "mg/L"
      """;

  private static Mapping mapping(String parts) {
    return Trial.mapping("name = \"t\"\nfiles = \"*.csv\"\n" + parts + REST);
  }

  private static final String COLUMNS =
      """
      [columns]
      sample = "ID"
      analyte = "El"
      signal = "Abs"
      addition_volume = "Added"
      """;

  private static Trial read(String table, String... lines) {
    return Trial.text(mapping("[table]\n" + table + "\n" + COLUMNS), "a.csv", ",", lines);
  }

  private static List<String> shown(Trial trial) {
    return trial.readings.stream()
        .map(
            r ->
                r.subject().sample()
                    + " "
                    + r.subject().analyte()
                    + " "
                    + r.facts().addition().amount()
                    + " "
                    + r.signal().text())
        .toList();
  }

  @ParameterizedTest
  @CsvSource({"mL, 0.5 mL", "(mL), 0.5 mL", "[µL], 0.5 µL", "'', refused"})
  void a_row_of_units_tells_what_the_mapping_leaves_open(String unit, String added) {
    Trial trial = read("units_row = true", "ID,El,Abs,Added", ",,AU," + unit, "W,Cd,0.1,0.5");
    if (added.equals("refused")) {
      assertThat(trial.rejections.get(0).reason()).isEqualTo(Reason.UNIT_DOES_NOT_FIT);
    } else {
      assertThat(trial.tally()).isEqualTo(new Tally(1, 1, 0, 0));
      assertThat(trial.readings.get(0).facts().addition().amount()).hasToString(added);
    }
  }

  @Test
  void a_row_of_units_must_be_what_the_mapping_declares() {
    String table = "[table]\nunits_row = true\n";
    String columns = COLUMNS.replace("\"Added\"", "{ header = \"Added\", unit = \"mL\" }");
    Mapping declared = mapping(table + columns);
    String[] good = {"ID,El,Abs,Added", ",,,ml", "W,Cd,0.1,0.5"};
    assertThat(Trial.text(declared, "a.csv", ",", good).readings).hasSize(1);
    Trial other = Trial.text(declared, "a.csv", ",", "ID,El,Abs,Added", ",,,µL", "W,Cd,0.1,0.5");
    assertThat(other.unmappable().place()).isEqualTo("line 2, column 4");
    assertThat(other.unmappable().found()).isEqualTo("the unit 'µL' under 'Added'");
    assertThat(other.unmappable().expected()).contains("mL, as the mapping says");
    Trial none = read("units_row = true", "ID,El,Abs,Added", ",,,mg", "W,Cd,0.1,0.5");
    assertThat(none.unmappable().expected()).contains("a volume");
  }

  @Test
  void a_header_of_two_rows_is_joined_and_upper_cells_hold_to_their_right() {
    Mapping two =
        mapping(
            """
            [table]
            header_rows = 2
            [columns]
            sample = "Sample"
            analyte = "Reading / Element"
            signal = "Reading / Abs"
            addition_volume = { header = "Flask / Added", unit = "mL" }
            """);
    Trial trial =
        Trial.text(
            two,
            "a.csv",
            ",",
            "Export,of,today",
            "Sample,Reading,,Flask,",
            ",Element,Abs,Added,Other",
            "W,Cd,0.1,0.5,",
            "Sample,Reading,,Flask,",
            ",Element,Abs,Added,Other",
            "W,Cd,0.2,1,");
    assertThat(shown(trial)).containsExactly("W Cd 0.5 mL 0.1", "W Cd 1 mL 0.2");
    assertThat(trial.tally()).isEqualTo(new Tally(4, 2, 0, 2));
    assertThat(trial.readings.get(0).position().within()).isEqualTo("line 4, column 3");
    Trial missing = Trial.text(two, "a.csv", ",", "Sample,Reading,", ",Element,Abs", "W,Cd,1");
    assertThat(missing.unmappable().found()).contains("'Flask / Added'", "Reading / Abs");
  }

  @Test
  void a_header_that_comes_again_is_skipped_and_counted() {
    Trial trial =
        read(
            "units_row = true",
            "ID,El,Abs,Added",
            ",,,mL",
            "W,Cd,0.1,0",
            "ID,El,Abs,Added",
            ",,,mL",
            "W,Cd,0.2,1");
    assertThat(trial.tally()).isEqualTo(new Tally(4, 2, 0, 2));
  }

  @Test
  void what_stands_below_the_end_is_skipped_and_counted() {
    String[] lines = {"ID,El,Abs,Added", "W,Cd,0.1,0 mL", "Total of 1", "W,Cd,0.2,0 mL", "x"};
    assertThat(read("footer = \"Total*\"", lines).tally()).isEqualTo(new Tally(4, 1, 0, 3));
    assertThat(read("", lines).tally()).isEqualTo(new Tally(4, 2, 2, 0));
  }

  @Test
  void an_empty_row_ends_the_table_where_the_mapping_says_so() {
    String[] lines = {"ID,El,Abs,Added", "W,Cd,0.1,0 mL", ",,,", "W,Cd,0.2,0 mL"};
    assertThat(read("footer = \"\"", lines).tally()).isEqualTo(new Tally(2, 1, 0, 1));
    assertThat(read("", lines).tally()).isEqualTo(new Tally(2, 2, 0, 0));
    // In a sheet a row that is not stored is empty.
    Source sheet = new Source("a.xlsx", Optional.of("S"));
    List<Row> rows = new ArrayList<>();
    for (int i = 0; i < lines.length; i++) {
      if (i != 2) {
        rows.add(
            new Row(
                sheet,
                i + 1,
                List.of(lines[i].split(",")).stream().<Cell>map(Cell.Text::new).toList()));
      }
    }
    Mapping mapping = mapping("[table]\nfooter = \"\"\n" + COLUMNS);
    assertThat(Trial.rows(mapping, "a.xlsx", rows).tally()).isEqualTo(new Tally(2, 1, 0, 1));
  }

  @Test
  void each_header_begins_a_table_whose_columns_may_differ() {
    Trial trial =
        read(
            "tables = \"all\"\nfooter = \"Mean\"",
            "ID,El,Abs,Added",
            "W,Cd,0.1,0 mL",
            "Mean,,0.1",
            "next page",
            "Added,Abs,Note,ID,El",
            "1 mL,0.2,,W,Cd",
            "Abs,Added,ID,El",
            "0.3,2 mL,W,Cd");
    assertThat(shown(trial)).containsExactly("W Cd 0 mL 0.1", "W Cd 1 mL 0.2", "W Cd 2 mL 0.3");
    assertThat(trial.tally()).isEqualTo(new Tally(5, 3, 0, 2));
    MappedFile.Mapped mapped = (MappedFile.Mapped) trial.file;
    assertThat(mapped.workedOut()).contains("header in line 1; line 5; line 7");
  }

  @Test
  void blocks_name_their_sample_once_and_cells_hold_on() {
    String parts =
        """
        [table]
        carry_down = ["analyte", "addition_volume"]
        tables = "all"
        [block]
        pattern = 'Sample (?<sample>\\S+)( of .*)?'
        """
            + COLUMNS.replace("sample = \"ID\"\n", "");
    Trial trial =
        Trial.text(
            mapping(parts),
            "a.csv",
            ",",
            "Sample,W-1 of today",
            "El,Added,Abs",
            "Cd,0 mL,0.1",
            ",,0.2",
            "Pb,,0.3",
            "Sample W-2",
            ",1 mL,0.4",
            "El,Added,Abs",
            ",1 mL,0.5");
    assertThat(shown(trial))
        .containsExactly(
            "W-1 Cd 0 mL 0.1", "W-1 Cd 0 mL 0.2", "W-1 Pb 0 mL 0.3", "W-2 Pb 1 mL 0.4");
    // Nothing is carried into the next table.
    assertThat(trial.rejections.get(0).found()).contains("nothing in column 'El'");
    assertThat(trial.tally()).isEqualTo(new Tally(6, 4, 1, 1));
  }

  @Test
  void a_cell_that_holds_on_is_blamed_where_it_stands() {
    Trial trial =
        read("carry_down = \"addition_volume\"", "ID,El,Abs,Added", "W,Cd,1,x mL", "W,Cd,2,");
    assertThat(trial.rejections)
        .extracting(Rejection::position)
        .extracting(Position::within)
        .containsExactly("line 2, column 4", "line 2, column 4");
  }

  @Test
  void rows_without_a_title_above_them_say_so() {
    Trial trial =
        Trial.text(
            mapping(
                "[block]\npattern = 'Sample (?<sample>.*)'\n"
                    + COLUMNS.replace("sample = \"ID\"\n", "")),
            "a.csv",
            ",",
            "El,Added,Abs",
            "Cd,0 mL,0.1");
    assertThat(trial.rejections.get(0).found()).contains("nothing in the title of its block");
  }

  @Test
  void the_name_of_a_sheet_gives_facts() {
    Mapping mapping =
        mapping(
            "[sheet]\npattern = '(?<analyte>\\w+) \\d+'\n"
                + COLUMNS.replace("analyte = \"El\"\n", ""));
    List<Row> rows = new ArrayList<>();
    for (String name : List.of("Cd 1", "Pb 2")) {
      Source source = new Source("a.xlsx", Optional.of(name));
      rows.add(new Row(source, 1, texts("ID", "Abs", "Added")));
      rows.add(
          new Row(
              source,
              2,
              List.of(new Cell.Text("W"), new Cell.Number(2, "2"), new Cell.Text("1 mL"))));
      rows.add(
          new Row(
              source,
              3,
              List.of(
                  new Cell.Text("W"), new Cell.Unusable("error #DIV/0!"), new Cell.Text("1 mL"))));
    }
    Trial trial = Trial.rows(mapping, "a.xlsx", rows);
    assertThat(shown(trial)).containsExactly("W Cd 1 mL 2", "W Pb 1 mL 2");
    assertThat(trial.rejections.get(1).reason()).isEqualTo(Reason.UNUSABLE_CELL);
    assertThat(trial.rejections.get(1).found()).isEqualTo("'error #DIV/0!'");
    assertThat(trial.rejections.get(1).position().within()).isEqualTo("sheet Pb 2, cell B3");
    assertThat(mapping.shape().sheets()).hasSize(1);
  }

  private static List<Cell> texts(String... texts) {
    return List.of(texts).stream().<Cell>map(Cell.Text::new).toList();
  }

  /** Whatever stands in the rows, in whatever order: none is lost, none counted twice. */
  @Test
  void no_row_is_lost() {
    String[] kinds = {
      "W-1,Cd,0.1,0 mL,0.3",
      "W-1,Cd,,,",
      ",,x,1 mL,OVER",
      "ID,El,Abs 1,Added,Abs 2",
      "Sample W-7",
      "End",
      "Rinse,,,,",
      "a,b,c,d,e,f,g",
      "1.234"
    };
    Mapping mapping =
        mapping(
            """
            [table]
            tables = "all"
            footer = "End"
            carry_down = ["analyte"]
            [layout]
            kind = "wide by replicate"
            pattern = 'Abs (?<replicate>\\d)'
            [block]
            pattern = 'Sample (?<sample>.*)'
            [columns]
            sample = "ID"
            analyte = "El"
            addition_volume = "Added"
            [skip]
            "ID" = "Rinse"
            """);
    for (int seed = 0; seed < 300; seed++) {
      Random random = new Random(seed);
      List<String> lines = new ArrayList<>(List.of(kinds[3], kinds[0]));
      int due = 2;
      boolean open = true;
      int n = random.nextInt(30);
      for (int i = 0; i < n; i++) {
        int kind = random.nextInt(kinds.length);
        lines.add(kinds[kind]);
        boolean header = kind == 3;
        boolean single = kind == 4 || kind == 5 || !open;
        due += header ? 0 : single ? 1 : 2;
        open = header || open && kind != 5;
      }
      Trial trial = Trial.text(mapping, "a.csv", ",", lines.toArray(String[]::new));
      assertThat(trial.tally().rows()).as("seed " + seed).isEqualTo(due);
      assertThat(trial.readings).as("seed " + seed).hasSize((int) trial.tally().readings());
      assertThat(trial.rejections).as("seed " + seed).hasSize((int) trial.tally().rejections());
    }
  }

  @Test
  void a_wide_row_is_as_many_rows_as_it_should_hold_readings() {
    Trial trial =
        Trial.text(
            mapping(
                """
                [layout]
                kind = "wide by analyte"
                columns = ["Cd", "Pb"]
                beside = { replicate = "{header} no." }
                [columns]
                sample = "ID"
                addition_volume = "Added"
                [skip]
                "ID" = "Rinse"
                """),
            "a.csv",
            ",",
            "ID,Added,Cd,Cd no.,Pb,Pb no.",
            "W,0 mL,0.1,1,0.2,2",
            "W,0 mL,0.1,3,,4",
            "W,x,0.1,5,0.2,6",
            "Rinse,,,,,");
    assertThat(trial.tally()).isEqualTo(new Tally(8, 3, 3, 2));
    assertThat(trial.readings).extracting(Reading::replicate).containsExactly("1", "2", "3");
    assertThat(trial.rejections.get(0).position().within()).isEqualTo("line 3, column 5");
  }

  @Test
  void a_wide_header_that_lacks_a_column_beside_is_refused() {
    Mapping mapping =
        mapping(
            """
            [layout]
            kind = "wide by analyte"
            pattern = '(?<analyte>[A-Z][a-z]) mean'
            beside = { measured_at = "{analyte} time" }
            [columns]
            sample = "ID"
            addition_volume = "Added"
            """);
    Trial trial = Trial.text(mapping, "a.csv", ",", "ID,Added,Cd mean,Cd time,Pb mean", "W,1 mL");
    assertThat(trial.unmappable().found()).isEqualTo("no column 'Pb time' beside 'Pb mean'");
    Trial none = Trial.text(mapping, "a.csv", ",", "ID,Added,Cd,Cd time", "W,1 mL");
    assertThat(none.unmappable().found()).contains("(?<analyte>[A-Z][a-z]) mean");
    Trial twice = Trial.text(mapping, "a.csv", ",", "ID,Added,Cd mean,Cd time,Cd mean", "W,1 mL");
    assertThat(twice.unmappable().found()).isEqualTo("more than one column 'Cd mean'");
  }
}
