package org.spikewright.judgement;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.fit.BendTest;
import org.spikewright.fit.DeletedResidual;
import org.spikewright.fit.Detection;
import org.spikewright.fit.NativeEstimate;
import org.spikewright.fit.StraightLine;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;

/**
 * The numbers of one series. On the axis: {@code line}, {@code estimate}, {@code bend}. On the
 * sample's scale, in {@code series.toResult().unit()}: everything else.
 *
 * @param series the series
 * @param flasks the flasks the line was fitted to, in the order of the line's points
 * @param line least squares on flask means
 * @param estimate the x-intercept with its interval
 * @param bend the one-sided bend test; empty with fewer than four distinct points
 * @param residuals deleted residual of each point; empty where it does not exist
 * @param detection critical value and detection limit on the sample's scale; empty without residual
 *     degrees of freedom
 * @param value the result
 * @param standardError standard error of the result from the fit alone; empty without residual
 *     degrees of freedom
 * @param lower95 lower end of the 95 % interval of the fit; empty when there is none or it is
 *     unbounded
 * @param upper95 upper end likewise
 */
public record SeriesResult(
    AdditionSeries series,
    List<Flask> flasks,
    StraightLine line,
    NativeEstimate estimate,
    Optional<BendTest> bend,
    List<Optional<DeletedResidual>> residuals,
    Optional<Detection> detection,
    double value,
    OptionalDouble standardError,
    OptionalDouble lower95,
    OptionalDouble upper95) {}
