package org.spikewright.published;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.spikewright.judgement.Flag;
import org.spikewright.judgement.FlagKind;
import org.spikewright.judgement.Outcome;
import org.spikewright.judgement.Verdict;
import org.spikewright.summary.ResultRow;

/** Exports of every design that allow no result, or a poor one: a verdict with a reason each. */
class UselessExportsTest {
  @TempDir Path folder;

  /** A bench: its name and the [columns] and [fixed] of its mapping. */
  private record Bench(String name, String mapping) {
    @Override
    public String toString() {
      return name;
    }
  }

  /** Additions and signals of a series, and what has to come of it. */
  private record Export(
      String name, double[] added, String[] signals, Verdict verdict, FlagKind... flags) {
    @Override
    public String toString() {
      return name;
    }
  }

  private static Bench bench(String name, String columns, String fixed, String unit) {
    return new Bench(
        name,
        """
        name  = "bench"
        files = "*.csv"
        [columns]
        sample = "sample"
        signal = "signal"
        flask  = "flask"
        %s
        [fixed]
        analyte = "Cd"
        %s
        [words]
        over_range = ["OVER"]
        [method]
        %s
        [result]
        unit = "%s"
        """
            .formatted(
                columns,
                fixed,
                name.equals("electrode") ? "charge = 1\nslope = 59\ntemperature = 25" : "",
                unit));
  }

  private static final String VOLUME = "addition_volume = { header = \"added\", unit = \"mL\" }";
  private static final String VESSEL =
      "\nadditions = \"cumulative\"\naliquot_volume = \"10 mL\"\nstart_volume = \"20 mL\"\n"
          + "stock = \"10 mg/L\"\n";
  private static final String MADE_UP =
      "design = \"made up\"\naliquot_volume = \"10 mL\"\nfinal_volume = \"50 mL\"\n"
          + "stock = \"10 mg/L\"\n";

  private static final List<Bench> LINES =
      List.of(
          bench("made up", VOLUME, MADE_UP, "mg/L"),
          bench(
              "internal standard",
              VOLUME + "\ninternal_standard = \"standard\"",
              MADE_UP + "internal_standard_given = \"in the flask\"",
              "mg/L"),
          bench("one vessel", VOLUME, "design = \"one vessel\"" + VESSEL, "mg/L"),
          bench(
              "stated",
              "addition = { header = \"added\", unit = \"mg/L\" }",
              "design = \"stated\"\naddition_terms = \"sample\"",
              "mg/L"),
          bench(
              "weighed",
              "addition_mass = { header = \"added\", unit = \"g\" }",
              "design = \"weighed\"\naliquot_mass = \"10 g\"\nfinal_mass = \"50 g\"\n"
                  + "stock = \"10 mg/kg\"",
              "mg/kg"),
          bench("read back", VOLUME, MADE_UP + "signal_unit = \"mg/L\"", "mg/L"));

  private static final Bench ELECTRODE =
      bench("electrode", VOLUME, "design = \"electrode\"\nsignal_unit = \"mV\"" + VESSEL, "mg/L");

  private static double[] of(double... numbers) {
    return numbers;
  }

  private static String[] read(String... signals) {
    return signals;
  }

  private static final double[] RISING = of(0, 1, 2, 3);

  /** What comes to the same for every design. */
  private static final List<Export> FOR_ALL =
      List.of(
          new Export("one flask", of(0), read("1"), Verdict.REPEAT, FlagKind.NO_ADDITIONS),
          new Export(
              "no additions",
              of(0, 0, 0, 0),
              read("1", "2", "3", "4"),
              Verdict.REPEAT,
              FlagKind.NO_ADDITIONS),
          new Export(
              "all the same addition",
              of(1, 1, 1),
              read("1", "2", "3"),
              Verdict.REPEAT,
              FlagKind.NO_ADDITIONS,
              FlagKind.NO_UNSPIKED_FLASK),
          new Export(
              "equal signals",
              RISING,
              read("5", "5", "5", "5"),
              Verdict.REPEAT,
              FlagKind.SLOPE_NOT_ESTABLISHED),
          new Export(
              "zeros",
              RISING,
              read("0", "0", "0", "0"),
              Verdict.REPEAT,
              FlagKind.SLOPE_NOT_ESTABLISHED),
          new Export(
              "falling signals",
              RISING,
              read("50", "30", "20", "10"),
              Verdict.REPEAT,
              FlagKind.SLOPE_NOT_ESTABLISHED),
          new Export(
              "nothing but over range",
              RISING,
              read("OVER", "OVER", "OVER", "OVER"),
              Verdict.REPEAT,
              FlagKind.OVER_RANGE),
          new Export(
              "overflow",
              RISING,
              read("1e308", "1.2e308", "1.4e308", "1.6e308"),
              Verdict.REPEAT,
              FlagKind.SLOPE_NOT_ESTABLISHED));

  private static final List<Export> FOR_LINES =
      List.of(
          new Export(
              "no unspiked flask",
              of(1, 2, 3, 4),
              read("2", "3.01", "4", "5"),
              Verdict.REVIEW,
              FlagKind.NO_UNSPIKED_FLASK),
          new Export(
              "two flasks", of(0, 1), read("1", "2"), Verdict.REVIEW, FlagKind.NO_FIT_UNCERTAINTY));

  private static final List<Export> FOR_ELECTRODES =
      List.of(
          new Export(
              "no unspiked state",
              of(1, 2, 3, 4),
              read("20", "32.1", "39", "44"),
              Verdict.REVIEW,
              FlagKind.NO_UNSPIKED_FLASK),
          new Export(
              "two states",
              of(0, 1),
              read("1", "19"),
              Verdict.REVIEW,
              FlagKind.NO_FIT_UNCERTAINTY));

  static Stream<Arguments> everyDesign() {
    List<Arguments> all = new ArrayList<>();
    for (Bench bench : LINES) {
      Stream.concat(FOR_ALL.stream(), FOR_LINES.stream())
          .forEach(export -> all.add(Arguments.of(bench, export)));
    }
    Stream.concat(FOR_ALL.stream(), FOR_ELECTRODES.stream())
        .forEach(export -> all.add(Arguments.of(ELECTRODE, export)));
    return all.stream();
  }

  @ParameterizedTest(name = "{0}: {1}")
  @MethodSource("everyDesign")
  void aVerdictWithAReasonAndNeverANumberThatIsNone(Bench bench, Export export) throws IOException {
    String[] lines = new String[export.added().length + 1];
    lines[0] = "sample,flask,added,signal,standard";
    for (int i = 0; i < export.added().length; i++) {
      lines[i + 1] = "BW-1," + i + "," + export.added()[i] + "," + export.signals()[i] + ",2";
    }
    Outcome outcome = HandBench.read(folder, bench.mapping(), lines).only();
    assertThat(outcome.flags().stream().map(Flag::kind).toList())
        .containsAll(List.of(export.flags()));
    assertThat(outcome.verdict()).isEqualTo(export.verdict());
    assertThat(outcome.flags())
        .isNotEmpty()
        .allSatisfy(
            flag -> assertThat(flag.sentence()).isNotBlank().doesNotContain("NaN", "Infinity"));
    assertThat(outcome.reported()).doesNotContain("NaN", "Infinity");
    ResultRow row = ResultRow.of(outcome);
    Stream.of(row.value(), row.lower95(), row.upper95(), row.ownStandardError(), row.slope())
        .forEach(number -> assertThat(Double.isFinite(number.orElse(0))).isTrue());
  }
}
