package org.spikewright.demo;

import static org.assertj.core.api.Assertions.assertThat;
import static org.spikewright.demo.ReferenceTable.number;

import java.util.List;
import java.util.function.ToDoubleFunction;
import java.util.stream.Stream;
import org.apache.commons.csv.CSVRecord;
import org.assertj.core.data.Offset;
import org.junit.jupiter.api.Named;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.spikewright.fit.BendTest;
import org.spikewright.fit.DeletedResidual;
import org.spikewright.fit.NativeEstimate;
import org.spikewright.fit.StraightLine;

/** The program's line, interval and tests agree with R on every series of the demo. */
class DemoFitTest {
  private static final double RELATIVE = 1e-9;

  /** Of a flask that lies on its line to the last digit both have rounding only, times some t. */
  private static final double ROUNDED_ZERO = 1e-11;

  static Stream<Named<CSVRecord>> series() {
    return ReferenceTable.series().stream().map(row -> Named.of(ReferenceTable.key(row), row));
  }

  @ParameterizedTest(name = "{0}")
  @MethodSource("series")
  void line_interval_and_tests_agree_with_r(CSVRecord r) {
    StraightLine line = line(r);
    agrees(line.slope(), r, "slope");
    agrees(line.signalIntercept(), r, "signal_intercept");
    agrees(line.residualSd().orElseThrow(), r, "residual_sd");
    agrees(line.correlation().orElseThrow(), r, "r");

    NativeEstimate estimate = NativeEstimate.of(line).orElseThrow();
    agrees(estimate.value(), r, "native");
    agrees(estimate.standardError().orElseThrow(), r, "native_se");
    agrees(estimate.lower95().orElseThrow(), r, "native_lower95");
    agrees(estimate.upper95().orElseThrow(), r, "native_upper95");
    agrees(estimate.g().orElseThrow(), r, "g");

    BendTest bend = BendTest.of(line).orElseThrow();
    agrees(bend.t(), r, "bend_t");
    agrees(bend.pOneSided(), r, "bend_p_one_sided");
    agrees(bend.nativeConcentration().orElseThrow(), r, "bent_native");
  }

  @ParameterizedTest(name = "{0}")
  @MethodSource("series")
  void deleted_residuals_agree_with_r(CSVRecord r) {
    StraightLine line = line(r);
    List<CSVRecord> flasks = flasks(r);
    for (int i = 0; i < flasks.size(); i++) {
      double theirs = number(flasks.get(i), "rstudent");
      double rounding = Math.max(ROUNDED_ZERO, RELATIVE * Math.abs(theirs));
      assertThat(DeletedResidual.of(line, i, 0).orElseThrow().t())
          .as(flasks.get(i).get("flask"))
          .isCloseTo(theirs, Offset.offset(rounding));
    }
  }

  private static void agrees(double ours, CSVRecord r, String column) {
    double theirs = number(r, column);
    assertThat(ours).as(column).isCloseTo(theirs, Offset.offset(RELATIVE * Math.abs(theirs)));
  }

  private static StraightLine line(CSVRecord r) {
    List<CSVRecord> flasks = flasks(r);
    double[] x = column(flasks, flask -> number(flask, "x"));
    double[] y = column(flasks, flask -> number(flask, "y"));
    return (StraightLine) StraightLine.fit(x, y);
  }

  private static double[] column(List<CSVRecord> flasks, ToDoubleFunction<CSVRecord> number) {
    return flasks.stream().mapToDouble(number).toArray();
  }

  private static List<CSVRecord> flasks(CSVRecord r) {
    return ReferenceTable.flasks().stream()
        .filter(flask -> ReferenceTable.key(flask).equals(ReferenceTable.key(r)))
        .toList();
  }
}
