package org.spikewright.published;

import static org.assertj.core.api.Assertions.assertThat;
import static org.spikewright.published.Agreement.isAbout;

import java.io.IOException;
import java.io.StringReader;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Instant;
import java.time.temporal.ChronoUnit;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import org.apache.commons.csv.CSVRecord;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.reference.ReferenceTable;
import org.spikewright.testkit.Program;

/** Exports that come in parts, again, and corrected: what the commands then give as the result. */
class RedeliveryTest {
  private static final double[] RIGHT = {0.503, 0.748, 1.006, 1.249};
  private static final double[] WRONG = {0.503, 0.748, 1.060, 1.249};

  /** Readings that end an hour ago, so that a series may still wait for flasks. */
  private static final Instant START =
      Instant.now().truncatedTo(ChronoUnit.SECONDS).minus(1, ChronoUnit.HOURS);

  @TempDir private static Path lab;
  private static Map<String, CSVRecord> first;
  private static Map<String, CSVRecord> second;
  private static Map<String, CSVRecord> third;

  @BeforeAll
  static void deliverAgainAndAgain() throws IOException {
    Files.createDirectories(lab.resolve("mappings"));
    Files.writeString(lab.resolve("spikewright.toml"), CONFIGURATION);
    mapping("named", "flask = \"flask\"\nmeasured_at = \"at\"");
    mapping("timed", "measured_at = \"at\"");
    mapping("untimed", "");

    drop("named/signal.csv", rows("signal corrected", 3, WRONG, 4));
    drop("timed/addition.csv", rows("addition corrected", 3.3, RIGHT, 4));
    drop("untimed/addition.csv", rows("untimed", 3.3, RIGHT, 4));
    drop("untimed/doubled.csv", rows("doubled", 2, RIGHT, 4));
    List<String> grown = rows("grown", 3, RIGHT, 4);
    drop("untimed/grown.csv", grown);
    drop("untimed/old-name.csv", rows("renamed", 3.3, RIGHT, 4));
    drop("named/parts.csv", rows("in parts", 3, RIGHT, 3));
    drop("named/again.csv", rows("again", 3, RIGHT, 4));
    drop("timed/back.csv", rows("taken back", 3, RIGHT, 4));
    first = results();

    drop("named/signal.csv", rows("signal corrected", 3, RIGHT, 4));
    drop("timed/addition.csv", rows("addition corrected", 3, RIGHT, 4));
    drop("untimed/addition.csv", rows("untimed", 3, RIGHT, 4));
    drop("untimed/doubled.csv", rows("doubled", 3, RIGHT, 4));
    drop("untimed/grown.csv", withARepeatOfTheFirst(grown));
    drop("untimed/new-name.csv", rows("renamed", 3, RIGHT, 4));
    List<String> rest = new ArrayList<>(rows("in parts", 3, RIGHT, 4));
    rest.subList(1, 4).clear();
    drop("named/parts-2.csv", rest);
    drop("named/again-2.csv", rows("again", 3, RIGHT, 4));
    drop("timed/back.csv", rows("taken back", 3.3, RIGHT, 4));
    second = results();

    List<String> back = new ArrayList<>(rows("taken back", 3, RIGHT, 4));
    Collections.reverse(back.subList(1, back.size()));
    drop("timed/back.csv", back);
    third = results();
  }

  private static void mapping(String name, String columns) throws IOException {
    Files.writeString(lab.resolve("mappings/" + name + ".toml"), MAPPING.formatted(name, columns));
  }

  /** Flasks A, B, … with 0, 1, 2 … mL, the fourth with so many. */
  private static List<String> rows(String sample, double fourth, double[] signals, int flasks) {
    List<String> rows = new ArrayList<>();
    rows.add("sample,flask,added,signal,at");
    for (int i = 0; i < flasks; i++) {
      double added = i == 3 ? fourth : i;
      Instant at = START.minus(10 - i, ChronoUnit.MINUTES);
      rows.add(sample + "," + (char) ('A' + i) + "," + added + "," + signals[i] + "," + at);
    }
    return rows;
  }

  private static List<String> withARepeatOfTheFirst(List<String> rows) {
    List<String> more = new ArrayList<>(rows);
    more.add(rows.get(1));
    return more;
  }

  private static void drop(String name, List<String> lines) throws IOException {
    Path file = lab.resolve("watch").resolve(name);
    Files.createDirectories(file.getParent());
    Files.write(file, lines);
  }

  private static Map<String, CSVRecord> results() throws IOException {
    String conf = lab.resolve("spikewright.toml").toString();
    Program.Ended once = Program.run("once", "--strict", "--settle", "0s", "--conf", conf);
    assertThat(once.code()).as(once.out() + once.err()).isZero();
    Program.Ended printed = Program.run("results", "--conf", conf);
    assertThat(printed.code()).as(printed.err()).isZero();
    Map<String, CSVRecord> rows = new TreeMap<>();
    for (CSVRecord row : ReferenceTable.rows(new StringReader(printed.out()))) {
      assertThat(rows.put(row.get("sample"), row)).as("one result a sample").isNull();
    }
    return rows;
  }

  private static void isResult(CSVRecord row, double[] x, double[] y) {
    ByHand line = ByHand.line(x, y);
    isAbout(line.found(), Double.parseDouble(row.get("value")), 1e-11);
    isAbout(line.standardError(), Double.parseDouble(row.get("own_standard_error")), 1e-10);
    assertThat(row.get("flasks")).isEqualTo(Integer.toString(x.length));
  }

  private static final double[] STEPS = {0, 1, 2, 3};
  private static final double[] MISTYPED = {0, 1, 2, 3.3};

  @Test
  void aCorrectedSignalReplacesTheEarlierOneAndIsShown() {
    isResult(first.get("signal corrected"), STEPS, WRONG);
    isResult(second.get("signal corrected"), STEPS, RIGHT);
    assertThat(second.get("signal corrected").get("flags")).contains("superseded-reading");
    assertThat(second.get("signal corrected").get("verdict")).isEqualTo("review");
  }

  @Test
  void aCorrectedAdditionReplacesTheEarlierOneByItsTime() {
    isResult(first.get("addition corrected"), MISTYPED, RIGHT);
    isResult(second.get("addition corrected"), STEPS, RIGHT);
    assertThat(second.get("addition corrected").get("flags")).contains("superseded-reading");
  }

  @Test
  void aCorrectionThatIsTakenBackNoLongerCounts() {
    isResult(second.get("taken back"), MISTYPED, RIGHT);
    isResult(third.get("taken back"), STEPS, RIGHT);
    assertThat(third.get("taken back").get("flags")).contains("superseded-reading");
  }

  @Test
  void aCorrectedAdditionWithoutTimeOrFlaskNeverLeavesTheMistypedOneInTheLine() {
    isResult(first.get("untimed"), MISTYPED, RIGHT);
    isResult(second.get("untimed"), STEPS, RIGHT);
    assertThat(second.get("untimed").get("flags")).contains("superseded-reading");
  }

  /** Two flasks bore one addition, so that their readings passed for replicates. */
  @Test
  void aCorrectedAdditionLeavesTheFlaskThatItWasTakenFor() {
    isResult(
        first.get("doubled"),
        new double[] {0, 1, 2},
        new double[] {RIGHT[0], RIGHT[1], (RIGHT[2] + RIGHT[3]) / 2});
    isResult(second.get("doubled"), STEPS, RIGHT);
    assertThat(second.get("doubled").get("flags")).contains("superseded-reading");
  }

  @Test
  void aCorrectedAdditionUnderAnotherFileNameReplacesTheEarlierOne() {
    isResult(first.get("renamed"), MISTYPED, RIGHT);
    isResult(second.get("renamed"), STEPS, RIGHT);
    assertThat(second.get("renamed").get("flags")).contains("superseded-reading", "exported-again");
  }

  @Test
  void anotherReplicateWithTheSameSignalIsNoCorrection() {
    isResult(second.get("grown"), STEPS, RIGHT);
    assertThat(second.get("grown").get("readings")).isEqualTo("5");
    assertThat(second.get("grown").get("flags")).isEmpty();
  }

  @Test
  void aSeriesInPartsIsWaitedForAndThenJudgedAsAWhole() {
    assertThat(first.get("in parts").get("verdict")).isEqualTo("waiting");
    assertThat(first.get("in parts").get("flags")).contains("waiting");
    assertThat(first.get("in parts").get("reported")).isEmpty();
    isResult(second.get("in parts"), STEPS, RIGHT);
    assertThat(second.get("in parts").get("verdict")).isEqualTo("report");
    assertThat(second.get("in parts").get("source_files"))
        .isEqualTo("named/parts-2.csv;named/parts.csv");
  }

  @Test
  void theSameReadingsAgainChangeNothing() {
    assertThat(second.get("again").toMap()).isEqualTo(first.get("again").toMap());
    assertThat(second.get("again").get("flags")).isEmpty();
  }

  private static final String MAPPING =
      """
      name  = "%1$s"
      files = "%1$s/*.csv"
      [columns]
      sample          = "sample"
      signal          = "signal"
      addition_volume = { header = "added", unit = "mL" }
      %2$s
      [fixed]
      analyte        = "Cd"
      design         = "made up"
      aliquot_volume = "10 mL"
      final_volume   = "50 mL"
      stock          = "10 mg/L"
      [result]
      unit = "mg/L"
      """;

  private static final String CONFIGURATION =
      """
      [folders]
      watch     = "watch"
      mappings  = "mappings"
      summaries = "summaries"
      ledger    = "ledger/spikewright.db"
      [laboratory]
      zone = "UTC"
      """;
}
