package org.spikewright.judgement;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.fit.BendAllowance;
import org.spikewright.fit.BendTest;
import org.spikewright.fit.Budget;
import org.spikewright.fit.DeletedResidual;
import org.spikewright.fit.Detection;
import org.spikewright.fit.NativeEstimate;
import org.spikewright.fit.OddFlask;
import org.spikewright.fit.PooledSeries;
import org.spikewright.fit.StraightLine;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;

/**
 * The numbers of one series. On the axis: {@code line}, {@code pooled}, {@code estimate}, {@code
 * bend}, {@code odd}. On the sample's scale, in {@code series.toResult().unit()}: everything else.
 * What is called own rests on this series' residuals alone.
 *
 * @param series the series
 * @param flasks the flasks the line was fitted to, in the order of the line's points
 * @param line least squares on flask means, weighted where the method says so
 * @param pooled the same flasks as the pool sees them
 * @param estimate the x-intercept with its own interval
 * @param bend the own bend test; empty with fewer than four distinct points
 * @param residuals own deleted residual of each point; empty where it does not exist
 * @param odd the own test for the oddest flask or level; empty with fewer than four flasks
 * @param ownDetection critical value and detection limit; empty without residual degrees of freedom
 * @param value the result
 * @param standardError own standard error of the result from the fit; empty without residual
 *     degrees of freedom
 * @param lower95 lower end of the own 95 % interval of the fit; empty when there is none or it is
 *     unbounded
 * @param upper95 upper end likewise
 * @param borrowed the same with what a pool lends; empty where none does
 * @param budget everything that makes the result uncertain; empty where the fit has no uncertainty
 */
public record SeriesResult(
    AdditionSeries series,
    List<Flask> flasks,
    StraightLine line,
    PooledSeries pooled,
    NativeEstimate estimate,
    Optional<BendTest> bend,
    List<Optional<DeletedResidual>> residuals,
    Optional<OddFlask> odd,
    Optional<Detection> ownDetection,
    double value,
    OptionalDouble standardError,
    OptionalDouble lower95,
    OptionalDouble upper95,
    Optional<Borrowed> borrowed,
    Optional<Budget> budget) {

  /** What a pool lends, where the method reports by it. */
  public Optional<Borrowed> reportedPool() {
    return borrowed.filter(Borrowed::isReported);
  }

  /** The estimate whose interval is reported, on the axis. */
  public NativeEstimate reportedEstimate() {
    return reportedPool().flatMap(pool -> pool.series().estimate()).orElse(estimate);
  }

  /** Lower end of the reported interval. */
  public OptionalDouble reportedLower95() {
    return reportedPool().map(Borrowed::lower95).orElse(lower95);
  }

  /** Upper end of the reported interval. */
  public OptionalDouble reportedUpper95() {
    return reportedPool().map(Borrowed::upper95).orElse(upper95);
  }

  /** Standard error of the fit by the reported interval's variance. */
  public OptionalDouble reportedStandardError() {
    return reportedPool().map(Borrowed::standardError).orElse(standardError);
  }

  /** Critical value and detection limit by the reported interval's variance. */
  public Optional<Detection> detection() {
    return reportedPool().isPresent() ? reportedPool().get().detection() : ownDetection;
  }

  /** The bend test that judges: the moderated one where a pool lends, whatever is reported. */
  public Optional<BendTest> judgedBend() {
    return borrowed.flatMap(pool -> pool.series().bend()).or(() -> bend);
  }

  /** The test of the oddest flask that judges. */
  public Optional<OddFlask> judgedOdd() {
    return borrowed.isPresent() ? borrowed.get().series().odd() : odd;
  }

  /** The largest bias by saturation that the data leave open, on the axis. */
  public Optional<BendAllowance> allowance() {
    return borrowed.flatMap(pool -> pool.series().allowance()).or(() -> BendAllowances.own(line));
  }
}
