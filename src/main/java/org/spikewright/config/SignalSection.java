package org.spikewright.config;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.mapping.Notation;
import org.spikewright.mapping.SignalRule;
import org.spikewright.quantity.Dimension;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.InternalStandard.Given;
import org.spikewright.reading.MethodFacts.Electrode;

/**
 * Reads what a mapping says about its signals: in {@code [fixed]}, and of electrodes in {@code
 * [method]}.
 */
final class SignalSection {
  private static final List<Dimension> QUANTITIES =
      List.of(
          Dimension.MASS_PER_VOLUME,
          Dimension.AMOUNT_PER_VOLUME,
          Dimension.MASS_PER_MASS,
          Dimension.AMOUNT_PER_MASS,
          Dimension.POTENTIAL);

  private SignalSection() {}

  static SignalRule rule(Optional<Section> fixed, Optional<Section> method, Notation notation) {
    return new SignalRule(
        fixed.flatMap(section -> unit(section, notation)),
        fixed.flatMap(
            section ->
                section.oneOf(
                    "internal_standard_given", Section.words(Given.values(), Given::word))),
        method.flatMap(SignalSection::electrode));
  }

  private static Optional<Unit> unit(Section section, Notation notation) {
    String expected = "the unit of a concentration that was read back, or \"mV\" or \"V\"";
    Optional<Unit> unit = UnitsSection.unit(section, "signal_unit", notation, expected);
    if (unit.isPresent() && !QUANTITIES.contains(unit.get().dimension())) {
      section.fault(
          "signal_unit",
          "'" + unit.get() + "', which is " + unit.get().dimension().words() + ", for signal_unit",
          expected);
      return Optional.empty();
    }
    return unit;
  }

  private static Optional<Electrode> electrode(Section section) {
    Optional<Integer> charge = charge(section);
    OptionalDouble slope = slope(section, charge);
    OptionalDouble celsius = celsius(section);
    return charge.map(z -> new Electrode(z, slope, celsius));
  }

  private static Optional<Integer> charge(Section section) {
    String expected = "a whole number from -4 to 4 and not 0, such as -1";
    Optional<Long> charge = section.wholeNumber("charge", expected);
    if (charge.isPresent() && !(Math.abs(charge.get()) >= 1 && Math.abs(charge.get()) <= 4)) {
      section.fault("charge", charge.get() + " for charge in [method]", expected);
      return Optional.empty();
    }
    return charge.map(Long::intValue);
  }

  private static OptionalDouble slope(Section section, Optional<Integer> charge) {
    String expected =
        "the measured slope in signal units per decade, with the sign of the charge: below 0 for"
            + " anions";
    Optional<Double> slope = section.number("slope", expected);
    boolean fits =
        slope.isEmpty()
            || slope.get() != 0 && (charge.isEmpty() || slope.get() > 0 == charge.get() > 0);
    if (!fits) {
      section.fault("slope", slope.get() + " for slope in [method]", expected);
      return OptionalDouble.empty();
    }
    return slope.map(OptionalDouble::of).orElseGet(OptionalDouble::empty);
  }

  private static OptionalDouble celsius(Section section) {
    String expected = "degrees Celsius from -10 to 110";
    Optional<Double> celsius = section.number("temperature", expected);
    if (celsius.isPresent() && !(celsius.get() >= -10 && celsius.get() <= 110)) {
      section.fault("temperature", celsius.get() + " for temperature in [method]", expected);
      return OptionalDouble.empty();
    }
    return celsius.map(OptionalDouble::of).orElseGet(OptionalDouble::empty);
  }
}
