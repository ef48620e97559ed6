package org.spikewright.fit;

/**
 * What a certificate or a data sheet says about an input, and the standard uncertainty that it
 * stands for.
 *
 * <p>Source: JCGM 100:2008 (GUM), 4.3.3 (normal), 4.3.7 (rectangular), 4.3.9 (triangular).
 *
 * @param shape how the input spreads within the statement
 * @param size the number stated: half-width, standard or expanded uncertainty; 0 or more
 * @param divisor what makes a standard uncertainty of it, above 0
 */
public record Tolerance(Shape shape, double size, double divisor) {
  /** How an input spreads. */
  public enum Shape {
    /** Anywhere within ± the half-width alike. */
    RECTANGULAR,
    /** Within ± the half-width, rather near the middle: volumetric glass in careful hands. */
    TRIANGULAR,
    /** Normal. */
    NORMAL
  }

  /** Refuses what is out of range or no number: {@link IllegalArgumentException}. */
  public Tolerance {
    if (!(size >= 0 && size <= Double.MAX_VALUE && divisor > 0 && divisor <= Double.MAX_VALUE)) {
      throw new IllegalArgumentException("tolerance " + size + " over " + divisor);
    }
  }

  /** A half-width with nothing known about what lies within it. */
  public static Tolerance rectangular(double halfWidth) {
    return new Tolerance(Shape.RECTANGULAR, halfWidth, Math.sqrt(3));
  }

  /** A half-width whose middle is likelier than its ends. */
  public static Tolerance triangular(double halfWidth) {
    return new Tolerance(Shape.TRIANGULAR, halfWidth, Math.sqrt(6));
  }

  /** A standard uncertainty. */
  public static Tolerance standard(double standardUncertainty) {
    return new Tolerance(Shape.NORMAL, standardUncertainty, 1);
  }

  /** An expanded uncertainty with its coverage factor. */
  public static Tolerance expanded(double expandedUncertainty, double coverageFactor) {
    return new Tolerance(Shape.NORMAL, expandedUncertainty, coverageFactor);
  }

  /** In the unit of the size. */
  public double standardUncertainty() {
    return size / divisor;
  }
}
