package org.spikewright.quantity;

import java.util.OptionalDouble;

/**
 * A quantity with the tolerance or standard uncertainty that was declared for it, if any.
 *
 * @param quantity the value
 * @param tolerance half-width in the unit of {@code quantity}, 0 or more; empty when none was
 *     declared
 */
public record Measured(Quantity quantity, OptionalDouble tolerance) {
  /** A value without a declared tolerance. */
  public static Measured exactly(Quantity quantity) {
    return new Measured(quantity, OptionalDouble.empty());
  }

  /** The value in another unit of the same dimension. */
  public double in(Unit unit) {
    return quantity.in(unit);
  }

  @Override
  public String toString() {
    return tolerance.isPresent()
        ? quantity + " ± " + new Quantity(tolerance.getAsDouble(), quantity.unit())
        : quantity.toString();
  }
}
