package org.spikewright.reading;

import java.util.OptionalDouble;
import org.spikewright.quantity.Unit;

/**
 * What the method says about a series as a whole.
 *
 * @param resultUnit the client's unit; its dimension fits the sample (per volume, or per mass for
 *     solids)
 * @param expectedFlasks how many flasks the method's design has, 2 or more
 * @param fitReadings whether each reading counts as a flask; only ever by the laboratory's explicit
 *     setting, and marked on every result
 * @param trustedSignal the largest signal inside the instrument's range
 * @param reportingLimit in {@code resultUnit}; replaces the detection limit in the reported text
 * @param targetUncertainty relative expanded uncertainty the method aims at, such as 0.25
 */
public record MethodFacts(
    Unit resultUnit,
    int expectedFlasks,
    boolean fitReadings,
    OptionalDouble trustedSignal,
    OptionalDouble reportingLimit,
    OptionalDouble targetUncertainty) {

  /** A method that says only its result unit: four flasks. */
  public static MethodFacts of(Unit resultUnit) {
    return new MethodFacts(
        resultUnit,
        4,
        false,
        OptionalDouble.empty(),
        OptionalDouble.empty(),
        OptionalDouble.empty());
  }
}
