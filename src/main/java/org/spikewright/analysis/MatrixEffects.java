package org.spikewright.analysis;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.TreeMap;
import java.util.function.Function;
import java.util.stream.Collectors;
import org.spikewright.fit.Equivalence;
import org.spikewright.fit.OriginLine;
import org.spikewright.fit.StraightLine;
import org.spikewright.judgement.Criterion;
import org.spikewright.judgement.Limit;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.quantity.Estimate;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Addition;
import org.spikewright.reading.CalibrationPoint;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;

/** Compares the sensitivity in a sample with that of an external calibration. */
final class MatrixEffects {
  /** With fewer solutions the line goes through the origin. */
  private static final int ENOUGH_FOR_A_LINE = 3;

  private record External(Estimate slope, int solutions, boolean throughOrigin) {}

  private final Beside beside;

  MatrixEffects(Beside beside) {
    this.beside = beside;
  }

  /**
   * The comparison; empty without a calibration in the same units, where the slopes have no
   * standard error, and where an internal standard makes the signals of a series ratios.
   */
  Optional<MatrixEffect> of(AdditionSeries series, SeriesResult result, Limit margin) {
    FlaskFacts facts = series.flasks().get(0).facts();
    OptionalDouble factor = volumeFactor(series);
    boolean comparable = margin.value() > 0 && margin.value() < 1;
    if (!comparable || facts.internalStandard().isPresent() || factor.isEmpty()) {
      return Optional.empty();
    }
    Optional<External> external = external(beside.calibrationOf(series), series.axisUnit());
    Optional<Estimate> own = slope(result.line(), factor.getAsDouble());
    if (external.isEmpty() || own.isEmpty()) {
      return Optional.empty();
    }
    return Equivalence.of(own.get(), external.get().slope(), margin.value())
        .map(
            comparison ->
                new MatrixEffect(
                    series.key(),
                    series.batchName(),
                    external.get().solutions(),
                    external.get().throughOrigin(),
                    external.get().slope().value(),
                    own.get().value(),
                    series.axisUnit().symbol(),
                    comparison));
  }

  /** The criterion whose value is the margin. */
  static Criterion criterion() {
    return Criterion.MATRIX_EFFECT;
  }

  private static Optional<Estimate> slope(StraightLine line, double factor) {
    OptionalDouble error = line.slopeStandardError();
    return error.isPresent() && line.residualDf() > 0
        ? Optional.of(
            new Estimate(line.slope() * factor, error.getAsDouble() * factor, line.residualDf()))
        : Optional.empty();
  }

  /**
   * From the slope on the axis to that per concentration in the measured solution: V_t/V_x, in one
   * vessel V_0/V_x. Empty where the volumes are not known.
   */
  private static OptionalDouble volumeFactor(AdditionSeries series) {
    FlaskFacts facts = series.flasks().get(0).facts();
    return switch (series.design()) {
      case MADE_UP, WEIGHED -> ratio(series, FlaskFacts::finalVolume);
      case ELECTRODE -> OptionalDouble.empty();
      case ONE_VESSEL ->
          facts.aliquot().isEmpty() ? OptionalDouble.of(1) : ratio(series, FlaskFacts::startVolume);
      case STATED ->
          facts.addition() instanceof Addition.Stated stated
                  && stated.terms() == Addition.Terms.FLASK
              ? OptionalDouble.of(1)
              : ratio(series, FlaskFacts::finalVolume);
    };
  }

  /** Of volumes, or of masses where the flasks were weighed. */
  private static OptionalDouble ratio(
      AdditionSeries series, Function<FlaskFacts, Optional<Measured>> total) {
    double whole = 0;
    double part = 0;
    for (Flask flask : series.flasks()) {
      whole += inBase(total.apply(flask.facts()));
      part += inBase(flask.facts().aliquot());
    }
    double ratio = whole / part;
    return ratio > 0 && Double.isFinite(ratio) ? OptionalDouble.of(ratio) : OptionalDouble.empty();
  }

  private static double inBase(Optional<Measured> measured) {
    return measured
        .map(m -> m.quantity().value() * m.quantity().unit().perBase())
        .orElse(Double.NaN);
  }

  /** Readings of one solution are averaged first: they are no solutions of their own. */
  private static Optional<External> external(List<CalibrationPoint> points, Unit unit) {
    Map<Double, Double> means = new TreeMap<>();
    Map<Double, List<CalibrationPoint>> solutions =
        points.stream()
            .filter(point -> point.concentration().unit().dimension() == unit.dimension())
            .collect(
                Collectors.groupingBy(
                    point -> point.concentration().in(unit), TreeMap::new, Collectors.toList()));
    solutions.forEach(
        (concentration, readings) ->
            means.put(
                concentration, readings.stream().mapToDouble(Beside::signal).average().orElse(0)));
    double[] x = new ArrayList<>(means.keySet()).stream().mapToDouble(d -> d).toArray();
    double[] y = new ArrayList<>(means.values()).stream().mapToDouble(d -> d).toArray();
    if (x.length >= ENOUGH_FOR_A_LINE) {
      return StraightLine.fit(x, y) instanceof StraightLine line
          ? slope(line, 1).map(estimate -> new External(estimate, x.length, false))
          : Optional.empty();
    }
    // A zero solution tells nothing about the slope of a line that goes through the origin.
    return (x.length > 0 && x[0] == 0 ? Optional.<OriginLine>empty() : OriginLine.fit(x, y))
        .filter(line -> line.slopeStandardError().isPresent())
        .map(
            line ->
                new Estimate(
                    line.slope(), line.slopeStandardError().getAsDouble(), line.residualDf()))
        .map(estimate -> new External(estimate, x.length, true));
  }
}
