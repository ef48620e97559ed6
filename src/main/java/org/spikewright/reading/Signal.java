package org.spikewright.reading;

import java.util.Optional;
import java.util.OptionalDouble;

/** What the instrument said. */
public sealed interface Signal {
  /** As it stood in the cell. */
  String text();

  /**
   * A number.
   *
   * @param value finite, in the instrument's unit
   * @param text as it stood in the cell
   * @param standard the internal standard's signal of the same reading, above its baseline; empty
   *     where there is none
   * @param spread of the readings whose mean the value is; empty for a single reading, and beside
   *     an internal standard: how a ratio scatters does not follow from how its signals do
   */
  record Value(double value, String text, OptionalDouble standard, Optional<Spread> spread)
      implements Signal {
    /** Holds one of the two at most. */
    public Value {
      if (standard.isPresent() && spread.isPresent()) {
        throw new IllegalArgumentException("a spread beside an internal standard");
      }
    }

    /** A single reading without an internal standard. */
    public Value(double value, String text) {
      this(value, text, OptionalDouble.empty(), Optional.empty());
    }
  }

  /** A declared word instead of a number. */
  record NoNumber(State state, String text) implements Signal {}

  /** What a declared word means. */
  enum State {
    OVER_RANGE("over range"),
    BELOW_RANGE("below range"),
    MISSING("missing");

    private final String word;

    State(String word) {
      this.word = word;
    }

    /** The words used in mappings and shown to people. */
    public String word() {
      return word;
    }
  }
}
