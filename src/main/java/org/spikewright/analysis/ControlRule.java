package org.spikewright.analysis;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.mapping.Glob;
import org.spikewright.mapping.PerAnalyte;
import org.spikewright.quantity.Quantity;
import org.spikewright.reading.SampleId;
import org.spikewright.reading.Subject;

/**
 * What the laboratory says about samples whose result it knows beforehand, or knows something of.
 *
 * @param name under which its history is kept, whatever the sample's ID is on a day
 * @param kind what it is
 * @param sample pattern of sample IDs
 * @param instrument on which it is measured; empty for any
 * @param analytes for which it counts; empty for all
 * @param reference known value, of a spiked control the amount added in the result's terms
 * @param parent of a spiked control or a duplicate: the sample it is held against
 * @param limits of the laboratory
 */
public record ControlRule(
    String name,
    Kind kind,
    Glob sample,
    Optional<String> instrument,
    List<String> analytes,
    PerAnalyte<Certified> reference,
    Optional<Parent> parent,
    Limits limits) {

  /** Copies its list. */
  public ControlRule {
    analytes = List.copyOf(analytes);
  }

  /** What a control is. */
  public enum Kind {
    CONTROL_SAMPLE("control sample"),
    REFERENCE_MATERIAL("reference material"),
    SPIKED_CONTROL("spiked control"),
    DUPLICATE("duplicate"),
    BLANK("blank");

    private final String word;

    Kind(String word) {
      this.word = word;
    }

    /** The word used in the configuration, shown to people and stored. */
    public String word() {
      return word;
    }

    /** Whether it is held against a known value of its own. */
    public boolean hasReference() {
      return this == CONTROL_SAMPLE || this == REFERENCE_MATERIAL || this == SPIKED_CONTROL;
    }

    /** Whether it is held against another sample. */
    public boolean hasParent() {
      return this == SPIKED_CONTROL || this == DUPLICATE;
    }
  }

  /**
   * A known value.
   *
   * @param value above 0
   * @param standardUncertainty in the unit of the value; empty when none was given
   */
  public record Certified(Quantity value, OptionalDouble standardUncertainty) {}

  /** Which sample a spiked control or a duplicate belongs to. */
  public sealed interface Parent {
    /** Always the same one. */
    record Named(SampleId sample) implements Parent {}

    /** The one whose ID is this one's without the suffix. */
    record WithoutSuffix(String suffix) implements Parent {}

    /** The parent of a sample; empty when its ID does not end in the suffix. */
    default Optional<SampleId> of(SampleId sample) {
      if (this instanceof Named named) {
        return Optional.of(named.sample());
      }
      String suffix = ((WithoutSuffix) this).suffix();
      String text = sample.text();
      return text.endsWith(suffix) && text.length() > suffix.length()
          ? Optional.of(new SampleId(text.substring(0, text.length() - suffix.length())))
          : Optional.empty();
    }
  }

  /**
   * Limits of the laboratory; where none is set, the general criteria hold.
   *
   * @param recovery least and largest recovery, 1 being full
   * @param z largest absolute z score; needs {@code sd}
   * @param sd standard deviation for the z score
   * @param en largest absolute E_n score
   * @param difference largest relative difference of duplicates
   * @param most largest value of a blank
   */
  public record Limits(
      Optional<Range> recovery,
      OptionalDouble z,
      PerAnalyte<Quantity> sd,
      OptionalDouble en,
      OptionalDouble difference,
      PerAnalyte<Quantity> most) {
    /** None is set. */
    public static final Limits NONE =
        new Limits(
            Optional.empty(),
            OptionalDouble.empty(),
            PerAnalyte.none(),
            OptionalDouble.empty(),
            OptionalDouble.empty(),
            PerAnalyte.none());
  }

  /**
   * From one number to another.
   *
   * @param lower below {@code upper}
   */
  public record Range(double lower, double upper) {
    /** Whether it holds a number; NaN it does not. */
    public boolean holds(double value) {
      return value >= lower && value <= upper;
    }
  }

  /** Whether the rule speaks of a subject. */
  public boolean appliesTo(Subject subject) {
    return sample.matches(subject.sample().text())
        && instrument.map(subject.instrument()::equals).orElse(true)
        && (analytes.isEmpty() || analytes.contains(subject.analyte()))
        && (!kind.hasReference() || reference.of(subject.analyte()).isPresent())
        && parent.map(of -> of.of(subject.sample()).isPresent()).orElse(true);
  }
}
