package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;

import java.math.BigDecimal;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import org.apache.commons.csv.CSVRecord;
import org.assertj.core.data.Offset;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.spikewright.reference.ReferenceTable;

/**
 * What books, papers and standards print for the cases, to the last digit they print; {@code
 * printed.csv} names the source of each. Where a print is wrong the row says why, and the test
 * holds that ours differs.
 */
class PrintedValuesTest {
  private static final Map<String, CSVRecord> SINGLES = singles();

  private static Map<String, CSVRecord> singles() {
    Map<String, CSVRecord> byCase = new TreeMap<>();
    ReferenceTable.rows("singles.csv").forEach(row -> byCase.put(row.get("case"), row));
    return byCase;
  }

  static List<CSVRecord> prints() {
    return ReferenceTable.rows("printed.csv");
  }

  @ParameterizedTest(name = "{0}")
  @MethodSource("prints")
  void a_print_is_met_to_its_last_digit_or_known_to_be_wrong(CSVRecord row) {
    BigDecimal printed = new BigDecimal(row.get("printed"));
    double unit = Math.pow(10, -printed.scale());
    // Certified values have more digits than arithmetic keeps through all its steps.
    double half = Math.max(unit / 2 * (1 + 1e-6), 1e-11 * Math.abs(printed.doubleValue()));
    double ours = ours(row.get("case"), row.get("quantity"));
    double distance = Math.abs(ours - printed.doubleValue());
    String what =
        String.join(
            " ",
            row.get("case"),
            row.get("quantity"),
            "ours",
            Double.toString(ours),
            "printed",
            row.get("printed"),
            row.get("source"),
            row.get("remark"));
    switch (row.get("agrees")) {
      case "last" -> assertThat(distance).as(what).isLessThanOrEqualTo(half);
      case "unit" -> assertThat(distance).as(what).isBetween(half, unit * (1 + 1e-6));
      case "no" -> assertThat(distance).as(what).isGreaterThan(unit);
      default -> throw new IllegalArgumentException(row.toString());
    }
  }

  @Test
  void every_print_names_its_source_and_every_wrong_one_its_reason() {
    List<CSVRecord> prints = prints();
    assertThat(prints).hasSizeGreaterThan(150);
    for (CSVRecord row : prints) {
      assertThat(row.get("source")).as(row.toString()).isNotBlank();
      assertThat(row.get("basis")).isIn("seen", "memory", "constructed");
      assertThat(row.get("remark").isBlank())
          .as(row.toString())
          .isEqualTo(row.get("agrees").equals("last"));
    }
  }

  @ParameterizedTest
  @MethodSource("singleIds")
  void a_single_addition_is_the_line_through_its_two_points(String id) {
    CSVRecord row = SINGLES.get(id);
    double expected = ReferenceTable.number(row, "value");
    assertThat(ours(id, "C")).isCloseTo(expected, within(1e-12 * expected));
    assertThat(single(id).standardError()).isEmpty();
    assertThat(single(id).isBounded()).isFalse();
  }

  static List<String> singleIds() {
    return List.copyOf(SINGLES.keySet());
  }

  private static NativeEstimate single(String id) {
    CSVRecord row = SINGLES.get(id);
    double[] x = {ReferenceTable.number(row, "x0"), ReferenceTable.number(row, "x1")};
    double[] y = {ReferenceTable.number(row, "y0"), ReferenceTable.number(row, "y1")};
    return NativeEstimate.of((StraightLine) StraightLine.fit(x, y)).orElseThrow();
  }

  private static double ours(String id, String quantity) {
    if (SINGLES.containsKey(id)) {
      double x0 = single(id).value();
      return quantity.equals("x0m") ? x0 : x0 * ReferenceTable.number(SINGLES.get(id), "factor");
    }
    FittedCase fitted = FittedCase.of(id);
    return switch (id) {
      case "SA02" -> gum(fitted, quantity);
      case "LA02" -> quantity.equals("C") ? inverse(fitted, 0.114) : common(fitted, quantity);
      case "LA05" -> thermometer(fitted, quantity);
      case "LA06" -> known(fitted, quantity);
      case "LD02" -> fluorescein(fitted, quantity);
      case "LD03" ->
          quantity.equals("Ep") ? fitted.line().at(Math.log10(5e-4)) : common(fitted, quantity);
      default -> common(fitted, quantity);
    };
  }

  /** From the x-intercept to the concentration in the sample: stock over aliquot, or 1. */
  private static double factor(String id) {
    return switch (id) {
      case "SA01" -> 11.1 / 10.0;
      case "SA02" -> 300.0 / 25 * 100 / 3.12;
      case "SA03" -> 2.0;
      case "SA09" -> 100.0;
      case "SE02" -> 1 / 20.0;
      default -> 1;
    };
  }

  private static double common(FittedCase c, String quantity) {
    double t = c.get("t95");
    double factor = factor(c.id());
    return switch (quantity) {
      case "C" -> c.get("x0") * factor;
      case "s_C" -> c.get("se_x0") * factor;
      case "hw" -> t * c.get("se_x0") * factor;
      case "s_C_propagation" -> withoutCovariance(c) * factor;
      case "hw_a" -> t * c.get("se_a");
      case "hw_b" -> t * c.get("se_b");
      case "r*100" -> 100 * c.get("r");
      case "s**2" -> c.get("s") * c.get("s");
      case "slope_per_mL" -> c.get("b") * 12.2 / 1000;
      case "sx0" -> c.get("s") / c.get("b");
      case "Vx0" -> 100 * c.get("s") / c.get("b") / c.get("xbar");
      default -> c.get(quantity);
    };
  }

  /** Slope and intercept as if independent: the printed 0.12 beside the right 0.16. */
  private static double withoutCovariance(FittedCase c) {
    return c.get("x0") * Math.hypot(c.get("se_a") / c.get("a"), c.get("se_b") / c.get("b"));
  }

  /**
   * The printed chain multiplies the concentration in the 25 mL flask by 100 mL and never uses the
   * 5 mL aliquot; its standard errors carry an extra 1 under the root, the form for one new reading
   * of the signal. Held here as arithmetic, not as a dilution.
   */
  private static double gum(FittedCase c, String quantity) {
    double asNewReading = Math.hypot(c.get("s") / c.get("b"), c.get("se_x0"));
    return switch (quantity) {
      case "x0*Cs/25" -> c.get("x0") * 12;
      case "x0*Cs/25*100" -> c.get("x0") * 1200;
      case "se_x0_plus1" -> asNewReading;
      case "se_Ca_plus1" -> asNewReading * 12;
      case "s_C_plus1" -> asNewReading * factor("SA02");
      case "hw_plus1" -> asNewReading * factor("SA02") * c.get("t95");
      default -> common(c, quantity);
    };
  }

  /** The correction of the thermometer at 30 °C, its uncertainty, and r(y1, y2). */
  private static double thermometer(FittedCase c, String quantity) {
    double apart = 10 - c.get("xbar");
    return switch (quantity) {
      case "b30" -> c.line().at(10);
      case "u_b30" -> c.get("s") * Math.sqrt(1 / c.get("n") + apart * apart / c.get("Sxx"));
      case "r_ab" -> c.get("cov_ab") / (c.get("se_a") * c.get("se_b"));
      default -> common(c, quantity);
    };
  }

  private static double known(FittedCase c, String quantity) {
    double xi = inverse(c, 10.5);
    return switch (quantity) {
      case "se_a", "se_b", "cov_ab" -> c.get("known_" + quantity);
      case "xi" -> xi;
      case "u_xi" -> {
        double apart = xi - c.get("xbar");
        double spread = 1 + 1 / c.get("n") + apart * apart / c.get("Sxx");
        yield 0.5 / c.get("b") * Math.sqrt(spread);
      }
      default -> common(c, quantity);
    };
  }

  private static double fluorescein(FittedCase c, String quantity) {
    double c0 = inverse(c, 13.5);
    double apart = c0 - c.get("xbar");
    double spread = 1 + 1 / c.get("n") + apart * apart / c.get("Sxx");
    return switch (quantity) {
      case "c0" -> c0;
      case "hw_c0" -> c.get("t95") * c.get("s") / c.get("b") * Math.sqrt(spread);
      default -> common(c, quantity);
    };
  }

  private static double inverse(FittedCase c, double signal) {
    return (signal - c.get("a")) / c.get("b");
  }

  private static Offset<Double> within(double tolerance) {
    return Offset.offset(tolerance);
  }
}
