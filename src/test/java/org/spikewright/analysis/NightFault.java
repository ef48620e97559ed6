package org.spikewright.analysis;

import java.util.EnumSet;
import java.util.List;
import java.util.Set;
import java.util.SplittableRandom;
import org.spikewright.fit.PooledSeries;
import org.spikewright.fit.SimulatedNight;
import org.spikewright.fit.SimulatedNight.Plan;
import org.spikewright.judgement.FlagKind;

/**
 * Something that may be wrong with a simulated night.
 *
 * @param words for the table
 * @param touched how many series it touches, the first of the night
 * @param names the flags that would name it
 * @param least the share of touched series that has to be found, with four to six flasks
 * @param maker makes a night with it
 */
record NightFault(String words, int touched, Set<FlagKind> names, double least, Maker maker) {
  /** How many series a night has. */
  static final int NIGHT = 60;

  private static final int FEW = 6;
  private static final int THREE = 3;
  private static final int ONE = 1;

  /** Makes a night. */
  interface Maker {
    List<PooledSeries> night(SplittableRandom random, Plan plan);
  }

  /** Changes the signals of one series. */
  private interface Slip {
    void change(SplittableRandom random, PooledSeries series, double[] signals);
  }

  static final NightFault NONE =
      new NightFault("nothing", NIGHT, EnumSet.noneOf(FlagKind.class), 0, SimulatedNight::straight);

  static final List<NightFault> ALL =
      List.of(
          bend(0.05, FEW, 0.02),
          bend(0.10, FEW, 0.15),
          bend(0.20, FEW, 0.85),
          bend(0.05, NIGHT, 0.35),
          bend(0.10, NIGHT, 0.98),
          bend(0.20, NIGHT, 0.98),
          oddFlask(ONE, 0.75),
          oddFlask(THREE, 0.4),
          slip(
              "one addition 30 % too large, in 3 of 60",
              THREE,
              EnumSet.of(FlagKind.ODD_FLASK, FlagKind.ODD_LEVEL, FlagKind.SUSPECTED_SLIP),
              0.98,
              (random, series, y) -> wrongVolume(series, y, anyAddition(random, y.length), 0.3)),
          slip(
              "one addition 30 % too small, in 3 of 60",
              THREE,
              EnumSet.of(FlagKind.ODD_FLASK, FlagKind.ODD_LEVEL, FlagKind.SUSPECTED_SLIP),
              0.98,
              (random, series, y) -> wrongVolume(series, y, anyAddition(random, y.length), -0.3)),
          slip(
              "two neighbouring flasks swapped, in 3 of 60",
              THREE,
              EnumSet.of(FlagKind.SUSPECTED_SLIP),
              0.98,
              NightFault::swapped),
          slip(
              "a stock ten times as strong, in 3 of 60",
              THREE,
              EnumSet.of(FlagKind.ODD_SLOPE, FlagKind.SUSPECTED_SLIP),
              0.98,
              NightFault::tenfold),
          slip(
              "the lowest addition 30 % too large in all",
              NIGHT,
              EnumSet.of(FlagKind.LEVEL_OFF),
              0.98,
              (random, series, y) -> wrongVolume(series, y, 1, 0.3)),
          slip(
              "the top addition 10 % too small in all",
              NIGHT,
              EnumSet.of(FlagKind.LEVEL_OFF, FlagKind.SHARED_BEND),
              0.98,
              (random, series, y) -> wrongVolume(series, y, y.length - 1, -0.1)));

  private static NightFault bend(double bias, int touched, double least) {
    return new NightFault(
        "a bend that makes the result "
            + Math.round(100 * bias)
            + " % too high, in "
            + (touched == NIGHT ? "all" : touched + " of 60"),
        touched,
        EnumSet.of(touched == NIGHT ? FlagKind.SHARED_BEND : FlagKind.BENT),
        least,
        (random, plan) ->
            SimulatedNight.bent(
                random, plan, touched, SimulatedNight.curvatureFor(bias, plan.flasks())));
  }

  private static NightFault oddFlask(int touched, double least) {
    return slip(
        "one odd flask, 10 standard deviations off, in " + touched + " of 60",
        touched,
        EnumSet.of(FlagKind.ODD_FLASK, FlagKind.ODD_LEVEL),
        least,
        NightFault::oddFlask);
  }

  private static NightFault slip(
      String words, int touched, Set<FlagKind> names, double least, Slip slip) {
    return new NightFault(
        words,
        touched,
        names,
        least,
        (random, plan) -> {
          List<PooledSeries> night = SimulatedNight.straight(random, plan);
          for (int j = 0; j < touched; j++) {
            double[] y = night.get(j).y().clone();
            slip.change(random, night.get(j), y);
            night.set(j, SimulatedNight.pooled(night.get(j).x(), y));
          }
          return night;
        });
  }

  private static int anyAddition(SplittableRandom random, int flasks) {
    return random.nextInt(1, flasks);
  }

  /** In standard deviations of a night's typical flask, 1 % of the unspiked signal. */
  private static void oddFlask(SplittableRandom random, PooledSeries series, double[] y) {
    double off = 10 * ProofTest.NOISE * SimulatedNight.TRUTH * series.sensitivity().orElseThrow();
    y[random.nextInt(y.length)] += random.nextBoolean() ? off : -off;
  }

  private static void wrongVolume(PooledSeries series, double[] y, int level, double share) {
    y[level] += share * series.sensitivity().orElseThrow() * series.x()[level];
  }

  private static void swapped(SplittableRandom random, PooledSeries series, double[] y) {
    int first = random.nextInt(y.length - 1);
    double kept = y[first];
    y[first] = y[first + 1];
    y[first + 1] = kept;
  }

  private static void tenfold(SplittableRandom random, PooledSeries series, double[] y) {
    for (int i = 0; i < y.length; i++) {
      y[i] += 9 * series.sensitivity().orElseThrow() * series.x()[i];
    }
  }
}
