package org.spikewright.reading;

import java.util.Optional;

/** What the instrument said. */
public sealed interface Signal {
  /** As it stood in the cell. */
  String text();

  /**
   * A number.
   *
   * @param value finite, in the instrument's unit
   * @param text as it stood in the cell
   * @param spread of the readings whose mean the value is; empty for a single reading
   */
  record Value(double value, String text, Optional<Spread> spread) implements Signal {
    /** A single reading. */
    public Value(double value, String text) {
      this(value, text, Optional.empty());
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
