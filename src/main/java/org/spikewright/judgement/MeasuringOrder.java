package org.spikewright.judgement;

import java.util.ArrayList;
import java.util.List;

/**
 * In which order flasks are measured so that a steady drift moves the result least. Measured by
 * rising additions a drift turns the line and hides in it; here the flasks' pulls on the result
 * balance about the middle of the order.
 */
final class MeasuringOrder {
  /** Up to so many flasks every order is looked at. */
  private static final int EVERY_ORDER = 7;

  /** A drift that is not steady counts for this much, so that a level is not measured in one go. */
  private static final double BOWED = 0.1;

  private final double[] pull;
  private int[] best;
  private double least = Double.POSITIVE_INFINITY;

  private MeasuringOrder(double[] pull) {
    this.pull = pull;
  }

  /**
   * The order, which is neither rising nor falling for three flasks or more; always the same for
   * the same pulls.
   *
   * @param pull of each flask on the result, by rising addition
   * @return the flasks from 0, in the order of measurement
   */
  static int[] of(double[] pull) {
    MeasuringOrder search = new MeasuringOrder(pull);
    if (pull.length <= EVERY_ORDER) {
      search.extend(new ArrayList<>());
    } else {
      search.exchange();
    }
    return search.best;
  }

  /** How far a drift of 1 from the first flask to the last moves the result. */
  static double effect(double[] pull, int[] order) {
    double sum = 0;
    for (int place = 0; place < order.length; place++) {
      sum += pull[order[place]] * place;
    }
    return Math.abs(sum) / Math.max(1, order.length - 1);
  }

  /** The same for a drift that falls to the middle and rises again. */
  private double bowed(int[] order) {
    double middle = (order.length - 1) / 2.0;
    double sum = 0;
    for (int place = 0; place < order.length; place++) {
      double off = (place - middle) / Math.max(middle, 1);
      sum += pull[order[place]] * off * off;
    }
    return Math.abs(sum);
  }

  private void extend(List<Integer> chosen) {
    if (chosen.size() == pull.length) {
      keep(chosen.stream().mapToInt(Integer::intValue).toArray());
      return;
    }
    for (int flask = 0; flask < pull.length; flask++) {
      if (!chosen.contains(flask)) {
        chosen.add(flask);
        extend(chosen);
        chosen.remove(chosen.size() - 1);
      }
    }
  }

  /** From the ends inwards, then exchanging two at a time while that helps. */
  private void exchange() {
    int n = pull.length;
    int[] order = new int[n];
    for (int place = 0; place < n; place++) {
      order[place] = place % 2 == 0 ? place / 2 : n - 1 - place / 2;
    }
    keep(order);
    boolean better = true;
    while (better) {
      better = false;
      int[] from = best;
      for (int i = 0; i < n; i++) {
        for (int j = i + 1; j < n; j++) {
          int[] swapped = from.clone();
          swapped[i] = from[j];
          swapped[j] = from[i];
          better |= keep(swapped);
        }
      }
    }
  }

  /** Whether an order is kept because it is clearly better than all before. */
  private boolean keep(int[] order) {
    double effect = effect(pull, order) + BOWED * bowed(order);
    if (isMonotone(order) || !(effect < least * (1 - 1e-9) - 1e-12)) {
      return false;
    }
    least = effect;
    best = order;
    return true;
  }

  private static boolean isMonotone(int[] order) {
    boolean rising = true;
    boolean falling = true;
    for (int i = 1; i < order.length; i++) {
      rising &= order[i] > order[i - 1];
      falling &= order[i] < order[i - 1];
    }
    return order.length > 2 && (rising || falling);
  }
}
