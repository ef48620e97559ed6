package org.spikewright.reading;

import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Quantity;

/** What was added to a flask. */
public sealed interface Addition {

  /**
   * A volume of a stock. In one vessel it is the total added so far.
   *
   * @param volume 0 or more
   * @param stock concentration of the stock
   */
  record OfStock(Quantity volume, Measured stock) implements Addition {}

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

  /** The added quantity: a volume of stock, or a stated concentration. */
  default Quantity amount() {
    return this instanceof OfStock spike ? spike.volume() : ((Stated) this).concentration();
  }

  /** Whether nothing was added. */
  default boolean isNone() {
    return amount().value() == 0;
  }
}
