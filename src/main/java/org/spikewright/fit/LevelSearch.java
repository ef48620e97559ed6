package org.spikewright.fit;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import java.util.stream.IntStream;

/**
 * Looks for addition levels that lie off over a night, the strongest first; what is found is left
 * out before the next is looked for, since one wrong level tilts the lines and moves the others.
 */
final class LevelSearch {
  /** A level of fewer series is not judged. */
  private static final int LEAST_SERIES = 5;

  /** Amounts this near are one level. */
  private static final double ALIKE = 1e-9;

  private final Optional<VariancePrior> given;
  private final double rate;

  LevelSearch(Optional<VariancePrior> given, double rate) {
    this.given = given;
    this.rate = rate;
  }

  /** The levels that are off, strongest first. */
  List<LevelBias> off(List<PooledLine> lines) {
    List<LevelBias> found = new ArrayList<>();
    List<PooledLine> left = lines;
    while (true) {
      List<LevelBias> all = all(left);
      Optional<LevelBias> strongest = strongest(all);
      if (strongest.isEmpty()) {
        return found;
      }
      found.add(strongest.get());
      left = without(left, strongest.get().addition());
    }
  }

  Optional<LevelBias> strongest(List<LevelBias> all) {
    return all.stream()
        .filter(level -> level.p() < rate)
        .max(Comparator.comparingDouble(level -> Math.abs(level.t())));
  }

  /** Every level's test, in rising order; p times the number of levels. */
  List<LevelBias> all(List<PooledLine> lines) {
    List<LevelBias> all = new ArrayList<>();
    List<Double> levels = levels(lines);
    for (double level : levels) {
      test(lines, level, levels.size()).ifPresent(all::add);
    }
    return all;
  }

  private Optional<LevelBias> test(List<PooledLine> lines, double level, int tests) {
    List<CommonEffect.Part> parts = new ArrayList<>();
    for (PooledLine line : lines) {
      if (line.line().n() > 3) {
        CommonEffect.part(line, column(line, level)).ifPresent(parts::add);
      }
    }
    if (parts.size() < LEAST_SERIES) {
      return Optional.empty();
    }
    return CommonEffect.of(parts, given)
        .map(
            effect ->
                new LevelBias(
                    level,
                    effect.coefficient(),
                    effect.standardError(),
                    effect.meanT(),
                    effect.series(),
                    effect.t(),
                    effect.df(),
                    Math.min(1, tests * effect.pTwoSided()),
                    false));
  }

  /** What a share of 1 too much adds to each flask's signal. */
  private static double[] column(PooledLine pooled, double level) {
    StraightLine line = pooled.line();
    double[] column = new double[line.n()];
    for (int i = 0; i < column.length; i++) {
      if (isAt(pooled.series().addition()[i], level)) {
        column[i] = level == 0 ? line.at(line.x()[i]) : line.slope() * line.x()[i];
      }
    }
    return column;
  }

  static boolean isAt(double addition, double level) {
    return Math.abs(addition - level) <= ALIKE * Math.abs(level);
  }

  /** The levels of enough series, in rising order. */
  private static List<Double> levels(List<PooledLine> lines) {
    TreeMap<Double, Integer> counts = new TreeMap<>();
    for (PooledLine line : lines) {
      List<Double> seen = new ArrayList<>();
      for (double addition : line.series().addition()) {
        if (Double.isFinite(addition) && seen.stream().noneMatch(level -> isAt(addition, level))) {
          seen.add(addition);
          counts.merge(known(counts, addition), 1, Integer::sum);
        }
      }
    }
    return counts.entrySet().stream()
        .filter(entry -> entry.getValue() >= LEAST_SERIES)
        .map(Map.Entry::getKey)
        .toList();
  }

  private static double known(TreeMap<Double, Integer> counts, double addition) {
    for (Double near : new Double[] {counts.floorKey(addition), counts.ceilingKey(addition)}) {
      if (near != null && isAt(addition, near)) {
        return near;
      }
    }
    return addition;
  }

  /** The series without the flasks of a level, where enough are left. */
  static List<PooledLine> without(List<PooledLine> lines, double level) {
    return lines.stream().flatMap(line -> without(line, level).stream()).toList();
  }

  private static Optional<PooledLine> without(PooledLine pooled, double level) {
    PooledSeries series = pooled.series();
    int[] kept =
        IntStream.range(0, series.flasks())
            .filter(i -> !isAt(series.addition()[i], level))
            .toArray();
    return kept.length < 3 ? Optional.empty() : pooled.only(kept);
  }
}
