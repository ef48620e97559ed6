package org.spikewright.fit;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/** The priors of a pool's lines and of its parabolas. */
final class PooledPriors {
  private PooledPriors() {}

  static Optional<VariancePrior> ofLines(List<PooledLine> lines) {
    return VariancePrior.of(
        lines.stream().mapToDouble(PooledLine::variance).toArray(),
        lines.stream().mapToInt(PooledLine::df).toArray());
  }

  /**
   * From the parabolas of series with four flasks or more; never from straight lines, whose
   * variances hold the bend that is looked for.
   */
  static Optional<VariancePrior> ofCurves(List<PooledLine> lines) {
    List<Double> variances = new ArrayList<>();
    List<Integer> df = new ArrayList<>();
    for (PooledLine line : lines) {
      Optional<Double> variance = line.curveVariance();
      if (variance.isPresent()) {
        variances.add(variance.get());
        df.add(line.line().n() - 3);
      }
    }
    return VariancePrior.of(
        variances.stream().mapToDouble(Double::doubleValue).toArray(),
        df.stream().mapToInt(Integer::intValue).toArray());
  }
}
