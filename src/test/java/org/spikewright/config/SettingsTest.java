package org.spikewright.config;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.time.LocalTime;
import java.time.ZoneId;
import java.util.List;
import java.util.stream.Collectors;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.Criterion;
import org.spikewright.judgement.Flag.LimitSource;
import org.spikewright.judgement.Limit;

class SettingsTest {
  private static final String LEAST =
      """
      [folders]
      watch = "in"
      mappings = "mappings"
      summaries = "out"
      ledger = "state/ledger.db"
      [laboratory]
      zone = "Europe/Lisbon"
      """;

  private static Settings good(String text) {
    Loaded<Settings> loaded = Settings.read(Path.of("/srv/lab/conf/s.toml"), text);
    assertThat(loaded).isInstanceOf(Loaded.Good.class);
    return ((Loaded.Good<Settings>) loaded).value();
  }

  private static List<ConfigFault> faults(String text) {
    Loaded<Settings> loaded = Settings.read(Path.of("/srv/lab/conf/s.toml"), text);
    assertThat(loaded).isInstanceOf(Loaded.Faulty.class);
    return ((Loaded.Faulty<Settings>) loaded).faults();
  }

  @Test
  void whatIsNotSaidHasItsDefault() {
    Settings settings = good(LEAST);
    assertThat(settings.watch()).isEqualTo(Path.of("/srv/lab/conf/in"));
    assertThat(settings.ledger()).isEqualTo(Path.of("/srv/lab/conf/state/ledger.db"));
    assertThat(settings.leave()).isFalse();
    assertThat(settings.laboratory()).isEmpty();
    assertThat(settings.calendar().zone()).isEqualTo(ZoneId.of("Europe/Lisbon"));
    assertThat(settings.calendar().cutOff()).isEqualTo(LocalTime.of(6, 0));
    assertThat(settings.nightly()).isEqualTo(LocalTime.of(6, 30));
    assertThat(settings.lookEvery()).isEqualTo(Duration.ofSeconds(5));
    assertThat(settings.settle()).isEqualTo(Duration.ofSeconds(10));
    assertThat(settings.longestPause()).isEqualTo(Duration.ofHours(4));
    assertThat(settings.waitForFlasks()).isEqualTo(Duration.ofHours(12));
    assertThat(settings.criteria()).isEqualTo(CriteriaBook.defaults());
    assertThat(settings.text()).isEqualTo(LEAST);
    assertThat(settings.sha256()).matches("[0-9a-f]{64}");
  }

  /**
   * The shipped file shows each default in a comment: with the comments taken off nothing changes.
   */
  @Test
  void theShippedFileNamesEveryKeyAndItsDefault() throws IOException {
    Path file = Path.of("conf", "spikewright.toml");
    String text = Files.readString(file);
    String uncommented =
        text.lines()
            .map(
                line ->
                    line.matches("#[a-z_]+ *=.*") && !line.contains("validation report")
                        ? line.substring(1)
                        : line)
            .collect(Collectors.joining("\n"));
    Settings shipped = ((Loaded.Good<Settings>) Settings.load(file)).value();
    Settings spelt = ((Loaded.Good<Settings>) Settings.read(file, uncommented)).value();
    SettingsFile.KEYS.forEach(
        (section, keys) ->
            keys.forEach(
                key ->
                    assertThat(uncommented)
                        .containsPattern(
                            section.isEmpty()
                                ? "(?m)^\\[" + key + "\\]"
                                : "(?m)^(#\\[" + section + "\\.)?" + key + "( *=|\\.)")));
    assertThat(spelt.nightly()).isEqualTo(shipped.nightly());
    assertThat(spelt.calendar()).isEqualTo(shipped.calendar());
    assertThat(spelt.lookEvery()).isEqualTo(shipped.lookEvery());
    assertThat(spelt.settle()).isEqualTo(shipped.settle());
    assertThat(spelt.longestPause()).isEqualTo(shipped.longestPause());
    assertThat(spelt.waitForFlasks()).isEqualTo(shipped.waitForFlasks());
    assertThat(spelt.leave()).isEqualTo(shipped.leave());
    assertThat(values(spelt.criteria())).isEqualTo(values(shipped.criteria()));
    assertThat(spelt.criteria().repeat()).isEqualTo(shipped.criteria().repeat());
  }

  private static List<Double> values(CriteriaBook criteria) {
    return criteria.general().limits().values().stream().map(Limit::value).toList();
  }

  @Test
  void aLimitIsANumberOrATable() {
    Settings settings =
        good(
            LEAST
                + """
                  [criteria]
                  false_alarms = 0.01
                  least_correlation = { on = false }
                  bend_to_review = { limit = 0.03, source = "published", reason = "our method" }
                  """);
    assertThat(settings.criteria().general().of(Criterion.FALSE_ALARMS))
        .isEqualTo(new Limit(0.01, true, LimitSource.LABORATORY, "set in the configuration"));
    assertThat(settings.criteria().general().of(Criterion.LEAST_CORRELATION).on()).isFalse();
    assertThat(settings.criteria().general().of(Criterion.LEAST_CORRELATION).value())
        .isEqualTo(0.995);
    assertThat(settings.criteria().general().of(Criterion.LEAST_CORRELATION).source())
        .isEqualTo(LimitSource.PUBLISHED);
    assertThat(settings.criteria().general().of(Criterion.BEND_TO_REVIEW))
        .isEqualTo(new Limit(0.03, true, LimitSource.PUBLISHED, "our method"));
  }

  @ParameterizedTest(name = "{0} is refused at line {1}")
  @CsvSource(
      delimiter = '|',
      value = {
        "[criteria]~false_alarms = 0.9 | 9 | at most 0.5",
        "[repeat]~flasks = 3 | 9 | from 4",
        "[repeat]~flasks = 20~most_flasks = 12 | 10 | as many as flasks",
        "[repeat]~top_addition = 4 | 9 | from 1.5 to 3.0",
        "[repeat]~largest_share_of_volume = nan | 9 | from 0.001",
        "[repeat]~pipettes = ['10 µL'] | 9 | such as",
        "[criteria]~false_alarms = nan | 9 | above 0",
        "[criteria]~bend_to_review = 0.5 | 9 | at most as large as bend_to_repeat",
        "[criteria]~bend_to_review = { limt = 0.5 } | 9 | limit",
        "[criteria]~bend_to_review = { source = 'me' } | 9 | laboratory",
        "[schedule]~settle = '10' | 9 | duration",
        "[schedule]~settle = '10 S' | 9 | duration",
        "[schedule]~look_every = '0 s' | 9 | at least 10 ms",
        "[schedule]~nightly = '25:00' | 9 | 06:30",
        "[schedule]~nightly = 630 | 9 | 06:30",
        "[series]~longest_pause = '-4 h' | 9 | duration"
      })
  void refusesWhatCannotBe(String lines, int line, String expected) {
    List<ConfigFault> faults = faults(LEAST + "\n" + lines.replace("~", "\n") + "\n");
    assertThat(faults)
        .anySatisfy(
            fault -> {
              assertThat(fault.line()).isIn(line, line + 1);
              assertThat(fault.expected()).contains(expected);
            });
  }

  @ParameterizedTest(name = "{0} = {1} inside the watched folder")
  @CsvSource({"summaries,in/out", "summaries,in", "ledger,./in/ledger.db", "mappings,x/../in/m"})
  void foldersInsideTheWatchedOneAreRefused(String key, String path) {
    String text = LEAST.replaceFirst("(?m)^" + key + " = .*$", key + " = \"" + path + "\"");
    assertThat(faults(text))
        .singleElement()
        .satisfies(fault -> assertThat(fault.found()).contains(key, "inside the watched folder"));
  }

  @Test
  void aNeighbourWhoseNameBeginsAlikeIsNotInside() {
    assertThat(good(LEAST.replace("\"out\"", "\"inside/out\"")).summaries())
        .isEqualTo(Path.of("/srv/lab/conf/inside/out"));
  }

  @Test
  void aZoneThatNobodyKnowsIsRefusedWithTheNearest() {
    assertThat(faults(LEAST.replace("Europe/Lisbon", "Europe/Lisbonn")))
        .singleElement()
        .satisfies(fault -> assertThat(fault.nearestKey()).contains("Europe/Lisbon"));
  }

  @Test
  void aTimeMayBeATextOrATimeOfToml() {
    String text = LEAST + "day_begins = 05:30:00\n[schedule]\nnightly = \"05:45\"\n";
    assertThat(good(text).calendar().cutOff()).isEqualTo(LocalTime.of(5, 30));
    assertThat(good(text).nightly()).isEqualTo(LocalTime.of(5, 45));
  }

  @Test
  void aFileThatIsNoTextOrNotThereIsAFault(@TempDir Path folder) throws IOException {
    Path binary = Files.write(folder.resolve("b.toml"), new byte[] {(byte) 0xff, (byte) 0xfe, 0});
    assertThat(((Loaded.Faulty<Settings>) Settings.load(binary)).faults())
        .singleElement()
        .satisfies(fault -> assertThat(fault.found()).contains("UTF-8"));
    assertThat(((Loaded.Faulty<Settings>) Settings.load(folder.resolve("none.toml"))).faults())
        .singleElement()
        .satisfies(fault -> assertThat(fault.found()).isEqualTo("no such file"));
    Path marked = Files.writeString(folder.resolve("m.toml"), "\ufeff" + LEAST);
    assertThat(Settings.load(marked)).isInstanceOf(Loaded.Good.class);
  }
}
