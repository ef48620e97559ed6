package org.spikewright.judgement;

import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import org.spikewright.judgement.Flag.Weight;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;

/** Whether the additions leave a wide gap, or one of them repeats while the others do not. */
final class UnevenAdditions {
  private UnevenAdditions() {}

  static Optional<Flag> flag(AdditionSeries series, Limit limit) {
    Map<Double, Integer> levels = new TreeMap<>();
    for (Flask flask : series.flasks()) {
      levels.merge(flask.x(), 1, Integer::sum);
    }
    if (!limit.on() || levels.size() < 3 || series.method().fitReadings()) {
      return Optional.empty();
    }
    double[] x = levels.keySet().stream().mapToDouble(Double::doubleValue).toArray();
    double mean = (x[x.length - 1] - x[0]) / (x.length - 1);
    double widest = 0;
    for (int i = 1; i < x.length; i++) {
      widest = Math.max(widest, x[i] - x[i - 1]);
    }
    double ratio = widest / mean;
    if (ratio > limit.value()) {
      return Optional.of(
          Flags.against(
              FlagKind.UNEVEN_ADDITIONS,
              Weight.REVIEW,
              ratio,
              limit,
              "The additions leave a gap "
                  + Flags.n(ratio)
                  + " times as wide as their mean distance.",
              "Check the additions against the bench sheet; space them evenly."));
    }
    return repeated(levels);
  }

  /** One spiked level prepared twice where all others stand alone is often a mistyped addition. */
  private static Optional<Flag> repeated(Map<Double, Integer> levels) {
    long once = levels.entrySet().stream().filter(e -> e.getValue() == 1).count();
    long spikedTwice =
        levels.entrySet().stream().filter(e -> e.getKey() != 0 && e.getValue() > 1).count();
    return spikedTwice == 1 && once >= 2
        ? Optional.of(
            Flags.plain(
                FlagKind.UNEVEN_ADDITIONS,
                Weight.NOTE,
                "One addition was made to two flasks and all others to one.",
                "Check the additions against the bench sheet."))
        : Optional.empty();
  }
}
