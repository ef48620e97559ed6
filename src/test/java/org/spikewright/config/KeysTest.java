package org.spikewright.config;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.file.Path;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Random;
import java.util.TreeSet;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;

/** Every key of mappings and configuration, spoilt in each way a person can spoil it. */
class KeysTest {

  /** What reads a file: a mapping or the configuration. */
  private enum Reader {
    MAPPING(MappingKeys.KEYS) {
      @Override
      List<ConfigFault> faults(String text) {
        return KeysTest.faults(MappingFile.read(Path.of("m.toml"), text, ZoneId.of("UTC")));
      }
    },
    SETTINGS(SettingsFile.KEYS) {
      @Override
      List<ConfigFault> faults(String text) {
        return KeysTest.faults(Settings.read(Path.of("s.toml"), text));
      }
    };

    final Map<String, List<String>> keys;

    Reader(Map<String, List<String>> keys) {
      this.keys = keys;
    }

    abstract List<ConfigFault> faults(String text);
  }

  private static List<ConfigFault> faults(Loaded<?> loaded) {
    return loaded instanceof Loaded.Faulty<?> faulty ? faulty.faults() : List.of();
  }

  static Stream<Arguments> everyKey() {
    return Stream.of(Reader.values())
        .flatMap(
            reader ->
                reader.keys.entrySet().stream()
                    .flatMap(
                        section ->
                            section.getValue().stream()
                                .map(key -> Arguments.of(reader, section.getKey(), key))));
  }

  /** A key alone in its section; keys of the file itself stand first. */
  private static String alone(String section, String line) {
    return section.isEmpty() ? line + "\n" : "[" + section + "]\n" + line + "\n";
  }

  private static int line(String section) {
    return section.isEmpty() ? 1 : 2;
  }

  @ParameterizedTest(name = "{0} [{1}] {2} misspelt")
  @MethodSource("everyKey")
  void aMisspeltKeyIsRefusedWithItsPlaceAndTheNearestKey(
      Reader reader, String section, String key) {
    String misspelt =
        key.charAt(0) + key.substring(1, key.length() - 1) + "x" + key.charAt(key.length() - 1);
    List<ConfigFault> faults = reader.faults(alone(section, misspelt + " = 1"));
    assertThat(faults)
        .anySatisfy(
            fault -> {
              assertThat(fault.line()).isEqualTo(line(section));
              assertThat(fault.column()).isEqualTo(1);
              assertThat(fault.found()).contains("unknown key '" + misspelt + "'");
              assertThat(fault.expected()).contains(key);
              assertThat(fault.nearestKey()).contains(key);
            });
    String where = section.isEmpty() ? "" : " in [" + section + "]";
    assertThat(faults).noneMatch(fault -> fault.found().equals("no " + key + where));
  }

  /** A date is the right type nowhere. */
  @ParameterizedTest(name = "{0} [{1}] {2} of the wrong type")
  @MethodSource("everyKey")
  void aKeyOfTheWrongTypeIsRefusedWithItsPlace(Reader reader, String section, String key) {
    List<ConfigFault> faults = reader.faults(alone(section, "  " + key + " = 2025-01-15"));
    assertThat(faults)
        .anySatisfy(
            fault -> {
              assertThat(fault.line()).isEqualTo(line(section));
              assertThat(fault.column()).isEqualTo(3);
              assertThat(fault.found()).contains("2025-01-15", key);
              assertThat(fault.expected()).isNotBlank();
            });
  }

  @ParameterizedTest(name = "{0} [{1}] {2} twice")
  @MethodSource("everyKey")
  void aKeyThatStandsTwiceIsRefusedWithItsPlace(Reader reader, String section, String key) {
    List<ConfigFault> faults =
        reader.faults(alone(section, key + " = 2025-01-15\n" + key + " = 2025-01-15"));
    assertThat(faults)
        .anySatisfy(
            fault -> {
              assertThat(fault.line()).isEqualTo(line(section) + 1);
              assertThat(fault.found())
                  .contains(key, "previously defined at line " + line(section));
              assertThat(fault.expected()).contains("once");
            });
  }

  @Test
  void aMissingKeyIsNamedWithWhatItIsFor() {
    assertThat(Reader.MAPPING.faults(""))
        .extracting(ConfigFault::found)
        .contains(
            "no name",
            "no files",
            "no design in [fixed]",
            "no unit in [result]",
            "no sample in [columns], [layout], [label], [block], [sheet], [file] or [fixed]",
            "no analyte in [columns], [layout], [label], [block], [sheet], [file] or [fixed]",
            "no signal in [columns], [layout], [label], [block], [sheet], [file]");
    assertThat(Reader.SETTINGS.faults(""))
        .extracting(ConfigFault::found)
        .containsExactlyInAnyOrder(
            "no watch in [folders]",
            "no mappings in [folders]",
            "no summaries in [folders]",
            "no ledger in [folders]",
            "no zone in [laboratory]");
  }

  /** Each line of a good mapping taken out in turn: it stays good, or the fault names the key. */
  @Test
  void everyLineTakenOutIsEitherNotMissedOrMissedByName() {
    String[] lines = GOOD.split("\n");
    int missed = 0;
    for (int i = 0; i < lines.length; i++) {
      if (lines[i].startsWith("[") || lines[i].isBlank()) {
        continue;
      }
      List<String> rest = new ArrayList<>(List.of(lines));
      rest.remove(i);
      List<ConfigFault> faults = Reader.MAPPING.faults(String.join("\n", rest));
      String key = lines[i].substring(0, lines[i].indexOf('=')).strip();
      if (!faults.isEmpty()) {
        missed++;
        assertThat(faults).as(lines[i]).anyMatch(fault -> fault.toString().contains(key));
      }
    }
    assertThat(missed).isEqualTo(11);
  }

  private static final String GOOD =
      """
      name = "good"
      instrument = "one"
      files = "*.csv"
      [columns]
      sample = "ID"
      analyte = "El"
      signal = "Abs"
      replicate = "Rep"
      addition_volume = { header = "Added", unit = "mL" }
      [fixed]
      design = "made up"
      aliquot_volume = "10 mL"
      final_volume = "50 mL"
      stock = "10 mg/L"
      [result]
      unit = "mg/L"
      """;

  @Test
  void theGoodMappingIsGood() {
    assertThat(Reader.MAPPING.faults(GOOD)).isEmpty();
  }

  /** Several lines spoilt at once: each is reported, at its own line, in the order of the file. */
  @Test
  void allFaultsAreReportedAtOnce() {
    long seed = 5;
    Random random = new Random(seed);
    for (int n = 0; n < 60; n++) {
      int round = n;
      String[] lines = GOOD.split("\n");
      Map<Integer, String> spoilt = new LinkedHashMap<>();
      for (int i = 0; i < lines.length; i++) {
        if (lines[i].contains(" = ") && random.nextInt(3) == 0) {
          String key = lines[i].substring(0, lines[i].indexOf(' '));
          boolean misspell = random.nextBoolean();
          lines[i] = misspell ? key + "z = 1" : key + " = 2025-01-15";
          spoilt.put(i + 1, misspell ? "unknown key '" + key + "z'" : "2025-01-15 for " + key);
        }
      }
      List<ConfigFault> faults = Reader.MAPPING.faults(String.join("\n", lines));
      spoilt.forEach(
          (line, found) ->
              assertThat(faults)
                  .as("seed %s round %s line %s", seed, round, line)
                  .anyMatch(fault -> fault.line() == line && fault.found().contains(found)));
      assertThat(faults)
          .isSortedAccordingTo(
              (a, b) -> a.line() == b.line() ? a.column() - b.column() : a.line() - b.line());
      assertThat(new TreeSet<>(faults.stream().map(ConfigFault::toString).toList()))
          .as("no fault is said twice")
          .hasSize(faults.size());
    }
  }

  @Test
  void aFaultReadsLikeASentence() {
    String text = GOOD.replace("replicate = ", "replicat = ");
    assertThat(Reader.MAPPING.faults(text))
        .singleElement()
        .asString()
        .startsWith(
            "m.toml line 8, column 1: found unknown key 'replicat' in [columns]; expected one of ")
        .endsWith("; did you mean replicate?");
  }

  /** Replacement in the good mapping, then what the fault must say. */
  static Stream<Arguments> contradictions() {
    return Stream.of(
        Arguments.of("stock = \"10 mg/L\"", "stock = \"10 mmol/L\"", 14, "molar mass"),
        Arguments.of("unit = \"mg/L\"\n", "unit = \"mg/kg\"\n", 14, "test_portion"),
        Arguments.of("unit = \"mg/L\"\n", "unit = \"ppm\"\n", 16, "[units]"),
        Arguments.of("\"made up\"", "\"one vessel\"", 10, "additions"),
        Arguments.of("\"made up\"", "\"one vessel\"\nadditions = \"each\"", 12, "flask"),
        Arguments.of(
            "\"made up\"", "\"one vessel\"\nadditions = \"cumulative\"", 4, "start_volume"),
        Arguments.of("\"made up\"", "\"stated\"", 4, "addition"),
        Arguments.of("\"made up\"", "\"made up\"\nadditions = \"each\"", 12, "only there"),
        Arguments.of("\"made up\"", "\"made up\"\nstart_volume = \"1 mL\"", 12, "one vessel"),
        Arguments.of("\"made up\"", "\"made-up\"", 11, "\"made up\""),
        Arguments.of("\"made up\"", "\"made up\"\nflasks = 1", 12, "from 2"),
        Arguments.of("\"made up\"", "\"made up\"\ntest_portion = \"1 g\"", 12, "digest_volume"),
        Arguments.of("\"made up\"", "\"made up\"\ndry_mass = \"85 %\"", 12, "test_portion"),
        Arguments.of(
            "\"made up\"", "\"made up\"\nmethod_blank = \"1 mg/kg\"", 12, "mass concentration"),
        Arguments.of("\"made up\"", "\"made up\"\ndilution = \"1:10\"", 12, "ratio"),
        Arguments.of("\"made up\"", "\"made up\"\ndilution = 0.5", 12, "1 or more"),
        Arguments.of("\"10 mL\"", "\"10 g\"", 12, "a volume"),
        Arguments.of("\"10 mL\"", "\"10\"", 12, "unit"),
        Arguments.of("\"10 mL\"", "\"10,0 mL\"", 12, "a volume"),
        Arguments.of("\"10 mL\"", "{ Cd = \"10 mL\", Pb = \"x\" }", 12, "a volume"),
        Arguments.of("\"Added\", unit = \"mL\"", "\"Added\", unit = \"mg\"", 9, "a volume"),
        Arguments.of("\"Added\", unit = \"mL\"", "\"Added\", unti = \"mL\"", 9, "unit"),
        Arguments.of("\"Added\", unit = \"mL\"", "\"Added\", format = \"x\"", 9, "header, unit"),
        Arguments.of("files = \"*.csv\"", "files = \"/abs/*.csv\"", 3, "inside the watched folder"),
        Arguments.of("files = \"*.csv\"", "files = 'a\\*.csv'", 3, "/"),
        Arguments.of("files = \"*.csv\"", "files = []", 3, "watched folder"),
        Arguments.of(
            "[columns]", "[table]\nencoding = \"latin-nine\"\n[columns]", 5, "ISO-8859-15"),
        Arguments.of(
            "[columns]", "[table]\ndecimal = \",\"\nthousands = \",\"\n[columns]", 6, "mark"),
        Arguments.of("[columns]", "[table]\nseparator = \";;\"\n[columns]", 5, "one character"),
        Arguments.of(
            "[columns]", "[label]\npattern = '('\ncolumn = \"x\"\n[columns]", 5, "regular"),
        Arguments.of(
            "[columns]",
            "[label]\npattern = '(?<id>.*)'\ncolumn = \"x\"\nflask = \"ib\"\n[columns]",
            7,
            "\"id\""),
        Arguments.of("[columns]", "[table]\nheader_rows = 3\n[columns]", 5, "1 or 2"),
        Arguments.of("[columns]", "[table]\ntables = \"al\"\n[columns]", 5, "\"all\""),
        Arguments.of(
            "[columns]", "[table]\ntables = \"all\"\nheader = 3\n[columns]", 5, "a cell of the"),
        Arguments.of(
            "[columns]", "[table]\nheader_rows = 2\ntables = \"all\"\n[columns]", 6, "footer"),
        Arguments.of("[columns]", "[table]\ncarry_down = \"sampel\"\n[columns]", 5, "\"sample\""),
        Arguments.of("[columns]", "[table]\ncarry_down = \"signal\"\n[columns]", 5, "\"sample\""),
        Arguments.of("[columns]", "[table]\nsheet = 0\n[columns]", 5, "number from 1"),
        Arguments.of("[columns]", "[layout]\nkind = \"wide\"\n[columns]", 5, "wide by analyte"),
        Arguments.of(
            "[columns]", "[layout]\nkind = \"long\"\ncolumns = \"A\"\n[columns]", 6, "kind"),
        Arguments.of(
            "[columns]",
            "[layout]\nkind = \"wide by replicate\"\n[columns]",
            5,
            "listed in columns"),
        Arguments.of(
            "[columns]",
            "[layout]\nkind = \"wide by replicate\"\ncolumns = \"A\"\n[columns]",
            10,
            "signal in [columns]"),
        Arguments.of(
            "[columns]",
            "[layout]\nkind = \"wide by replicate\"\ncolumns = \"A\"\n[columns]",
            11,
            "the headers under [layout]"),
        Arguments.of(
            "[columns]",
            "[layout]\nkind = \"wide by analyte\"\npattern = '(?<replicate>.)'\n[columns]",
            6,
            "(?<analyte>"),
        Arguments.of(
            "[columns]",
            "[layout]\nkind = \"wide by analyte\"\npattern = '(?<analyte>.)'\n"
                + "beside = { line = \"{analite} nm\" }\n[columns]",
            7,
            "did you mean analyte"),
        Arguments.of(
            "[columns]",
            "[layout]\nkind = \"wide by analyte\"\npattern = '(?<analyte>.)'\n"
                + "beside = { line = \"nm\" }\n[columns]",
            7,
            "or the column in [columns]"),
        Arguments.of("\"Rep\"", "\"Rep\"\nsignal_sd = \"sd\"", 9, "readings beside it"),
        Arguments.of("\"made up\"", "\"made up\"\nreadings = 2.5", 12, "one whole number"),
        Arguments.of("[columns]", "[block]\npattern = '('\n[columns]", 5, "regular"),
        Arguments.of("[columns]", "[sheet]\nanalyte = \"a\"\n[columns]", 4, "no pattern"),
        Arguments.of("[columns]", "[roles]\ncolumn = \"x\"\n[columns]", 4, "at least one role"),
        Arguments.of(
            "[result]",
            "[method]\nreporting_limit = \"1 mg/kg\"\n[result]",
            16,
            "mass concentration"),
        Arguments.of(
            "replicate = \"Rep\"",
            "measured_at = { header = \"T\", format = \"dd.MM.yyyy\" }",
            8,
            "time of day"),
        Arguments.of(
            "replicate = \"Rep\"",
            "measured_at = { header = \"T\", zone = \"Europe/Lisbone\" }",
            8,
            "time zone"));
  }

  @ParameterizedTest(name = "{1}")
  @MethodSource("contradictions")
  void whatCannotBeIsRefusedAtItsLine(String from, String to, int line, String expected) {
    assertThat(GOOD).contains(from);
    List<ConfigFault> faults = Reader.MAPPING.faults(GOOD.replace(from, to));
    assertThat(faults)
        .anySatisfy(
            fault -> {
              assertThat(fault.line()).as(faults.toString()).isEqualTo(line);
              assertThat(fault.toString()).contains(expected);
            });
  }

  @Test
  void aRoleForAllRowsAndAColumnOfRolesContradict() {
    String text =
        GOOD.replace(
            "[result]", "role = \"control\"\n[roles]\ncolumn = \"x\"\nsample = \"*\"\n[result]");
    assertThat(Reader.MAPPING.faults(text))
        .singleElement()
        .satisfies(fault -> assertThat(fault.found()).isEqualTo("role in [fixed] beside [roles]"));
  }

  @Test
  void readingsKnownByTheirMeanAloneCannotBePointsOfTheLine() {
    String text =
        GOOD.replace("\"Rep\"", "\"Rep\"\nreadings = \"n\"\nsignal_sd = \"sd\"")
            .replace("[result]", "[method]\nunit = \"reading\"\n[result]");
    assertThat(Reader.MAPPING.faults(text))
        .singleElement()
        .satisfies(fault -> assertThat(fault.expected()).startsWith("unit = \"flask\""));
  }

  @Test
  void brokenTomlIsRefusedWithItsPlaceAndNothingIsCalledMissing() {
    List<ConfigFault> faults = Reader.MAPPING.faults("name = \"a\nfles = 3\n");
    assertThat(faults).extracting(ConfigFault::line).containsExactly(1, 2);
    assertThat(faults.get(0).expected()).contains("TOML");
    assertThat(faults.get(1).nearestKey()).contains("files");
  }
}
