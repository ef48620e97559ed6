package org.spikewright.series;

import org.spikewright.quantity.Unit;

/**
 * From the axis to the result: {@code result = (x · dilution − methodBlank) · perSample ·
 * unitFactor}.
 *
 * @param dilution volume after over volume taken before the aliquot, times V_t/V_x where additions
 *     are stated in flask terms
 * @param methodBlank the method blank in the axis unit, in the undiluted solution; 0 when none
 * @param methodBlankUncertainty its standard uncertainty in the axis unit; 0 when none is known
 * @param perSample digest volume over test portion, over the dry-mass fraction; 1 for liquids; in
 *     base units of the two
 * @param unitFactor from axis unit (times perSample) to {@code unit}
 * @param unit the unit of the result
 */
public record ToResult(
    double dilution,
    double methodBlank,
    double methodBlankUncertainty,
    double perSample,
    double unitFactor,
    Unit unit) {

  /** The result that belongs to a concentration on the axis. */
  public double value(double x) {
    return (x * dilution - methodBlank) * perSample * unitFactor;
  }

  /** The length on the result's scale that belongs to a length on the axis. */
  public double length(double dx) {
    return dx * dilution * perSample * unitFactor;
  }
}
