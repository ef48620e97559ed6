package org.spikewright.mapping;

import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Accuracies;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Blanks;
import org.spikewright.reading.Bottle;
import org.spikewright.reading.Design;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.MethodFacts;
import org.spikewright.reading.Preparation;
import org.spikewright.reading.Role;

/**
 * The quantities of one flask, before they are known to agree.
 *
 * @param method what the mapping says
 * @param values by fact; what the design needs is there
 * @param resultUnit the client's unit
 * @param analyte whose facts these are
 * @param accuracies how well the quantities are known
 * @param bottle the named stock, where it has a name
 */
record FlaskDraft(
    MethodRule method,
    Map<Fact, Measured> values,
    Unit resultUnit,
    String analyte,
    Accuracies accuracies,
    Optional<Bottle> bottle) {
  /** Marks are round numbers; sums of them may differ by this share. */
  private static final double ROUNDING = 1e-9;

  /** What does not agree, named after the fact that is probably wrong. */
  Optional<Trouble> contradiction() {
    return volumes().or(this::units);
  }

  private Optional<Trouble> volumes() {
    boolean vessel = method.design() == Design.ONE_VESSEL;
    Optional<Measured> whole = vessel ? value(Fact.START_VOLUME) : value(Fact.FINAL_VOLUME);
    // A step's own addition is no total; the vessel's volumes are then checked without it.
    boolean counts = !vessel && method.design() == Design.MADE_UP;
    double parts = litres(Fact.ALIQUOT_VOLUME) + (counts ? litres(Fact.ADDITION_VOLUME) : 0);
    if (whole.isPresent() && !(parts <= whole.get().in(Unit.of("L")) * (1 + ROUNDING))) {
      return Optional.of(
          new Trouble(
              Reason.OUT_OF_BOUNDS,
              -1,
              (vessel ? Fact.START_VOLUME : Fact.FINAL_VOLUME).word(),
              "'" + whole.get().quantity() + "'",
              "at least what is in it: " + contents(counts)));
    }
    Optional<Measured> read = vessel ? value(Fact.FINAL_VOLUME) : Optional.empty();
    if (read.isPresent()
        && !(litres(Fact.ALIQUOT_VOLUME) <= read.get().in(Unit.of("L")) * (1 + ROUNDING))) {
      return Optional.of(
          new Trouble(
              Reason.OUT_OF_BOUNDS,
              -1,
              Fact.FINAL_VOLUME.word(),
              "'" + read.get().quantity() + "'",
              "at least what is in it: " + contents(false)));
    }
    return Optional.empty();
  }

  private String contents(boolean addition) {
    String aliquot = "an aliquot of " + values.get(Fact.ALIQUOT_VOLUME).quantity();
    return addition
        ? aliquot + " and an addition of " + values.get(Fact.ADDITION_VOLUME).quantity()
        : aliquot;
  }

  private double litres(Fact fact) {
    Measured value = values.get(fact);
    return value == null ? 0 : value.in(Unit.of("L"));
  }

  private Optional<Trouble> units() {
    Quantity added = added();
    Optional<String> fault =
        Chain.fault(
            added.unit().dimension(),
            value(Fact.TEST_PORTION).map(portion -> portion.quantity().unit().dimension()),
            resultUnit.dimension());
    if (fault.isPresent()) {
      return Optional.of(
          new Trouble(
              Reason.UNIT_DOES_NOT_FIT,
              -1,
              Fact.RESULT_UNIT.word(),
              "a result in " + resultUnit + " for an addition in " + added.unit(),
              fault.get()));
    }
    return unlike(Fact.METHOD_BLANK, added)
        .or(() -> unlike(Fact.SOLVENT_BLANK, added))
        .or(this::reportingLimit)
        .or(this::workingRange);
  }

  private Optional<Trouble> unlike(Fact fact, Quantity added) {
    return value(fact)
        .filter(value -> value.quantity().unit().dimension() != added.unit().dimension())
        .map(
            value ->
                new Trouble(
                    Reason.UNIT_DOES_NOT_FIT,
                    -1,
                    fact.word(),
                    "'" + value + "'",
                    added.unit().dimension().words() + ", like the addition's " + added.unit()));
  }

  private Optional<Trouble> reportingLimit() {
    return method
        .reportingLimit()
        .of(analyte)
        .filter(limit -> limit.quantity().unit().dimension() != resultUnit.dimension())
        .map(
            limit ->
                new Trouble(
                    Reason.UNIT_DOES_NOT_FIT,
                    -1,
                    "reporting_limit",
                    "'" + limit + "'",
                    resultUnit.dimension().words() + ", like the result's " + resultUnit));
  }

  private Optional<Trouble> workingRange() {
    return method
        .workingRange()
        .of(analyte)
        .filter(range -> range.lower().unit().dimension() != resultUnit.dimension())
        .map(
            range ->
                new Trouble(
                    Reason.UNIT_DOES_NOT_FIT,
                    -1,
                    "working_range",
                    "'" + range + "'",
                    resultUnit.dimension().words() + ", like the result's " + resultUnit));
  }

  private Quantity added() {
    Fact fact = method.design() == Design.STATED ? Fact.ADDITION : Fact.STOCK;
    return values.get(fact).quantity();
  }

  /** The facts, where nothing contradicts. */
  FlaskFacts facts(Role role, Optional<String> preparation) {
    return new FlaskFacts(
        role,
        method.design(),
        addition(),
        value(Fact.ALIQUOT_VOLUME),
        value(Fact.FINAL_VOLUME),
        value(Fact.START_VOLUME),
        new Preparation(
            preparation,
            value(Fact.DILUTION).map(value -> value.quantity().value()).orElse(1.0),
            value(Fact.TEST_PORTION).map(Measured::quantity),
            value(Fact.DIGEST_VOLUME).map(Measured::quantity),
            number(Fact.DRY_MASS)),
        new Blanks(number(Fact.BASELINE), value(Fact.METHOD_BLANK), value(Fact.SOLVENT_BLANK)),
        methodFacts(),
        Optional.empty(),
        accuracies,
        bottle);
  }

  private Addition addition() {
    return method.design() == Design.STATED
        ? new Addition.Stated(added(), method.terms().orElseThrow())
        : new Addition.OfStock(values.get(Fact.ADDITION_VOLUME).quantity(), values.get(Fact.STOCK));
  }

  private MethodFacts methodFacts() {
    return new MethodFacts(
        method.name(),
        resultUnit,
        method.flasks(),
        method.fitReadings(),
        optional(method.trustedSignal().of(analyte)),
        optional(method.reportingLimit().of(analyte).map(limit -> limit.in(resultUnit))),
        method.targetUncertainty(),
        method.workingRange().of(analyte).map(range -> range.in(resultUnit)),
        method.bendAllowance(),
        method.blankDue(),
        method.calculation(),
        Optional.empty());
  }

  private Optional<Measured> value(Fact fact) {
    return Optional.ofNullable(values.get(fact));
  }

  private OptionalDouble number(Fact fact) {
    return optional(value(fact).map(value -> value.quantity().value()));
  }

  private static OptionalDouble optional(Optional<Double> value) {
    return value.map(OptionalDouble::of).orElseGet(OptionalDouble::empty);
  }
}
