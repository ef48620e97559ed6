package org.spikewright.quantity;

/**
 * A value with its standard uncertainty and how well that is known.
 *
 * <p>Source: JCGM 100:2008 (GUM), 2.3.1 and 4.2.6.
 *
 * @param value finite, in any unit
 * @param standardUncertainty finite, 0 or more, in the unit of the value
 * @param degreesOfFreedom above 0; infinite when the uncertainty itself is taken as known
 */
public record Estimate(double value, double standardUncertainty, double degreesOfFreedom) {
  /** Refuses what is out of range or no number: {@link IllegalArgumentException}. */
  public Estimate {
    boolean known =
        Double.isFinite(value) && standardUncertainty >= 0 && standardUncertainty < 1 / 0.0;
    if (!(known && degreesOfFreedom > 0)) {
      throw new IllegalArgumentException(
          value + " with standard uncertainty " + standardUncertainty + ", " + degreesOfFreedom);
    }
  }

  /** A value whose standard uncertainty is taken as known. */
  public static Estimate known(double value, double standardUncertainty) {
    return new Estimate(value, standardUncertainty, Double.POSITIVE_INFINITY);
  }
}
