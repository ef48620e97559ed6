package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;

import java.lang.reflect.RecordComponent;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;
import org.spikewright.quantity.Estimate;

/** Whatever the data: each number of each result is finite, and nothing is thrown. */
class FiniteOrEmptyTest {
  private static final double[] NASTY = {
    0,
    -0.0,
    1,
    1,
    2,
    0.1,
    -3,
    1e-300,
    1e300,
    Double.MAX_VALUE,
    Double.MIN_VALUE,
    1e-8,
    1e8,
    1e70,
    -1e70,
    1e-70,
    1 + 1e-15,
    Double.NaN,
    Double.POSITIVE_INFINITY
  };

  @Test
  void nasty_numbers_give_finite_results_or_none() throws Exception {
    int results = 0;
    for (int seed = 0; seed < 4_000; seed++) {
      SplittableRandom random = new SplittableRandom(seed);
      int n = random.nextInt(2, 7);
      double[] x = draw(random, n);
      double[] y = draw(random, n);
      for (Optional<?> result : all(random, x, y)) {
        if (result.isPresent()) {
          results++;
          assertFinite(result.get(), "seed " + seed + ": " + result.get());
        }
      }
    }
    assertThat(results).as("the numbers were not all refused").isGreaterThan(10_000);
  }

  private static List<Optional<?>> all(SplittableRandom random, double[] x, double[] y) {
    List<Optional<?>> all = new ArrayList<>();
    all.add(OriginLine.fit(x, y));
    all.add(ControlLimits.of(y));
    if (finite(y)) {
      all.add(Outliers.grubbs(y));
      all.add(Outliers.cochran(new double[][] {x, y}));
    }
    all.add(electrode(random, x, y));
    List<Estimate> estimates = new ArrayList<>();
    for (int i = 0; i < x.length; i++) {
      if (Double.isFinite(x[i]) && Double.isFinite(y[i])) {
        estimates.add(new Estimate(x[i], Math.abs(y[i]), random.nextInt(1, 6)));
      }
    }
    all.add(Combination.of(estimates));
    if (estimates.size() > 1) {
      all.add(Equivalence.of(estimates.get(0), estimates.get(1), 0.1));
    }
    if (StraightLine.fit(x, y) instanceof StraightLine line) {
      all.addAll(ofLine(random, line));
    }
    return all;
  }

  private static List<Optional<?>> ofLine(SplittableRandom random, StraightLine line) {
    List<Double> factors = new ArrayList<>();
    for (int i = 0; i < line.n(); i++) {
      factors.add(1 + 0.1 * i);
    }
    Slips.Lent lent = random.nextBoolean() ? Slips.Lent.nothing() : Slips.Lent.variance(20, 1e-4);
    Slips.Layout layout = Slips.Layout.values()[random.nextInt(2)];
    List<Optional<?>> all = new ArrayList<>();
    all.add(RepeatedMedian.of(line));
    all.add(LackOfFit.of(line));
    all.add(Slips.of(new Slips.Suspect(line, layout, factors, factors), lent));
    Optional<NativeEstimate> own = NativeEstimate.of(line);
    if (own.isPresent()) {
      Preparation.OneVessel vessel =
          new Preparation.OneVessel(
              10, 5, 0.1, factors, List.of(new Preparation.Delivery(1, 2, 0.1)));
      Preparation preparation =
          new Preparation(
              Map.of(Preparation.Input.STOCK, Preparation.Part.known(0.01)),
              10,
              1,
              2,
              Optional.of(vessel));
      all.add(
          AdditionBudget.of(
              line,
              own.get().value(),
              own.get().standardError().stream()
                  .mapToObj(u -> new Preparation.Part(u, line.residualDf()))
                  .findFirst(),
              preparation));
    }
    return all;
  }

  private static Optional<?> electrode(SplittableRandom random, double[] x, double[] y) {
    KnownAdditions.Vessel vessel =
        new KnownAdditions.Vessel(
            5, 10, random.nextBoolean() ? 1 : -2, OptionalDouble.of(298), OptionalDouble.of(58));
    List<KnownAdditions.Reading> readings = new ArrayList<>();
    for (int i = 0; i < x.length; i++) {
      double amount = random.nextBoolean() ? Math.abs(x[i]) : i;
      readings.add(new KnownAdditions.Reading(amount, 0.1 * i, y[i]));
    }
    return Optional.of(KnownAdditions.fit(vessel, readings));
  }

  private static boolean finite(double[] values) {
    for (double value : values) {
      if (!Double.isFinite(value)) {
        return false;
      }
    }
    return true;
  }

  /** Half of the series are ordinary but for one number. */
  private static double[] draw(SplittableRandom random, int n) {
    double[] values = new double[n];
    boolean ordinary = random.nextBoolean();
    for (int i = 0; i < n; i++) {
      values[i] = ordinary ? i + random.nextGaussian() : NASTY[random.nextInt(NASTY.length)];
    }
    if (random.nextInt(3) == 0) {
      values[random.nextInt(n)] = NASTY[random.nextInt(NASTY.length)];
    }
    return values;
  }

  /** Degrees of freedom alone may be infinite. */
  private static void assertFinite(Object result, String what) throws Exception {
    for (RecordComponent component : result.getClass().getRecordComponents()) {
      component.getAccessor().setAccessible(true);
      Object value = component.getAccessor().invoke(result);
      List<?> inside = value instanceof List<?> list ? list : List.of();
      if (value instanceof Optional<?> optional) {
        inside = optional.stream().toList();
      }
      for (Object one : inside) {
        if (one instanceof Record) {
          assertFinite(one, what);
        }
      }
      if (value instanceof Record) {
        assertFinite(value, what);
      } else if (value instanceof OptionalDouble optional) {
        assertThat(optional.orElse(0)).as("%s of %s", component.getName(), what).isFinite();
      } else if (value instanceof Double number
          && !component.getName().contains("df")
          && !component.getName().contains("degrees")) {
        assertThat(number).as("%s of %s", component.getName(), what).isFinite();
      }
    }
  }
}
