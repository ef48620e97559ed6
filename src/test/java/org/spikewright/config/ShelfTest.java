package org.spikewright.config;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.MethodSource;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Accuracies.Accuracy;
import org.spikewright.reading.Shelf;
import org.spikewright.reading.Stock;
import org.spikewright.reading.Tool;

/** The tables of named stocks and glassware. */
class ShelfTest {
  private static final String CONF =
      """
      [folders]
      watch = "in"
      mappings = "mappings"
      summaries = "out"
      ledger = "state/ledger.db"
      [laboratory]
      zone = "Europe/Lisbon"
      """;

  private static final String STOCK =
      """
      ["Pb 10"]
      value = "10 mg/L ± 0.05 mg/L"
      means = "expanded"
      k = 2
      certificate = "lot 7"
      expires = 2026-06-30
      """;

  private static final String TOOL =
      """
      [P200]
      kind = "piston pipette"
      range = "20 µL to 200 µL"
      systematic = "1.6 µL"
      random = "0.3 %"
      means = "triangular"
      standard = "our certificate"
      """;

  private static Loaded<Settings> read(String stocks, String glassware) {
    return Settings.read(
        Path.of("/srv/lab/conf/s.toml"),
        CONF + "####: stocks\n" + stocks + "####: glassware\n" + glassware);
  }

  private static Settings good(Loaded<Settings> loaded) {
    assertThat(loaded).as(loaded.toString()).isInstanceOf(Loaded.Good.class);
    return ((Loaded.Good<Settings>) loaded).value();
  }

  private static List<ConfigFault> faults(Loaded<Settings> loaded) {
    return loaded instanceof Loaded.Faulty<Settings> faulty ? faulty.faults() : List.of();
  }

  @Test
  void aStockHasWhatItsCertificateSays() {
    Stock stock = good(read(STOCK, "")).shelf().stocks().get("Pb 10");
    assertThat(stock.of("any").orElseThrow()).hasToString("10 mg/L ± 0.05 mg/L");
    assertThat(stock.means().words()).isEqualTo("expanded, k = 2");
    assertThat(stock.expires()).contains(LocalDate.of(2026, 6, 30));
    assertThat(stock.accuracy("any").orElseThrow().systematic()).isCloseTo(0.0025, within(1e-15));
    assertThat(stock.certificate()).isEqualTo("lot 7");
    String each =
        STOCK.replace("\"10 mg/L ± 0.05 mg/L\"", "{ Cd = \"1 mg/L ± 0.1\", Zn = \"5 M\" }");
    Stock mixed = good(read(each, "")).shelf().stocks().get("Pb 10");
    assertThat(mixed.of("Cd").orElseThrow()).hasToString("1 mg/L ± 0.1 mg/L");
    assertThat(mixed.of("Zn").orElseThrow()).hasToString("5 M");
    assertThat(mixed.of("Pb")).isEmpty();
  }

  @Test
  void aSharePointsToTheVolumeMeasured() {
    Tool tool = good(read("", TOOL)).shelf().glassware().get("P200");
    assertThat(tool.lowest()).hasToString("20 µL");
    assertThat(tool.highest()).hasToString("200 µL");
    for (double volume : new double[] {20, 55, 200}) {
      Accuracy accuracy = tool.accuracy(new Quantity(volume, Unit.of("µL"))).orElseThrow();
      assertThat(accuracy.random()).isCloseTo(0.003, within(1e-12));
      assertThat(accuracy.systematic()).isCloseTo(1.6 / Math.sqrt(6) / volume, within(1e-12));
    }
  }

  @Test
  void pointsAreReadInTheUnitOfTheFirst() {
    String points =
        """
        [P]
        kind = "piston pipette"
        [[P.points]]
        at = "100 µL"
        systematic = "1 %"
        [[P.points]]
        at = "1 mL"
        systematic = "8 µL"
        random = "3 µL"
        """;
    Tool tool = good(read("", points)).shelf().glassware().get("P");
    assertThat(tool.points())
        .containsExactly(new Tool.Point(100, 1, 0), new Tool.Point(1000, 8, 3));
  }

  /** A replacement in the good stock, the fault's line and column, and what it says. */
  @ParameterizedTest(name = "stock with {1}")
  @CsvSource(
      delimiter = '|',
      value = {
        "value = | valeu = | 2,1 | did you mean value?",
        "value = \"10 mg/L ± 0.05 mg/L\" | value = 10 | 2,1 | a concentration above 0",
        "10 mg/L ± 0.05 mg/L | 10 | 2,1 | unit",
        "10 mg/L ± 0.05 mg/L | 10 mL | 2,1 | a mass concentration",
        "10 mg/L ± 0.05 mg/L | 0 mg/L | 2,1 | above 0",
        "10 mg/L ± 0.05 mg/L | 10 mg/L ± x | 2,1 | a tolerance after ±",
        "10 mg/L ± 0.05 mg/L | 10 mg/L | 3,1 | means without a number after ±",
        "\"10 mg/L ± 0.05 mg/L\" | { Cd = \"x\" } | 2,11 | a mass concentration",
        "\"10 mg/L ± 0.05 mg/L\" | {} | 2,1 | a key for each analyte",
        "\"expanded\" | \"expandet\" | 3,1 | did you mean expanded?",
        "\"expanded\" | \"standard\" | 4,1 | k without means",
        "k = 2 | k = 0 | 4,1 | above 0",
        "k = 2 | k = \"2\" | 4,1 | coverage factor",
        "k = 2 | # | 1,1 | coverage factor",
        "\"lot 7\" | 7 | 5,1 | the certificate in words",
        "2026-06-30 | \"30.6.2026\" | 6,1 | such as 2026-06-30",
        "2026-06-30 | 2026 | 6,1 | such as 2026-06-30",
        "Pb 10 | 10 mg/L | 1,1 | reads as a concentration",
        "Pb 10 | 10 | 1,1 | reads as a concentration",
        "Pb 10 | 10 ppm | 1,1 | reads as a concentration",
        "Pb 10 | 'Pb, 10' | 1,1 | without commas",
        "Pb 10 | 1 to 2 | 1,1 | without commas"
      })
  void aFaultyStockIsRefusedAtItsPlace(String from, String to, String at, String said) {
    assertThat(STOCK).contains(from);
    at(read(STOCK.replace(from, to.replace("'", "")), ""), "stocks.toml", at, said);
  }

  @ParameterizedTest(name = "glassware with {1}")
  @CsvSource(
      delimiter = '|',
      value = {
        "kind = \"piston pipette\" | # | 1,1 | no kind",
        "\"piston pipette\" | \"piston pipete\" | 2,1 | did you mean piston pipette?",
        "\"piston pipette\" | \"flask\" | 3,1 | volume: it has one",
        "\"piston pipette\" | \"balance\" | 3,1 | two sizes",
        "range = \"20 µL to 200 µL\" | # | 1,1 | one of volume, range, points",
        "range = \"20 µL to 200 µL\" | volume = \"2 µL\"~range = \"1 µL to 2 µL\" | 4,1 | range beside volume",
        "20 µL to 200 µL | 20 µL - 200 µL | 3,1 | two sizes",
        "20 µL to 200 µL | 20 µL to 200 mg | 3,1 | two sizes",
        "20 µL to 200 µL | 0 µL to 200 µL | 3,1 | two sizes",
        "20 µL to 200 µL | 200 µL to 20 µL | 3,1 | sizes that do not rise",
        "20 µL to 200 µL | nan µL to 200 µL | 3,1 | two sizes",
        "systematic = \"1.6 µL\" | # | 1,1 | no systematic",
        "\"1.6 µL\" | \"1.6\" | 4,1 | an error such as",
        "\"1.6 µL\" | \"-1 µL\" | 4,1 | an error such as",
        "\"1.6 µL\" | 1.6 | 4,1 | an error such as",
        "\"1.6 µL\" | \"1.6 µL ± 1 µL\" | 4,1 | an error such as",
        "\"0.3 %\" | \"300 %\" | 5,1 | an error such as",
        "\"triangular\" | \"expanded\" | 1,1 | no k",
        "\"our certificate\" | 3 | 7,1 | where the numbers come from",
        "standard = | standart = | 7,1 | did you mean standard?",
        "range = \"20 µL to 200 µL\" | points = [{ at = \"20 µL\", systematic = \"1 µL\" }] | 3,1 | fewer than two",
        "range = \"20 µL to 200 µL\" | points = [{ att = \"20 µL\" }] | 3,13 | did you mean at?",
        "range = \"20 µL to 200 µL\" | points = 3 | 3,1 | a table",
        "range = \"20 µL to 200 µL\" | points = [{ at = \"2 µL\", systematic = \"1 µL\" }, { at = \"1 µL\", systematic = \"1 µL\" }] | 3,1 | do not rise",
        "range = \"20 µL to 200 µL\" | points = [{ at = \"2 µL\", systematic = \"1 µL\" }, { at = \"3 µL\" }] | 3,49 | no systematic",
        "range = \"20 µL to 200 µL\" | points = [{ at = \"2 µL\", systematic = \"1 µL\" }, { at = \"3 µL\", systematic = \"1 µL\" }] | 4,1 | systematic beside points",
        "range = \"20 µL to 200 µL\" | volume = \"200 µL ± 1 µL\" | 4,1 | systematic beside ±",
        "range = \"20 µL to 200 µL\" | volume = \"200 mg\" | 3,1 | a volume above 0"
      })
  void aFaultyToolIsRefusedAtItsPlace(String from, String to, String at, String said) {
    assertThat(TOOL).contains(from);
    at(read("", TOOL.replace(from, to.replace('~', '\n'))), "glassware.toml", at, said);
  }

  private static void at(Loaded<Settings> loaded, String file, String at, String said) {
    int line = Integer.parseInt(at.split(",")[0]);
    int column = Integer.parseInt(at.split(",")[1]);
    assertThat(faults(loaded))
        .anySatisfy(
            fault -> {
              assertThat(fault.file()).isEqualTo(file);
              assertThat(fault.toString()).contains(said);
              assertThat(List.of(fault.line(), fault.column()))
                  .as(fault.toString())
                  .isEqualTo(List.of(line, column));
            });
    assertThat(faults(loaded)).extracting(ConfigFault::toString).doesNotHaveDuplicates();
  }

  static Stream<Arguments> everyKey() {
    return Stream.of(
            StocksFile.KEYS.stream().map(key -> Arguments.of("stocks", key)),
            GlasswareFile.KEYS.stream().map(key -> Arguments.of("glassware", key)))
        .flatMap(keys -> keys);
  }

  /** A truth value is the right type nowhere. */
  @ParameterizedTest(name = "{0}: {1}")
  @MethodSource("everyKey")
  void everyKeyIsRefusedMisspeltOrOfTheWrongType(String table, String key) {
    boolean stocks = table.equals("stocks");
    String wrong = "[x]\n  " + key + " = true\n";
    at(read(stocks ? wrong : "", stocks ? "" : wrong), table + ".toml", "2,3", key);
    String misspelt = "[x]\n" + key + "x = 1\n";
    at(
        read(stocks ? misspelt : "", stocks ? "" : misspelt),
        table + ".toml",
        "2,1",
        "did you mean " + key + "?");
  }

  @Test
  void aValueWithoutATableIsNoName() {
    at(read("value = 3\n", ""), "stocks.toml", "1,1", "a table");
    at(read("", "value = 3\n"), "glassware.toml", "1,1", "a table");
  }

  @Test
  void faultsOfAllFilesAreToldAtOnce(@TempDir Path folder) throws IOException {
    Path conf = Files.writeString(folder.resolve("s.toml"), CONF + "nmae = \"x\"\n");
    Files.writeString(folder.resolve("stocks.toml"), "[a]\nvalue = 3\nmeans = \"x\"\n");
    Files.writeString(folder.resolve("glassware.toml"), "[b]\nkind = 3\n");
    assertThat(faults(Settings.load(conf)))
        .extracting(fault -> Path.of(fault.file()).getFileName() + ":" + fault.line())
        .containsExactly(
            "s.toml:8", "stocks.toml:2", "stocks.toml:3", "glassware.toml:1", "glassware.toml:2");
  }

  @Test
  void theTablesMayBeAbsentUnlessTheyAreNamed(@TempDir Path folder) throws IOException {
    Path conf = Files.writeString(folder.resolve("s.toml"), CONF);
    Settings alone = good(Settings.load(conf));
    assertThat(alone.shelf()).isEqualTo(Shelf.EMPTY);
    assertThat(alone.text()).isEqualTo(CONF);
    String named = CONF.replace("[laboratory]", "stocks = \"x/mine.toml\"\n[laboratory]");
    Files.writeString(conf, named);
    assertThat(faults(Settings.load(conf)))
        .singleElement()
        .asString()
        .contains("line 6, column 1", "stocks 'x/mine.toml', which is not there");
    Files.createDirectory(folder.resolve("x"));
    Files.writeString(folder.resolve("x/mine.toml"), STOCK);
    assertThat(good(Settings.load(conf)).shelf().stocks()).containsOnlyKeys("Pb 10");
  }

  @Test
  void theStoredTextHoldsAllTablesAndGivesThemBack(@TempDir Path folder) throws IOException {
    Path conf = Files.writeString(folder.resolve("s.toml"), CONF);
    String alone = good(Settings.load(conf)).sha256();
    Files.writeString(folder.resolve("stocks.toml"), STOCK.strip());
    Files.writeString(folder.resolve("glassware.toml"), "\ufeff" + TOOL);
    Settings all = good(Settings.load(conf));
    Settings again = good(Settings.read(Path.of("/elsewhere/s.toml"), all.text()));
    assertThat(again.shelf()).isEqualTo(all.shelf());
    assertThat(again.sha256()).isEqualTo(all.sha256()).isNotEqualTo(alone);
    assertThat(again.text()).isEqualTo(all.text());
    assertThat(all.shelf().glassware()).containsOnlyKeys("P200");
    Files.writeString(folder.resolve("stocks.toml"), STOCK.replace("k = 2", "k = 3"));
    assertThat(good(Settings.load(conf)).sha256()).isNotEqualTo(all.sha256());
    Files.delete(folder.resolve("glassware.toml"));
    Settings stocks = good(Settings.load(conf));
    assertThat(good(Settings.read(conf, stocks.text())).shelf()).isEqualTo(stocks.shelf());
  }

  @Test
  void aLineThatWouldPassForAMarkIsRefused(@TempDir Path folder) throws IOException {
    Path conf = Files.writeString(folder.resolve("s.toml"), CONF + "####: glassware\n");
    Files.writeString(folder.resolve("stocks.toml"), "#\n####: x\n" + STOCK);
    assertThat(faults(Settings.load(conf)))
        .extracting(fault -> Path.of(fault.file()).getFileName() + ":" + fault.line())
        .containsExactly("s.toml:8", "stocks.toml:2");
  }

  @Test
  void theShippedTablesAreInOrder() {
    Shelf shelf = good(Settings.load(Path.of("conf", "spikewright.toml"))).shelf();
    assertThat(shelf.stocks()).containsOnlyKeys("Pb 10", "two metals");
    assertThat(shelf.glassware()).containsKeys("flask 100 A", "pipette 20 A", "P100", "P1000");
    assertThat(shelf.glassware().values())
        .allSatisfy(
            tool -> {
              Accuracy accuracy = tool.accuracy(tool.highest()).orElseThrow();
              assertThat(accuracy.systematic()).isGreaterThan(0).isLessThan(0.02);
              assertThat(tool.standard()).isNotBlank();
            });
  }
}
