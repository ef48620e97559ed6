package org.spikewright.reading;

/** How the additions of a series were made. */
public enum Design {
  /** Each flask holds an aliquot and its own addition and is made up to a mark. */
  MADE_UP("made up"),
  /** Successive additions to one vessel, whose volume grows. */
  ONE_VESSEL("one vessel"),
  /** The bench states the added concentration. */
  STATED("stated");

  private final String word;

  Design(String word) {
    this.word = word;
  }

  /** The word used in mappings and shown to people. */
  public String word() {
    return word;
  }
}
