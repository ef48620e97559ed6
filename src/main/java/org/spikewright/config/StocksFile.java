package org.spikewright.config;

import java.time.DateTimeException;
import java.time.LocalDate;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Stream;
import org.spikewright.mapping.AmountReader;
import org.spikewright.mapping.Fact;
import org.spikewright.mapping.Notation;
import org.spikewright.mapping.PerAnalyte;
import org.spikewright.mapping.Understood;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.NumberGrammar;
import org.spikewright.quantity.PlusMinus;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Stock;

/** Reads the table of named stocks: {@code ["Pb 10"]} and below it what the certificate says. */
final class StocksFile {
  static final List<String> KEYS = List.of("value", "means", "k", "certificate", "expires");

  private static final String VALUE =
      "a concentration above 0, such as \"10.00 mg/L ± 0.05 mg/L\", or a table with one for each"
          + " analyte";

  private StocksFile() {}

  static Map<String, Stock> read(TomlText text, Faults faults) {
    Section root = Section.open(text.parse(faults), "", At.START, faults);
    Map<String, Stock> stocks = new LinkedHashMap<>();
    for (String key : root.keys()) {
      Optional<Section> section = root.section(key, KEYS);
      String name = ShelfNames.checked(root, key, stocks.keySet());
      if (isQuantity(name)) {
        root.fault(key, "the name '" + name + "', which reads as a concentration", "another name");
      }
      section.ifPresent(found -> stocks.put(name, stock(name, found)));
    }
    return stocks;
  }

  /** Whether some mapping would take the name for a concentration, or for a bare number. */
  private static boolean isQuantity(String name) {
    Unit unit = Unit.of("mg/L");
    Map<String, Unit> declared = Map.of("ppm", unit, "ppb", unit, "ppt", unit);
    return Stream.of(NumberGrammar.POINT, NumberGrammar.COMMA)
        .map(numbers -> new AmountReader(new Notation(numbers, declared, Optional.empty())))
        .anyMatch(
            reader ->
                reader.read(Fact.STOCK, name, Optional.of(unit))
                    instanceof Understood.Value<Measured>);
  }

  private static Stock stock(String name, Section section) {
    if (!section.has("value")) {
      section.missing("value", VALUE);
    }
    PerAnalyte<Measured> value =
        FixedSection.perAnalyte(section, "value", StocksFile::concentration);
    PlusMinus means = ShelfNames.means(section);
    boolean declared = value.values().anyMatch(one -> one.tolerance().isPresent());
    if (section.has("means") && !declared && !value.isEmpty()) {
      section.fault("means", "means without a number after ± in value", "value with ±");
    }
    return new Stock(
        name,
        value.all(),
        value.each(),
        means,
        section.text("certificate", "the certificate in words").map(String::strip).orElse(""),
        expires(section));
  }

  private static Optional<Measured> concentration(Section where, String key) {
    Optional<String> text = where.text(key, VALUE);
    Optional<Understood<Measured>> read =
        text.map(
            words -> new AmountReader(Notation.PLAIN).read(Fact.STOCK, words, Optional.empty()));
    if (read.isPresent() && read.get() instanceof Understood.Nothing<Measured> nothing) {
      where.fault(key, "'" + nothing.found() + "' for " + where.named(key), nothing.expected());
      return Optional.empty();
    }
    return read.map(understood -> ((Understood.Value<Measured>) understood).value());
  }

  private static Optional<LocalDate> expires(Section section) {
    String expected = "the last day of use, such as 2026-06-30";
    if (section.value("expires").orElse(null) instanceof LocalDate date) {
      return Optional.of(date);
    }
    Optional<String> text = section.text("expires", expected);
    try {
      return text.map(LocalDate::parse);
    } catch (DateTimeException e) {
      section.fault("expires", "'" + text.get() + "' for " + section.named("expires"), expected);
      return Optional.empty();
    }
  }
}
