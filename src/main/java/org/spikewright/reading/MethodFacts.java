package org.spikewright.reading;

import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.quantity.Unit;

/**
 * What the method says about a series as a whole.
 *
 * @param name the method's name, which is its mapping's; under it the configuration may set limits
 * @param resultUnit the client's unit; its dimension fits the sample (per volume, or per mass for
 *     solids)
 * @param expectedFlasks how many flasks the method's design has, 2 or more
 * @param fitReadings whether each reading counts as a flask; only ever by the laboratory's explicit
 *     setting, and marked on every result
 * @param trustedSignal the largest signal inside the instrument's range
 * @param reportingLimit in {@code resultUnit}; replaces the detection limit in the reported text
 * @param targetUncertainty relative expanded uncertainty the method aims at, such as 0.25
 * @param workingRange where results of the method are valid
 * @param bendAllowance largest relative bias by a bend that the data may leave open; where it is
 *     set, the allowance also counts in the budget
 * @param blankDue whether a method blank must be there
 * @param calculation how the line is drawn and which interval is reported
 * @param electrode what a potentiometric method needs besides; empty for all others
 * @param signalUnit the unit of the signals where they are quantities: a concentration that the
 *     instrument read back from a calibration, or a potential
 */
public record MethodFacts(
    String name,
    Unit resultUnit,
    int expectedFlasks,
    boolean fitReadings,
    OptionalDouble trustedSignal,
    OptionalDouble reportingLimit,
    OptionalDouble targetUncertainty,
    Optional<WorkingRange> workingRange,
    OptionalDouble bendAllowance,
    boolean blankDue,
    Calculation calculation,
    Optional<Electrode> electrode,
    Optional<Unit> signalUnit) {

  /** What a method says whose signals have no unit. */
  public MethodFacts(
      String name,
      Unit resultUnit,
      int expectedFlasks,
      boolean fitReadings,
      OptionalDouble trustedSignal,
      OptionalDouble reportingLimit,
      OptionalDouble targetUncertainty,
      Optional<WorkingRange> workingRange,
      OptionalDouble bendAllowance,
      boolean blankDue,
      Calculation calculation,
      Optional<Electrode> electrode) {
    this(
        name,
        resultUnit,
        expectedFlasks,
        fitReadings,
        trustedSignal,
        reportingLimit,
        targetUncertainty,
        workingRange,
        bendAllowance,
        blankDue,
        calculation,
        electrode,
        Optional.empty());
  }

  /**
   * Where results of a method are valid.
   *
   * @param lower in the result's unit
   * @param upper in the result's unit, above {@code lower}
   */
  public record WorkingRange(double lower, double upper) {}

  /**
   * What a potentiometric method says.
   *
   * @param charge of the ion, with its sign; not 0
   * @param slope measured slope in signal units per decade, where it is fixed; empty where it is
   *     fitted
   * @param celsius temperature; empty when unknown, then the slope is not judged
   */
  public record Electrode(int charge, OptionalDouble slope, OptionalDouble celsius) {}

  /** A method that says only its result unit: four flasks. */
  public static MethodFacts of(Unit resultUnit) {
    return new MethodFacts(
        "",
        resultUnit,
        4,
        false,
        OptionalDouble.empty(),
        OptionalDouble.empty(),
        OptionalDouble.empty(),
        Optional.empty(),
        OptionalDouble.empty(),
        false,
        Calculation.DEFAULT,
        Optional.empty());
  }
}
