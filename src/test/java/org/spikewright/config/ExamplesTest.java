package org.spikewright.config;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.ZoneId;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.spikewright.mapping.Fact;
import org.spikewright.mapping.Mapping;
import org.spikewright.mapping.Places;
import org.spikewright.mapping.Tally;
import org.spikewright.mapping.Trial;
import org.spikewright.reading.MethodFacts;
import org.spikewright.reading.Reading;
import org.spikewright.reading.Role;
import org.spikewright.reading.Signal;
import org.spikewright.reading.Spread;
import org.spikewright.table.Cell;
import org.spikewright.table.Row;
import org.spikewright.table.Source;

/** The mappings that are shipped, each with a few rows of the export it is made for. */
class ExamplesTest {
  private static final Path MAPPINGS = Path.of("mappings");
  private static final ZoneId LISBON = ZoneId.of("Europe/Lisbon");

  private static Mapping mapping(String file) {
    Loaded<Mapping> loaded = MappingFile.load(MAPPINGS.resolve(file), LISBON);
    assertThat(loaded).as(loaded.toString()).isInstanceOf(Loaded.Good.class);
    return ((Loaded.Good<Mapping>) loaded).value();
  }

  @Test
  void allLoad() {
    MappingFolder folder = MappingFolder.load(MAPPINGS, LISBON);
    assertThat(folder.faults()).isEmpty();
    assertThat(folder.good()).hasSize(15);
  }

  @Test
  void theReferenceNamesEveryKey() throws IOException {
    String text = Files.readString(MAPPINGS.resolve("reference-all-keys.toml"));
    MappingKeys.KEYS.forEach(
        (section, keys) -> {
          boolean ofFacts =
              List.of("label", "file", "fixed", "layout", "block", "sheet").contains(section);
          for (String key : keys) {
            if (!ofFacts || Fact.of(key).isEmpty()) {
              assertThat(text).as(section).containsPattern("(?m)^(#: )?\\[?" + key + "( *=|\\])");
            }
          }
        });
    for (String key : MappingKeys.METHOD_IN_FIXED) {
      assertThat(text).containsPattern("(?m)^(#: )?" + key + " *=");
    }
  }

  /** What the reference shows of names in comments, by the tables that are shipped. */
  @ParameterizedTest(name = "{0}")
  @ValueSource(strings = {"stock       = \"two metals\"", "stock       = { Cd = \"two metals\""})
  void theReferenceNamesWhatTheShippedTablesHold(String stock) throws IOException {
    Loaded<Settings> settings = Settings.load(Path.of("conf", "spikewright.toml"));
    String text = Files.readString(MAPPINGS.resolve("reference-all-keys.toml"));
    String named =
        text.replaceFirst("(?m)^stock          = .*$", "")
            .replace("#: " + stock, stock)
            .replace("#: addition_by = \"P100", "addition_by = \"P100")
            .replace("\"100 mL ± 0.10 mL\"", "\"100 mL\"")
            .replace("#: final_volume_by = \"flask 100 A", "final_volume_by = \"flask 100 A");
    assertThat(named).hasSizeLessThan(text.length() - 40);
    Loaded<Mapping> mapping =
        MappingFile.read(
            Path.of("m.toml"), named, LISBON, ((Loaded.Good<Settings>) settings).value().shelf());
    assertThat(mapping).as(mapping.toString()).isInstanceOf(Loaded.Good.class);
    Places places = ((Loaded.Good<Mapping>) mapping).value().places();
    assertThat(places.fixedStocks().of("Cd")).contains("two metals");
    assertThat(places.fixedNames())
        .containsEntry(Fact.ADDITION_BY, "P100, P1000")
        .containsEntry(Fact.FINAL_VOLUME_BY, "flask 100 A");
  }

  @Test
  void theReferenceReadsAnExport() {
    Mapping mapping = mapping("reference-all-keys.toml");
    assertThat(mapping.claims("flame/a.csv")).isTrue();
    assertThat(mapping.claims("Flame/B7/x/a.TXT")).isTrue();
    assertThat(mapping.claims("furnace/a.csv")).isFalse();
    Trial trial =
        Trial.text(
            mapping,
            "flame/B7/run1.txt",
            ";",
            "Flame export;;",
            "Sample label;Element;Peak area;Line;Position;Rep;Date;Time;Run;Spike;Aliquot;Filled to;"
                + "Stock;Dilution;Prep;Remark;Type",
            "W-1;Cd;0,12;228.8;1;1;15.01.2025;18:30:00;R1;;;;;;;;Unk 1",
            "W-1;Cd;1.000,5;228.8;2;1;15.01.2025;18:31:00;R1;50;10;50;5;1 + 9;acid;;Unk 1",
            "W-1;Cd;>9;228.8;3;1;15.01.2025;18:32:00;R1;;;;;1:10;acid;;QC",
            "W-1;Cd;0,1;228.8;3;1;15.01.2025;18:32:00;R1;;;;;;;rinse 1;Unk",
            "STD-1;Cd;0,1;228.8;3;1;15.01.2025;18:32:00;R1;;;;;;;;Std 1",
            "W-1 + 2,5 mL;Pb;0,1;283.3;4;1;15.01.2025;18:33:00;R1;;;;;;;;S");
    assertThat(trial.tally()).isEqualTo(new Tally(6, 4, 0, 2));
    Reading first = trial.readings.get(0);
    assertThat(first.facts().addition().amount()).hasToString("0 µL");
    assertThat(first.facts().aliquot().get()).hasToString("20 mL ± 0.03 mL");
    assertThat(first.measuredAt().get()).hasToString("2025-01-15T18:30:00Z");
    assertThat(first.batch().delimits()).isTrue();
    Reading second = trial.readings.get(1);
    assertThat(second.facts().preparation().dilution()).isEqualTo(10);
    assertThat(second.facts().addition().toString()).contains("50 µL", "5 mg/L");
    assertThat(trial.readings.get(2).facts().role()).isEqualTo(Role.CONTROL);
    Reading lead = trial.readings.get(3);
    assertThat(lead.facts().addition().amount()).hasToString("2.5 mL");
    assertThat(lead.facts().method().reportingLimit()).hasValue(0.002);
  }

  @Test
  void longCsv() {
    Trial trial =
        Trial.text(
            mapping("long-csv.toml"),
            "furnace/night.csv",
            ",",
            "sample,analyte,aliquot_mL,stock_mgL,added_mL,final_mL,replicate,signal,measured_at",
            "S000001,A01,10,8.07,0,50,1,123.4,2025-01-15T18:00:00",
            "S000001,A01,10,8.07,1,50,1,OVER,2025-01-15T18:00:20",
            "S000001,A01,10,8.07,2,50,1,,2025-01-15T18:00:40",
            "S000001,A01,10,8.07,3,50,1,NaN,2025-01-15T18:01:00");
    assertThat(trial.tally()).isEqualTo(new Tally(4, 3, 1, 0));
    assertThat(trial.readings.get(0).replicateMapped()).isTrue();
  }

  @Test
  void longXlsx() {
    Source source = new Source("plasma/a.xlsx", Optional.of("Readings"));
    Cell time = new Cell.Moment(java.time.LocalDateTime.parse("2025-01-15T18:30"), "45672.77");
    List<Cell> header =
        cells(
            "Sample name",
            "Type",
            "Element",
            "Wavelength (nm)",
            "Tube",
            "Intensity",
            "Acquired",
            "Spike (µL)",
            "Dilution");
    Trial trial =
        Trial.rows(
            mapping("long-xlsx.toml"),
            "plasma/a.xlsx",
            List.of(
                new Row(source, 1, cells("Export")),
                new Row(source, 3, header),
                new Row(
                    source,
                    4,
                    List.of(
                        new Cell.Text("W-1"),
                        new Cell.Text("Unknown"),
                        new Cell.Text("Cd"),
                        new Cell.Number(228.8, "228.8"),
                        new Cell.Number(1, "1"),
                        new Cell.Number(1234.5, "1234.5"),
                        time,
                        new Cell.Number(0, "0"),
                        new Cell.Number(10, "10"))),
                new Row(source, 5, List.of(new Cell.Text("S1"), new Cell.Text("Std 1"))),
                new Row(
                    source,
                    6,
                    List.of(
                        new Cell.Text("W-1"),
                        new Cell.Text("Unknown"),
                        new Cell.Text("As"),
                        new Cell.Number(228.8, "228.8"),
                        new Cell.Number(1, "1"),
                        new Cell.Number(1, "1"),
                        time,
                        new Cell.Number(0, "0")))));
    assertThat(trial.tally()).isEqualTo(new Tally(3, 1, 1, 1));
    assertThat(trial.readings.get(0).facts().preparation().dilution()).isEqualTo(10);
    assertThat(trial.readings.get(0).flask()).isEqualTo("1");
    assertThat(trial.rejections.get(0).found()).contains("[fixed]");
    assertThat(trial.rejections.get(0).expected()).contains("for As");
  }

  private static List<Cell> cells(String... texts) {
    return java.util.Arrays.stream(texts).<Cell>map(Cell.Text::new).toList();
  }

  @Test
  void growingVolume() {
    Trial trial =
        Trial.text(
            mapping("growing-volume.toml"),
            "voltammetry/a.txt",
            "\t",
            "Sample\tStep\tDate\tTime\tAdded\tPeak current",
            "W-1\t0\t15.01.2025\t18:30:00\t0\t1,5",
            "W-1\t1\t15.01.2025\t18:33:00\t100\t2,5",
            "W-1\t1\t15.01.2025\t18:34:00\t100\t2,6",
            "W-1\t2\t15.01.2025\t18:36:00\t100\t3,5");
    assertThat(trial.readings)
        .extracting(reading -> reading.facts().addition().amount().toString())
        .containsExactly("0 µL", "100 µL", "100 µL", "200 µL");
    assertThat(trial.readings.get(1).facts()).isSameAs(trial.readings.get(2).facts());
  }

  @Test
  void stated() {
    Trial trial =
        Trial.text(
            mapping("stated.toml"),
            "fluorescence/B7/a.csv",
            ";",
            "Label;Intensity",
            "W-17;10",
            "W-17;11",
            "W-17 + 5 µg/L;20",
            "W-17 + 5 mg;20");
    assertThat(trial.tally()).isEqualTo(new Tally(4, 3, 1, 0));
    assertThat(trial.readings)
        .extracting(Reading::flask)
        .containsExactly("0 µg/L", "0 µg/L", "5 µg/L");
    assertThat(trial.readings).extracting(Reading::replicate).containsExactly("1", "2", "1");
    assertThat(trial.readings.get(0).batch().name()).isEqualTo("B7");
    assertThat(trial.readings.get(0).batch().delimits()).isTrue();
  }

  @Test
  void solids() {
    Trial trial =
        Trial.text(
            mapping("solids.toml"),
            "sediment/a.csv",
            ",",
            "ID,Element,Flask,Rep,Absorbance,Added µL,Weight g,Dry %,Dilution",
            "K-1,Pb,1,1,0.1,0,0.5012,85,1:10",
            "K-1,Pb,1,1,0.1,0,0.5012,120,1:10");
    assertThat(trial.tally()).isEqualTo(new Tally(2, 1, 1, 0));
    assertThat(trial.readings.get(0).facts().preparation().shown())
        .isEqualTo("diluted 10-fold, 0.5012 g, in 50 mL, dry fraction 0.85");
    assertThat(trial.readings.get(0).facts().blanks().method().get())
        .hasToString("0.4 µg/L ± 0.1 µg/L");
  }

  @Test
  void wideByReplicate() {
    Trial trial =
        Trial.text(
            mapping("wide-by-replicate.toml"),
            "flame/a.csv",
            ";",
            "Sample;Spike;Abs 1;Abs 2;Abs 3",
            ";µL;;;",
            "W-1;0;0,101;0,103;0,099",
            "W-1;50;0,201;OVER;",
            "Mean;;0,15;;");
    assertThat(trial.tally()).isEqualTo(new Tally(7, 6, 0, 1));
    assertThat(trial.readings)
        .extracting(Reading::replicate)
        .containsExactly("1", "2", "3", "1", "2", "3");
    assertThat(trial.readings.get(2).position().within()).isEqualTo("line 3, column 5");
    assertThat(trial.readings.get(3).facts().addition().amount()).hasToString("50 µL");
  }

  @Test
  void wideByAnalyte() {
    Trial trial =
        Trial.text(
            mapping("wide-by-analyte.toml"),
            "plasma/a.csv",
            ",",
            "Sample,Tube,Spike,Acquired,Cd 228.8 signal,Cd 228.8 RSD,Pb 283.3 signal,Pb 283.3 RSD",
            "W-1,1,0,2025-01-15 18:00,1000,2.5,900,",
            "W-1,2,0.5,2025-01-15 18:01,2000,1.5,1800,1");
    assertThat(trial.tally()).isEqualTo(new Tally(4, 3, 1, 0));
    Reading second = trial.readings.get(1);
    assertThat(second.subject().analyte()).isEqualTo("Cd");
    assertThat(second.subject().line()).isEqualTo("228.8");
    assertThat(second.signal()).isEqualTo(mean(2000, "2000", new Spread(30, 3)));
    assertThat(trial.rejections.get(0).column()).isEqualTo("signal_sd");
    assertThat(trial.rejections.get(0).position().within()).isEqualTo("line 2, column 8");
  }

  @Test
  void wideByFlask() {
    Trial trial =
        Trial.text(
            mapping("wide-by-flask.toml"),
            "colour/a.csv",
            "\t",
            "Sample\tReading\t0 mL\t0,5 mL\t1 mL",
            "W-1\t1\t0,10\t0,15\t0,20",
            "W-1\t2\t0,11\t\t0,21");
    assertThat(trial.tally()).isEqualTo(new Tally(6, 6, 0, 0));
    assertThat(trial.readings)
        .extracting(reading -> reading.facts().addition().amount().toString())
        .containsExactly("0 mL", "0.5 mL", "1 mL", "0 mL", "0.5 mL", "1 mL");
    assertThat(trial.readings.get(4).signal()).isInstanceOf(Signal.NoNumber.class);
  }

  @Test
  void meanAndSd() {
    Trial trial =
        Trial.text(
            mapping("mean-and-sd.toml"),
            "furnace2/a.csv",
            ",",
            "Sample,Position,Added µL,Mean,SD,n",
            "W-1,1,0,0.1234,0.0021,3",
            "W-1,2,5,0.2234,,1",
            "W-1,3,10,0.3234,,3");
    assertThat(trial.tally()).isEqualTo(new Tally(3, 2, 1, 0));
    assertThat(trial.readings.get(0).signal())
        .isEqualTo(mean(0.1234, "0.1234", new Spread(0.0021, 3)));
    assertThat(trial.readings.get(1).signal()).isEqualTo(new Signal.Value(0.2234, "0.2234"));
  }

  @Test
  void blocks() {
    Trial trial =
        Trial.text(
            mapping("blocks.toml"),
            "bench3/a.txt",
            "\t",
            "Element\tAdded\tRep\tAbs",
            "Sample: W-1 (tap)",
            "Cd\t0\t1\t0.10",
            "\t\t2\t0.11",
            "\t1\t1\t0.20",
            "Sample: W-2",
            "Pb\t0\t1\t0.30",
            "End of export",
            "printed 18:00");
    assertThat(trial.tally()).isEqualTo(new Tally(8, 4, 0, 4));
    assertThat(trial.readings)
        .extracting(reading -> reading.subject().sample() + " " + reading.subject().analyte())
        .containsExactly("W-1 Cd", "W-1 Cd", "W-1 Cd", "W-2 Pb");
  }

  @Test
  void oneFileASample() {
    Trial trial =
        Trial.text(
            mapping("one-file-a-sample.toml"),
            "voltammetry2/B7/W-17.csv",
            ";",
            "Added;Current",
            "0 µL;1,5",
            "100 µL;2,5");
    assertThat(trial.tally()).isEqualTo(new Tally(2, 2, 0, 0));
    assertThat(trial.readings.get(1).subject().sample().text()).isEqualTo("W-17");
    assertThat(trial.readings.get(1).batch().name()).isEqualTo("B7");
  }

  @Test
  void weighed() {
    Trial trial =
        Trial.text(
            mapping("weighed.toml"),
            "weighed/a.csv",
            ",",
            "Sample,Flask,Run,Counts Pb,Counts Tl,Aliquot g,Spike g,Tl solution g",
            "K-1,1,1,10040,5025,10.003,0,0.1002",
            "K-1,2,1,20040,SAT,9.998,0.5,0.1001",
            "K-1,3,1,30040,25,10.001,1.0,0.1");
    assertThat(trial.tally()).isEqualTo(new Tally(3, 2, 1, 0));
    Reading first = trial.readings.get(0);
    assertThat(first.facts().aliquot().get()).hasToString("10.003 g");
    assertThat(first.facts().addition().amount()).hasToString("0 g");
    assertThat(first.facts().internalStandard().get().mass().get()).hasToString("0.1002 g");
    assertThat(first.signal())
        .isEqualTo(new Signal.Value(10040, "10040", OptionalDouble.of(5025), Optional.empty()));
    assertThat(trial.readings.get(1).signal())
        .isEqualTo(new Signal.NoNumber(Signal.State.OVER_RANGE, "SAT"));
    assertThat(trial.rejections.get(0).column()).isEqualTo("Counts Tl");
    assertThat(trial.rejections.get(0).expected()).contains("above its baseline of 25");
  }

  @Test
  void internalStandard() {
    Trial trial =
        Trial.text(
            mapping("internal-standard.toml"),
            "yttrium/a.csv",
            ",",
            "Sample,Element,Intensity,Y 371.029,Time,Spike",
            "K-1,Cu,1000,5000,2025-01-15 18:30:00,0",
            "K-1,Cu,1000,,2025-01-15 18:31:00,1",
            "K-1,Zn,1000,0,2025-01-15 18:31:00,0");
    assertThat(trial.tally()).isEqualTo(new Tally(3, 1, 2, 0));
    assertThat(trial.rejections)
        .extracting(rejection -> rejection.position().column())
        .containsOnly(4);
    assertThat(trial.rejections.get(1).expected()).contains("above 0");
  }

  @Test
  void electrode() {
    Trial trial =
        Trial.text(
            mapping("electrode.toml"),
            "electrode/a.csv",
            ",",
            "Sample,Step,E / mV,Time,Added / mL",
            "K-1,0,102.3,2025-01-15 18:30:00,0",
            "K-1,1,89.1,2025-01-15 18:31:00,0.5",
            "K-1,2,81.2,2025-01-15 18:32:00,0.5");
    assertThat(trial.readings)
        .extracting(reading -> reading.facts().addition().amount().toString())
        .containsExactly("0 mL", "0.5 mL", "1 mL");
    MethodFacts method = trial.readings.get(0).facts().method();
    assertThat(method.electrode().get().charge()).isEqualTo(-1);
    assertThat(method.signalUnit().get().symbol()).isEqualTo("mV");
  }

  @Test
  void twoMappingsOfOneNameAreOneTooMany(@TempDir Path folder) throws IOException {
    String text = Files.readString(MAPPINGS.resolve("long-csv.toml"));
    Files.writeString(folder.resolve("b.toml"), text);
    Files.writeString(folder.resolve("a.toml"), text);
    Files.writeString(folder.resolve("c.toml"), "nme = 1");
    Files.writeString(folder.resolve(".hidden.toml"), "x");
    Files.writeString(folder.resolve("note.txt"), "x");
    MappingFolder loaded = MappingFolder.load(folder, LISBON);
    assertThat(loaded.loaded()).hasSize(3);
    assertThat(loaded.loaded().get(0)).isInstanceOf(Loaded.Good.class);
    ConfigFault second = ((Loaded.Faulty<Mapping>) loaded.loaded().get(1)).faults().get(0);
    assertThat(second.file()).isEqualTo("b.toml");
    assertThat(second.line()).isEqualTo(4);
    assertThat(second.found()).isEqualTo("the name 'furnace', which a.toml has already");
    assertThat(loaded.faults()).hasSizeGreaterThan(2);
    assertThat(MappingFolder.load(folder.resolve("none"), LISBON).faults()).hasSize(1);
  }

  private static Signal mean(double value, String text, Spread spread) {
    return new Signal.Value(value, text, OptionalDouble.empty(), Optional.of(spread));
  }
}
