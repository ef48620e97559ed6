package org.spikewright.config;

import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.mapping.AmountReader;
import org.spikewright.mapping.Fact;
import org.spikewright.mapping.MethodRule;
import org.spikewright.mapping.MethodRule.Additions;
import org.spikewright.mapping.Notation;
import org.spikewright.mapping.PerAnalyte;
import org.spikewright.mapping.Understood;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.NumberGrammar;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Calculation;
import org.spikewright.reading.Design;

/** Reads {@code [result]}, {@code [method]} and the design in {@code [fixed]}. */
final class MethodSection {
  private static final Map<String, Boolean> POINTS = Map.of("flask", false, "reading", true);

  private final Section root;
  private final Optional<Section> fixed;
  private final Notation notation;

  MethodSection(Section root, Optional<Section> fixed, Notation notation) {
    this.root = root;
    this.fixed = fixed;
    this.notation = notation.with(NumberGrammar.POINT);
  }

  MethodRule rule(String name) {
    Optional<Section> method = root.section("method", MappingKeys.KEYS.get("method"));
    return new MethodRule(
        name,
        design(),
        fixed.flatMap(
            section ->
                section.oneOf("additions", Section.words(Additions.values(), Additions::word))),
        fixed.flatMap(
            section ->
                section.oneOf(
                    "addition_terms",
                    Section.words(Addition.Terms.values(), Addition.Terms::word))),
        resultUnit(),
        fixed.flatMap(this::flasks).orElse(4),
        method.flatMap(section -> section.oneOf("unit", POINTS)).orElse(false),
        method.map(this::trustedSignal).orElse(PerAnalyte.none()),
        method.map(this::reportingLimit).orElse(PerAnalyte.none()),
        method.map(MethodSection::targetUncertainty).orElse(OptionalDouble.empty()),
        method
            .map(section -> new CalculationKeys(section, notation).workingRange())
            .orElse(PerAnalyte.none()),
        method.map(CalculationKeys::bendAllowance).orElse(OptionalDouble.empty()),
        method.flatMap(section -> section.yesOrNo("blank_due")).orElse(false),
        method.map(CalculationKeys::calculation).orElse(Calculation.DEFAULT),
        SignalSection.rule(fixed, method, notation));
  }

  private Design design() {
    Map<String, Design> words = Section.words(Design.values(), Design::word);
    if (fixed.isEmpty() || !fixed.get().has("design")) {
      root.faults()
          .missing(
              fixed.map(Section::at).orElse(At.START),
              "[fixed]",
              "design",
              "how additions are made, one of " + Section.quoted(words.keySet()));
    }
    return fixed.flatMap(section -> section.oneOf("design", words)).orElse(Design.MADE_UP);
  }

  private PerAnalyte<Unit> resultUnit() {
    String expected = "the unit of the result, such as \"µg/L\"";
    Optional<Section> result = root.section("result", MappingKeys.KEYS.get("result"));
    if (result.isEmpty() || !result.get().has("unit")) {
      root.faults().missing(result.map(Section::at).orElse(At.START), "[result]", "unit", expected);
      return PerAnalyte.none();
    }
    return FixedSection.perAnalyte(
        result.get(), "unit", (where, key) -> UnitsSection.unit(where, key, notation, expected));
  }

  private Optional<Integer> flasks(Section section) {
    String expected = "a whole number from 2 to 100";
    Optional<Long> flasks = section.wholeNumber("flasks", expected);
    if (flasks.isPresent() && !(flasks.get() >= 2 && flasks.get() <= 100)) {
      section.fault("flasks", flasks.get() + " for flasks in [fixed]", expected);
      return Optional.empty();
    }
    return flasks.map(Long::intValue);
  }

  private PerAnalyte<Double> trustedSignal(Section section) {
    return FixedSection.perAnalyte(
        section, "trusted_signal", (where, key) -> where.number(key, "a number in signal units"));
  }

  private PerAnalyte<Measured> reportingLimit(Section section) {
    return FixedSection.perAnalyte(section, "reporting_limit", this::limit);
  }

  private Optional<Measured> limit(Section where, String key) {
    String expected = "a concentration above 0, such as \"0.5 µg/L\"";
    Optional<String> text = where.text(key, expected);
    // A limit is a concentration like an addition; only 0 makes no sense here.
    Optional<Understood<Measured>> read =
        text.map(words -> new AmountReader(notation).read(Fact.ADDITION, words, Optional.empty()));
    if (read.isPresent()
        && read.get() instanceof Understood.Value<Measured> value
        && value.value().quantity().value() > 0
        && value.value().tolerance().isEmpty()) {
      return Optional.of(value.value());
    }
    text.ifPresent(words -> where.fault(key, "'" + words + "' for " + where.named(key), expected));
    return Optional.empty();
  }

  private static OptionalDouble targetUncertainty(Section section) {
    String expected = "a number above 0 and below 10, such as 0.25 for 25 %";
    Optional<Double> target = section.number("target_uncertainty", expected);
    if (target.isPresent() && !(target.get() > 0 && target.get() < 10)) {
      section.fault(
          "target_uncertainty", target.get() + " for target_uncertainty in [method]", expected);
      return OptionalDouble.empty();
    }
    return target.map(OptionalDouble::of).orElseGet(OptionalDouble::empty);
  }
}
