package org.spikewright.mapping;

import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.quantity.Dimension;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Calculation;
import org.spikewright.reading.Design;
import org.spikewright.reading.MethodFacts.WorkingRange;

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
 * @param workingRange where results of the method are valid
 * @param bendAllowance largest relative bias by a bend that the data may leave open
 * @param blankDue whether a method blank must be there
 * @param calculation how the line is drawn and which interval is reported
 * @param signal what it says about the signals
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
    OptionalDouble targetUncertainty,
    PerAnalyte<Range> workingRange,
    OptionalDouble bendAllowance,
    boolean blankDue,
    Calculation calculation,
    SignalRule signal) {

  /**
   * A range of results.
   *
   * @param lower 0 or more
   * @param upper above {@code lower}, of the same dimension
   */
  public record Range(Quantity lower, Quantity upper) {
    /** The same in a unit of its dimension. */
    WorkingRange in(Unit unit) {
      return new WorkingRange(lower.in(unit), upper.in(unit));
    }

    @Override
    public String toString() {
      return lower + " to " + upper;
    }
  }

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

  /** The fact that tells the aliquot. */
  public Fact aliquotFact() {
    return design == Design.WEIGHED ? Fact.ALIQUOT_MASS : Fact.ALIQUOT_VOLUME;
  }

  /** The fact that tells how much stock was added, where the design adds one. */
  public Fact additionFact() {
    return design == Design.WEIGHED ? Fact.ADDITION_MASS : Fact.ADDITION_VOLUME;
  }

  /** Whether a stock can be of this dimension: per mass where it is weighed, else per volume. */
  public boolean fitsStock(Dimension dimension) {
    return Chain.isPerMass(dimension) == (design == Design.WEIGHED);
  }

  /** What the stock should be. */
  public String stockExpectation() {
    return design == Design.WEIGHED
        ? "a mass fraction or a molality, such as 'mg/kg', since additions are weighed"
        : "a concentration per volume, such as 'mg/L', since additions are volumes";
  }

  /** Whether totals have to be summed up step by step. */
  public boolean sumsSteps() {
    return additions.isPresent() && additions.get() == Additions.EACH;
  }
}
