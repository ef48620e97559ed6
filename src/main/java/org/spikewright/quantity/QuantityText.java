package org.spikewright.quantity;

import java.util.Optional;
import java.util.OptionalDouble;

/** Quantities as a person writes them in a setting: {@code 10 mL}, {@code 2 %}, {@code 0.5}. */
public final class QuantityText {
  private QuantityText() {}

  /**
   * Reads a number with a decimal point and, after it, a unit of the table; a number alone has unit
   * {@link Unit#ONE}.
   *
   * @return empty when the text is no such quantity
   */
  public static Optional<Quantity> parse(String text) {
    String stripped = text.strip();
    int end = 0;
    while (end < stripped.length() && "+-.0123456789eE".indexOf(stripped.charAt(end)) >= 0) {
      end++;
    }
    OptionalDouble number = NumberGrammar.POINT.parse(stripped.substring(0, end));
    String symbol = stripped.substring(end).strip();
    Optional<Unit> unit = symbol.isEmpty() ? Optional.of(Unit.ONE) : Unit.find(symbol);
    return number.isPresent() && unit.isPresent()
        ? Optional.of(new Quantity(number.getAsDouble(), unit.get()))
        : Optional.empty();
  }

  /** Reads a quantity of one dimension. */
  public static Optional<Quantity> parse(String text, Dimension dimension) {
    return parse(text).filter(quantity -> quantity.unit().dimension() == dimension);
  }
}
