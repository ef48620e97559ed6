package org.spikewright.mapping;

import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Design;

/**
 * What a mapping says about the method.
 *
 * @param name the mapping's name
 * @param design how additions are made
 * @param additions one vessel: what an addition volume means
 * @param terms stated: what a concentration refers to
 * @param resultUnit the client's unit
 * @param flasks how many flasks the design has
 * @param fitReadings whether each reading counts as a flask
 * @param trustedSignal largest signal inside the range
 * @param reportingLimit replaces the detection limit in the report
 * @param targetUncertainty relative expanded uncertainty aimed at
 */
public record MethodRule(
    String name,
    Design design,
    Optional<Additions> additions,
    Optional<Addition.Terms> terms,
    PerAnalyte<Unit> resultUnit,
    int flasks,
    boolean fitReadings,
    PerAnalyte<Double> trustedSignal,
    PerAnalyte<Measured> reportingLimit,
    OptionalDouble targetUncertainty) {

  /** What an addition volume means in one vessel. */
  public enum Additions {
    /** What this step added. */
    EACH("each"),
    /** All that was added so far. */
    CUMULATIVE("cumulative");

    private final String word;

    Additions(String word) {
      this.word = word;
    }

    /** The word used in mappings. */
    public String word() {
      return word;
    }
  }

  /** Whether totals have to be summed up step by step. */
  boolean sumsSteps() {
    return additions.isPresent() && additions.get() == Additions.EACH;
  }
}
