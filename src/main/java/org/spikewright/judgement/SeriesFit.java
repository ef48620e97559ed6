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

  private static SeriesResult result(
      AdditionSeries series, List<Flask> flasks, StraightLine line, NativeEstimate estimate) {
    ToResult scale = series.toResult();
    return new SeriesResult(
        series,
        flasks,
        line,
        estimate,
        BendTest.of(line),
        residuals(line, Resolution.of(flasks)),
        detection(line, scale),
        scale.value(estimate.value()),
        onScale(estimate.standardError(), scale::length),
        onScale(estimate.lower95(), scale::value),
        onScale(estimate.upper95(), scale::value));
  }

  private static List<Optional<DeletedResidual>> residuals(StraightLine line, double floor) {
    List<Optional<DeletedResidual>> residuals = new ArrayList<>();
    for (int i = 0; i < line.n(); i++) {
      residuals.add(DeletedResidual.of(line, i, floor));
    }
    return List.copyOf(residuals);
  }

  private static Optional<Detection> detection(StraightLine line, ToResult scale) {
    OptionalDouble sd = line.residualSd();
    if (sd.isEmpty()) {
      return Optional.empty();
    }
    double fit = scale.length(Detection.standardErrorAtZero(line, sd.getAsDouble()));
    double blank = scale.methodBlankUncertainty() * scale.perSample() * scale.unitFactor();
    return Optional.of(Detection.of(Math.hypot(fit, blank), line.residualDf()));
  }

  private static OptionalDouble onScale(OptionalDouble onAxis, DoubleUnaryOperator scale) {
    return onAxis.isPresent()
        ? OptionalDouble.of(scale.applyAsDouble(onAxis.getAsDouble()))
        : onAxis;
  }

  private static boolean isFinite(SeriesResult result) {
    return Double.isFinite(result.value())
        && Double.isFinite(result.standardError().orElse(0))
        && Double.isFinite(result.lower95().orElse(0))
        && Double.isFinite(result.upper95().orElse(0))
        && Double.isFinite(result.detection().map(Detection::detectionLimit).orElse(0.0));
  }
}
