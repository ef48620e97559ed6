package org.spikewright.quantity;

/** What kind of thing a unit measures. Units convert only within one dimension. */
public enum Dimension {
  VOLUME("a volume"),
  MASS("a mass"),
  AMOUNT("an amount of substance"),
  MASS_PER_VOLUME("a mass concentration"),
  MASS_PER_MASS("a mass fraction"),
  AMOUNT_PER_VOLUME("an amount concentration"),
  AMOUNT_PER_MASS("a molality"),
  POTENTIAL("a potential"),
  MASS_PER_AMOUNT("a molar mass"),
  NUMBER("a plain number");

  private final String words;

  Dimension(String words) {
    this.words = words;
  }

  /** The dimension in words with its article, for messages: "a volume". */
  public String words() {
    return words;
  }
}
