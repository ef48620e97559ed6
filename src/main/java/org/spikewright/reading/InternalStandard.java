package org.spikewright.reading;

import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.quantity.Measured;

/**
 * An internal standard whose signal divides the analyte's.
 *
 * @param given how it came into the flask
 * @param mass weighed into this flask; only where it was weighed in
 * @param baseline its signal without any of it, in signal units, subtracted before it divides
 */
public record InternalStandard(Given given, Optional<Measured> mass, OptionalDouble baseline) {

  /** One whose signal has no baseline. */
  public InternalStandard(Given given, Optional<Measured> mass) {
    this(given, mass, OptionalDouble.empty());
  }

  /** How an internal standard came into the flask. */
  public enum Given {
    /** The same amount in every flask, or once in the vessel: the final volume cancels. */
    IN_THE_FLASK("in the flask"),
    /** Weighed into each flask. */
    WEIGHED_IN("weighed in"),
    /** Added on line to what is measured: the final volume does not cancel. */
    ON_LINE("on line");

    private final String word;

    Given(String word) {
      this.word = word;
    }

    /** The word used in mappings. */
    public String word() {
      return word;
    }
  }
}
