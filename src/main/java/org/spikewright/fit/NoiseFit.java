package org.spikewright.fit;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.apache.commons.math3.distribution.ChiSquaredDistribution;

/**
 * Fits a noise function to squared deviations: each has an expectation {@code a·σ_0² + b·ρ²} and a
 * spread in proportion to it, so that least squares is weighted anew with the inverse square of
 * what was fitted. Groups whose deviations are out of all likelihood are brought down to its edge.
 */
final class NoiseFit {
  private static final int ROUNDS = 60;

  /**
   * So many squares' worth of belief in what the weighting takes for granted: where the series
   * cannot tell σ_0 from ρ (three flasks of like samples), noise is constant, or where the method
   * has its lines weighted, proportional.
   */
  private static final double LEAN_CONSTANT = 0.3;

  private static final double LEAN_PROPORTIONAL = 12;

  /** A group of clean deviations is brought down once in two hundred. */
  private static final double EDGE = 0.995;

  /**
   * What scatters together: the flasks of a series or the readings of a flask.
   *
   * @param a factor of σ_0² in the expectation of each square
   * @param b factor of ρ²
   * @param square the squared deviations
   * @param df their degrees of freedom together
   * @param count how many equal squares each stands for
   */
  private record Group(double[] a, double[] b, double[] square, int df, int count) {}

  private NoiseFit() {}

  static Optional<NoiseFunction> ofReadings(List<PooledSeries> series) {
    List<Group> groups = new ArrayList<>();
    for (PooledSeries one : series) {
      for (int i = 0; i < one.flasks(); i++) {
        double signal = one.y()[i] / one.factor()[i];
        double variance = one.replicateVariance()[i];
        if (one.readings()[i] > 1 && isUsable(signal) && isUsable(variance)) {
          int df = one.readings()[i] - 1;
          double[] b = {signal * signal};
          groups.add(new Group(new double[] {1}, b, new double[] {variance}, df, df));
        }
      }
    }
    return fit(groups, Weighting.EQUAL);
  }

  private static boolean isUsable(double number) {
    return Math.abs(number) < 1e75;
  }

  static Optional<NoiseFunction> ofFlasks(List<PooledSeries> series, Weighting lean) {
    List<Group> groups = new ArrayList<>();
    for (PooledSeries one : series) {
      PooledLine.ordinary(one).ifPresent(line -> groups.add(scatter(line, one.factor())));
    }
    return fit(groups, lean);
  }

  /**
   * The squared residuals of a line. That of flask i is expected to be Σ_k m_ik²·var_k, m the
   * matrix that makes residuals of signals; with constant noise (1 − leverage)·σ².
   */
  private static Group scatter(StraightLine line, double[] factor) {
    int n = line.n();
    double[] a = new double[n];
    double[] b = new double[n];
    double[] square = new double[n];
    for (int i = 0; i < n; i++) {
      for (int k = 0; k < n; k++) {
        double along = (line.x()[i] - line.xMean()) * (line.x()[k] - line.xMean()) / line.sxx();
        double m = (i == k ? 1 : 0) - 1.0 / n - along;
        double fitted = line.at(line.x()[k]);
        a[i] += m * m * factor[k] * factor[k];
        b[i] += m * m * fitted * fitted;
      }
      square[i] = line.residual(i) * line.residual(i);
    }
    return new Group(a, b, square, n - 2, 1);
  }

  private static Optional<NoiseFunction> fit(List<Group> groups, Weighting lean) {
    if (groups.isEmpty()) {
      return Optional.empty();
    }
    double unit = typicalSquare(groups);
    double start = typicalRatio(groups);
    double[] now = {0, start};
    if (!(start > 0)) {
      // More than half without any scatter, as on rounded displays: begin with the mean.
      now[1] = meanRatio(groups);
    }
    for (int round = 0; round < ROUNDS && now[0] + now[1] > 0; round++) {
      double[] next = step(groups, now, unit, lean);
      boolean settled =
          Math.abs(next[0] - now[0]) + Math.abs(next[1] - now[1]) < 1e-12 * (now[0] + now[1]);
      now = next;
      if (settled) {
        break;
      }
    }
    return Optional.of(new NoiseFunction(Math.sqrt(now[0] * unit), Math.sqrt(now[1])));
  }

  /** The median of b over a: a square of signals with which σ_0² and ρ² become alike in size. */
  private static double typicalSquare(List<Group> groups) {
    double[] squares =
        groups.stream().mapToDouble(group -> sum(group.b()) / sum(group.a())).sorted().toArray();
    double median = squares[squares.length / 2];
    return median > 0 ? median : Math.max(squares[squares.length - 1], 1e-150);
  }

  private static double typicalRatio(List<Group> groups) {
    double[] ratios =
        groups.stream()
            .filter(group -> sum(group.b()) > 0)
            .mapToDouble(group -> ratio(group) / typicalChi(group.df()))
            .sorted()
            .toArray();
    return ratios.length == 0 ? 0 : ratios[ratios.length / 2];
  }

  private static double ratio(Group group) {
    return sum(group.square()) / sum(group.b());
  }

  private static double meanRatio(List<Group> groups) {
    return groups.stream()
        .filter(group -> sum(group.b()) > 0)
        .mapToDouble(NoiseFit::ratio)
        .average()
        .orElse(0);
  }

  /** The median of chi-squared over its degrees of freedom, by Wilson and Hilferty. */
  private static double typicalChi(int df) {
    return Math.pow(1 - 2.0 / (9 * df), 3);
  }

  /** One round of reweighted least squares for σ_0²/unit and ρ², neither below 0. */
  private static double[] step(List<Group> groups, double[] now, double unit, Weighting lean) {
    double saa = 0;
    double sab = 0;
    double sbb = 0;
    double say = 0;
    double sby = 0;
    double least = 1e-6 * (now[0] + now[1]);
    for (Group group : groups) {
      double down = down(group, now, unit, least);
      for (int i = 0; i < group.square().length; i++) {
        double expected = expected(group, i, now, unit, least);
        double a = group.a()[i] / expected;
        double b = group.b()[i] / unit / expected;
        double y = down * group.square()[i] / unit / expected;
        saa += group.count() * a * a;
        sab += group.count() * a * b;
        sbb += group.count() * b * b;
        say += group.count() * a * y;
        sby += group.count() * b * y;
      }
    }
    boolean constant = lean == Weighting.EQUAL;
    double belief = constant ? LEAN_CONSTANT : LEAN_PROPORTIONAL;
    double pull = belief / ((now[0] + now[1]) * (now[0] + now[1]));
    return nonNegative(saa + (constant ? 0 : pull), sab, sbb + (constant ? pull : 0), say, sby);
  }

  private static double expected(Group group, int i, double[] now, double unit, double least) {
    double expected = group.a()[i] * now[0] + group.b()[i] / unit * now[1];
    return Math.max(expected, least * group.a()[i]) + Double.MIN_NORMAL;
  }

  /** The factor on a group's squares that brings them down to the edge of what is likely. */
  private static double down(Group group, double[] now, double unit, double least) {
    double sum = 0;
    double share = 0;
    for (int i = 0; i < group.square().length; i++) {
      sum += group.square()[i] / unit;
      share += expected(group, i, now, unit, least);
    }
    double most = edge(group.df()) * share;
    return sum > most ? most / sum : 1;
  }

  private static double edge(int df) {
    return df < EDGES.length ? EDGES[df] : edgeOf(df);
  }

  private static final double[] EDGES = edges();

  private static double[] edges() {
    double[] edges = new double[64];
    Arrays.setAll(edges, df -> df == 0 ? 1 : edgeOf(df));
    return edges;
  }

  private static double edgeOf(int df) {
    return new ChiSquaredDistribution(null, df).inverseCumulativeProbability(EDGE) / df;
  }

  private static double[] nonNegative(double saa, double sab, double sbb, double say, double sby) {
    double determinant = saa * sbb - sab * sab;
    if (determinant > 1e-10 * saa * sbb) {
      double constant = (sbb * say - sab * sby) / determinant;
      double proportional = (saa * sby - sab * say) / determinant;
      if (constant >= 0 && proportional >= 0) {
        return new double[] {constant, proportional};
      }
    }
    double constantAlone = saa > 0 ? Math.max(0, say / saa) : 0;
    double proportionalAlone = sbb > 0 ? Math.max(0, sby / sbb) : 0;
    // The better of the two edges: the larger fall of the weighted sum of squares.
    return constantAlone * say >= proportionalAlone * sby
        ? new double[] {constantAlone, 0}
        : new double[] {0, proportionalAlone};
  }

  private static double sum(double[] values) {
    double sum = 0;
    for (double value : values) {
      sum += value;
    }
    return sum;
  }
}
