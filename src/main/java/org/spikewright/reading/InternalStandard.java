package org.spikewright.reading;

import java.util.Optional;
import org.spikewright.quantity.Measured;

/**
 * An internal standard whose signal divides the analyte's.
 *
 * @param given how it came into the flask
 * @param mass weighed into this flask; only where it was weighed in
 */
public record InternalStandard(Given given, Optional<Measured> mass) {

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
