package org.spikewright.analysis;

import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.analysis.ControlRule.Kind;
import org.spikewright.fit.ControlLimits;
import org.spikewright.series.SeriesKey;

/**
 * A control, held against what is known of it.
 *
 * @param key whose history it continues
 * @param series the series it is
 * @param batch the batch it stands for
 * @param unit of value and reference
 * @param value found; empty when its series gave no result
 * @param standardUncertainty of the value
 * @param reference the known value; of a spiked control the amount added; empty when there is none
 * @param referenceUncertainty its standard uncertainty
 * @param recovery value over reference; of a spiked control what was found more than in its parent,
 *     over what was added
 * @param z distance from the reference in the laboratory's standard deviations
 * @param en distance from the reference over both expanded uncertainties
 * @param lower limit on the chart's scale, where there is one
 * @param upper likewise
 * @param limitsFrom where the limits come from, in words
 * @param chart limits from the history; empty with fewer than two points
 * @param standing what the chart says of this point, where its limits are not provisional
 * @param verdict in or out
 * @param words what was found, in a sentence
 */
public record ControlResult(
    ControlKey key,
    SeriesKey series,
    String batch,
    String unit,
    OptionalDouble value,
    OptionalDouble standardUncertainty,
    OptionalDouble reference,
    OptionalDouble referenceUncertainty,
    OptionalDouble recovery,
    OptionalDouble z,
    OptionalDouble en,
    OptionalDouble lower,
    OptionalDouble upper,
    String limitsFrom,
    Optional<ControlLimits> chart,
    Optional<ControlLimits.Standing> standing,
    Verdict verdict,
    String words) {

  /** What is made of a control. */
  public enum Verdict {
    IN("in"),
    OUT("out"),
    /** There is nothing to hold it against. */
    NOT_JUDGED("not judged");

    private final String word;

    Verdict(String word) {
      this.word = word;
    }

    /** The word shown to people. */
    public String word() {
      return word;
    }
  }

  /** What its chart shows: the recovery of a spiked control, the value of any other. */
  public OptionalDouble plotted() {
    return key.kind() == Kind.SPIKED_CONTROL ? recovery : value;
  }

  /** The unit of what its chart shows. */
  public String plottedUnit() {
    return key.kind() == Kind.SPIKED_CONTROL ? "1" : unit;
  }

  /** The point that it adds to its history; empty without a value. */
  public Optional<ControlPoint> point() {
    OptionalDouble plotted = plotted();
    OptionalDouble known = key.kind() == Kind.SPIKED_CONTROL ? OptionalDouble.of(1) : reference;
    return plotted.isPresent()
        ? Optional.of(
            new ControlPoint(
                series.labDay(), key, plottedUnit(), plotted.getAsDouble(), known, lower, upper))
        : Optional.empty();
  }
}
