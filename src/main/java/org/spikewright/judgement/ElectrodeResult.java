package org.spikewright.judgement;

import java.util.List;
import java.util.OptionalDouble;
import org.spikewright.fit.KnownAdditions;
import org.spikewright.quantity.Numbers;
import org.spikewright.quantity.Unit;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;

/**
 * The numbers of one series of known additions to an electrode's vessel. There is no detection
 * limit, and no pool lends anything.
 *
 * @param series the series
 * @param flasks the states of the vessel that the curve was fitted to
 * @param fit the curve: concentrations in the axis unit, volumes in L, potentials in mV
 * @param value the result, in {@code series.toResult().unit()}
 * @param standardError of the result from the fit alone; empty without degrees of freedom
 * @param lower95 lower end of the profile's 95 % interval; empty where there is none
 * @param upper95 upper end likewise
 */
public record ElectrodeResult(
    AdditionSeries series,
    List<Flask> flasks,
    KnownAdditions.Fitted fit,
    double value,
    OptionalDouble standardError,
    OptionalDouble lower95,
    OptionalDouble upper95) {

  private static final Unit MILLIVOLT = Unit.of("mV");

  /** A potential, or a slope per decade, in the unit of the signals. */
  public double inSignalUnits(double millivolts) {
    return series.method().signalUnit().map(unit -> millivolts * MILLIVOLT.to(unit)).orElseThrow();
  }

  /** The curve's potential at a state of the vessel, in the unit of the signals. */
  public double at(Flask flask) {
    AdditionSeries.Vessel vessel = series.vessel().orElseThrow();
    double amount = (fit.nativeConcentration() + flask.x()) * vessel.aliquot();
    double volume = vessel.start() + AdditionSeries.Vessel.added(flask);
    return inSignalUnits(fit.standardPotential() + fit.slope() * Math.log10(amount / volume));
  }

  /** U = t · standard error of the fit; empty without degrees of freedom. */
  public OptionalDouble expandedUncertainty() {
    return standardError.isPresent() && fit.t().isPresent()
        ? OptionalDouble.of(fit.t().getAsDouble() * standardError.getAsDouble())
        : OptionalDouble.empty();
  }

  /** The text to report. */
  String reported() {
    OptionalDouble limit = series.method().reportingLimit();
    if (limit.isPresent() && value < limit.getAsDouble()) {
      return "< " + Numbers.plain(limit.getAsDouble());
    }
    double u = expandedUncertainty().orElse(0);
    return u > 0
        ? Numbers.roundedLike(value, u, 2) + " ± " + Numbers.roundedLike(u, u, 2)
        : Numbers.rounded(value, 3);
  }
}
