package org.spikewright.reading;

/**
 * How a method wants its lines drawn and judged.
 *
 * @param interval which interval of the fit is reported
 * @param weights how flasks are weighted
 * @param bend which bends count
 * @param correctDrift whether signals are corrected for the drift between bracketing check readings
 */
public record Calculation(Interval interval, Weights weights, Bend bend, boolean correctDrift) {

  /** What holds where the method says nothing. */
  public static final Calculation DEFAULT =
      new Calculation(Interval.BEST_KNOWN, Weights.EQUAL, Bend.SATURATION, false);

  /** Which interval of the fit is reported. */
  public enum Interval {
    /** The moderated one where the pool holds ten series or more, else the series' own. */
    BEST_KNOWN("best known"),
    /** Always the series' own. */
    OWN("own"),
    /** The moderated one wherever there is a pool. */
    POOL("pool");

    private final String word;

    Interval(String word) {
      this.word = word;
    }

    /** The word used in mappings. */
    public String word() {
      return word;
    }
  }

  /** How flasks are weighted. */
  public enum Weights {
    /** All alike. */
    EQUAL("equal"),
    /** By the noise function of the pool; never decided series by series. */
    POOL("pool");

    private final String word;

    Weights(String word) {
      this.word = word;
    }

    /** The word used in mappings. */
    public String word() {
      return word;
    }
  }

  /** Which bends count. */
  public enum Bend {
    /** Towards saturation only. */
    SATURATION("saturation"),
    /** Either way. */
    EITHER("either");

    private final String word;

    Bend(String word) {
      this.word = word;
    }

    /** The word used in mappings. */
    public String word() {
      return word;
    }
  }
}
