package org.spikewright.config;

import java.util.EnumMap;
import java.util.HashMap;
import java.util.Map;
import java.util.Optional;
import java.util.function.BiFunction;
import org.spikewright.mapping.AmountReader;
import org.spikewright.mapping.DilutionReader;
import org.spikewright.mapping.Fact;
import org.spikewright.mapping.Fact.Kind;
import org.spikewright.mapping.Notation;
import org.spikewright.mapping.PerAnalyte;
import org.spikewright.mapping.Rejection;
import org.spikewright.mapping.Spelling;
import org.spikewright.mapping.StockReader;
import org.spikewright.mapping.Understood;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.NumberGrammar;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Stock;
import org.tomlj.TomlTable;

/** Reads the facts in {@code [fixed]}, and whatever else is given once or for each analyte. */
final class FixedSection {
  private final Section section;
  private final Notation notation;
  private final Named named;
  private final Map<String, Stock> known;
  private final StockReader stockReader;

  FixedSection(Section section, Notation notation, Named named, Map<String, Stock> stocks) {
    this.section = section;
    // In a mapping numbers have a decimal point, whatever the export uses.
    this.notation = notation.with(NumberGrammar.POINT);
    this.named = named;
    this.known = stocks;
    this.stockReader = new StockReader(stocks, this.notation);
  }

  Map<Fact, String> names() {
    Map<Fact, String> names = new EnumMap<>(Fact.class);
    for (Fact fact : MappingKeys.fixable()) {
      if (isName(fact) && section.has(fact.word())) {
        named.add(fact, section.at(fact.word()));
        section
            .text(fact.word(), fact.expectation())
            .ifPresent(text -> names.put(fact, text.strip()));
      }
    }
    return names;
  }

  Map<Fact, PerAnalyte<Measured>> amounts() {
    Map<Fact, PerAnalyte<Measured>> amounts = new EnumMap<>(Fact.class);
    for (Fact fact : MappingKeys.fixable()) {
      if (!isName(fact) && section.has(fact.word())) {
        named.add(fact, section.at(fact.word()));
        amounts.put(
            fact,
            severalIn(fact)
                .orElseGet(
                    () ->
                        perAnalyte(
                            section, fact.word(), (where, key) -> amount(where, key, fact))));
      }
    }
    return amounts;
  }

  private static boolean isName(Fact fact) {
    return fact.kind() == Kind.NAME || fact.kind() == Kind.TOOL;
  }

  /** The concentrations of one named stock that holds several analytes. */
  private Optional<PerAnalyte<Measured>> severalIn(Fact fact) {
    Optional<Stock> stock = fact == Fact.STOCK ? wholeStock() : Optional.empty();
    return stock
        .filter(one -> !one.each().isEmpty())
        .map(
            one -> {
              one.each()
                  .forEach(
                      (analyte, value) ->
                          named.unit(
                              fact,
                              new Named.Known(
                                  value.quantity().unit(),
                                  section.at(fact.word()),
                                  Optional.of(analyte))));
              return new PerAnalyte<>(one.all(), one.each());
            });
  }

  private Optional<Stock> wholeStock() {
    return section.value(Fact.STOCK.word()).orElse(null) instanceof String text
        ? stockReader.named(text)
        : Optional.empty();
  }

  /** The names of the stocks that have one. */
  PerAnalyte<String> stocks() {
    String key = Fact.STOCK.word();
    if (section.value(key).orElse(null) instanceof TomlTable) {
      Section analytes = section.openSection(key).orElseThrow();
      Map<String, String> each = new HashMap<>();
      for (String analyte : analytes.keys()) {
        if (analytes.value(analyte).orElse(null) instanceof String text) {
          stockReader.named(text).ifPresent(stock -> each.put(analyte.strip(), stock.name()));
        }
      }
      return new PerAnalyte<>(Optional.empty(), each);
    }
    return new PerAnalyte<>(wholeStock().map(Stock::name), Map.of());
  }

  /** Something given once, or in a table with a key for each analyte. */
  static <T> PerAnalyte<T> perAnalyte(
      Section section, String key, BiFunction<Section, String, Optional<T>> reader) {
    if (!(section.value(key).orElse(null) instanceof TomlTable)) {
      return new PerAnalyte<>(reader.apply(section, key), Map.of());
    }
    Section analytes = section.openSection(key).orElseThrow();
    if (analytes.keys().isEmpty()) {
      section.fault(key, "an empty table for " + section.named(key), "a key for each analyte");
    }
    Map<String, T> each = new HashMap<>();
    for (String analyte : analytes.keys()) {
      reader.apply(analytes, analyte).ifPresent(value -> each.put(analyte.strip(), value));
    }
    return new PerAnalyte<>(Optional.empty(), each);
  }

  private Optional<Measured> amount(Section where, String key, Fact fact) {
    Optional<Understood<Measured>> read = read(where, key, fact);
    if (read.isEmpty()) {
      return Optional.empty();
    }
    if (read.get() instanceof Understood.Nothing<Measured> nothing) {
      String found = "'" + nothing.found() + "' for " + where.named(key);
      Optional<String> near =
          nothing.reason() == Rejection.Reason.NAME_UNKNOWN
              ? Spelling.nearest(nothing.found(), known.keySet())
              : Optional.empty();
      section.faults().add(where.at(key), found, nothing.expected(), near);
      return Optional.empty();
    }
    Measured value = ((Understood.Value<Measured>) read.get()).value();
    Optional<String> analyte = where == section ? Optional.empty() : Optional.of(key);
    named.unit(fact, new Named.Known(value.quantity().unit(), where.at(key), analyte));
    return Optional.of(value);
  }

  private Optional<Understood<Measured>> read(Section where, String key, Fact fact) {
    String expected =
        "a text with " + (fact.kind() == Kind.DILUTION ? "a dilution" : fact.expectation());
    boolean pure = fact.fits(Unit.ONE.dimension());
    Optional<String> text =
        pure && where.value(key).orElse(null) instanceof Number number
            ? Optional.of(plain(number))
            : where.text(key, expected);
    Optional<Unit> unit = pure ? Optional.of(Unit.ONE) : Optional.empty();
    String analyte = where == section ? "" : key.strip();
    return text.map(
        words ->
            switch (fact) {
              case DILUTION -> new DilutionReader(notation).read(words);
              case STOCK -> stockReader.read(words, unit, analyte);
              default -> new AmountReader(notation).read(fact, words, unit);
            });
  }

  private static String plain(Number number) {
    return Double.isFinite(number.doubleValue())
        ? new Quantity(number.doubleValue(), Unit.ONE).toString()
        : number.toString();
  }
}
