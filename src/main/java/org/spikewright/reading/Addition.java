package org.spikewright.reading;

import java.util.List;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;

/** What was added to a flask. */
public sealed interface Addition {

  /**
   * A volume of a stock, or a mass of it where it was weighed. In one vessel it is the total added
   * so far.
   *
   * @param delivered 0 or more
   * @param stock concentration of the stock; its mass fraction (or molality) where it was weighed
   */
  record OfStock(Quantity delivered, Measured stock) implements Addition {}

  /**
   * All that one vessel got so far, of several stocks.
   *
   * @param portions in the order of delivery, two or more; each with its own volume and stock
   */
  record OfStocks(List<OfStock> portions) implements Addition {
    /** Copies its list. */
    public OfStocks {
      portions = List.copyOf(portions);
    }

    private Quantity total() {
      Unit unit = portions.get(0).delivered().unit();
      return new Quantity(
          portions.stream().mapToDouble(portion -> portion.delivered().in(unit)).sum(), unit);
    }
  }

  /**
   * A concentration that the bench states.
   *
   * @param concentration 0 or more
   * @param terms what it refers to
   */
  record Stated(Quantity concentration, Terms terms) implements Addition {}

  /** What a stated concentration refers to. */
  enum Terms {
    /** The added concentration in the measured flask. */
    FLASK("flask"),
    /** The added concentration referred to the aliquot (the solution that was aliquoted). */
    SAMPLE("sample");

    private final String word;

    Terms(String word) {
      this.word = word;
    }

    /** The word used in mappings. */
    public String word() {
      return word;
    }
  }

  /** The added quantity: a volume or mass of stock, or a stated concentration. */
  default Quantity amount() {
    if (this instanceof OfStocks several) {
      return several.total();
    }
    return this instanceof OfStock spike ? spike.delivered() : ((Stated) this).concentration();
  }

  /** What came of which stock; empty where the concentration is stated. */
  default List<OfStock> portions() {
    if (this instanceof OfStocks several) {
      return several.portions();
    }
    return this instanceof OfStock spike ? List.of(spike) : List.of();
  }

  /** Whether nothing was added. */
  default boolean isNone() {
    return amount().value() == 0;
  }
}
