package org.spikewright.mapping;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.stream.Collectors;
import org.spikewright.quantity.Dimension;

/** What a row of an export can say: each fact with the word that mappings use for it. */
public enum Fact {
  SAMPLE("sample"),
  ANALYTE("analyte"),
  LINE("line"),
  FLASK("flask"),
  REPLICATE("replicate"),
  BATCH("batch"),
  INSTRUMENT("instrument"),
  PREPARATION("preparation"),
  RESULT_UNIT("result_unit"),
  SIGNAL("signal", Kind.SIGNAL, Bound.ANY, "", Dimension.NUMBER),
  SIGNAL_SD("signal_sd", Kind.SPREAD, Bound.NOT_NEGATIVE, "0.002", Dimension.NUMBER),
  READINGS("readings", Kind.SPREAD, Bound.AT_LEAST_ONE, "3", Dimension.NUMBER),
  INTERNAL_STANDARD("internal_standard", Kind.SIGNAL, Bound.ANY, "", Dimension.NUMBER),
  MEASURED_AT("measured_at", Kind.TIME, Bound.ANY, ""),
  ADDITION_VOLUME("addition_volume", Kind.AMOUNT, Bound.NOT_NEGATIVE, "0.5 mL", Dimension.VOLUME),
  ADDITION_MASS("addition_mass", Kind.AMOUNT, Bound.NOT_NEGATIVE, "0.5 g", Dimension.MASS),
  ADDITION("addition", Kind.AMOUNT, Bound.NOT_NEGATIVE, "5 µg/L", Concentration.CONCENTRATIONS),
  ALIQUOT_VOLUME("aliquot_volume", Kind.AMOUNT, Bound.ABOVE_ZERO, "20 mL", Dimension.VOLUME),
  ALIQUOT_MASS("aliquot_mass", Kind.AMOUNT, Bound.ABOVE_ZERO, "20 g", Dimension.MASS),
  FINAL_VOLUME("final_volume", Kind.AMOUNT, Bound.ABOVE_ZERO, "100 mL", Dimension.VOLUME),
  FINAL_MASS("final_mass", Kind.AMOUNT, Bound.ABOVE_ZERO, "100 g", Dimension.MASS),
  START_VOLUME("start_volume", Kind.AMOUNT, Bound.ABOVE_ZERO, "20 mL", Dimension.VOLUME),
  STOCK("stock", Kind.AMOUNT, Bound.ABOVE_ZERO, "10 mg/L", Concentration.CONCENTRATIONS),
  DILUTION("dilution", Kind.DILUTION, Bound.AT_LEAST_ONE, "", Dimension.NUMBER),
  TEST_PORTION(
      "test_portion", Kind.AMOUNT, Bound.ABOVE_ZERO, "0.5 g", Dimension.MASS, Dimension.VOLUME),
  DIGEST_VOLUME("digest_volume", Kind.AMOUNT, Bound.ABOVE_ZERO, "50 mL", Dimension.VOLUME),
  DIGEST_MASS("digest_mass", Kind.AMOUNT, Bound.ABOVE_ZERO, "50 g", Dimension.MASS),
  DRY_MASS("dry_mass", Kind.AMOUNT, Bound.FRACTION, "85 %", Dimension.NUMBER),
  CALIBRATION_CONCENTRATION(
      "calibration_concentration",
      Kind.AMOUNT,
      Bound.NOT_NEGATIVE,
      "5 µg/L",
      Concentration.CONCENTRATIONS),
  BASELINE("baseline", Kind.AMOUNT, Bound.ANY, "0.003", Dimension.NUMBER),
  METHOD_BLANK("method_blank", Kind.AMOUNT, Bound.ANY, "0.1 µg/L", Concentration.CONCENTRATIONS),
  METHOD_BLANK_DILUTION(
      "method_blank_dilution", Kind.DILUTION, Bound.AT_LEAST_ONE, "", Dimension.NUMBER),
  SOLVENT_BLANK(
      "solvent_blank", Kind.AMOUNT, Bound.NOT_NEGATIVE, "1 µg/L", Concentration.CONCENTRATIONS),
  INTERNAL_STANDARD_BASELINE(
      "internal_standard_baseline", Kind.AMOUNT, Bound.ANY, "0.003", Dimension.NUMBER),
  INTERNAL_STANDARD_MASS(
      "internal_standard_mass", Kind.AMOUNT, Bound.ABOVE_ZERO, "0.1 g", Dimension.MASS),
  MOLAR_MASS("molar_mass", Kind.AMOUNT, Bound.ABOVE_ZERO, "207.2 g/mol", Dimension.MASS_PER_AMOUNT),
  ALIQUOT_BY("aliquot_by", Kind.TOOL),
  ADDITION_BY("addition_by", Kind.TOOL),
  FINAL_VOLUME_BY("final_volume_by", Kind.TOOL),
  START_VOLUME_BY("start_volume_by", Kind.TOOL),
  DILUTION_BY("dilution_by", Kind.TOOL),
  TEST_PORTION_BY("test_portion_by", Kind.TOOL),
  DIGEST_VOLUME_BY("digest_volume_by", Kind.TOOL);

  /** How a fact is read. */
  public enum Kind {
    /** A name, as it stands. */
    NAME,
    /** The signal: a number or a declared word. */
    SIGNAL,
    /** How the readings behind a mean signal scatter: a number. */
    SPREAD,
    /** A date and time. */
    TIME,
    /** A number with its unit. */
    AMOUNT,
    /** A dilution factor in one of its notations. */
    DILUTION,
    /** The glassware that a quantity was measured with, by name. */
    TOOL
  }

  /** Which values make sense; every check is written so that NaN fails. */
  enum Bound {
    ANY("", Double.NEGATIVE_INFINITY, Double.POSITIVE_INFINITY),
    NOT_NEGATIVE(", 0 or more", 0, Double.POSITIVE_INFINITY),
    ABOVE_ZERO(" above 0", Double.MIN_VALUE, Double.POSITIVE_INFINITY),
    AT_LEAST_ONE(", 1 or more", 1, Double.POSITIVE_INFINITY),
    FRACTION(" above 0 and at most 100 % (or 1)", Double.MIN_VALUE, 1);

    private final String words;
    private final double least;
    private final double most;

    Bound(String words, double least, double most) {
      this.words = words;
      this.least = least;
      this.most = most;
    }

    boolean admits(double value) {
      return value >= least && value <= most;
    }
  }

  /** Lists that the constants above need before they exist. */
  private static final class Concentration {
    static final Dimension[] CONCENTRATIONS = {
      Dimension.MASS_PER_VOLUME,
      Dimension.AMOUNT_PER_VOLUME,
      Dimension.MASS_PER_MASS,
      Dimension.AMOUNT_PER_MASS
    };
  }

  private final String word;
  private final Kind kind;
  private final Bound bound;
  private final String example;
  private final List<Dimension> dimensions;

  Fact(String word) {
    this(word, Kind.NAME);
  }

  Fact(String word, Kind kind) {
    this(word, kind, Bound.ANY, "");
  }

  Fact(String word, Kind kind, Bound bound, String example, Dimension... dimensions) {
    this.word = word;
    this.kind = kind;
    this.bound = bound;
    this.example = example;
    this.dimensions = List.of(dimensions);
  }

  /** The word that mappings use. */
  public String word() {
    return word;
  }

  /** How it is read. */
  public Kind kind() {
    return kind;
  }

  /** The fact that a mapping's word names. */
  public static Optional<Fact> of(String word) {
    return Arrays.stream(values()).filter(fact -> fact.word.equals(word)).findFirst();
  }

  /** Whether a quantity of this dimension can be this fact. */
  public boolean fits(Dimension dimension) {
    return dimensions.contains(dimension);
  }

  /** Whether a tolerance declared for it is kept; where not, none may be declared. */
  boolean keepsTolerance() {
    return switch (this) {
      case BASELINE, SIGNAL -> false;
      default -> true;
    };
  }

  /** The fact that names the glassware this one was measured with, where there is such a fact. */
  public Optional<Fact> measuredBy() {
    return switch (this) {
      case ALIQUOT_VOLUME -> Optional.of(ALIQUOT_BY);
      case ADDITION_VOLUME -> Optional.of(ADDITION_BY);
      case FINAL_VOLUME -> Optional.of(FINAL_VOLUME_BY);
      case START_VOLUME -> Optional.of(START_VOLUME_BY);
      case DILUTION -> Optional.of(DILUTION_BY);
      case TEST_PORTION -> Optional.of(TEST_PORTION_BY);
      case DIGEST_VOLUME -> Optional.of(DIGEST_VOLUME_BY);
      default -> Optional.empty();
    };
  }

  /** Whether it is in signal units, which bare numbers need not name. */
  boolean isInSignalUnits() {
    return this == BASELINE || this == INTERNAL_STANDARD_BASELINE;
  }

  /** Whether a value is possible; {@code value} in the base unit, which bounds of 0 do not need. */
  boolean admits(double value) {
    return bound.admits(value);
  }

  /** What should stand there: {@code a volume above 0, such as "20 mL"}. */
  public String expectation() {
    if (kind == Kind.NAME) {
      return "a name for " + word;
    }
    if (kind == Kind.TOOL) {
      return this == DILUTION_BY
          ? "names of glassware for taken and made up in, such as 'pipette 1 to flask 10'"
          : "the name of glassware, or several parted by commas";
    }
    if (kind == Kind.TIME) {
      return "a date and time";
    }
    String what = dimensions.stream().map(Dimension::words).collect(Collectors.joining(" or "));
    return what + bound.words + (example.isEmpty() ? "" : ", such as '" + example + "'");
  }
}
