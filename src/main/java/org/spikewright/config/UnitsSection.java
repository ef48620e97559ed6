package org.spikewright.config;

import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.mapping.Notation;
import org.spikewright.mapping.Spelling;
import org.spikewright.quantity.Dimension;
import org.spikewright.quantity.NumberGrammar;
import org.spikewright.quantity.Unit;

/** Reads {@code [units]}, and units wherever they stand. */
final class UnitsSection {
  private UnitsSection() {}

  static Notation read(Optional<Section> section, NumberGrammar numbers) {
    Map<String, Unit> declared = new HashMap<>();
    for (String word : List.of("ppm", "ppb", "ppt")) {
      section.flatMap(inner -> declared(inner, word)).ifPresent(unit -> declared.put(word, unit));
    }
    Optional<Notation.Ratio> ratio =
        section.flatMap(
            inner ->
                inner.oneOf("ratio", Section.words(Notation.Ratio.values(), Notation.Ratio::word)));
    return new Notation(numbers, Map.copyOf(declared), ratio);
  }

  private static Optional<Unit> declared(Section section, String word) {
    String expected = "a mass per volume or per mass, such as \"mg/L\" or \"mg/kg\"";
    Optional<String> text = section.text(word, expected);
    Optional<Unit> unit =
        text.flatMap(Unit::find)
            .filter(
                found ->
                    found.dimension() == Dimension.MASS_PER_VOLUME
                        || found.dimension() == Dimension.MASS_PER_MASS);
    if (text.isPresent() && unit.isEmpty()) {
      section.fault(word, "'" + text.get() + "' for " + section.named(word), expected);
    }
    return unit;
  }

  /** A unit by its spelling; a fault with the nearest one where there is none. */
  static Optional<Unit> unit(Section section, String key, Notation notation, String expected) {
    Optional<String> text = section.text(key, expected);
    Optional<Unit> unit = text.flatMap(notation::unit);
    if (text.isPresent() && unit.isEmpty()) {
      boolean undeclared = List.of("ppm", "ppb", "ppt").contains(text.get());
      section
          .faults()
          .add(
              section.at(key),
              "'" + text.get() + "' for " + section.named(key),
              undeclared
                  ? expected + "; what " + text.get() + " means [units] has to say"
                  : expected,
              undeclared ? Optional.empty() : Spelling.nearest(text.get(), Unit.symbols()));
    }
    return unit;
  }
}
