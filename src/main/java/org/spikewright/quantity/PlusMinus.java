package org.spikewright.quantity;

/**
 * What a number after ± says, and the standard uncertainty that it stands for.
 *
 * <p>Source: JCGM 100:2008 (GUM), 4.3.3 (expanded), 4.3.7 (rectangular), 4.3.9 (triangular).
 *
 * @param meaning what the number is
 * @param divisor what makes a standard uncertainty of it, above 0
 */
public record PlusMinus(Meaning meaning, double divisor) {
  /** What holds where nothing is said: nothing is known about what lies within the limits. */
  public static final PlusMinus RECTANGULAR =
      new PlusMinus(Meaning.RECTANGULAR, Meaning.RECTANGULAR.divisor);

  /** What a number after ± can be. */
  public enum Meaning {
    /** A limit; every value within it is as likely. */
    RECTANGULAR("rectangular", Math.sqrt(3)),
    /** A limit; values near the middle are likelier. */
    TRIANGULAR("triangular", Math.sqrt(6)),
    /** A standard uncertainty. */
    STANDARD("standard", 1),
    /** An expanded uncertainty; its coverage factor stands beside it. */
    EXPANDED("expanded", 2);

    private final String word;
    private final double divisor;

    Meaning(String word, double divisor) {
      this.word = word;
      this.divisor = divisor;
    }

    /** The word used in tables of stocks and glassware. */
    public String word() {
      return word;
    }
  }

  /** Refuses a divisor that is not above 0: {@link IllegalArgumentException}. */
  public PlusMinus {
    if (!(divisor > 0 && Double.isFinite(divisor))) {
      throw new IllegalArgumentException("divisor " + divisor);
    }
  }

  /** A meaning whose divisor follows from it; an expanded uncertainty is taken with k = 2. */
  public static PlusMinus of(Meaning meaning) {
    return new PlusMinus(meaning, meaning.divisor);
  }

  /** An expanded uncertainty with its coverage factor. */
  public static PlusMinus expanded(double k) {
    return new PlusMinus(Meaning.EXPANDED, k);
  }

  /** The standard uncertainty that a number after ± stands for, in its unit. */
  public double standard(double size) {
    return size / divisor;
  }

  /** In words: {@code rectangular}, {@code expanded, k = 2}. */
  public String words() {
    return meaning == Meaning.EXPANDED
        ? meaning.word + ", k = " + Numbers.plain(divisor)
        : meaning.word;
  }
}
