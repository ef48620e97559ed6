package org.spikewright.demo;

/** What is the matter with a series of the demo, if anything. */
enum Scenario {
  CLEAN("clean"),
  BENT("bent"),
  ODD_FLASK("odd flask"),
  ADDITIONS_TOO_SMALL("additions too small"),
  ADDITIONS_TOO_LARGE("additions too large"),
  NO_UNSPIKED_FLASK("no unspiked flask"),
  OVER_RANGE("over range"),
  REFUSED_ROW("refused row"),
  REFUSED_FILE("refused file");

  private final String words;

  Scenario(String words) {
    this.words = words;
  }

  /** As the truth file says it. */
  String words() {
    return words;
  }
}
