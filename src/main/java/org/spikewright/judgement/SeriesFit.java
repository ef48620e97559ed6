package org.spikewright.judgement;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.DoubleUnaryOperator;
import org.spikewright.fit.BendTest;
import org.spikewright.fit.DeletedResidual;
import org.spikewright.fit.Detection;
import org.spikewright.fit.LineOutcome;
import org.spikewright.fit.NativeEstimate;
import org.spikewright.fit.NoLine;
import org.spikewright.fit.OddFlask;
import org.spikewright.fit.PooledSeries;
import org.spikewright.fit.StraightLine;
import org.spikewright.reading.Design;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;
import org.spikewright.series.ToResult;

/** What the numbers of a series come to: a result, or why its flasks allow none. */
public sealed interface SeriesFit {

  /** The numbers. */
  record Fitted(SeriesResult result) implements SeriesFit {}

  /** The numbers of potentials, which no line goes through. */
  record ByElectrode(ElectrodeResult result) implements SeriesFit {}

  /**
   * No result.
   *
   * @param reason in plain words
   */
  record Unfitted(String reason) implements SeriesFit {}

  /** Fits a series: least squares on flask means, carried back to zero signal. */
  static SeriesFit of(AdditionSeries series) {
    if (series.design() == Design.ELECTRODE) {
      return ElectrodeFit.of(series);
    }
    List<Flask> flasks = series.usableFlasks();
    double[] x = flasks.stream().mapToDouble(Flask::x).toArray();
    double[] y = flasks.stream().mapToDouble(Flask::y).toArray();
    LineOutcome outcome = StraightLine.fit(x, y);
    if (outcome instanceof NoLine none) {
      return new Unfitted(none.reason());
    }
    StraightLine line = (StraightLine) outcome;
    if (!(line.slope() > 0)) {
      return new Unfitted("the signal does not rise with the additions");
    }
    if (flasks.stream().mapToDouble(Flask::meanSignal).distinct().count() == 1) {
      // Only the volume factors make a line of a display that stands still.
      return new Unfitted("all signals are equal");
    }
    return NativeEstimate.of(line)
        .map(estimate -> result(series, flasks, line, estimate))
        .filter(SeriesFit::isFinite)
        .<SeriesFit>map(Fitted::new)
        .orElse(new Unfitted("the numbers are too large or too small to compute with"));
  }

  /** The numbers of a line by itself; not yet checked to be finite. */
  static SeriesResult result(
      AdditionSeries series, List<Flask> flasks, StraightLine line, NativeEstimate estimate) {
    ToResult scale = series.toResult();
    PooledSeries pooled = Pooling.of(series, flasks, line);
    double floor = Resolution.of(flasks);
    return new SeriesResult(
        series,
        flasks,
        line,
        pooled,
        estimate,
        BendTest.of(line),
        residuals(line, floor),
        OddFlask.of(line, pooled.addition(), floor),
        detection(line, line.residualSd(), line.residualDf(), scale),
        scale.value(estimate.value()),
        onScale(estimate.standardError(), scale::length),
        onScale(estimate.lower95(), scale::value),
        onScale(estimate.upper95(), scale::value),
        Optional.empty(),
        Optional.empty());
  }

  private static List<Optional<DeletedResidual>> residuals(StraightLine line, double floor) {
    List<Optional<DeletedResidual>> residuals = new ArrayList<>();
    for (int i = 0; i < line.n(); i++) {
      residuals.add(DeletedResidual.of(line, i, floor));
    }
    return List.copyOf(residuals);
  }

  static Optional<Detection> detection(
      StraightLine line, OptionalDouble sd, double df, ToResult scale) {
    if (sd.isEmpty()) {
      return Optional.empty();
    }
    double fit = scale.length(Detection.standardErrorAtZero(line, sd.getAsDouble()));
    double blank = scale.methodBlankUncertainty() * scale.perSample() * scale.unitFactor();
    return Optional.of(Detection.of(Math.hypot(fit, blank), df));
  }

  static OptionalDouble onScale(OptionalDouble onAxis, DoubleUnaryOperator scale) {
    return onAxis.isPresent()
        ? OptionalDouble.of(scale.applyAsDouble(onAxis.getAsDouble()))
        : onAxis;
  }

  static boolean isFinite(SeriesResult result) {
    return Double.isFinite(result.value())
        && areFinite(
            result.standardError(), result.lower95(), result.upper95(), result.ownDetection());
  }

  static boolean areFinite(
      OptionalDouble error, OptionalDouble lower, OptionalDouble upper, Optional<Detection> d) {
    return Double.isFinite(error.orElse(0))
        && Double.isFinite(lower.orElse(0))
        && Double.isFinite(upper.orElse(0))
        && Double.isFinite(d.map(Detection::detectionLimit).orElse(0.0));
  }
}
