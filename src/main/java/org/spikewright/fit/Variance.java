package org.spikewright.fit;

/**
 * A variance that was estimated.
 *
 * @param value in the square of the unit at hand, 0 or more, finite
 * @param df its degrees of freedom, above 0; infinite when it is known
 */
public record Variance(double value, double df) {

  /**
   * Checks the ranges.
   *
   * @throws IllegalArgumentException when a number is out of range or none
   */
  public Variance {
    if (!(value >= 0 && value < Double.POSITIVE_INFINITY && df > 0)) {
      throw new IllegalArgumentException("variance " + value + " with " + df + " df");
    }
  }

  /** The standard deviation. */
  public double sd() {
    return Math.sqrt(value);
  }
}
