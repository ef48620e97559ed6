package org.spikewright.mapping;

import static org.assertj.core.api.Assertions.assertThat;

import java.time.Instant;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Batch;
import org.spikewright.reading.CalibrationPoint;
import org.spikewright.reading.CheckReading;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Role;
import org.spikewright.reading.Signal;
import org.spikewright.table.Cell;
import org.spikewright.table.Row;
import org.spikewright.table.Source;

class RowMapperTest {
  private static final String PLAIN =
      """
      name = "plain"
      files = "*.csv"
      [columns]
      sample = "ID"
      analyte = "El"
      signal = "Abs"
      measured_at = "Time"
      addition_volume = { header = "Added", unit = "mL" }
      [fixed]
      design = "made up"
      aliquot_volume = "10 mL"
      final_volume = "50 mL"
      stock = { Cd = "10 mg/L", Pb = "20 mg/L" }
      [words]
      over_range = "OVER"
      below_range = "<*"
      missing = "n.d."
      [skip]
      "ID" = ["Rinse*", "Mean"]
      [result]
      unit = "mg/L"
      """;

  private static final String HEADER = "ID,El,Abs,Time,Added";

  private static Trial plain(String... rows) {
    return Trial.text(Trial.mapping(PLAIN), "run7.csv", ",", rows);
  }

  private static Trial row(String row) {
    return plain(HEADER, row);
  }

  @Test
  void mapsARowToAReading() {
    Trial trial = plain("Run of today", "", HEADER, " W-1 ,Cd,0.120,2025-01-15 18:30,0.5");
    assertThat(trial.tally()).isEqualTo(new Tally(1, 1, 0, 0));
    Reading reading = trial.readings.get(0);
    assertThat(reading.subject().instrument()).isEqualTo("plain");
    assertThat(reading.subject().sample().text()).isEqualTo("W-1");
    assertThat(reading.signal()).isEqualTo(new Signal.Value(0.12, "0.120"));
    assertThat(reading.measuredAt()).contains(Instant.parse("2025-01-15T17:30:00Z"));
    assertThat(reading.flask()).isEqualTo("0.5 mL");
    assertThat(reading.flaskMapped()).isFalse();
    assertThat(reading.replicate()).isEmpty();
    assertThat(reading.batch()).isEqualTo(new Batch("run7.csv", false));
    assertThat(reading.position()).hasToString("run7.csv line 4, column 3");
    assertThat(reading.facts().addition().amount()).hasToString("0.5 mL");
    assertThat(reading.facts().role()).isEqualTo(Role.SAMPLE);
    assertThat(reading.facts().method().expectedFlasks()).isEqualTo(4);
  }

  @ParameterizedTest(name = "{0}: {1} at column {2}, found {3}")
  @CsvSource(
      delimiter = '|',
      value = {
        "W-1,Cd,abc,2025-01-15 18:30,0.5 | NOT_A_NUMBER | 3 | 'abc'",
        "W-1,Cd,NaN,2025-01-15 18:30,0.5 | NOT_A_NUMBER | 3 | 'NaN'",
        "W-1,Cd,,2025-01-15 18:30,0.5 | FACT_MISSING | 3 | nothing in column 'Abs'",
        "W-1,Cd,0.1,15.1.2025,0.5 | NOT_A_TIME | 4 | '15.1.2025'",
        "W-1,Cd,0.1,,0.5 | FACT_MISSING | 4 | nothing in column 'Time'",
        "W-1,Cd,0.1,2025-01-15 18:30,-1 | OUT_OF_BOUNDS | 5 | '-1'",
        "W-1,Cd,0.1,2025-01-15 18:30,1 g | UNIT_DOES_NOT_FIT | 5 | '1 g (g is a mass)'",
        "W-1,Cd,0.1,2025-01-15 18:30, | FACT_MISSING | 5 | nothing in column 'Added', [fixed]",
        "W-1,Cd,0.1,2025-01-15 18:30 | ROW_TOO_SHORT | 0 | a row of 4 cells",
        "W-1,Cd,0,1,2025-01-15 18:30,0.5 | ROW_TOO_LONG | 6 | 6 cells",
        ",Cd,0.1,2025-01-15 18:30,0.5 | FACT_MISSING | 1 | nothing in column 'ID'",
        "W-1,Zn,0.1,2025-01-15 18:30,0.5 | FACT_MISSING | 0 | nothing in [fixed]",
        "W-1,Cd,0.1,2025-01-15 18:30,45 | OUT_OF_BOUNDS | 0 | '50 mL'"
      })
  void refusesARowAndSaysWhereAndWhy(String row, Reason reason, int column, String found) {
    Trial trial = row(row);
    assertThat(trial.tally()).isEqualTo(new Tally(1, 0, 1, 0));
    Rejection rejection = trial.rejections.get(0);
    assertThat(rejection.reason()).isEqualTo(reason);
    assertThat(rejection.position().row()).isEqualTo(2);
    assertThat(rejection.position().column()).isEqualTo(column);
    assertThat(rejection.found()).contains(found);
    assertThat(rejection.expected()).isNotBlank();
  }

  @Test
  void oneRowIsOneRejectionHoweverManyCellsAreUnusable() {
    Trial trial = row("W-1,Cd,abc,yesterday,much");
    assertThat(trial.rejections).hasSize(1);
    assertThat(trial.rejections.get(0).found())
        .isEqualTo("'much' (also 'Time' 'yesterday', 'Abs' 'abc')");
  }

  @ParameterizedTest(name = "{0} is {1}")
  @CsvSource({"OVER,OVER_RANGE", "<0.01,BELOW_RANGE", "n.d.,MISSING", " n.d. ,MISSING"})
  void declaredWordsAreReadings(String word, Signal.State state) {
    Trial trial = row("W-1,Cd," + word + ",2025-01-15 18:30,0.5");
    assertThat(trial.readings.get(0).signal()).isEqualTo(new Signal.NoNumber(state, word));
  }

  @Test
  void aBlankSignalIsMissingOnlyWhereThatIsDeclared() {
    String declared = PLAIN.replace("missing = \"n.d.\"", "missing = \"\"");
    Trial trial =
        Trial.text(Trial.mapping(declared), "a.csv", ",", HEADER, "W-1,Cd,,2025-01-15 18:30,0");
    assertThat(trial.readings.get(0).signal())
        .isEqualTo(new Signal.NoNumber(Signal.State.MISSING, ""));
  }

  @Test
  void rowsInAreReadingsAndRejectionsAndSkips() {
    Trial trial =
        plain(
            HEADER,
            "W-1,Cd,0.1,2025-01-15 18:30,0",
            "Rinse 1,,,,",
            "",
            "W-1,Cd,0.2,2025-01-15 18:31,0.5",
            "W-1,Cd,bad,2025-01-15 18:32,1",
            "Mean,of,all,the,above,and,more");
    assertThat(trial.tally()).isEqualTo(new Tally(5, 2, 1, 2));
  }

  @Test
  void equalFactsAndNamesAreTheSameObject() {
    Trial trial =
        plain(
            HEADER,
            "W-1,Cd,0.1,2025-01-15 18:30,0.5",
            "W-1,Cd,0.2,2025-01-15 18:31,0.5",
            "W-2,Cd,0.2,2025-01-15 18:31,0.5");
    assertThat(trial.readings.get(0).facts()).isSameAs(trial.readings.get(1).facts());
    assertThat(trial.readings.get(0).facts()).isSameAs(trial.readings.get(2).facts());
    assertThat(trial.readings.get(0).subject()).isSameAs(trial.readings.get(1).subject());
  }

  @Test
  void aMissingColumnRefusesTheFileAndListsThoseThatExist() {
    MappedFile.Unmappable why = plain("today", "ID,El,abs,Time,Added", "W-1,Cd,1,x,0").unmappable();
    assertThat(why.place()).isEqualTo("line 2");
    assertThat(why.found()).isEqualTo("no column 'Abs'; this row has: ID, El, abs, Time, Added");
    assertThat(why.expected()).contains("'ID', 'El', 'Abs', 'Time', 'Added'");
    assertThat(why.advice()).contains("mapping 'plain'", "perhaps 'abs' for 'Abs'");
  }

  @Test
  void aMappedColumnThatStandsTwiceRefusesTheFile() {
    assertThat(plain("ID,El,Abs,Abs,Time,Added", "W-1,Cd,1,1,x,0").unmappable().found())
        .isEqualTo("more than one column 'Abs'");
    assertThat(plain("ID,El,Abs,x,x,Time,Added", "W-1,Cd,1,,,2025-01-15 18:30,0").readings)
        .as("a column that is not mapped may stand twice")
        .hasSize(1);
  }

  @Test
  void aFileWithoutRowsIsRefused() {
    assertThat(plain(HEADER).unmappable().found()).isEqualTo("no rows below the header");
    assertThat(plain(HEADER, ",,", "").unmappable().found()).isEqualTo("no rows below the header");
    assertThat(plain().unmappable().found()).isEqualTo("no rows");
  }

  @Test
  void headersAreFoundByTheirCellOrByTheirRow() {
    String byCell = PLAIN.replace("[columns]", "[table]\nheader = \"El\"\n[columns]");
    assertThat(Trial.text(Trial.mapping(byCell), "a.csv", ",", "a", "ID,El,Abs", "x").unmappable())
        .satisfies(
            why -> {
              assertThat(why.place()).isEqualTo("line 2");
              assertThat(why.found()).startsWith("no column 'Time', 'Added'");
            });
    String byRow = PLAIN.replace("[columns]", "[table]\nheader = 3\n[columns]");
    assertThat(
            Trial.text(
                    Trial.mapping(byRow),
                    "a.csv",
                    ",",
                    HEADER,
                    "x",
                    HEADER,
                    "W-1,Cd,0.1,2025-01-15 18:30,0")
                .tally())
        .isEqualTo(new Tally(1, 1, 0, 0));
    assertThat(Trial.text(Trial.mapping(byRow), "a.csv", ",", HEADER, "x").unmappable().found())
        .isEqualTo("nothing in row 3");
  }

  @Test
  void theSearchForAHeaderHasAnEnd() {
    String[] rows = new String[5000];
    java.util.Arrays.fill(rows, "no header");
    assertThat(plain(rows).unmappable().found()).startsWith("no column");
  }

  private static String without(String toml, String... lines) {
    String out = toml;
    for (String line : lines) {
      assertThat(out).contains(line);
      out = out.replace(line, "");
    }
    return out;
  }

  @Test
  void withoutTimeAndReplicateTheOrderInTheFileIsTheReplicate() {
    Mapping mapping = Trial.mapping(without(PLAIN, "measured_at = \"Time\"\n"));
    Trial trial =
        Trial.text(
            mapping,
            "b/run7.csv",
            ",",
            "ID,El,Abs,Added",
            "W-1,Cd,1,0",
            "W-1,Cd,2,0",
            "W-1,Cd,3,1",
            "W-1,Pb,4,0",
            "W-1,Cd,5,0");
    assertThat(trial.readings)
        .extracting(Reading::replicate)
        .containsExactly("1", "2", "1", "1", "3");
    assertThat(trial.readings).extracting(Reading::replicateMapped).containsOnly(false);
    assertThat(trial.readings.get(0).batch()).isEqualTo(new Batch("run7.csv", true));
  }

  @Test
  void driftChecksAndCalibrationSolutionsAreReadBesideTheSamples() {
    String toml =
        PLAIN.replace(
                "[columns]",
                "[columns]\ncalibration_concentration = { header = \"Conc\", unit = \"µg/L\" }")
            + """
              [roles]
              column = "Type"
              sample = "Unk*"
              calibration = "Std*"
              drift_check = "CCV"
              """;
    Trial trial =
        Trial.text(
            Trial.mapping(toml),
            "a.csv",
            ",",
            HEADER + ",Type,Conc",
            "Std 1,Cd,0.1,2025-01-15 18:28,,Std,5",
            "Std 2,Cd,0.2,2025-01-15 18:29,,Std,",
            "CCV,Cd,0.11,2025-01-15 18:30,,CCV,",
            "W-1,Cd,0.1,2025-01-15 18:31,0,Unk,",
            "CCV,Cd,oops,2025-01-15 18:32,,CCV,");
    assertThat(trial.tally()).isEqualTo(new Tally(5, 1, 2, 0, 1, 1));
    assertThat(trial.besideSamples.get(0))
        .isInstanceOfSatisfying(
            CalibrationPoint.class,
            point -> {
              assertThat(point.concentration()).hasToString("5 µg/L");
              assertThat(point.subject().sample().text()).isEqualTo("Std 1");
            });
    assertThat(trial.besideSamples.get(1)).isInstanceOf(CheckReading.class);
    assertThat(trial.rejections)
        .extracting(Rejection::column)
        .containsExactly("calibration_concentration", "Abs");
  }

  @Test
  void rolesComeFromAColumnAndCalibrationIsLeftOut() {
    String toml =
        PLAIN
            + """
              [roles]
              column = "Type"
              sample = "Unk*"
              control = ["QC*"]
              calibration = "Std*"
              """;
    Trial trial =
        Trial.text(
            Trial.mapping(toml),
            "a.csv",
            ",",
            HEADER + ",Type",
            "W-1,Cd,0.1,2025-01-15 18:30,0,Unknown",
            "C-1,Cd,0.1,2025-01-15 18:31,0,QC 1",
            "S-1,Cd,0.1,2025-01-15 18:32,,Std 3",
            "W-1,Cd,0.1,2025-01-15 18:33,0,unknown");
    assertThat(trial.tally()).isEqualTo(new Tally(4, 2, 1, 1));
    assertThat(trial.readings)
        .extracting(r -> r.facts().role())
        .containsExactly(Role.SAMPLE, Role.CONTROL);
    assertThat(trial.rejections.get(0).reason()).isEqualTo(Reason.ROLE_UNKNOWN);
    assertThat(trial.rejections.get(0).expected()).contains("'Unk*'", "'QC*'", "'Std*'");
  }

  @Test
  void factsAreTakenInOrderOfPrecedence() {
    String toml =
        """
        name = "precedence"
        files = "**/*.csv"
        [columns]
        analyte = "El"
        signal = "Abs"
        stock = { header = "Stock", unit = "mg/L" }
        [label]
        column = "Label"
        pattern = '(?<id>W-\\d+)( \\+ (?<volume>[\\d.]+) mL)?( stock (?<stock>\\d+))?'
        sample = "id"
        addition_volume = { group = "volume", unit = "mL" }
        stock = { group = "stock", unit = "mg/L" }
        [file]
        pattern = '(?<batch>[^/]+)/(s(?<stock>\\d+)-)?.*'
        batch = "batch"
        stock = { group = "stock", unit = "mg/L" }
        [fixed]
        design = "made up"
        aliquot_volume = "10 mL"
        final_volume = "50 mL"
        addition_volume = "0 mL"
        stock = "4 mg/L"
        [result]
        unit = "mg/L"
        """;
    Mapping mapping = Trial.mapping(toml);
    String[] rows = {
      "Label,El,Abs,Stock", "W-1 + 2 mL stock 2,Cd,1,1", "W-1 + 2 mL stock 2,Cd,1,", "W-1,Cd,1,"
    };
    Trial named = Trial.text(mapping, "B7/s3-run.csv", ",", rows);
    assertThat(named.readings)
        .extracting(RowMapperTest::stock)
        .containsExactly("1 mg/L", "2 mg/L", "3 mg/L");
    assertThat(named.readings).extracting(Reading::flask).containsExactly("2 mL", "2 mL", "0 mL");
    assertThat(named.readings.get(0).batch()).isEqualTo(new Batch("B7", true));
    Trial unnamed = Trial.text(mapping, "B7/run.csv", ",", rows);
    assertThat(stock(unnamed.readings.get(2))).isEqualTo("4 mg/L");
    Trial odd = Trial.text(mapping, "B7/run.csv", ",", "Label,El,Abs,Stock", "X-1,Cd,1,");
    assertThat(odd.rejections.get(0).reason()).isEqualTo(Reason.LABEL_UNREADABLE);
    assertThat(Trial.text(mapping, "run.csv", ",", rows).unmappable().place())
        .isEqualTo("the file's name");
  }

  private static String stock(Reading reading) {
    return ((Addition.OfStock) reading.facts().addition()).stock().toString();
  }

  private static final String VESSEL =
      """
      name = "vessel"
      files = "*.csv"
      [columns]
      sample = "ID"
      flask = "Step"
      signal = "I"
      addition_volume = { header = "Added", unit = "mL" }
      [fixed]
      analyte = "Cd"
      design = "one vessel"
      additions = "each"
      aliquot_volume = "10 mL"
      start_volume = "20 mL"
      stock = "10 mg/L"
      [result]
      unit = "µg/L"
      """;

  private static Trial vessel(String additions, String... rows) {
    String[] all = new String[rows.length + 1];
    all[0] = "ID,Step,I,Added";
    System.arraycopy(rows, 0, all, 1, rows.length);
    return Trial.text(
        Trial.mapping(VESSEL.replace("\"each\"", "\"" + additions + "\"")), "v.csv", ",", all);
  }

  private static List<String> totals(Trial trial) {
    return trial.readings.stream().map(r -> r.facts().addition().amount().toString()).toList();
  }

  @Test
  void additionsToOneVesselAreSummedStepByStep() {
    String[] rows = {
      "W-1,0,1,0",
      "W-1,0,1,0",
      "W-1,1,2,0.1",
      "W-2,0,1,0",
      "W-1,1,2,0.1",
      "W-1,2,3,0.1",
      "W-2,1,2,0.3",
      "W-1,3,4,0.1",
      "W-1,1,2,0.1"
    };
    assertThat(totals(vessel("each", rows)))
        .containsExactly(
            "0 mL", "0 mL", "0.1 mL", "0 mL", "0.1 mL", "0.2 mL", "0.3 mL", "0.3 mL", "0.1 mL");
    assertThat(totals(vessel("cumulative", rows)))
        .containsExactly(
            "0 mL", "0 mL", "0.1 mL", "0 mL", "0.1 mL", "0.1 mL", "0.3 mL", "0.1 mL", "0.1 mL");
  }

  @Test
  void aStepCountsEvenWhereItsSignalCannotBeUsed() {
    Trial trial = vessel("each", "W-1,0,1,0", "W-1,1,bad,0.1", "W-1,2,3,0.1");
    assertThat(totals(trial)).containsExactly("0 mL", "0.2 mL");
  }

  @Test
  void afterAnAdditionThatCouldNotBeReadNoTotalIsGuessed() {
    Trial trial = vessel("each", "W-1,0,1,0", "W-1,1,2,x", "W-1,2,3,0.1", "W-1,0,1,0", "W-2,0,1,0");
    assertThat(trial.tally()).isEqualTo(new Tally(5, 3, 2, 0));
    assertThat(trial.rejections.get(1).expected()).contains("line 3");
    assertThat(totals(trial)).containsExactly("0 mL", "0 mL", "0 mL");
  }

  @Test
  void aStepThatNamesTwoVolumesIsAContradiction() {
    Trial trial = vessel("each", "W-1,1,2,0.1", "W-1,1,2,0.2");
    assertThat(trial.rejections.get(0).reason()).isEqualTo(Reason.CONTRADICTION);
    assertThat(trial.rejections.get(0).position().column()).isEqualTo(4);
  }

  @Test
  void sheetsHaveTheirOwnHeadersAndCellsTheirOwnKinds() {
    Source one = new Source("a.xlsx", Optional.of("One"));
    Source two = new Source("a.xlsx", Optional.of("Two"));
    Mapping mapping = Trial.mapping(PLAIN);
    List<Cell> header = texts("ID", "El", "Abs", "Time", "Added");
    List<Cell> turned = texts("Added", "Time", "Abs", "El", "ID");
    Cell time = new Cell.Moment(java.time.LocalDateTime.parse("2025-01-15T18:30"), "45672.77");
    List<Cell> first =
        List.of(
            new Cell.Number(1001, "1001"),
            new Cell.Text("Cd"),
            new Cell.Number(0.1234567890123456, "0.1234567890123456"),
            time,
            new Cell.Number(0.5, "0.5"));
    List<Cell> second =
        List.of(
            new Cell.Number(0.5, "0.5"),
            time,
            new Cell.Unusable("#DIV/0!"),
            new Cell.Text("Cd"),
            new Cell.Text("W-2"));
    Trial trial =
        Trial.rows(
            mapping,
            "a.xlsx",
            List.of(
                new Row(one, 1, header),
                new Row(one, 2, first),
                new Row(two, 5, turned),
                new Row(two, 6, second)));
    assertThat(trial.tally()).isEqualTo(new Tally(2, 1, 1, 0));
    assertThat(trial.readings.get(0).subject().sample().text()).isEqualTo("1001");
    assertThat(trial.readings.get(0).measuredAt()).contains(Instant.parse("2025-01-15T17:30:00Z"));
    assertThat(trial.readings.get(0).position()).hasToString("a.xlsx sheet One, cell C2");
    assertThat(trial.rejections.get(0).reason()).isEqualTo(Reason.UNUSABLE_CELL);
    assertThat(trial.rejections.get(0).position()).hasToString("a.xlsx sheet Two, cell C6");
    Trial torn =
        Trial.rows(
            mapping,
            "a.xlsx",
            List.of(new Row(one, 1, texts("x")), new Row(two, 1, header), new Row(two, 2, first)));
    assertThat(torn.unmappable().place()).isEqualTo("sheet One, row 1");
  }

  private static List<Cell> texts(String... texts) {
    return java.util.Arrays.stream(texts).<Cell>map(Cell.Text::new).toList();
  }

  @Test
  void anyRowBecomesExactlyOneThing() {
    long seed = 99;
    Random random = new Random(seed);
    String[] parts = {
      "",
      " ",
      "W-1",
      "Cd",
      "Pb",
      "0.1",
      "1e400",
      "NaN",
      "OVER",
      "<1",
      "2025-01-15 18:30",
      "-5",
      "5 g",
      "Rinse",
      "Mean",
      "\u0000",
      "٣",
      "x".repeat(5000),
      "1,5",
      "2025-03-30 02:30"
    };
    String[] rows = new String[5001];
    rows[0] = HEADER.replace(',', ';');
    for (int i = 1; i < rows.length; i++) {
      StringBuilder row = new StringBuilder(parts[random.nextInt(parts.length)]);
      for (int cells = random.nextInt(7); cells > 0; cells--) {
        row.append(';').append(parts[random.nextInt(parts.length)]);
      }
      rows[i] = random.nextInt(3) == 0 ? "W-1;Cd;0.1;2025-01-15 18:30;0.1" : row.toString();
    }
    Trial trial = Trial.text(Trial.mapping(PLAIN), "a.csv", ";", rows);
    Tally tally = trial.tally();
    assertThat(tally.readings()).as("seed %s", seed).isEqualTo(trial.readings.size());
    assertThat(tally.rejections()).isEqualTo(trial.rejections.size());
    assertThat(tally.readings()).isGreaterThan(1000);
    assertThat(tally.rejections()).isGreaterThan(1000);
    assertThat(tally.skipped()).isGreaterThan(50);
    for (Rejection rejection : trial.rejections) {
      assertThat(rejection.found().length()).isLessThan(500);
    }
  }
}
