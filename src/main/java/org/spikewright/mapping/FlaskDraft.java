package org.spikewright.mapping;

import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.quantity.Dimension;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Accuracies;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Blanks;
import org.spikewright.reading.Bottle;
import org.spikewright.reading.Design;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.InternalStandard;
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
    return contents().or(this::stock).or(this::units);
  }

  private Optional<Trouble> contents() {
    Fact addition = method.additionFact();
    return switch (method.design()) {
      case MADE_UP -> tooSmall(Fact.FINAL_VOLUME, Optional.of(addition));
      case WEIGHED -> tooSmall(Fact.FINAL_MASS, Optional.of(addition));
      case STATED -> tooSmall(Fact.FINAL_VOLUME, Optional.empty());
      // A step's own addition is no total; the vessel's volumes are then checked without it.
      case ONE_VESSEL, ELECTRODE ->
          tooSmall(Fact.START_VOLUME, Optional.empty())
              .or(() -> tooSmall(Fact.FINAL_VOLUME, Optional.empty()));
    };
  }

  /** Whether less than what is in it. */
  private Optional<Trouble> tooSmall(Fact whole, Optional<Fact> addition) {
    Fact aliquot = method.aliquotFact();
    double parts = base(value(aliquot)) + base(addition.flatMap(this::value));
    if (value(whole).isEmpty() || parts <= base(value(whole)) * (1 + ROUNDING)) {
      return Optional.empty();
    }
    String contents =
        "an aliquot of "
            + values.get(aliquot).quantity()
            + addition.map(fact -> " and an addition of " + values.get(fact).quantity()).orElse("");
    return Optional.of(
        new Trouble(
            Reason.OUT_OF_BOUNDS,
            -1,
            whole.word(),
            "'" + values.get(whole).quantity() + "'",
            "at least what is in it: " + contents));
  }

  private static double base(Optional<Measured> measured) {
    return measured
        .map(known -> known.quantity().value() * known.quantity().unit().perBase())
        .orElse(0.0);
  }

  private Optional<Trouble> stock() {
    return value(Fact.STOCK)
        .filter(stock -> !method.fitsStock(dimension(stock)))
        .map(
            stock ->
                new Trouble(
                    Reason.UNIT_DOES_NOT_FIT,
                    -1,
                    Fact.STOCK.word(),
                    "'" + stock + "'",
                    method.stockExpectation()));
  }

  private Optional<Trouble> units() {
    Measured added = values.get(addedFact());
    Optional<String> fault = chain().fault(dimension(added), resultUnit.dimension());
    if (fault.isPresent()) {
      return Optional.of(
          new Trouble(
              Reason.UNIT_DOES_NOT_FIT,
              -1,
              Fact.RESULT_UNIT.word(),
              "a result in " + resultUnit + " for an addition in " + added.quantity().unit(),
              fault.get()));
    }
    return unlike(Fact.METHOD_BLANK, added)
        .or(() -> unlike(Fact.SOLVENT_BLANK, added))
        .or(this::reportingLimit)
        .or(this::workingRange);
  }

  private Chain chain() {
    return new Chain(
        value(Fact.TEST_PORTION).map(FlaskDraft::dimension),
        values.containsKey(Fact.DIGEST_MASS),
        values.containsKey(Fact.MOLAR_MASS));
  }

  private static Dimension dimension(Measured measured) {
    return measured.quantity().unit().dimension();
  }

  private Optional<Trouble> unlike(Fact fact, Measured added) {
    return value(fact)
        .filter(value -> !chain().addUp(dimension(value), dimension(added)))
        .map(
            value ->
                new Trouble(
                    Reason.UNIT_DOES_NOT_FIT,
                    -1,
                    fact.word(),
                    "'" + value + "'",
                    dimension(added).words() + ", like the addition's " + added.quantity().unit()));
  }

  private Optional<Trouble> reportingLimit() {
    return method
        .reportingLimit()
        .of(analyte)
        .filter(limit -> dimension(limit) != resultUnit.dimension())
        .map(
            limit ->
                new Trouble(
                    Reason.UNIT_DOES_NOT_FIT,
                    -1,
                    "reporting_limit",
                    "'" + limit + "'",
                    resultUnit.dimension().words() + ", like the result's " + resultUnit));
  }

  private Fact addedFact() {
    return method.design() == Design.STATED ? Fact.ADDITION : Fact.STOCK;
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

  /** The facts, where nothing contradicts. */
  FlaskFacts facts(Role role, Optional<String> preparation) {
    return new FlaskFacts(
        role,
        method.design(),
        addition(),
        value(method.aliquotFact()),
        value(method.design() == Design.WEIGHED ? Fact.FINAL_MASS : Fact.FINAL_VOLUME),
        value(Fact.START_VOLUME),
        new Preparation(
            preparation,
            factor(Fact.DILUTION),
            value(Fact.TEST_PORTION).map(Measured::quantity),
            value(Fact.DIGEST_VOLUME).or(() -> value(Fact.DIGEST_MASS)).map(Measured::quantity),
            number(Fact.DRY_MASS)),
        blanks(),
        methodFacts(),
        method
            .signal()
            .standard()
            .map(
                given ->
                    new InternalStandard(
                        given,
                        value(Fact.INTERNAL_STANDARD_MASS),
                        number(Fact.INTERNAL_STANDARD_BASELINE))),
        accuracies,
        bottle);
  }

  private Addition addition() {
    if (method.design() == Design.STATED) {
      return new Addition.Stated(
          concentration(Fact.ADDITION).orElseThrow().quantity(), method.terms().orElseThrow());
    }
    return new Addition.OfStock(
        values.get(method.additionFact()).quantity(), concentration(Fact.STOCK).orElseThrow());
  }

  /** The method blank counts in the digest: what diluted it before it was measured is undone. */
  private Blanks blanks() {
    double factor = factor(Fact.METHOD_BLANK_DILUTION);
    return new Blanks(
        number(Fact.BASELINE),
        concentration(Fact.METHOD_BLANK)
            .map(blank -> MolarMass.times(blank, factor, blank.quantity().unit())),
        concentration(Fact.SOLVENT_BLANK));
  }

  /** In mass or amount as the result is, where the molar mass is known. */
  private Optional<Measured> concentration(Fact fact) {
    Optional<Measured> molarMass = value(Fact.MOLAR_MASS);
    return value(fact)
        .map(
            value ->
                molarMass
                    .map(known -> MolarMass.like(value, resultUnit.dimension(), known))
                    .orElse(value));
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
        method.signal().electrode(),
        method.signal().unit());
  }

  private double factor(Fact fact) {
    return value(fact).map(value -> value.quantity().value()).orElse(1.0);
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
