package org.spikewright.config;

import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.mapping.AmountReader;
import org.spikewright.mapping.Fact;
import org.spikewright.mapping.MethodRule;
import org.spikewright.mapping.Notation;
import org.spikewright.mapping.PerAnalyte;
import org.spikewright.mapping.Understood;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Calculation;
import org.spikewright.reading.Calculation.Bend;
import org.spikewright.reading.Calculation.Interval;
import org.spikewright.reading.Calculation.Weights;

/** Reads the keys of {@code [method]} that say how lines are drawn and where results hold. */
final class CalculationKeys {
  private static final String RANGE =
      "two concentrations, such as \"0.5 µg/L to 50 µg/L\", the lower one first";

  private final Section section;
  private final AmountReader amounts;

  /**
   * Reads them.
   *
   * @param notation with a decimal point
   */
  CalculationKeys(Section section, Notation notation) {
    this.section = section;
    this.amounts = new AmountReader(notation);
  }

  static Calculation calculation(Section section) {
    Calculation otherwise = Calculation.DEFAULT;
    return new Calculation(
        section
            .oneOf("interval", Section.words(Interval.values(), Interval::word))
            .orElse(otherwise.interval()),
        section
            .oneOf("weights", Section.words(Weights.values(), Weights::word))
            .orElse(otherwise.weights()),
        section.oneOf("bend", Section.words(Bend.values(), Bend::word)).orElse(otherwise.bend()),
        section.yesOrNo("correct_drift").orElse(otherwise.correctDrift()));
  }

  static OptionalDouble bendAllowance(Section section) {
    String expected = "a number above 0 and below 1, such as 0.05 for 5 %";
    Optional<Double> allowance = section.number("bend_allowance", expected);
    if (allowance.isPresent() && !(allowance.get() > 0 && allowance.get() < 1)) {
      section.fault(
          "bend_allowance", allowance.get() + " for bend_allowance in [method]", expected);
      return OptionalDouble.empty();
    }
    return allowance.map(OptionalDouble::of).orElseGet(OptionalDouble::empty);
  }

  PerAnalyte<MethodRule.Range> workingRange() {
    return FixedSection.perAnalyte(section, "working_range", this::range);
  }

  private Optional<MethodRule.Range> range(Section where, String key) {
    Optional<String> text = where.text(key, RANGE);
    Optional<MethodRule.Range> range = text.flatMap(this::range);
    if (text.isPresent() && range.isEmpty()) {
      where.fault(key, "'" + text.get() + "' for " + where.named(key), RANGE);
    }
    return range;
  }

  /** A range; a lower end without a unit has that of the upper. */
  private Optional<MethodRule.Range> range(String text) {
    int between = text.indexOf(" to ");
    if (between < 0) {
      return Optional.empty();
    }
    Optional<Measured> upper = concentration(text.substring(between + 4), Optional.empty());
    Optional<Measured> lower =
        upper.flatMap(
            top -> concentration(text.substring(0, between), Optional.of(top.quantity().unit())));
    boolean fits =
        lower.isPresent()
            && lower.get().quantity().unit().dimension()
                == upper.get().quantity().unit().dimension()
            && lower.get().in(upper.get().quantity().unit()) < upper.get().quantity().value();
    return fits
        ? Optional.of(new MethodRule.Range(lower.get().quantity(), upper.get().quantity()))
        : Optional.empty();
  }

  private Optional<Measured> concentration(String text, Optional<Unit> declared) {
    return amounts.read(Fact.ADDITION, text, declared) instanceof Understood.Value<Measured> value
            && value.value().tolerance().isEmpty()
        ? Optional.of(value.value())
        : Optional.empty();
  }
}
