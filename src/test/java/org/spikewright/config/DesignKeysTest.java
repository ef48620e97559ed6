package org.spikewright.config;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.file.Path;
import java.time.ZoneId;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.spikewright.mapping.Mapping;
import org.spikewright.mapping.Rejection;
import org.spikewright.mapping.Trial;

/** What each design needs and refuses, said when the mapping is loaded. */
class DesignKeysTest {
  private static final String START =
      """
      name  = "bench"
      files = "*.csv"
      [columns]
      sample = "Sample"
      signal = "Signal"
      flask  = "Flask"
      """;

  private static final String WEIGHED =
      START
          + """
          addition_mass = { header = "Added", unit = "g" }
          [fixed]
          analyte      = "Pb"
          design       = "weighed"
          aliquot_mass = "10 g"
          final_mass   = "50 g"
          stock        = "1 mg/kg"
          [result]
          unit = "mg/kg"
          """;

  private static final String STANDARD =
      START
          + """
          internal_standard = "Standard"
          addition_volume   = { header = "Added", unit = "mL" }
          [fixed]
          analyte        = "Pb"
          design         = "made up"
          aliquot_volume = "10 mL"
          final_volume   = "50 mL"
          stock          = "1 mg/L"
          internal_standard_given = "on line"
          [result]
          unit = "mg/L"
          """;

  private static final String ELECTRODE =
      START
          + """
          addition_volume = { header = "Added", unit = "mL" }
          [fixed]
          analyte        = "F"
          design         = "electrode"
          additions      = "each"
          signal_unit    = "mV"
          aliquot_volume = "10 mL"
          start_volume   = "20 mL"
          stock          = "100 mg/L"
          [method]
          charge = -1
          slope  = -58
          [result]
          unit = "mg/L"
          """;

  private static String mapping(String which) {
    return which.equals("weighed") ? WEIGHED : which.equals("standard") ? STANDARD : ELECTRODE;
  }

  private static List<String> faults(String text) {
    return MappingFile.read(Path.of("m.toml"), text, ZoneId.of("UTC"))
            instanceof Loaded.Faulty<Mapping> faulty
        ? faulty.faults().stream().map(ConfigFault::toString).toList()
        : List.of();
  }

  @ParameterizedTest
  @ValueSource(strings = {"weighed", "standard", "electrode"})
  void theMappingsThemselvesAreGood(String which) {
    assertThat(faults(mapping(which))).isEmpty();
  }

  /** A line of the mapping and what stands in its place; ';' stands for a new line. */
  @ParameterizedTest(name = "{0}: {1} -> {2}")
  @CsvSource(
      delimiter = '|',
      nullValues = "-",
      value = {
        "weighed | stock        = \"1 mg/kg\" | stock = \"1 mg/L\" | mass fraction",
        "weighed | final_mass   = \"50 g\" | - | final_mass",
        "weighed | final_mass   = \"50 g\" | final_volume = \"50 mL\" | masses",
        "weighed | aliquot_mass = \"10 g\" | - | aliquot_mass",
        "weighed | unit = \"mg/kg\" | unit = \"mg/L\" | a mass fraction",
        "weighed | unit = \"mg/kg\" | unit = \"mmol/kg\" | molar_mass",
        "weighed | analyte      = \"Pb\" | analyte = \"Pb\";start_volume = \"1 mL\" | one vessel",
        "weighed | analyte      = \"Pb\" | analyte = \"Pb\";signal_unit = \"mL\" | concentration",
        "weighed | analyte      = \"Pb\" | analyte = \"Pb\";signal_unit = \"mg/L\" | mass fraction",
        "weighed | analyte      = \"Pb\" | analyte = \"Pb\";signal_unit = \"mV\" | concentration",
        "standard | stock          = \"1 mg/L\" | stock = \"1 mg/kg\" | per volume",
        "standard | internal_standard_given = \"on line\" | - | in the flask",
        "standard | internal_standard_given = \"on line\" | internal_standard_given = \"weighed in\" |"
            + " internal_standard_mass",
        "standard | internal_standard = \"Standard\" | - | internal_standard",
        "standard | analyte        = \"Pb\" | analyte = \"Pb\";internal_standard_mass = \"1 g\" |"
            + " weighed in",
        "standard | analyte        = \"Pb\" | analyte = \"Pb\";signal_unit = \"mg/L\" | plain signal",
        "standard | analyte        = \"Pb\" | analyte = \"Pb\";method_blank_dilution = \"2\" |"
            + " method_blank",
        "standard | internal_standard = \"Standard\" | internal_standard = \"Standard\";"
            + "signal_sd = \"SD\";readings = \"n\" | of the ratio",
        "standard | [columns] | [table];carry_down = \"internal_standard\";[columns] | 'internal_standard'"
            + " for carry_down",
        "electrode | charge = -1 | - | charge",
        "electrode | charge = -1 | charge = 0 | not 0",
        "electrode | slope  = -58 | slope = 58 | sign",
        "electrode | signal_unit    = \"mV\" | - | mV",
        "electrode | signal_unit    = \"mV\" | signal_unit = \"mg/L\" | mV",
        "electrode | start_volume   = \"20 mL\" | - | start_volume",
        "electrode | additions      = \"each\" | - | cumulative",
        "electrode | design         = \"electrode\" | design = \"one vessel\" | only there",
      })
  void whatDoesNotBelongTogetherIsRefused(
      String which, String line, String instead, String expected) {
    String text = mapping(which);
    assertThat(text).contains(line);
    String spoilt = text.replace(line, Optional.ofNullable(instead).orElse("").replace(';', '\n'));
    assertThat(faults(spoilt)).anyMatch(fault -> fault.contains(expected));
  }

  /** A stock whose unit only the row tells is refused there. */
  @ParameterizedTest
  @CsvSource({"1 mg/kg, 2, 0", "1 mg/L, 0, 2"})
  void aStockOfTheWrongKindRefusesTheRow(String stock, int readings, int rejections) {
    String text =
        WEIGHED
            .replace("stock        = \"1 mg/kg\"\n", "")
            .replace("flask  =", "stock = \"Stock\"\nflask  =");
    Trial trial =
        Trial.text(
            Trial.mapping(text),
            "a.csv",
            ",",
            "Sample,Signal,Flask,Stock,Added",
            "W-1,1,1," + stock + ",0",
            "W-1,2,2," + stock + ",1");
    assertThat(trial.readings).hasSize(readings);
    assertThat(trial.rejections)
        .hasSize(rejections)
        .allMatch(r -> r.reason() == Rejection.Reason.UNIT_DOES_NOT_FIT);
  }
}
