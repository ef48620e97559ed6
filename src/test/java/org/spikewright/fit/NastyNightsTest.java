package org.spikewright.fit;

import static org.assertj.core.api.Assertions.assertThat;

import java.lang.reflect.RecordComponent;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.SplittableRandom;
import org.junit.jupiter.api.Test;

/** Whatever a pool holds, every number that comes out is finite, but for degrees of freedom. */
class NastyNightsTest {
  /** Components that may be infinite by their documentation. */
  private static final Set<String> MAY_BE_INFINITE = Set.of("df", "priorDf");

  private static final double[] NASTY = {
    0,
    -0.0,
    1,
    -1,
    1.0 / 3,
    1e-9,
    1e9,
    1e15,
    1e74,
    -1e74,
    1e-74,
    1e150,
    1e300,
    Double.MIN_VALUE,
    Double.NaN,
    Double.POSITIVE_INFINITY,
    Double.NEGATIVE_INFINITY
  };

  @Test
  void three_hundred_nasty_pools_give_no_nan_and_no_exception() throws Exception {
    int lent = 0;
    int bends = 0;
    int levels = 0;
    for (long seed = 1; seed <= 300; seed++) {
      SplittableRandom random = new SplittableRandom(seed);
      List<PooledSeries> tonight = pool(random, random.nextInt(0, 25));
      List<PooledSeries> remembered = pool(random, random.nextInt(0, 15));
      PoolOptions options =
          new PoolOptions(
              random.nextBoolean() ? Weighting.EQUAL : Weighting.BY_NOISE,
              random.nextBoolean() ? BendTest.Side.SATURATION : BendTest.Side.EITHER,
              0.01);
      PoolEvidence evidence = PoolEvidence.of(tonight, remembered, options);
      finite(evidence, "seed " + seed);
      lent += evidence.lent().isPresent() ? 1 : 0;
      bends += evidence.bend().isPresent() ? 1 : 0;
      levels += evidence.levels().size();
      for (PooledSeries series : tonight) {
        examine(series, evidence.lent(), random, "seed " + seed);
        examine(series, evidence.lentByInstrument(), random, "seed " + seed);
      }
    }
    assertThat(lent).as("pools that lend").isGreaterThan(100);
    assertThat(bends).as("pools with a bend to test").isGreaterThan(150);
    assertThat(levels).as("levels found off").isGreaterThan(5);
  }

  private static void examine(
      PooledSeries series, Optional<Lent> lent, SplittableRandom random, String seen)
      throws Exception {
    Optional<StraightLine> ordinary = PooledLine.ordinary(series);
    if (lent.isPresent() && ordinary.isPresent()) {
      StraightLine line = ordinary.get();
      ModeratedSeries moderated = ModeratedSeries.of(line, series, lent.get(), 0);
      finite(moderated, seen + " " + Arrays.toString(series.y()));
      finite(DriftExposure.of(line, series.minutes()), seen);
      finite(OddFlask.of(line, series.addition(), random.nextInt(2)), seen);
      if (lent.get().bend().isPresent()) {
        finite(lent.get().bend().get().bias(line, series.factor()), seen);
        finite(lent.get().bend().get().signalWhereItTakes(0.05), seen);
      }
    }
  }

  private static List<PooledSeries> pool(SplittableRandom random, int size) {
    List<PooledSeries> pool = new ArrayList<>();
    int kind = random.nextInt(6);
    for (int j = 0; j < size; j++) {
      int n = random.nextInt(0, 13);
      double[] x = new double[n];
      double[] y = new double[n];
      double[] minutes = new double[n];
      double[] replicate = new double[n];
      double[] factor = new double[n];
      int[] readings = new int[n];
      double unit = kind == 3 ? Math.pow(10, random.nextInt(-60, 60)) : 100;
      for (int i = 0; i < n; i++) {
        x[i] = n < 2 ? 0 : 2.0 * (i - i % 2) / (n - 1);
        double exact = unit * (1 + x[i]);
        y[i] = noisy(random, kind, exact);
        minutes[i] = random.nextInt(20) == 0 ? Double.NaN : random.nextInt(600);
        replicate[i] = random.nextInt(3) == 0 ? Double.NaN : exact * exact * 1e-4;
        factor[i] = random.nextInt(5) == 0 ? 1.1 : 1;
        readings[i] = random.nextInt(1, 4);
        if (kind == 5 && random.nextInt(10) == 0) {
          x[i] = NASTY[random.nextInt(NASTY.length)];
          replicate[i] = NASTY[random.nextInt(NASTY.length)];
          factor[i] = NASTY[random.nextInt(NASTY.length)];
          minutes[i] = NASTY[random.nextInt(NASTY.length)];
        }
      }
      OptionalDouble sensitivity =
          random.nextInt(4) == 0
              ? OptionalDouble.empty()
              : OptionalDouble.of(
                  kind == 5 ? NASTY[random.nextInt(NASTY.length)] : unit * random.nextDouble());
      pool.add(
          new PooledSeries(x.clone(), x, y, factor, readings, replicate, minutes, sensitivity));
    }
    return pool;
  }

  private static double noisy(SplittableRandom random, int kind, double exact) {
    return switch (kind) {
      case 0 -> exact;
      case 1 -> Math.rint(exact / 50 + 0.2 * random.nextGaussian()) * 50;
      case 2 -> exact - 0.0008 * exact * exact + random.nextGaussian();
      case 3 -> exact * (1 + 0.05 * random.nextGaussian());
      case 4 -> exact * Math.exp(3 * random.nextGaussian());
      default ->
          random.nextInt(4) == 0
              ? NASTY[random.nextInt(NASTY.length)]
              : exact + random.nextGaussian();
    };
  }

  private static void finite(Object value, String seen) throws Exception {
    if (value instanceof Double number) {
      assertThat(Double.isFinite(number)).as("%s in %s", number, seen).isTrue();
    } else if (value instanceof OptionalDouble number) {
      finite(number.orElse(0), seen);
    } else if (value instanceof Optional<?> optional && optional.isPresent()) {
      finite(optional.get(), seen);
    } else if (value instanceof List<?> list) {
      for (Object element : list) {
        finite(element, seen);
      }
    } else if (value instanceof Record record) {
      for (RecordComponent component : record.getClass().getRecordComponents()) {
        Object held = component.getAccessor().invoke(record);
        boolean infinite = held instanceof Double number && number == Double.POSITIVE_INFINITY;
        if (!(infinite && MAY_BE_INFINITE.contains(component.getName()))) {
          finite(held, component.getName() + " of " + seen);
        }
      }
    }
  }

  @Test
  void a_night_without_any_noise_finds_nothing_wrong() {
    List<PooledSeries> night = new ArrayList<>();
    for (int j = 0; j < 20; j++) {
      double[] x = {0, 0.7, 1.3, 2.1};
      double sensitivity = 1000 + 3 * j;
      double[] y = Arrays.stream(x).map(v -> sensitivity * (1 + v)).toArray();
      night.add(SimulatedNight.pooled(x, y));
    }
    PoolEvidence evidence = PoolEvidence.of(night, List.of());
    assertThat(evidence.levels()).isEmpty();
    assertThat(evidence.sharedBend()).isEmpty();
    Lent lent = evidence.lent().orElseThrow();
    for (PooledSeries series : night) {
      ModeratedSeries moderated = ModeratedSeries.of(SimulatedNight.line(series), series, lent, 0);
      assertThat(FamilyOfTests.flags(moderated)).isEmpty();
      NativeEstimate estimate = moderated.estimate().orElseThrow();
      assertThat(SimulatedNight.halfWidth(estimate)).isLessThan(1e-12);
    }
  }

  @Test
  void flasks_of_unlike_numbers_and_rounded_readings_share_a_pool() {
    SplittableRandom random = new SplittableRandom(5);
    List<PooledSeries> night = new ArrayList<>();
    for (int j = 0; j < 60; j++) {
      int n = 3 + j % 10;
      double[] x = new double[n];
      double[] y = new double[n];
      for (int i = 0; i < n; i++) {
        x[i] = 2.0 * i / (n - 1);
        y[i] = Math.rint(100 * (1 + x[i]) + 0.4 * random.nextGaussian());
      }
      night.add(SimulatedNight.pooled(x, y));
    }
    Lent lent = PoolEvidence.of(night, List.of()).lent().orElseThrow();
    int flagged = 0;
    int covered = 0;
    for (PooledSeries series : night) {
      ModeratedSeries moderated =
          ModeratedSeries.of(SimulatedNight.line(series), series, lent, 0.29);
      flagged += FamilyOfTests.flags(moderated).isEmpty() ? 0 : 1;
      covered += SimulatedNight.holds(moderated.estimate().orElseThrow()) ? 1 : 0;
    }
    assertThat(flagged).isLessThanOrEqualTo(4);
    assertThat(covered).isGreaterThanOrEqualTo(52);
  }
}
