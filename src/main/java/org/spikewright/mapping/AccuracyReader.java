package org.spikewright.mapping;

import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.PlusMinus;
import org.spikewright.quantity.Quantity;
import org.spikewright.reading.Accuracies;
import org.spikewright.reading.Accuracies.Accuracy;
import org.spikewright.reading.Stock;

/**
 * How well the quantities of a flask are known: by the ± of their own, else by the glassware that
 * is named for them. A ± in a quantity's own text is a rectangular limit and systematic.
 */
final class AccuracyReader {
  private final Places places;
  private final RowLookup lookup;
  private final ToolChoice choice;
  private final DilutionTools dilutions;

  AccuracyReader(Mapping mapping, RowLookup lookup) {
    this.places = mapping.places();
    this.lookup = lookup;
    this.choice = new ToolChoice(mapping.shelf().glassware());
    this.dilutions = new DilutionTools(choice);
  }

  /**
   * Reads them.
   *
   * @param values what was understood of the flask
   * @param stock the named stock, where the stock has a name
   * @param troubles gains what is wrong, each under the word of its fact
   */
  Accuracies read(
      Map<Fact, Measured> values, Optional<Stock> stock, String analyte, List<Trouble> troubles) {
    Map<Fact, Accuracy> known = new EnumMap<>(Fact.class);
    for (Map.Entry<Fact, Measured> entry : values.entrySet()) {
      accuracy(entry.getKey(), entry.getValue(), troubles)
          .ifPresent(accuracy -> known.put(entry.getKey(), accuracy));
    }
    if (known.isEmpty() && stock.isEmpty()) {
      return Accuracies.NONE;
    }
    return new Accuracies(
        stock.isPresent() ? stock.get().accuracy(analyte) : first(known, Fact.STOCK),
        first(known, Fact.ALIQUOT_VOLUME),
        first(known, Fact.ADDITION_VOLUME, Fact.ADDITION),
        first(known, Fact.FINAL_VOLUME),
        first(known, Fact.START_VOLUME),
        first(known, Fact.DILUTION),
        first(known, Fact.TEST_PORTION),
        first(known, Fact.DIGEST_VOLUME),
        first(known, Fact.DRY_MASS));
  }

  private static Optional<Accuracy> first(Map<Fact, Accuracy> known, Fact... facts) {
    for (Fact fact : facts) {
      if (known.containsKey(fact)) {
        return Optional.of(known.get(fact));
      }
    }
    return Optional.empty();
  }

  private Optional<Accuracy> accuracy(Fact fact, Measured value, List<Trouble> troubles) {
    if (value.tolerance().isPresent()) {
      return Accuracy.of(value, PlusMinus.RECTANGULAR, "");
    }
    Optional<Fact> by = fact.measuredBy().filter(places::isNamed);
    return by.isPresent() ? byTool(by.get(), value.quantity(), troubles) : Optional.empty();
  }

  private Optional<Accuracy> byTool(Fact by, Quantity quantity, List<Trouble> troubles) {
    Optional<String> text =
        lookup.find(by).map(Given::text).or(() -> Optional.ofNullable(places.fixedNames().get(by)));
    if (text.isEmpty()) {
      // What was not measured out needs no tool: no addition, no dilution.
      boolean nothingDone = quantity.value() == (by == Fact.DILUTION_BY ? 1 : 0);
      if (!nothingDone) {
        troubles.add(lookup.missing(by, by.expectation(), true));
      }
      return Optional.empty();
    }
    Understood<Optional<Accuracy>> accuracy =
        by == Fact.DILUTION_BY
            ? dilutions.of(text.get(), quantity.value())
            : choice
                .of(text.get(), quantity)
                .then(tool -> new Understood.Value<>(tool.accuracy(quantity)));
    if (accuracy instanceof Understood.Value<Optional<Accuracy>> value) {
      return value.value();
    }
    Understood.Nothing<Optional<Accuracy>> nothing =
        (Understood.Nothing<Optional<Accuracy>>) accuracy;
    troubles.add(
        new Trouble(
            nothing.reason(), -1, by.word(), Said.quoted(nothing.found()), nothing.expected()));
    return Optional.empty();
  }
}
