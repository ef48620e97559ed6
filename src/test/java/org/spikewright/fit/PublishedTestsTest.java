package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;

import java.math.BigDecimal;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.apache.commons.csv.CSVRecord;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.spikewright.reference.ReferenceTable;

/**
 * What books and standards print for outlier tests, budgets, electrodes and lines through the
 * origin, to the last digit they print; {@code printed-tests.csv} names the source of each.
 */
class PublishedTestsTest {
  static List<CSVRecord> prints() {
    return ReferenceTable.rows("printed-tests.csv");
  }

  @ParameterizedTest(name = "{0}")
  @MethodSource("prints")
  void a_print_is_met_to_its_last_digit_or_known_to_be_wrong(CSVRecord row) {
    BigDecimal printed = new BigDecimal(row.get("printed"));
    double unit = Math.pow(10, -printed.scale());
    double half = Math.max(unit / 2 * (1 + 1e-6), 1e-13 * Math.abs(printed.doubleValue()));
    double ours = ours(row.get("case"), row.get("quantity"));
    double distance = Math.abs(ours - printed.doubleValue());
    String what = row + ": ours " + ours;
    switch (row.get("agrees")) {
      case "last" -> assertThat(distance).as(what).isLessThanOrEqualTo(half);
      case "unit" -> assertThat(distance).as(what).isBetween(half, unit * (1 + 1e-6));
      case "no" -> assertThat(distance).as(what).isGreaterThan(unit);
      default -> throw new IllegalArgumentException(row.toString());
    }
  }

  @Test
  void every_print_names_its_source_and_every_wrong_one_its_reason() {
    assertThat(prints()).hasSizeGreaterThan(50);
    for (CSVRecord row : prints()) {
      assertThat(row.get("source")).as(row.toString()).isNotBlank();
      assertThat(row.get("basis")).isIn("seen", "memory");
      assertThat(row.get("remark").isBlank())
          .as(row.toString())
          .isEqualTo(row.get("agrees").equals("last"));
    }
  }

  private static double ours(String id, String quantity) {
    if (id.contains("Cochran")) {
      String[] size = id.substring(id.lastIndexOf(' ') + 1).split("x");
      return cochran(Integer.parseInt(size[0]), Integer.parseInt(size[1]), quantity);
    }
    return switch (id) {
      case "NoInt1" -> origin(counting(60, 70), counting(130, 140), quantity);
      case "NoInt2" -> origin(counting(4, 6), new double[] {3, 4, 4}, quantity);
      case "TB03" -> uranium(quantity);
      case "TB05" -> new Outliers.Grubbs(0, 10, 2.16, 0.1).critical(0.05);
      case "ISO5725 Grubbs 3" -> new Outliers.Grubbs(0, 3, 1, 1).critical(0.01);
      case "ISO5725 Grubbs 10" -> new Outliers.Grubbs(0, 10, 1, 1).critical(0.01);
      case "SD01" -> electrode(102, 89, 25, 1, 200);
      case "SD04" -> electrode(-180.5, -349, 50, 0.5, 100) / 18.998 / 1000;
      case "GUM G.4.1" -> product(quantity);
      case "QUAM A1" -> standard(quantity);
      default -> throw new IllegalArgumentException(id);
    };
  }

  private static double[] counting(int first, int last) {
    double[] values = new double[last - first + 1];
    Arrays.setAll(values, i -> first + i);
    return values;
  }

  private static double origin(double[] x, double[] y, String quantity) {
    OriginLine line = OriginLine.fit(x, y).orElseThrow();
    return switch (quantity) {
      case "slope" -> line.slope();
      case "se" -> line.slopeStandardError().orElseThrow();
      case "s" -> line.residualSd().orElseThrow();
      case "r2" -> line.rSquared().orElseThrow();
      default -> throw new IllegalArgumentException(quantity);
    };
  }

  private static double uranium(String quantity) {
    double[] values = {199.31, 199.53, 200.19, 200.82, 201.92, 201.95, 202.18, 245.57};
    Outliers.Grubbs test = Outliers.grubbs(values).orElseThrow();
    assertThat(test.index()).isEqualTo(7);
    // The print is of the test of the largest value: all of the 5 % on one side.
    return quantity.equals("G") ? test.g() : test.critical(0.10);
  }

  private static double cochran(int groups, int values, String quantity) {
    double df = values - 1;
    Outliers.Cochran test = new Outliers.Cochran(0, groups, 0.5, 1, df, (groups - 1) * df);
    return test.critical(quantity.endsWith("1 %") ? 0.01 : 0.05);
  }

  private static double electrode(double e0, double e1, double volume, double added, double stock) {
    KnownAdditions.Vessel vessel =
        new KnownAdditions.Vessel(
            volume, volume, -1, OptionalDouble.empty(), OptionalDouble.of(-59.16));
    List<KnownAdditions.Reading> readings =
        List.of(
            new KnownAdditions.Reading(0, 0, e0),
            new KnownAdditions.Reading(stock * added, added, e1));
    return ((KnownAdditions.Fitted) KnownAdditions.fit(vessel, readings)).nativeConcentration();
  }

  /** Three factors, in percent of the product. */
  private static double product(String quantity) {
    Budget budget =
        Budget.of(
                Optional.empty(),
                List.of(
                    Contribution.absolute("x1", "", 0.25, 9),
                    Contribution.absolute("x2", "", 0.57, 4),
                    Contribution.absolute("x3", "", 0.82, 14)))
            .orElseThrow();
    return switch (quantity) {
      case "u" -> budget.standardUncertainty();
      case "df" -> budget.df();
      case "U" -> budget.expandedUncertainty();
      default -> throw new IllegalArgumentException(quantity);
    };
  }

  /** Cadmium of 99.99 % in 100 mL: 1002.7 mg/L, its parts and the whole. */
  private static double standard(String quantity) {
    double purity = Tolerance.rectangular(0.0001).standardUncertainty();
    double flask = Tolerance.triangular(0.1).standardUncertainty();
    double temperature = Tolerance.rectangular(100 * 4 * 2.1e-4).standardUncertainty();
    double filling = Tolerance.standard(0.02).standardUncertainty();
    double volume = Math.sqrt(flask * flask + temperature * temperature + filling * filling);
    double known = Double.POSITIVE_INFINITY;
    Budget budget =
        Budget.of(
                Optional.empty(),
                List.of(
                    Contribution.relative("purity", "", purity / 0.9999, 1002.7, known),
                    Contribution.relative("mass", "", 0.05 / 100.28, 1002.7, known),
                    Contribution.relative("volume", "", volume / 100, -1002.7, known)))
            .orElseThrow();
    return switch (quantity) {
      case "u purity" -> purity;
      case "u flask" -> flask;
      case "u temperature" -> temperature;
      case "u volume" -> volume;
      case "u" -> budget.standardUncertainty();
      default -> throw new IllegalArgumentException(quantity);
    };
  }
}
