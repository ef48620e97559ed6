package org.spikewright.judgement;

import java.util.List;
import java.util.OptionalDouble;
import java.util.function.DoubleUnaryOperator;
import org.spikewright.fit.KnownAdditions;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.MethodFacts.Electrode;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;
import org.spikewright.series.ToResult;

/** Fits the potentials of an electrode: known additions to one vessel. */
final class ElectrodeFit {
  private static final Unit MILLIVOLT = Unit.of("mV");
  private static final double ZERO_CELSIUS = 273.15;

  /** Volumes and slopes beyond these are no bench's, and no number to compute with. */
  private static final double FAR = 1e6;

  private ElectrodeFit() {}

  static SeriesFit of(AdditionSeries series) {
    Electrode electrode = series.method().electrode().orElseThrow();
    double toMillivolt = series.method().signalUnit().orElseThrow().to(MILLIVOLT);
    AdditionSeries.Vessel vessel = series.vessel().orElseThrow();
    double slope = Math.abs(electrode.slope().orElse(1) * toMillivolt);
    if (!(vessel.aliquot() > 1 / FAR / FAR && vessel.start() < FAR)
        || !(slope > 10 / FAR && slope < FAR / 10)) {
      return new SeriesFit.Unfitted("the volumes or the slope are no bench's");
    }
    List<Flask> flasks = series.usableFlasks();
    KnownAdditions outcome =
        KnownAdditions.fit(
            new KnownAdditions.Vessel(
                vessel.aliquot(),
                Math.max(vessel.start(), vessel.aliquot()),
                electrode.charge(),
                mapped(electrode.celsius(), celsius -> celsius + ZERO_CELSIUS),
                mapped(electrode.slope(), own -> own * toMillivolt)),
            flasks.stream()
                .map(
                    flask ->
                        new KnownAdditions.Reading(
                            flask.x() * vessel.aliquot(),
                            AdditionSeries.Vessel.added(flask),
                            flask.y() * toMillivolt))
                .toList());
    return outcome instanceof KnownAdditions.Fitted fit
        ? result(series, flasks, fit)
        : new SeriesFit.Unfitted(((KnownAdditions.Refused) outcome).reason());
  }

  private static SeriesFit result(
      AdditionSeries series, List<Flask> flasks, KnownAdditions.Fitted fit) {
    ToResult scale = series.toResult();
    ElectrodeResult result =
        new ElectrodeResult(
            series,
            flasks,
            fit,
            scale.value(fit.nativeConcentration()),
            mapped(fit.standardError(), scale::length),
            mapped(fit.lower95(), scale::value),
            mapped(fit.upper95(), scale::value));
    boolean finite =
        Double.isFinite(result.value())
            && Double.isFinite(result.standardError().orElse(0))
            && Double.isFinite(result.lower95().orElse(0))
            && Double.isFinite(result.upper95().orElse(0));
    return finite
        ? new SeriesFit.ByElectrode(result)
        : new SeriesFit.Unfitted("the numbers are too large or too small to compute with");
  }

  private static OptionalDouble mapped(OptionalDouble number, DoubleUnaryOperator change) {
    return number.isPresent()
        ? OptionalDouble.of(change.applyAsDouble(number.getAsDouble()))
        : number;
  }
}
