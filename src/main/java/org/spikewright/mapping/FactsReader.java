package org.spikewright.mapping;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.EnumMap;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Predicate;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Accuracies;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.Role;
import org.spikewright.reading.Stock;
import org.spikewright.table.Cell;

/**
 * Reads what is known about a flask. Rows that say the same get the same object: most rows of an
 * export repeat a few sets of facts, and equality is then a matter of identity.
 */
final class FactsReader {
  private static final int MOST_KEPT = 50_000;

  /** What came of it. */
  sealed interface Facts {
    /**
     * All is known.
     *
     * @param facts the facts; in a vessel whose steps are summed, the addition is this step's own
     * @param addition what was added, as a person writes it
     */
    record Known(FlaskFacts facts, String addition) implements Facts {}

    /** Something is missing or wrong. */
    record Unknown(List<Trouble> troubles) implements Facts {}
  }

  private final Mapping mapping;
  private final RowLookup lookup;
  private final NameReader names;
  private final AmountReader amounts;
  private final DilutionReader dilutions;
  private final StockReader stocks;
  private final AccuracyReader accuracies;
  private final Fact[] read;
  private final Fact[] needed;
  private final Map<String, Facts> known = new HashMap<>();
  private final StringBuilder key = new StringBuilder();

  FactsReader(Mapping mapping, RowLookup lookup, NameReader names) {
    this.names = names;
    this.mapping = mapping;
    this.lookup = lookup;
    this.amounts = new AmountReader(mapping.notation());
    this.dilutions = new DilutionReader(mapping.notation());
    this.stocks = new StockReader(mapping.shelf().stocks(), mapping.notation());
    this.accuracies = new AccuracyReader(mapping, lookup);
    this.read = facts(fact -> mapping.places().isRead(fact));
    this.needed = facts(fact -> mapping.places().isNamed(fact));
  }

  private static Fact[] facts(Predicate<Fact> which) {
    return Arrays.stream(Fact.values())
        .filter(FactsReader::isOfFlask)
        .filter(which)
        .toArray(Fact[]::new);
  }

  private static boolean isOfFlask(Fact fact) {
    return fact.kind() == Fact.Kind.AMOUNT && fact != Fact.CALIBRATION_CONCENTRATION
        || fact.kind() == Fact.Kind.DILUTION
        || fact.kind() == Fact.Kind.TOOL
        || fact == Fact.PREPARATION
        || fact == Fact.RESULT_UNIT;
  }

  /** Reads the facts of the lookup's row. */
  Facts facts(String analyte, Role role) {
    key.setLength(0);
    key.append(role.ordinal()).append(analyte).append('\0');
    for (Fact fact : read) {
      Optional<Given> given = lookup.find(fact);
      if (given.isPresent()) {
        Cell cell = given.get().cell();
        // A number in a spreadsheet and the same digits in text may be read differently.
        key.append(cell instanceof Cell.Text ? 't' : 'n').append(given.get().place());
        key.append(cell.shown());
      }
      key.append('\0');
    }
    String same = key.toString();
    Facts facts = known.get(same);
    if (facts == null) {
      facts = understand(analyte, role);
      if (known.size() >= MOST_KEPT) {
        known.clear();
      }
      // What a row lacks names its columns and length, which the key does not hold.
      if (facts instanceof Facts.Known) {
        known.put(same, facts);
      }
    }
    return facts;
  }

  private Facts understand(String analyte, Role role) {
    Map<Fact, Measured> values = new EnumMap<>(Fact.class);
    List<Trouble> troubles = new ArrayList<>();
    Optional<String> preparation = Optional.empty();
    for (Fact fact : needed) {
      if (fact == Fact.PREPARATION) {
        preparation = names.read(fact, troubles);
      } else if (fact != Fact.RESULT_UNIT && fact.kind() != Fact.Kind.TOOL) {
        amount(fact, analyte, troubles).ifPresent(value -> values.put(fact, value));
      }
    }
    Optional<Unit> resultUnit = resultUnit(analyte, troubles);
    if (!troubles.isEmpty() || resultUnit.isEmpty()) {
      return new Facts.Unknown(troubles);
    }
    Optional<Stock> stock = stock(analyte);
    Accuracies known = accuracies.read(values, stock, analyte, troubles);
    if (!troubles.isEmpty()) {
      return new Facts.Unknown(troubles.stream().map(this::placed).toList());
    }
    FlaskDraft draft =
        new FlaskDraft(
            mapping.method(), values, resultUnit.get(), analyte, known, stock.map(Stock::bottle));
    Optional<Trouble> contradiction = draft.contradiction().map(this::placed);
    if (contradiction.isPresent()) {
      return new Facts.Unknown(List.of(contradiction.get()));
    }
    FlaskFacts facts = draft.facts(role, preparation);
    return new Facts.Known(facts, facts.addition().amount().toString());
  }

  /** Points a trouble at the cell of its fact. */
  private Trouble placed(Trouble trouble) {
    return Fact.of(trouble.column())
        .flatMap(lookup::find)
        .map(
            given ->
                new Trouble(
                    trouble.reason(),
                    given.index(),
                    given.column(),
                    trouble.found(),
                    trouble.expected()))
        .orElse(trouble);
  }

  private Optional<Measured> amount(Fact fact, String analyte, List<Trouble> troubles) {
    Optional<Given> given = lookup.find(fact);
    if (given.isPresent()) {
      return understood(fact, given.get(), analyte, troubles);
    }
    PerAnalyte<Measured> fixed =
        mapping.places().fixedAmounts().getOrDefault(fact, PerAnalyte.none());
    Optional<Measured> value = fixed.of(analyte);
    if (value.isEmpty()) {
      String whose = fixed.each().isEmpty() ? "" : " for " + Said.briefly(analyte);
      troubles.add(lookup.missing(fact, fact.expectation() + whose, true));
    }
    return value;
  }

  /** A quantity of the lookup's row that is none of a flask's facts. */
  Optional<Quantity> quantity(Fact fact, List<Trouble> troubles) {
    Optional<Given> given = lookup.find(fact);
    if (given.isEmpty()) {
      troubles.add(lookup.missing(fact, fact.expectation(), false));
      return Optional.empty();
    }
    return understood(fact, given.get(), "", troubles).map(Measured::quantity);
  }

  /** The named stock that the row, or the mapping for all rows, names. */
  private Optional<Stock> stock(String analyte) {
    Optional<Given> given = lookup.find(Fact.STOCK);
    return given.isPresent()
        ? stocks.named(given.get().text())
        : mapping.places().fixedStocks().of(analyte).flatMap(stocks::named);
  }

  private Optional<Measured> understood(
      Fact fact, Given given, String analyte, List<Trouble> troubles) {
    Optional<Unit> unit = given.form().unit();
    Understood<Measured> result =
        switch (fact) {
          case DILUTION -> dilutions.read(given.cell());
          case STOCK -> stocks.read(given.cell(), unit, analyte);
          default -> amounts.read(fact, given.cell(), unit);
        };
    if (result instanceof Understood.Value<Measured> value) {
      return Optional.of(value.value());
    }
    troubles.add(Trouble.of((Understood.Nothing<Measured>) result, given));
    return Optional.empty();
  }

  private Optional<Unit> resultUnit(String analyte, List<Trouble> troubles) {
    Optional<Given> given = lookup.find(Fact.RESULT_UNIT);
    if (given.isEmpty()) {
      Optional<Unit> unit = mapping.method().resultUnit().of(analyte);
      if (unit.isEmpty()) {
        troubles.add(
            new Trouble(
                Reason.FACT_MISSING,
                -1,
                Fact.RESULT_UNIT.word(),
                "no unit under [result] for " + Said.quoted(analyte),
                "a unit for each analyte, or one for all"));
      }
      return unit;
    }
    Optional<Unit> unit = mapping.notation().unit(given.get().text());
    if (unit.isEmpty()) {
      troubles.add(
          new Trouble(
              Reason.UNIT_DOES_NOT_FIT,
              given.get().index(),
              given.get().column(),
              Said.quoted(given.get().text()),
              "a unit for the result, such as 'µg/L'"));
    }
    return unit;
  }
}
