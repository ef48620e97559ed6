package org.spikewright.quantity;

/**
 * A number with its unit.
 *
 * @param value finite
 * @param unit the unit of {@code value}
 */
public record Quantity(double value, Unit unit) {
  /** Refuses what is not finite: {@link IllegalArgumentException}. */
  public Quantity {
    if (!Double.isFinite(value)) {
      throw new IllegalArgumentException("not a finite number: " + value);
    }
  }

  /**
   * The number in another unit of the same dimension; {@link IllegalArgumentException} otherwise.
   */
  public double in(Unit other) {
    return value * unit.to(other);
  }

  /** As a person writes it: {@code 20 mL}. The number is printed so that it reads back the same. */
  @Override
  public String toString() {
    String number = Numbers.plain(value);
    return unit.equals(Unit.ONE) ? number : number + " " + unit.symbol();
  }
}
