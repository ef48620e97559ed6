package org.spikewright.judgement;

import java.util.OptionalDouble;

/**
 * A departure from what a good series looks like.
 *
 * @param kind which
 * @param weight what it does to the verdict
 * @param number the number it rests on, where there is one
 * @param limit what the number was held against, where there is one
 * @param source where the limit comes from
 * @param sentence a plain sentence for the bench, with the numbers
 * @param advice what to do
 */
public record Flag(
    FlagKind kind,
    Weight weight,
    OptionalDouble number,
    OptionalDouble limit,
    LimitSource source,
    String sentence,
    String advice) {

  /** What a flag does to the verdict. */
  public enum Weight {
    /** Shown; changes no verdict. */
    NOTE,
    /** A person decides. */
    REVIEW,
    /** Not reportable. */
    REPEAT
  }

  /** Where a limit comes from. */
  public enum LimitSource {
    PUBLISHED("published"),
    COMMON_PRACTICE("common practice"),
    LABORATORY("laboratory"),
    ARITHMETIC("arithmetic");

    private final String words;

    LimitSource(String words) {
      this.words = words;
    }

    /** As shown to people. */
    public String words() {
      return words;
    }
  }
}
