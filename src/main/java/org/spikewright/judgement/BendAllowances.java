package org.spikewright.judgement;

import java.util.Optional;
import org.spikewright.fit.BendAllowance;
import org.spikewright.fit.QuadraticFit;
import org.spikewright.fit.StraightLine;
import org.spikewright.fit.Variance;

/** The bend allowance of a series alone. */
final class BendAllowances {
  private BendAllowances() {}

  /** By the parabola's own residual variance; empty with fewer than four flasks. */
  static Optional<BendAllowance> own(StraightLine line) {
    return QuadraticFit.of(line)
        .filter(fit -> fit.residualDf() > 0)
        .flatMap(
            fit -> {
              int df = fit.residualDf();
              return BendAllowance.of(line, new Variance(fit.residualSumOfSquares() / df, df));
            });
  }
}
