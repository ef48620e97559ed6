package org.spikewright.reading;

/** How the additions of a series were made. */
public enum Design {
  /** Each flask holds an aliquot and its own addition and is made up to a mark. */
  MADE_UP("made up"),
  /** Successive additions to one vessel, whose volume grows. */
  ONE_VESSEL("one vessel"),
  /** The bench states the added concentration. */
  STATED("stated"),
  /** As made up, with aliquot, addition and total weighed. */
  WEIGHED("weighed"),
  /** Successive additions to one vessel, read as the potential of an electrode. */
  ELECTRODE("electrode");

  private final String word;

  Design(String word) {
    this.word = word;
  }

  /** Whether all additions go to one vessel, so that each reading is of a state of it. */
  public boolean isVessel() {
    return this == ONE_VESSEL || this == ELECTRODE;
  }

  /** The word used in mappings and shown to people. */
  public String word() {
    return word;
  }
}
