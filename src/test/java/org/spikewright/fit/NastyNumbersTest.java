package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;

import java.lang.reflect.RecordComponent;
import java.util.Arrays;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;

/** Whatever comes in, a number that comes out is finite. */
class NastyNumbersTest {
  private static final double[] NASTY = {
    0,
    -0.0,
    1,
    -1,
    0.1,
    1.0 / 3,
    1e-9,
    1e9,
    1e15,
    1e-15,
    1e74,
    -1e74,
    1e75,
    1e-75,
    1e-74,
    1e150,
    -1e150,
    1e-150,
    1e300,
    Double.MAX_VALUE,
    -Double.MAX_VALUE,
    Double.MIN_VALUE,
    Double.NaN,
    Double.POSITIVE_INFINITY,
    Double.NEGATIVE_INFINITY
  };

  @Test
  void ten_thousand_nasty_series_give_no_nan_no_infinity_and_no_exception() throws Exception {
    int lines = 0;
    int without = 0;
    for (long seed = 1; seed <= 10_000; seed++) {
      SplittableRandom random = new SplittableRandom(seed);
      int n = random.nextInt(0, 9);
      boolean tame = random.nextInt(3) > 0;
      double[] x = numbers(random, n, tame);
      double[] y = numbers(random, n, tame);
      String seen = "seed " + seed + " x " + Arrays.toString(x) + " y " + Arrays.toString(y);
      if (StraightLine.fit(x, y) instanceof StraightLine line) {
        lines++;
        without += NativeEstimate.of(line).isEmpty() ? 1 : 0;
        examine(line, random, seen);
      }
    }
    assertThat(lines).as("the loop meets lines").isBetween(3_000, 9_000);
    assertThat(without).as("and lines without a concentration").isGreaterThan(50);
  }

  private static double[] numbers(SplittableRandom random, int n, boolean tame) {
    double size = Math.pow(10, random.nextInt(-80, 80));
    int kind = random.nextInt(5);
    double[] values = new double[n];
    for (int i = 0; i < n; i++) {
      values[i] =
          switch (kind) {
            case 0 -> NASTY[random.nextInt(tame ? 15 : NASTY.length)];
            case 1 -> size * random.nextInt(3);
            case 2 -> size * (1 + Math.ulp(1.0) * random.nextInt(-40, 40));
            case 3 -> random.nextDouble(-1, 1) * Math.pow(10, random.nextInt(-76, 76));
            default -> size * random.nextGaussian();
          };
    }
    return values;
  }

  private static void examine(StraightLine line, SplittableRandom random, String seen)
      throws Exception {
    double sd = random.nextInt(4) == 0 ? 0 : Math.pow(10, random.nextInt(-60, 60));
    double df = random.nextInt(5) == 0 ? Double.POSITIVE_INFINITY : 0.5 * random.nextInt(1, 100);
    finite(line, seen);
    finite(line.residualSd(), seen);
    finite(line.slopeStandardError(), seen);
    finite(line.interceptStandardError(), seen);
    finite(line.covariance(), seen);
    finite(line.correlation(), seen);
    finite(NativeEstimate.of(line), seen);
    Optional<NativeEstimate> given = NativeEstimate.of(line, sd, df);
    finite(given, seen);
    if (given.isPresent()) {
      finite(Detection.of(Detection.standardErrorAtZero(line, sd), df), seen);
    }
    finite(QuadraticFit.of(line), seen);
    finite(QuadraticFit.of(line).map(QuadraticFit::nativeConcentration), seen);
    finite(BendTest.of(line), seen);
    for (int i = 0; i < line.n(); i++) {
      finite(line.residual(i), seen);
      finite(line.leverage(i), seen);
      finite(DeletedResidual.of(line, i, random.nextBoolean() ? 0 : sd), seen);
    }
  }

  private static void finite(Object value, String seen) throws Exception {
    if (value instanceof Double number) {
      assertThat(Double.isFinite(number)).as("%s in %s", number, seen).isTrue();
    } else if (value instanceof OptionalDouble number) {
      finite(number.orElse(0), seen);
    } else if (value instanceof Optional<?> optional) {
      if (optional.isPresent()) {
        finite(optional.get(), seen);
      }
    } else if (value instanceof Record record) {
      for (RecordComponent component : record.getClass().getRecordComponents()) {
        finite(component.getAccessor().invoke(record), component.getName() + " of " + seen);
      }
    }
  }
}
