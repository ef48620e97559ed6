package org.spikewright.app;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.testkit.Laboratory;
import org.spikewright.testkit.Program;

class PlanCommandTest {
  private static final List<String> WATER =
      List.of("--aliquot", "10 mL", "--final", "50 mL", "--stock", "10 mg/L");

  private static Program.Ended plan(String expected, List<String> rest, String... more) {
    List<String> args = new ArrayList<>(List.of("plan", "--expected", expected));
    args.addAll(rest);
    args.addAll(List.of(more));
    return InProcess.run(args.toArray(String[]::new));
  }

  @Test
  void theExampleOfTheHelpIsATableForAPerson() {
    // By hand: c = 1.06, 0.52, −0.02, −0.56 and s = 0.24, 0.44, 0.64, 0.84 µg/L give 0.582 µg/L,
    // 4.85 % of 12; times t = 4.303 is 20.9 %.
    Program.Ended ended = plan("12 µg/L", WATER);
    assertThat(ended.code()).as(ended.toString()).isEqualTo(ExitCode.DONE);
    assertThat(ended.err()).isEmpty();
    assertThat(ended.out().lines())
        .contains(
            "Add stock 10 mg/L; 60 µL in all.",
            "Each flask: 10 mL of sample and its addition, made up to 50 mL.",
            "  flask  add          concentration added  pipette",
            "  1      no addition  0 µg/L",
            "  2      10 µL        10.00 µg/L           10 µL to 100 µL",
            "  4      30 µL        30.00 µg/L           10 µL to 100 µL",
            "Replicates of each flask: 3.",
            "Top addition: 2.50 times what is expected after dilution (12.0 µg/L).")
        .anyMatch(line -> line.matches("Measure in the order \\d, \\d, \\d, \\d\\."))
        .anyMatch(
            line ->
                line.matches(
                    "Expected uncertainty of the fit: 21 %.*2 degrees.*by less than 0.01 %."))
        .anyMatch(line -> line.startsWith("Volumes are arithmetic, not a procedure"));
  }

  @Test
  void theTrustedSignalDilutesTheSampleAndSignalsAreShown() {
    // 0.05 a µg/L in the flask: trusted up to 10 µg/L there, 50 µg/L in the sample.
    Program.Ended ended = plan("60 µg/L", WATER, "--most-signal", "0.5", "--slope", "0.05");
    assertThat(ended.code()).as(ended.toString()).isEqualTo(ExitCode.DONE);
    assertThat(ended.out()).contains("Dilute the sample 5-fold (1 + 4) first.", "signal", "0.120");
  }

  @Test
  void aTargetTakesMoreFlasks() {
    Program.Ended four = plan("12 µg/L", WATER);
    Program.Ended more = plan("12 µg/L", WATER, "--target", "5 %");
    assertThat(four.out()).doesNotContain("  5  ");
    assertThat(more.out()).contains("  5  ");
  }

  @Test
  void oneVesselWeighedAndStatedAreToldByWhatIsGiven() {
    List<String> one = List.of("--aliquot", "10 mL", "--start", "20 mL", "--stock", "B=5 mg/L");
    assertThat(plan("12 µg/L", one).out())
        .contains("One vessel: 10 mL of sample in a start volume of 20 mL", "stock B (5 mg/L)")
        .contains("check solution");
    List<String> weighed = List.of("--aliquot", "2 g", "--stock", "1 mg/kg");
    assertThat(plan("0.05 mg/kg", weighed).out()).contains("2.000 g of sample", " mg  ");
    assertThat(plan("12 µg/L", List.of()).out()).contains("8 µg/L", "Additions are concentrations");
  }

  @Test
  void whatCannotBePlannedIsRefusedWithTheCapAndWhatWouldHelp() {
    List<String> weak = List.of("--aliquot", "10 mL", "--final", "10.1 mL", "--stock", "1 µg/L");
    Program.Ended ended =
        plan("12 µg/L", weak, "--pipette", "10 µL to 100 µL", "--most-signal", "1", "--slope", "1");
    assertThat(ended.code()).as(ended.toString()).isEqualTo(ExitCode.REFUSED);
    assertThat(ended.out()).isEmpty();
    assertThat(ended.err()).contains("No plan (", "or a smaller aliquot or a larger flask");
  }

  @Test
  void theCapsOfTheConfigurationHold(@TempDir Path folder) {
    Laboratory lab = new Laboratory(folder.resolve("lab"));
    lab.write(
        "spikewright.toml",
        lab.text("spikewright.toml") + "\n[repeat]\nflasks = 6\nreplicates = 2\n");
    Program.Ended ended = plan("120 µg/L", WATER, "--conf", lab.conf());
    assertThat(ended.out()).as(ended.toString()).contains("  6  ", "Replicates of each flask: 2.");
    lab.write("spikewright.toml", lab.text("spikewright.toml").replace("flasks = 6", "flasks = 3"));
    Program.Ended faulty = plan("120 µg/L", WATER, "--conf", lab.conf());
    assertThat(faulty.code()).isEqualTo(ExitCode.CONFIGURATION);
    assertThat(faulty.err()).contains("spikewright.toml line", "from 4");
  }

  @ParameterizedTest(name = "{0} {1}")
  @CsvSource(
      delimiter = '|',
      value = {
        "--expected | 12 | a concentration above 0",
        "--expected | -3 µg/L | a concentration above 0",
        "--aliquot | ten | a volume above 0",
        "--final | 1 mL | does not fit",
        "--start | 20 mL | expected one",
        "--stock | 10 mmol/L | a mass concentration",
        "--flasks | 3 | 4 to 100",
        "--pipette | 100 µL | such as",
        "--noise | 200 % | a share",
        "--target | 0 % | a share",
        "--most-signal | 1 | --slope",
        "--slope | -1 | above 0"
      })
  void whatIsTypedWronglyIsNamed(String option, String value, String said) {
    List<String> rest = new ArrayList<>(List.of("plan"));
    List<String> good = new ArrayList<>(List.of("--expected", "12 µg/L"));
    good.addAll(WATER);
    int at = good.indexOf(option);
    if (at >= 0) {
      good.set(at + 1, value);
    } else {
      good.addAll(List.of(option, value));
    }
    rest.addAll(good);
    Program.Ended ended = InProcess.run(rest.toArray(String[]::new));
    assertThat(ended.code()).as(ended.toString()).isEqualTo(ExitCode.CONFIGURATION);
    assertThat(ended.err()).contains(said);
  }
}
