package org.spikewright.mapping;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.nio.file.Path;
import java.time.LocalDate;
import java.time.ZoneId;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.config.ConfigFault;
import org.spikewright.config.Loaded;
import org.spikewright.config.MappingFile;
import org.spikewright.config.Settings;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.reading.Accuracies;
import org.spikewright.reading.Accuracies.Accuracy;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Bottle;
import org.spikewright.reading.Calculation;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.MethodFacts;
import org.spikewright.reading.Shelf;

/** Stocks and glassware that mappings and exports call by name, and the ± of quantities. */
class NamedTest {
  private static final double ROOT3 = Math.sqrt(3);

  private static final String TABLES =
      """
      [folders]
      watch = "in"
      mappings = "m"
      summaries = "out"
      ledger = "l.db"
      [laboratory]
      zone = "UTC"
      ####: stocks
      ["Pb 10"]
      value = "10 mg/L ± 0.06 mg/L"
      expires = 2025-01-14
      ["mix"]
      value = { Cd = "1 mg/L ± 0.01 mg/L", Zn = "5 mg/L" }
      means = "standard"
      ####: glassware
      [P100]
      kind = "piston pipette"
      range = "10 µL to 100 µL"
      systematic = "0.9 µL"
      random = "0.3 µL"
      [P1000]
      kind = "piston pipette"
      range = "100 µL to 1000 µL"
      systematic = "6 µL"
      random = "2 µL"
      ["pipette 1"]
      kind = "pipette"
      volume = "1 mL ± 0.006 mL"
      ["pipette 10"]
      kind = "pipette"
      volume = "10 mL ± 0.02 mL"
      ["flask 10"]
      kind = "flask"
      volume = "10 mL ± 0.03 mL"
      ["flask 50"]
      kind = "flask"
      volume = "50 mL ± 0.06 mL"
      ["flask 100"]
      kind = "flask"
      volume = "100 mL ± 0.1 mL"
      [balance]
      kind = "balance"
      range = "10 mg to 100 g"
      systematic = "0.3 mg"
      means = "triangular"
      """;

  private static final String MAPPING =
      """
      name = "named"
      files = "*.csv"
      [columns]
      sample = "ID"
      analyte = "El"
      signal = "Abs"
      addition_volume = { header = "Added", unit = "µL" }
      addition_by = "By"
      [fixed]
      design = "made up"
      aliquot_volume = "10 mL"
      final_volume = "50 mL"
      stock = "Pb 10"
      [result]
      unit = "mg/L"
      """;

  private static final String HEADER = "ID,El,Abs,Added,By";

  private static Shelf shelf() {
    Loaded<Settings> loaded = Settings.read(Path.of("s.toml"), TABLES);
    assertThat(loaded).as(loaded.toString()).isInstanceOf(Loaded.Good.class);
    return ((Loaded.Good<Settings>) loaded).value().shelf();
  }

  private static Loaded<Mapping> load(String toml) {
    return MappingFile.read(Path.of("m.toml"), toml, ZoneId.of("UTC"), shelf());
  }

  private static Mapping mapping(String toml) {
    Loaded<Mapping> loaded = load(toml);
    assertThat(loaded).as(loaded.toString()).isInstanceOf(Loaded.Good.class);
    return ((Loaded.Good<Mapping>) loaded).value();
  }

  private static Trial trial(String toml, String... rows) {
    return Trial.text(mapping(toml), "a.csv", ",", rows);
  }

  private static FlaskFacts facts(String toml, String... rows) {
    Trial trial = trial(toml, rows);
    assertThat(trial.rejections).isEmpty();
    return trial.readings.get(trial.readings.size() - 1).facts();
  }

  private static void is(Optional<Accuracy> found, double systematic, double random) {
    assertThat(found).isPresent();
    assertThat(found.get().systematic()).isCloseTo(systematic, within(1e-12));
    assertThat(found.get().random()).isCloseTo(random, within(1e-12));
  }

  @Test
  void aNamedStockGivesValueAccuracyAndName() {
    FlaskFacts facts = facts(MAPPING, HEADER, "W-1,Pb,0.1,50,P100");
    assertThat(((Addition.OfStock) facts.addition()).stock()).hasToString("10 mg/L ± 0.06 mg/L");
    is(facts.accuracies().stock(), 0.006 / ROOT3, 0);
    assertThat(facts.accuracies().stock().get().origin())
        .isEqualTo("Pb 10: ± 0.06 mg/L, rectangular");
    assertThat(facts.bottle())
        .contains(new Bottle("Pb 10", Optional.of(LocalDate.of(2025, 1, 14))));
  }

  @Test
  void aStockOfSeveralAnalytesIsReadForEach() {
    String mix = MAPPING.replace("\"Pb 10\"", "\"mix\"");
    Trial trial = trial(mix, HEADER, "W,Cd,0.1,50,P100", "W,Zn,0.1,50,P100", "W,Pb,0.1,50,P100");
    is(trial.readings.get(0).facts().accuracies().stock(), 0.01, 0);
    assertThat(trial.readings.get(1).facts().accuracies().stock()).isEmpty();
    assertThat(trial.readings.get(1).facts().bottle().get().name()).isEqualTo("mix");
    assertThat(trial.rejections).singleElement().asString().contains("for Pb");
    String each = MAPPING.replace("\"Pb 10\"", "{ Cd = \"mix\", Pb = \"Pb 10\", Zn = \"2 mg/L\" }");
    Trial several = trial(each, HEADER, "W,Cd,0.1,50,P100", "W,Pb,0.1,50,P100", "W,Zn,0.1,50,P100");
    assertThat(several.readings)
        .extracting(reading -> reading.facts().bottle().map(Bottle::name).orElse("none"))
        .containsExactly("mix", "Pb 10", "none");
  }

  private static final String STOCK_COLUMN =
      MAPPING
          .replace("stock = \"Pb 10\"\n", "")
          .replace("signal", "stock = { header = \"Stock\", unit = \"mg/L\" }\nsignal");

  @ParameterizedTest(name = "stock ''{0}'': {1}")
  @CsvSource({
    "Pb 10,10 mg/L ± 0.06 mg/L,Pb 10",
    " Pb 10 ,10 mg/L ± 0.06 mg/L,Pb 10",
    "12,12 mg/L,none",
    "12 µg/L ± 1,12 µg/L ± 1 µg/L,none"
  })
  void aColumnNamesAStockOrItsConcentration(String cell, String value, String name) {
    FlaskFacts facts = facts(STOCK_COLUMN, HEADER + ",Stock", "W,Pb,0.1,50,P100," + cell);
    assertThat(((Addition.OfStock) facts.addition()).stock()).hasToString(value);
    assertThat(facts.bottle().map(Bottle::name).orElse("none")).isEqualTo(name);
    assertThat(facts.accuracies().stock().isPresent()).isEqualTo(value.contains("±"));
  }

  @ParameterizedTest(name = "row ''{0}'': {1}")
  @CsvSource(
      delimiter = '|',
      value = {
        "W,Pb,0.1,50,P100,Pb 11 | NAME_UNKNOWN | Stock | did you mean 'Pb 10'?",
        "W,Pb,0.1,50,P100,mix | NAME_UNKNOWN | Stock | holds Cd, Zn",
        "W,Pb,0.1,50,P100,10 g | UNIT_DOES_NOT_FIT | Stock | a mass concentration",
        "W,Pb,0.1,50,P10,Pb 10 | NAME_UNKNOWN | By | did you mean 'P100'?",
        "W,Pb,0.1,50,pipette 1,Pb 10 | OUT_OF_BOUNDS | By | 1 mL, or a multiple of it by 'pipette 1'",
        "W,Pb,0.1,50,balance,Pb 10 | UNIT_DOES_NOT_FIT | By | a mass by 'balance'",
        "W,Pb,0.1,50,,Pb 10 | FACT_MISSING | addition_by | the name of glassware"
      })
  void aRowThatNamesWhatIsNotThereIsRefused(
      String row, Reason reason, String column, String expected) {
    Trial trial = trial(STOCK_COLUMN, HEADER + ",Stock", row);
    assertThat(trial.readings).isEmpty();
    Rejection rejection = trial.rejections.get(0);
    assertThat(rejection.reason()).isEqualTo(reason);
    assertThat(rejection.expected()).contains(expected);
    String header = rejection.column();
    assertThat(header).isEqualTo(column);
  }

  @Test
  void noAdditionNeedsNoPipette() {
    Trial trial = trial(MAPPING, HEADER, "W,Pb,0.1,0,", "W,Pb,0.1,0,P100");
    assertThat(trial.rejections).isEmpty();
    assertThat(trial.readings)
        .allSatisfy(reading -> assertThat(reading.facts().accuracies().addition()).isEmpty());
  }

  /** Of several pipettes the one whose good range holds the volume; else the fewest strokes. */
  @ParameterizedTest(name = "{0} µL by {1}: {2}")
  @CsvSource(
      delimiter = '|',
      value = {
        "50 | P100, P1000 | P100 | 0.9 | 0.3",
        "100 | P1000, P100 | P1000 | 6 | 2",
        "500 | P100, P1000 | P1000 | 6 | 2",
        "2000 | P100, P1000 | P1000 | 12 | 2.8284271247461903",
        "5 | P1000, P100 | P100 | 0.9 | 0.3"
      })
  void theFittingPipetteIsTaken(
      double volume, String tools, String taken, double systematic, double random) {
    String fixed =
        MAPPING
            .replace("addition_by = \"By\"\n", "")
            .replace("stock =", "addition_by = \"" + tools + "\"\nstock =");
    FlaskFacts facts = facts(fixed, HEADER, "W,Pb,0.1," + volume + ",");
    Optional<Accuracy> addition = facts.accuracies().addition();
    is(addition, systematic / ROOT3 / volume, random / volume);
    assertThat(addition.get().origin()).startsWith(taken + ": ");
  }

  private static final String SOLID =
      """
      name = "solid"
      files = "*.csv"
      [columns]
      sample = "ID"
      analyte = "El"
      signal = "Abs"
      addition_volume = "Added"
      test_portion = "Portion"
      dry_mass = "Dry"
      dilution = "Dilution"
      [fixed]
      design = "made up"
      aliquot_volume = "10 mL"
      aliquot_by = "pipette 10"
      final_volume = "50 mL"
      final_volume_by = "flask 50"
      test_portion_by = "balance"
      digest_volume = "100 mL"
      digest_volume_by = "flask 100"
      dilution_by = "pipette 1 to flask 10"
      stock = "10 mg/L ± 0.06 mg/L"
      [result]
      unit = "mg/kg"
      """;

  @Test
  void everyQuantityIsAsWellKnownAsItsGlasswareOrItsOwnNumber() {
    Accuracies known =
        facts(
                SOLID,
                "ID,El,Abs,Added,Portion,Dry,Dilution",
                "S,Pb,1,1 mL ± 9 µL,0.5 g,80 % ± 1 %,10")
            .accuracies();
    is(known.stock(), 0.006 / ROOT3, 0);
    is(known.aliquot(), 0.002 / ROOT3, 0);
    is(known.addition(), 0.009 / ROOT3, 0);
    is(known.finalVolume(), 0.0012 / ROOT3, 0);
    is(known.dilution(), Math.hypot(0.006 / ROOT3, 0.003 / ROOT3), 0);
    is(known.testPortion(), 0.0006 / Math.sqrt(6), 0);
    is(known.digestVolume(), 0.001 / ROOT3, 0);
    is(known.dryMass(), 0.0125 / ROOT3, 0);
    assertThat(known.startVolume()).isEmpty();
    assertThat(known.dryMass().get().origin()).isEqualTo("± 0.01, rectangular");
  }

  @Test
  void aNumberOfItsOwnGoesBeforeTheGlassware() {
    Accuracies known =
        facts(
                SOLID,
                "ID,El,Abs,Added,Portion,Dry,Dilution",
                "S,Pb,1,1 mL,0.5 g ± 5 mg,80 %,1 mL ± 0.03 mL to 10 mL ± 0.4 mL")
            .accuracies();
    is(known.testPortion(), 0.01 / ROOT3, 0);
    is(known.dilution(), 0.05 / ROOT3, 0);
    assertThat(known.addition()).isEmpty();
  }

  @Test
  void whatNobodyDeclaresIsNotKnown() {
    String bare = MAPPING.replace("addition_by = \"By\"\n", "").replace("\"Pb 10\"", "\"10 mg/L\"");
    FlaskFacts facts = facts(bare, HEADER, "W,Pb,0.1,50,");
    assertThat(facts.accuracies()).isEqualTo(Accuracies.NONE);
    assertThat(facts.bottle()).isEmpty();
  }

  @ParameterizedTest(name = "dilution {0} by {1}")
  @CsvSource(
      delimiter = '|',
      value = {
        // relative systematic errors: pipette 1 0.006, flask 10 0.003, flask 100 0.001 (limits)
        "10 | pipette 1 to flask 10 | 0.006708203932499369",
        "100 | pipette 1 to flask 10, pipette 1 to flask 10 | 0.013416407864998738",
        "100 | pipette 1 to flask 10, pipette 10 to flask 100 | 0.007071067811865475",
        "1000 | pipette 1 to flask 10, pipette 1 to flask 100 | 0.012409673645990857",
        "100 | P1000 to flask 100 | 0.006082762530298219",
        "1 | pipette 1 to flask 10 | 0"
      })
  void aDilutionIsAsWellKnownAsItsSteps(double factor, String by, double limit) {
    String toml = SOLID.replace("\"pipette 1 to flask 10\"", "\"" + by + "\"");
    Optional<Accuracy> found =
        facts(toml, "ID,El,Abs,Added,Portion,Dry,Dilution", "S,Pb,1,1 mL,1 g,80 %," + factor)
            .accuracies()
            .dilution();
    if (limit == 0) {
      assertThat(found).isEmpty();
    } else {
      assertThat(found.orElseThrow().systematic()).isCloseTo(limit / ROOT3, within(1e-12));
    }
  }

  @Test
  void aDilutionThatItsGlasswareDoesNotGiveIsRefused() {
    Trial trial = trial(SOLID, "ID,El,Abs,Added,Portion,Dry,Dilution", "S,Pb,1,1 mL,1 g,80 %,20");
    Rejection rejection = trial.rejections.get(0);
    assertThat(rejection.reason()).isEqualTo(Reason.OUT_OF_BOUNDS);
    assertThat(rejection.found()).contains("a dilution of 20 by pipette 1 to flask 10");
    assertThat(rejection.expected()).contains("this gives 10");
  }

  @Test
  void stepsOfOneVesselKeepWhatIsKnownOfTheirOwnDelivery() {
    String vessel =
        MAPPING
            .replace("\"made up\"", "\"one vessel\"\nadditions = \"each\"")
            .replace("final_volume = \"50 mL\"", "start_volume = \"20 mL ± 0.06 mL\"")
            .replace("signal =", "flask = \"Step\"\nsignal =");
    FlaskFacts facts =
        facts(
            vessel, HEADER + ",Step", "W,Pb,0.1,0,,0", "W,Pb,0.2,50,P100,1", "W,Pb,0.3,100,P100,2");
    assertThat(facts.addition().amount()).hasToString("150 µL");
    is(facts.accuracies().addition(), 0.009 / ROOT3, 0.003);
    is(facts.accuracies().startVolume(), 0.003 / ROOT3, 0);
    assertThat(facts.bottle()).isPresent();
  }

  /** A replacement in the good mapping, the line of the fault, and what it says. */
  @ParameterizedTest(name = "{1}")
  @CsvSource(
      delimiter = '|',
      value = {
        "\"Pb 10\" | \"Pb 11\" | 13 | did you mean Pb 10?",
        "\"Pb 10\" | { Pb = \"mix\" } | 13 | this one holds Cd, Zn",
        "\"Pb 10\" | \"10 mL\" | 13 | a mass concentration",
        "stock = | final_volume_by = \"flask 51\"~stock = | 13 | did you mean flask 50?",
        "stock = | final_volume_by = \"flask 100\"~stock = | 13 | 100 mL by 'flask 100'",
        "stock = | final_volume_by = \"balance\"~stock = | 13 | a mass by 'balance'",
        "stock = | final_volume_by = \"\"~stock = | 13 | the name of glassware",
        "stock = | aliquot_by = \"P100, x\"~stock = | 13 | 'x' for aliquot_by",
        "stock = | dilution_by = \"pipette 1 to flask 10\"~stock = | 13 | dilution_by without dilution",
        "stock = | dilution = 20~dilution_by = \"pipette 1 to flask 10\"~stock = | 14 | this gives 10",
        "stock = | dilution = 10~dilution_by = \"pipette 1\"~stock = | 14 | taken and made up in",
        "stock = | dilution = 10~dilution_by = \"pipette 1 to P100\"~stock = | 14 | to make up in",
        "stock = | dilution = 10~dilution_by = \"balance to flask 10\"~stock = | 14 | two volumes",
        "\"10 mL\" | \"10 mL ± 0.1 mL\"~aliquot_by = \"pipette 10\" | 12 | one of the two",
        "stock = | start_volume_by = \"pipette 10\"~stock = | 13 | start_volume_by without"
      })
  void aMappingThatNamesWhatIsNotThereIsRefusedAtItsLine(
      String from, String to, int line, String said) {
    assertThat(MAPPING).contains(from);
    Loaded<Mapping> loaded = load(MAPPING.replace(from, to.replace('~', '\n')));
    assertThat(loaded).isInstanceOf(Loaded.Faulty.class);
    List<ConfigFault> faults = ((Loaded.Faulty<Mapping>) loaded).faults();
    assertThat(faults)
        .singleElement()
        .satisfies(
            fault -> {
              assertThat(fault.toString()).contains(said);
              assertThat(fault.line()).as(fault.toString()).isEqualTo(line);
            });
  }

  @Test
  void aColumnOfDilutionsIsCheckedForItsWordsAtOnce() {
    String toml = SOLID.replace("\"pipette 1 to flask 10\"", "\"pipette 1 and flask 10\"");
    assertThat(((Loaded.Faulty<Mapping>) load(toml)).faults())
        .singleElement()
        .satisfies(fault -> assertThat(fault.line()).isEqualTo(20));
  }

  private static MethodFacts method(String keys) {
    return facts(MAPPING + "[method]\n" + keys, HEADER, "W,Pb,0.1,50,P100").method();
  }

  @Test
  void theMethodSaysHowLinesAreDrawnAndWhereResultsHold() {
    assertThat(method("").calculation()).isEqualTo(Calculation.DEFAULT);
    assertThat(method("").workingRange()).isEmpty();
    assertThat(method("").bendAllowance()).isEmpty();
    assertThat(method("").blankDue()).isFalse();
    MethodFacts all =
        method(
            """
            interval = "own"
            weights = "pool"
            bend = "either"
            correct_drift = true
            working_range = { Pb = "0.5 to 50 µg/L", Cd = "0 mg/L to 1 mg/L" }
            bend_allowance = 0.05
            blank_due = true
            """);
    assertThat(all.calculation())
        .isEqualTo(
            new Calculation(
                Calculation.Interval.OWN, Calculation.Weights.POOL, Calculation.Bend.EITHER, true));
    assertThat(all.workingRange().get().lower()).isCloseTo(0.0005, within(1e-15));
    assertThat(all.workingRange().get().upper()).isCloseTo(0.05, within(1e-15));
    assertThat(all.bendAllowance()).hasValue(0.05);
    assertThat(all.blankDue()).isTrue();
  }

  @ParameterizedTest(name = "{0}")
  @CsvSource(
      delimiter = '|',
      value = {
        "interval = \"best\" | \"best known\"",
        "interval = \"owm\" | did you mean own?",
        "weights = \"pol\" | did you mean pool?",
        "bend = \"both\" | \"either\"",
        "correct_drift = \"yes\" | true or false",
        "blank_due = 1 | true or false",
        "bend_allowance = 0 | above 0 and below 1",
        "bend_allowance = 1 | above 0 and below 1",
        "bend_allowance = nan | above 0 and below 1",
        "bend_allowance = \"5 %\" | above 0 and below 1",
        "working_range = \"5 µg/L\" | the lower one first",
        "working_range = \"50 µg/L to 5 µg/L\" | the lower one first",
        "working_range = \"5 µg/L to 5 µg/L\" | the lower one first",
        "working_range = \"-1 µg/L to 5 µg/L\" | the lower one first",
        "working_range = \"1 µg/L ± 1 to 5 µg/L\" | the lower one first",
        "working_range = \"1 µg/kg to 5 µg/L\" | the lower one first",
        "working_range = \"1 µg/kg to 5 µg/kg\" | a mass concentration",
        "reporting_limit = \"1 µg/L ± 0.1 µg/L\" | a concentration above 0"
      })
  void aMethodThatCannotBeIsRefusedAtItsLine(String key, String said) {
    Loaded<Mapping> loaded = load(MAPPING + "[method]\n" + key + "\n");
    assertThat(loaded).isInstanceOf(Loaded.Faulty.class);
    assertThat(((Loaded.Faulty<Mapping>) loaded).faults())
        .singleElement()
        .satisfies(
            fault -> {
              assertThat(fault.toString()).contains(said);
              assertThat(fault.line()).isEqualTo(17);
              assertThat(fault.column()).isEqualTo(1);
            });
  }

  @Test
  void aWorkingRangeOfAnotherKindThanTheRowsUnitRefusesTheRow() {
    String toml =
        MAPPING.replace("addition_by = \"By\"", "result_unit = \"By\"")
            + "[method]\nworking_range = \"1 mg/L to 5 mg/L\"\n";
    Trial trial = trial(toml, HEADER, "W,Pb,0.1,50,µg/L", "W,Pb,0.1,50,mmol/L");
    assertThat(trial.readings).hasSize(1);
    assertThat(trial.readings.get(0).facts().method().workingRange().get().upper())
        .isCloseTo(5000, within(1e-9));
    assertThat(trial.rejections).hasSize(1);
  }
}
