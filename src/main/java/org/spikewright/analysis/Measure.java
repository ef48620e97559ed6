package org.spikewright.analysis;

import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.quantity.Estimate;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Role;
import org.spikewright.reading.Subject;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.SeriesKey;

/**
 * What is kept of a series for comparisons with others.
 *
 * @param value in {@code unit}
 * @param estimate the value with its standard uncertainty; empty where there is none
 * @param expanded its expanded uncertainty; empty likewise
 * @param inSolution concentration in the digest or undiluted solution, before any blank, in {@code
 *     solutionUnit}
 * @param detected whether the result is above its critical value
 */
record Measure(
    SeriesKey key,
    BatchKey batch,
    Role role,
    String method,
    Unit unit,
    double value,
    Optional<Estimate> estimate,
    OptionalDouble expanded,
    double inSolution,
    Unit solutionUnit,
    boolean detected) {

  static Measure of(AdditionSeries series, SeriesResult result) {
    return new Measure(
        series.key(),
        BatchKey.of(series),
        series.role(),
        series.method().name(),
        series.toResult().unit(),
        result.value(),
        estimate(result),
        expanded(result),
        result.estimate().value() * series.toResult().dilution(),
        series.axisUnit(),
        result
            .detection()
            .map(detection -> result.value() > detection.criticalValue())
            .orElse(result.value() > 0));
  }

  Subject subject() {
    return key.subject();
  }

  OptionalDouble standardUncertainty() {
    return estimate.isPresent()
        ? OptionalDouble.of(estimate.get().standardUncertainty())
        : OptionalDouble.empty();
  }

  /** Comparisons rest on the fit alone: pools and budgets come after them, in the second walk. */
  private static Optional<Estimate> estimate(SeriesResult result) {
    OptionalDouble u = result.standardError();
    int df = result.line().residualDf();
    return u.isPresent() && df > 0
        ? Optional.of(new Estimate(result.value(), u.getAsDouble(), df))
        : Optional.empty();
  }

  private static OptionalDouble expanded(SeriesResult result) {
    OptionalDouble t = result.estimate().t();
    OptionalDouble u = result.standardError();
    return t.isPresent() && u.isPresent()
        ? OptionalDouble.of(t.getAsDouble() * u.getAsDouble())
        : OptionalDouble.empty();
  }
}
