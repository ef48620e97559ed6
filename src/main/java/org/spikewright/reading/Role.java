package org.spikewright.reading;

/** What a row was measured for. */
public enum Role {
  SAMPLE("sample"),
  BLANK("blank"),
  CONTROL("control"),
  CALIBRATION("calibration"),
  DRIFT_CHECK("drift check");

  private final String word;

  Role(String word) {
    this.word = word;
  }

  /** The word used in mappings and shown to people. */
  public String word() {
    return word;
  }
}
