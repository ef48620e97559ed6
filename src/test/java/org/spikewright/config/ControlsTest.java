package org.spikewright.config;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.OptionalDouble;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.analysis.ControlRule;
import org.spikewright.analysis.ControlRule.Kind;
import org.spikewright.analysis.ControlRule.Parent;
import org.spikewright.analysis.ControlRule.Range;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Subject;

/** The laboratory's list of controls. */
class ControlsTest {
  private static final String SETTINGS =
      """
      [folders]
      watch = "watch"
      mappings = "mappings"
      summaries = "summaries"
      ledger = "ledger.db"
      [laboratory]
      zone = "Europe/Lisbon"
      """;

  @TempDir Path folder;

  private Loaded<Settings> load(String controls) throws IOException {
    Files.writeString(folder.resolve("spikewright.toml"), SETTINGS);
    Files.writeString(folder.resolve("controls.toml"), controls);
    return Settings.load(folder.resolve("spikewright.toml"));
  }

  private Settings good(String controls) throws IOException {
    Loaded<Settings> loaded = load(controls);
    assertThat(loaded).isInstanceOf(Loaded.Good.class);
    return ((Loaded.Good<Settings>) loaded).value();
  }

  private List<String> faults(String controls) throws IOException {
    Loaded<Settings> loaded = load(controls);
    assertThat(loaded).isInstanceOf(Loaded.Faulty.class);
    return ((Loaded.Faulty<Settings>) loaded)
        .faults().stream().map(fault -> fault.toString().replace(folder + "/", "")).toList();
  }

  private static Subject subject(String sample, String analyte) {
    return new Subject("furnace", new SampleId(sample), analyte, "");
  }

  @Test
  void theExampleBesideTheConfigurationIsInOrderAndNamesEveryKind() throws IOException {
    List<ControlRule> rules =
        good(Files.readString(Path.of("conf/controls.toml"))).controls().rules();
    assertThat(rules).extracting(ControlRule::kind).contains(Kind.values());
    String text = Files.readString(Path.of("conf/controls.toml"));
    assertThat(ControlsSection.KEYS.get("control"))
        .allSatisfy(key -> assertThat(text).containsPattern("(?m)^#?\\s*" + key + "\\s*="));
  }

  @Test
  void aCertificatesUncertaintyIsExpandedTwofoldUnlessItSaysOtherwise() throws IOException {
    String control =
        """
        [[control]]
        kind = "reference material"
        sample = "RM-7*"
        reference = { Cd = "12.0 µg/L ± 0.3 µg/L", Pb = "1 mg/L" }
        """;
    ControlRule twofold = good(control).controls().rules().get(0);
    assertThat(twofold.reference().of("Cd").orElseThrow().standardUncertainty()).hasValue(0.15);
    assertThat(twofold.reference().of("Pb").orElseThrow().standardUncertainty())
        .isEqualTo(OptionalDouble.empty());
    ControlRule threefold = good(control + "coverage = 3\n").controls().rules().get(0);
    assertThat(threefold.reference().of("Cd").orElseThrow().standardUncertainty().getAsDouble())
        .isCloseTo(0.1, org.assertj.core.api.Assertions.within(1e-15));
    assertThat(twofold.appliesTo(subject("RM-7 b", "Cd"))).isTrue();
    assertThat(twofold.appliesTo(subject("RM-7 b", "Zn"))).isFalse();
    assertThat(twofold.appliesTo(subject("RM-8", "Cd"))).isFalse();
  }

  @Test
  void aSuffixNamesTheOtherSample() throws IOException {
    ControlRule rule =
        good("""
                [[control]]
                kind = "spiked control"
                suffix = "-SP"
                added = "5 µg/L"
                recovery = [0.85, 1.15]
                """)
            .controls()
            .rules()
            .get(0);
    assertThat(rule.sample().pattern()).isEqualTo("*-SP");
    assertThat(rule.parent()).contains(new Parent.WithoutSuffix("-SP"));
    assertThat(rule.parent().get().of(new SampleId("W-1-SP"))).contains(new SampleId("W-1"));
    assertThat(rule.limits().recovery()).contains(new Range(0.85, 1.15));
  }

  @Test
  void whatIsRecordedOfBothFilesIsReadAgainAsOne() throws IOException {
    Settings settings =
        good("[[control]]\nkind = \"blank\"\nsample = \"RB*\"\nmost = \"0.1 µg/L\"\n");
    Loaded<Settings> again = Settings.read(folder.resolve("spikewright.toml"), settings.text());
    assertThat(again).isEqualTo(new Loaded.Good<>(settings));
    Files.delete(folder.resolve("controls.toml"));
    Settings without =
        ((Loaded.Good<Settings>) Settings.load(folder.resolve("spikewright.toml"))).value();
    assertThat(without.text()).isEqualTo(SETTINGS);
    assertThat(without.sha256()).isNotEqualTo(settings.sha256());
    assertThat(without.controls().rules()).isEmpty();
  }

  @ParameterizedTest(name = "{0}")
  @CsvSource(
      delimiter = '|',
      value = {
        "kind = \"duplicat\"/sample = \"A\" | line 2, column 1: found 'duplicat' for kind",
        "kind = \"duplicate\"/sample = \"A\" | line 1, column 1: found no of",
        "kind = \"control sample\"/sample = \"A\" | line 1, column 1: found no reference",
        "kind = \"control sample\"/reference = \"1 mg/L\" | line 1, column 1: found no sample",
        "kind = \"blank\"/sample = \"A\"/z = 2 | line 4, column 1: found z with kind \"blank\"",
        "kind = \"control sample\"/sample = \"A\"/reference = \"-1 mg/L\""
            + " | line 4, column 1: found '-1 mg/L'",
        "kind = \"control sample\"/sample = \"A\"/reference = { Cd = \"3 mL\" }"
            + " | line 4, column 15: found '3 mL' for Cd",
        "kind = \"control sample\"/sample = \"A\"/reference = \"1 mg/L\"/recovery = [1.2, 0.8]"
            + " | line 5, column 1: found this for recovery",
        "kind = \"control sample\"/sample = \"A\"/reference = \"1 mg/L\"/z = 2"
            + " | line 1, column 1: found no sd",
        "kind = \"control sample\"/sample = \"A\"/reference = \"1 mg/L\"/coverage = 0"
            + " | line 5, column 1: found 0.0 for coverage",
        "kind = \"control sample\"/sample = \"A\"/refernce = \"1 mg/L\""
            + " | line 4, column 1: found unknown key 'refernce'",
      })
  void aFaultIsSaidWithItsPlace(String control, String expected) throws IOException {
    List<String> faults =
        faults("[[control]]\n" + control.replace("/", "\n").replace("mg\nL", "mg/L") + "\n");
    assertThat(faults).as(faults.toString()).hasSize(1);
    assertThat(faults.get(0)).startsWith("controls.toml " + expected);
  }
}
