package org.spikewright.config;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Stream;
import org.spikewright.mapping.DilutionTools;
import org.spikewright.mapping.Fact;
import org.spikewright.mapping.PerAnalyte;
import org.spikewright.mapping.Places;
import org.spikewright.mapping.Spelling;
import org.spikewright.mapping.ToolChoice;
import org.spikewright.mapping.Understood;
import org.spikewright.quantity.Measured;
import org.spikewright.reading.Tool;

/**
 * Whether the glassware that a mapping names is there and can have measured what it is named for.
 */
final class ToolCheck {
  private final Section root;
  private final Named named;
  private final Places places;
  private final Map<String, Tool> glassware;
  private final ToolChoice choice;

  ToolCheck(Section root, Named named, Places places, Map<String, Tool> glassware) {
    this.root = root;
    this.named = named;
    this.places = places;
    this.glassware = glassware;
    this.choice = new ToolChoice(glassware);
  }

  void check() {
    for (Fact fact : Fact.values()) {
      fact.measuredBy().filter(named::has).ifPresent(by -> check(fact, by));
    }
  }

  private void check(Fact fact, Fact by) {
    if (!named.has(fact)) {
      root.faults()
          .add(named.at(by), by.word() + " without " + fact.word(), fact.word() + " beside it");
    }
    String text = places.fixedNames().get(by);
    if (text == null) {
      return;
    }
    List<Measured> values =
        places.fixedAmounts().getOrDefault(fact, PerAnalyte.none()).values().toList();
    Optional<Measured> declared =
        values.stream().filter(value -> value.tolerance().isPresent()).findFirst();
    if (declared.isPresent()) {
      fault(
          by,
          by.word() + " beside " + fact.word() + " of '" + declared.get() + "'",
          "one of the two: the glassware, or a ± of its own",
          Optional.empty());
    }
    for (String name : names(by, text)) {
      if (choice.named(name) instanceof Understood.Nothing<Tool> unknown) {
        // The nearest name is said once, apart.
        String expected = unknown.expected().replaceFirst("; did you mean .*", "");
        fault(
            by,
            "'" + unknown.found() + "' for " + by.word() + " in [fixed]",
            expected,
            Spelling.nearest(name, glassware.keySet()));
        return;
      }
    }
    Stream<Understood<?>> made =
        by == Fact.DILUTION_BY
            ? factors(values).map(factor -> new DilutionTools(choice).of(text, factor))
            : values.stream().map(value -> choice.of(text, value.quantity()));
    made.flatMap(one -> one instanceof Understood.Nothing<?> no ? Stream.of(no) : Stream.empty())
        .findFirst()
        .ifPresent(
            no ->
                fault(
                    by,
                    no.found() + " for " + by.word() + " in [fixed]",
                    no.expected(),
                    Optional.empty()));
  }

  /** The dilutions that are known here; where only rows tell them, 1 checks the words alone. */
  private static Stream<Double> factors(List<Measured> values) {
    return values.isEmpty()
        ? Stream.of(1.0)
        : values.stream().map(value -> value.quantity().value());
  }

  private static List<String> names(Fact by, String text) {
    List<String> parts = ToolChoice.names(text);
    return by == Fact.DILUTION_BY
        ? parts.stream().flatMap(part -> List.of(part.split(" to ", -1)).stream()).toList()
        : parts;
  }

  private void fault(Fact by, String found, String expected, Optional<String> nearest) {
    root.faults().add(root.at("fixed", by.word()), found, expected, nearest);
  }
}
