package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.OptionalDouble;
import java.util.TreeMap;
import java.util.stream.Collectors;
import java.util.stream.IntStream;
import org.apache.commons.csv.CSVRecord;
import org.assertj.core.api.SoftAssertions;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.spikewright.quantity.Estimate;
import org.spikewright.reference.ReferenceTable;

/** Electrodes, groups, levels and slopes of seeded data against the stored numbers of R. */
class NumbersByRTest {
  private static final Map<String, List<CSVRecord>> SETS =
      ReferenceTable.rows("numbers-series.csv").stream()
          .collect(
              Collectors.groupingBy(
                  row -> row.get("set"), LinkedHashMap::new, Collectors.toList()));
  private static final Map<String, List<CSVRecord>> BY_R =
      ReferenceTable.rows("numbers-r.csv").stream()
          .collect(Collectors.groupingBy(row -> row.get("set")));

  static List<String> sets() {
    return List.copyOf(SETS.keySet());
  }

  @ParameterizedTest
  @MethodSource("sets")
  void every_number_of_a_set_agrees_and_none_is_only_in_one_program(String id) {
    Map<String, Double> ours = ours(SETS.get(id));
    SoftAssertions soft = new SoftAssertions();
    for (CSVRecord row : BY_R.get(id)) {
      String quantity = row.get("quantity");
      double expected = ReferenceTable.number(row, "value");
      Double value = ours.remove(quantity);
      // A slope and a concentration that hold each other loosely cost R some of its digits.
      double tolerance = id.startsWith("e") ? 1e-8 : 1e-9;
      soft.assertThat(value).as("%s %s", id, quantity).isNotNull();
      soft.assertThat(value == null ? 1 : Math.abs(value / expected - 1))
          .as("%s %s: %s, R %s", id, quantity, value, expected)
          .isLessThanOrEqualTo(tolerance);
    }
    soft.assertThat(ours).as("only ours").isEmpty();
    soft.assertAll();
  }

  @Test
  void the_sets_have_bounded_and_unbounded_intervals_and_every_kind() {
    assertThat(SETS).hasSize(32);
    assertThat(SETS.values().stream().map(rows -> rows.get(0).get("kind")).distinct()).hasSize(4);
    assertThat(BY_R.entrySet().stream().filter(e -> e.getKey().startsWith("e")))
        .anyMatch(e -> has(e.getValue(), "upper"))
        .anyMatch(e -> !has(e.getValue(), "upper"))
        .anyMatch(e -> !has(e.getValue(), "S"));
  }

  private static boolean has(List<CSVRecord> rows, String quantity) {
    return rows.stream().anyMatch(row -> row.get("quantity").equals(quantity));
  }

  private static Map<String, Double> ours(List<CSVRecord> rows) {
    double[] a = column(rows, "a");
    double[] b = column(rows, "b");
    double[] c = column(rows, "c");
    return switch (rows.get(0).get("kind")) {
      case "electrode" -> electrode(a, b, c);
      case "group" -> groups(a, b);
      case "levels" -> levels(a, b);
      case "slopes" -> slopes(a, b, c);
      default -> throw new IllegalArgumentException(rows.get(0).toString());
    };
  }

  private static double[] column(List<CSVRecord> rows, String name) {
    return rows.stream().mapToDouble(row -> ReferenceTable.number(row, name)).toArray();
  }

  private static Map<String, Double> electrode(double[] amount, double[] volume, double[] e) {
    double measured = e[e.length - 1] < e[0] ? -57.8 : 28.7;
    KnownAdditions.Vessel vessel =
        new KnownAdditions.Vessel(
            25, 50, measured < 0 ? -1 : 2, OptionalDouble.empty(), OptionalDouble.of(measured));
    List<KnownAdditions.Reading> readings = new ArrayList<>();
    for (int i = 0; i < e.length; i++) {
      readings.add(new KnownAdditions.Reading(amount[i], volume[i], e[i]));
    }
    KnownAdditions.Fitted fitted = (KnownAdditions.Fitted) KnownAdditions.fit(vessel, readings);
    Map<String, Double> all = new TreeMap<>();
    all.put("C", fitted.nativeConcentration());
    all.put("se_C", fitted.standardError().orElseThrow());
    all.put("E0", fitted.standardPotential());
    all.put("s", fitted.residualSd().orElseThrow());
    if (fitted.slopeStandardError().isPresent()) {
      all.put("S", fitted.slope());
    }
    put(all, "se_S", fitted.slopeStandardError());
    put(all, "lower", fitted.lower95());
    put(all, "upper", fitted.upper95());
    return all;
  }

  private static Map<String, Double> groups(double[] group, double[] values) {
    Map<Double, List<Double>> byGroup = new TreeMap<>();
    for (int i = 0; i < values.length; i++) {
      byGroup.computeIfAbsent(group[i], key -> new ArrayList<>()).add(values[i]);
    }
    double[][] all =
        byGroup.values().stream()
            .map(list -> list.stream().mapToDouble(v -> v).toArray())
            .toArray(double[][]::new);
    Combination combined =
        Combination.of(Arrays.stream(all).map(NumbersByRTest::estimate).toList()).orElseThrow();
    Outliers.Cochran cochran = Outliers.cochran(all).orElseThrow();
    Outliers.Grubbs grubbs = Outliers.grubbs(values).orElseThrow();
    Map<String, Double> ours = new TreeMap<>();
    ours.put("p", combined.p());
    ours.put("mean", combined.mean());
    ours.put("chi2", combined.chiSquare());
    ours.put("cochran_index", cochran.index() + 1.0);
    ours.put("cochran_c", cochran.c());
    ours.put("cochran_p", cochran.p());
    ours.put("grubbs_g", grubbs.g());
    ours.put("grubbs_p", grubbs.p());
    ours.put("grubbs_critical", grubbs.critical(0.05));
    return ours;
  }

  private static Estimate estimate(double[] values) {
    double mean = StraightLine.mean(values);
    double squares = 0;
    for (double value : values) {
      squares += (value - mean) * (value - mean);
    }
    int n = values.length;
    return new Estimate(mean, Math.sqrt(squares / (n - 1) / n), n - 1);
  }

  private static Map<String, Double> levels(double[] x, double[] y) {
    StraightLine line = (StraightLine) StraightLine.fit(x, y);
    LackOfFit test = LackOfFit.of(line).orElseThrow();
    RepeatedMedian robust = RepeatedMedian.of(line).orElseThrow();
    OriginLine origin = OriginLine.fit(x, y).orElseThrow();
    Map<String, Double> ours = new TreeMap<>();
    ours.put("F", test.f());
    ours.put("p", test.p());
    ours.put("rm_slope", robust.slope());
    ours.put("rm_intercept", robust.signalIntercept());
    ours.put("o_slope", origin.slope());
    put(ours, "o_se", origin.slopeStandardError());
    put(ours, "o_s", origin.residualSd());
    put(ours, "o_r2", origin.rSquared());
    return ours;
  }

  private static Map<String, Double> slopes(double[] which, double[] x, double[] y) {
    Equivalence compared =
        Equivalence.of(slope(1, which, x, y), slope(2, which, x, y), Equivalence.COMMON_MARGIN)
            .orElseThrow();
    Map<String, Double> ours = new TreeMap<>();
    ours.put("p", compared.p());
    ours.put("ratio", compared.ratio());
    put(ours, "lower", compared.lower95());
    put(ours, "upper", compared.upper95());
    return ours;
  }

  private static Estimate slope(int line, double[] which, double[] x, double[] y) {
    int[] rows = IntStream.range(0, x.length).filter(i -> which[i] == line).toArray();
    StraightLine fitted =
        (StraightLine)
            StraightLine.fit(
                Arrays.stream(rows).mapToDouble(i -> x[i]).toArray(),
                Arrays.stream(rows).mapToDouble(i -> y[i]).toArray());
    return new Estimate(
        fitted.slope(), fitted.slopeStandardError().orElseThrow(), fitted.residualDf());
  }

  private static void put(Map<String, Double> all, String name, OptionalDouble value) {
    value.ifPresent(v -> all.put(name, v));
  }
}
