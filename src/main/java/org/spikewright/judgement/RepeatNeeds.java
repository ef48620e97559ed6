package org.spikewright.judgement;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.fit.DeletedResidual;
import org.spikewright.fit.Detection;
import org.spikewright.fit.StraightLine;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;
import org.spikewright.series.ToResult;

/**
 * What a repeat plan needs of a fitted series: the one place where it is read from a result.
 *
 * @param series the series
 * @param flasks those the line was fitted to, in the order of its points
 * @param line through the flasks
 * @param estimate native concentration, on the axis
 * @param half half-width of its 95 % interval, t times its standard error, on the axis
 * @param g Fieller's g
 * @param floor the least native concentration that could be told from zero, on the axis; 0 when not
 *     known
 * @param sd standard deviation of a flask, in signal units
 * @param sdDf its degrees of freedom beyond those of the line: what a pool lends
 * @param oddest the flask that stands off furthest, counted from 0
 */
record RepeatNeeds(
    AdditionSeries series,
    List<Flask> flasks,
    StraightLine line,
    double estimate,
    OptionalDouble half,
    OptionalDouble g,
    double floor,
    OptionalDouble sd,
    double sdDf,
    Optional<Integer> oddest) {

  static RepeatNeeds of(SeriesResult result) {
    OptionalDouble se = result.estimate().standardError();
    OptionalDouble t = result.estimate().t();
    return new RepeatNeeds(
        result.series(),
        result.flasks(),
        result.line(),
        result.estimate().value(),
        se.isPresent() && t.isPresent()
            ? OptionalDouble.of(se.getAsDouble() * t.getAsDouble())
            : OptionalDouble.empty(),
        result.estimate().g(),
        floor(result),
        result.line().residualSd(),
        0,
        oddest(result.residuals()));
  }

  private static double floor(SeriesResult result) {
    ToResult scale = result.series().toResult();
    return result.detection().map(Detection::detectionLimit).orElse(0.0) / scale.length(1);
  }

  private static Optional<Integer> oddest(List<Optional<DeletedResidual>> residuals) {
    Optional<Integer> oddest = Optional.empty();
    double least = Double.POSITIVE_INFINITY;
    for (int i = 0; i < residuals.size(); i++) {
      double p = residuals.get(i).map(DeletedResidual::p).orElse(Double.POSITIVE_INFINITY);
      if (p < least) {
        least = p;
        oddest = Optional.of(i);
      }
    }
    return oddest;
  }

  /** Relative expanded uncertainty of the fit; empty where there is none. */
  OptionalDouble relativeUncertainty() {
    return half.isPresent() && estimate != 0
        ? OptionalDouble.of(half.getAsDouble() / Math.abs(estimate))
        : OptionalDouble.empty();
  }

  /** The largest addition, on the axis. */
  double topAddition() {
    return flasks.stream().mapToDouble(Flask::x).max().orElse(0);
  }
}
