package org.spikewright.fit;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.stream.IntStream;

/**
 * A slip as a model of the signals: y = intercept·constant + slope·x, both columns as they would be
 * had the slip happened.
 *
 * @param constant ones, or what the volume factor makes of them
 * @param x additions in truth, times the same
 * @param scaled whether the columns carry a volume factor
 */
record SlipHypothesis(
    Slips.Kind kind, List<Integer> points, double[] constant, double[] x, boolean scaled) {

  /** Every slip that the layout allows, whether or not it can be told from a flawless series. */
  static List<SlipHypothesis> all(Slips.Suspect suspect) {
    List<SlipHypothesis> all = new ArrayList<>();
    Integer[] order = order(suspect.line().x());
    if (suspect.layout() == Slips.Layout.FLASKS) {
      addSwaps(all, suspect.line());
      addAdditions(all, suspect.line());
    } else {
      addSteps(all, suspect, order);
    }
    addShifts(all, suspect.line(), order);
    addGrowth(all, suspect);
    return all;
  }

  private static Integer[] order(double[] x) {
    return IntStream.range(0, x.length)
        .boxed()
        .sorted(Comparator.comparingDouble(i -> x[i]))
        .toArray(Integer[]::new);
  }

  private static SlipHypothesis moved(Slips.Kind kind, List<Integer> points, double[] x) {
    double[] ones = new double[x.length];
    Arrays.fill(ones, 1);
    return new SlipHypothesis(kind, points, ones, x, false);
  }

  private static void addSwaps(List<SlipHypothesis> all, StraightLine line) {
    for (int i = 0; i < line.n(); i++) {
      for (int j = i + 1; j < line.n(); j++) {
        if (line.x()[i] != line.x()[j]) {
          double[] x = line.x().clone();
          x[i] = line.x()[j];
          x[j] = line.x()[i];
          all.add(moved(Slips.Kind.SWAPPED, List.of(i, j), x));
        }
      }
    }
  }

  private static void addAdditions(List<SlipHypothesis> all, StraightLine line) {
    for (int i = 0; i < line.n(); i++) {
      if (line.x()[i] > 0) {
        for (int times : new int[] {0, 2}) {
          double[] x = line.x().clone();
          x[i] *= times;
          Slips.Kind kind = times == 0 ? Slips.Kind.MISSED : Slips.Kind.DOUBLED;
          all.add(moved(kind, List.of(i), x));
        }
      }
    }
  }

  /** An addition to one vessel that is missed or doubled is so in all later steps too. */
  private static void addSteps(List<SlipHypothesis> all, Slips.Suspect suspect, Integer[] order) {
    double[] x = suspect.line().x();
    for (int k = 1; k < order.length; k++) {
      double step = x[order[k]] - x[order[k - 1]];
      if (step > 0) {
        all.add(stepped(Slips.Kind.MISSED, suspect, order, k));
        all.add(stepped(Slips.Kind.DOUBLED, suspect, order, k));
      }
    }
  }

  private static SlipHypothesis stepped(
      Slips.Kind kind, Slips.Suspect suspect, Integer[] order, int k) {
    int times = kind == Slips.Kind.MISSED ? -1 : 1;
    double[] x = suspect.line().x();
    List<Double> factors = suspect.applied();
    double step = x[order[k]] - x[order[k - 1]];
    double growth = factors.isEmpty() ? 0 : factors.get(order[k]) - factors.get(order[k - 1]);
    double[] constant = new double[x.length];
    double[] moved = new double[x.length];
    for (int rank = 0; rank < order.length; rank++) {
      int j = order[rank];
      double factor = factors.isEmpty() ? 1 : factors.get(j);
      boolean has = rank >= k;
      constant[j] = has ? factor / (factor + times * growth) : 1;
      moved[j] = constant[j] * (has ? x[j] + times * step : x[j]);
    }
    return new SlipHypothesis(kind, List.of(order[k]), constant, moved, growth != 0);
  }

  private static void addShifts(List<SlipHypothesis> all, StraightLine line, Integer[] order) {
    int n = order.length;
    for (int k = 1; k < n; k++) {
      if (line.x()[order[k]] == line.x()[order[k - 1]]) {
        return;
      }
    }
    double[] lower = new double[n];
    double[] higher = new double[n];
    for (int k = 0; k < n; k++) {
      lower[order[k]] = line.x()[order[(k + n - 1) % n]];
      higher[order[k]] = line.x()[order[(k + 1) % n]];
    }
    // With two or three flasks these are swaps, or close to it, but other ones than those tried.
    if (n > 2) {
      all.add(moved(Slips.Kind.SHIFTED_UP, List.of(), lower));
      all.add(moved(Slips.Kind.SHIFTED_DOWN, List.of(), higher));
    }
  }

  private static void addGrowth(List<SlipHypothesis> all, Slips.Suspect suspect) {
    List<Double> growth = suspect.growth();
    if (growth.stream().distinct().count() < 2) {
      return;
    }
    double[] constant = new double[growth.size()];
    double[] x = new double[growth.size()];
    for (int i = 0; i < x.length; i++) {
      constant[i] = 1 / growth.get(i);
      x[i] = suspect.line().x()[i] / growth.get(i);
    }
    all.add(new SlipHypothesis(Slips.Kind.GROWING_VOLUME, List.of(), constant, x, true));
  }
}
