package org.spikewright.fit;

import java.util.Arrays;
import java.util.Comparator;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.IntStream;

/**
 * Whether the levels lie further from the line than flasks of one level lie apart.
 *
 * <p>Source: Draper and Smith, Applied Regression Analysis (1998), 2.1; Danzer and Currie, Pure
 * Appl. Chem. 70 (1998) 993.
 *
 * @param f mean square of the levels about the line over that within levels
 * @param levelDf number of levels − 2
 * @param withinDf number of flasks − number of levels
 * @param p probability of such a ratio or a larger one on a straight line
 */
public record LackOfFit(double f, int levelDf, int withinDf, double p) {

  /** Additions that differ by less than this part of their range are one level. */
  private static final double SAME_LEVEL = 1e-9;

  /**
   * The test on the points of a line. A scatter within levels below the last digits of the numbers
   * counts as those digits.
   *
   * @param line of flask means, not of readings
   * @return empty with fewer than three levels or when no level holds two flasks
   */
  public static Optional<LackOfFit> of(StraightLine line) {
    Integer[] order =
        IntStream.range(0, line.n())
            .boxed()
            .sorted(Comparator.comparingDouble(i -> line.x()[i]))
            .toArray(Integer[]::new);
    double range = line.x()[order[line.n() - 1]] - line.x()[order[0]];
    double within = 0;
    double between = 0;
    int levels = 0;
    for (int start = 0; start < order.length; ) {
      int end = start + 1;
      while (end < order.length
          && line.x()[order[end]] - line.x()[order[start]] <= SAME_LEVEL * range) {
        end++;
      }
      double[] residuals =
          Arrays.stream(order, start, end).mapToDouble(i -> line.residual(i)).toArray();
      double mean = StraightLine.mean(residuals);
      between += residuals.length * mean * mean;
      within += Arrays.stream(residuals).map(r -> (r - mean) * (r - mean)).sum();
      levels++;
      start = end;
    }
    return of(between, within, new int[] {levels - 2, line.n() - levels}, line.rounding());
  }

  private static Optional<LackOfFit> of(double between, double within, int[] df, double rounding) {
    if (df[0] < 1 || df[1] < 1) {
      return Optional.empty();
    }
    double f = between / df[0] / Math.max(within / df[1], rounding * rounding);
    return Double.isFinite(f)
        ? Optional.of(new LackOfFit(f, df[0], df[1], FisherF.upper(f, df[0], df[1])))
        : Optional.empty();
  }

  /**
   * The preparation scatter: the residual variance of the flask means over what re-reading each
   * flask explains. It is shown and never tested: preparing a flask scatters more than reading it,
   * and a test would call that a bend.
   *
   * @param line of flask means
   * @param readingVariance variance of one reading of a flask, signal units squared
   * @param readings in each mean, 1 or more
   * @return empty without residual degrees of freedom or without a reading variance
   */
  public static OptionalDouble preparationScatter(
      StraightLine line, double readingVariance, double readings) {
    OptionalDouble sd = line.residualSd();
    double ratio = sd.orElse(0) / (readingVariance / readings) * sd.orElse(0);
    return sd.isPresent() && readingVariance > 0 && Double.isFinite(ratio)
        ? OptionalDouble.of(ratio)
        : OptionalDouble.empty();
  }
}
