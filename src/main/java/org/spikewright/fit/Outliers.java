package org.spikewright.fit;

import java.util.Arrays;
import java.util.Optional;

/**
 * Tests for one value apart from the others, and for one group that scatters more than the others.
 *
 * <p>Source: Grubbs, Technometrics 11 (1969) 1; Cochran, Ann. Eugenics 11 (1941) 47; ISO 5725-2,
 * 7.3.
 */
public final class Outliers {
  private Outliers() {}

  /**
   * The value farthest from the mean.
   *
   * @param index which, from 0
   * @param n number of values, 3 or more
   * @param g distance from the mean over the standard deviation
   * @param p two-sided probability that the farthest of n normal values lies this far; never too
   *     small (Bonferroni)
   */
  public record Grubbs(int index, int n, double g, double p) {
    /**
     * What g exceeds with probability {@code alpha} at most, whichever side it lies on.
     *
     * @param alpha between 0 and 1
     */
    public double critical(double alpha) {
      double t = StudentT.quantile(1 - alpha / (2 * n), n - 2);
      return (n - 1) / Math.sqrt(n) * Math.sqrt(t * t / (n - 2 + t * t));
    }
  }

  /**
   * The group with the largest part in the scatter, for its size.
   *
   * @param index which, from 0
   * @param groups number of groups, 2 or more
   * @param c its sum of squares over that of all groups; of groups of one size Cochran's C, the
   *     largest variance over the sum of variances
   * @param p probability that a group of normal values of one standard deviation has such a part;
   *     never too small (Bonferroni)
   * @param df degrees of freedom of the group
   * @param otherDf degrees of freedom of all other groups
   */
  public record Cochran(int index, int groups, double c, double p, double df, double otherDf) {
    /**
     * What c exceeds with probability {@code alpha} at most.
     *
     * @param alpha between 0 and 1
     */
    public double critical(double alpha) {
      double f = FisherF.upperQuantile(alpha / groups, df, otherDf);
      return 1 / (1 + otherDf / df / f);
    }
  }

  /**
   * Grubbs' test of the farthest value.
   *
   * @param values finite
   * @return empty with fewer than three values or when they do not differ
   */
  public static Optional<Grubbs> grubbs(double[] values) {
    int n = values.length;
    if (n < 3) {
      return Optional.empty();
    }
    double mean = StraightLine.mean(values);
    int farthest = 0;
    for (int i = 1; i < n; i++) {
      if (Math.abs(values[i] - mean) > Math.abs(values[farthest] - mean)) {
        farthest = i;
      }
    }
    double distance = Math.abs(values[farthest] - mean);
    // In units of the farthest, so that no square overflows or vanishes.
    double squares = 0;
    for (double value : values) {
      double part = (value - mean) / distance;
      squares += part * part;
    }
    double g = Math.sqrt((n - 1) / squares);
    if (!(distance > 4 * Math.ulp(mean)) || !Double.isFinite(g)) {
      return Optional.empty();
    }
    double left = Math.max(0, (n - 1.0) * (n - 1.0) / n - g * g);
    double t = g * Math.sqrt((n - 2) / left);
    return Optional.of(new Grubbs(farthest, n, g, Math.min(1, n * StudentT.twoSided(t, n - 2))));
  }

  /**
   * Cochran's test of the group that scatters most. ISO 5725-2 has it for groups of one size; here
   * a group of another size counts with its own degrees of freedom.
   *
   * @param groups finite values; groups with fewer than two are not tested
   * @return empty with fewer than two groups to compare or when no values differ
   */
  public static Optional<Cochran> cochran(double[][] groups) {
    double[] df = new double[groups.length];
    double[] squares = new double[groups.length];
    int tested = 0;
    for (int i = 0; i < groups.length; i++) {
      df[i] = Math.max(0, groups[i].length - 1);
      squares[i] = df[i] > 0 ? squares(groups[i]) : 0;
      tested += df[i] > 0 ? 1 : 0;
    }
    double all = Arrays.stream(squares).sum();
    double allDf = Arrays.stream(df).sum();
    if (tested < 2 || !(all > 0 && all <= Double.MAX_VALUE)) {
      return Optional.empty();
    }
    Optional<Cochran> most = Optional.empty();
    for (int i = 0; i < groups.length; i++) {
      if (df[i] > 0) {
        Cochran one = cochran(i, tested, squares[i] / all, df[i], allDf - df[i]);
        if (most.isEmpty() || before(one, most.get())) {
          most = Optional.of(one);
        }
      }
    }
    return most;
  }

  /** Where both are certain (p is 1 or below the smallest number) the larger part decides. */
  private static boolean before(Cochran one, Cochran other) {
    return one.p < other.p || one.p == other.p && one.c > other.c;
  }

  private static Cochran cochran(int i, int groups, double c, double df, double otherDf) {
    double f = c / df / ((1 - c) / otherDf);
    double p = c < 1 ? Math.min(1, groups * FisherF.upper(f, df, otherDf)) : 0;
    return new Cochran(i, groups, c, p, df, otherDf);
  }

  private static double squares(double[] values) {
    double mean = StraightLine.mean(values);
    double sum = 0;
    for (double value : values) {
      sum += (value - mean) * (value - mean);
    }
    return sum;
  }
}
