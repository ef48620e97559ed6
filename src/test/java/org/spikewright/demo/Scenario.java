package org.spikewright.demo;

import java.util.List;

/** What is the matter with a series of the demo, if anything, and what should come of it. */
enum Scenario {
  CLEAN("clean", "", "report"),
  REFUSED_ROW("refused row", "", "report"),
  REFUSED_FILE("refused file", "", ""),
  BELOW_DETECTION("below detection", "below-detection", "report", "negative-result"),
  BENT("bent", "bent", "repeat", "odd-slope", "low-correlation"),
  ODD_FLASK("odd flask", "odd-flask", "review", "noisy", "uncertain", "low-correlation"),
  NOISY("noisy", "noisy", "review", "odd-flask", "uncertain", "low-correlation"),
  SWAPPED(
      "swapped neighbours",
      "suspected-slip",
      "review",
      "noisy",
      "odd-flask",
      "uncertain",
      "low-correlation"),
  WRONG_STOCK("wrong stock", "odd-slope", "review"),
  ADDITIONS_TOO_SMALL(
      "additions too small", "additions-too-small", "repeat", "uncertain", "low-correlation"),
  ADDITIONS_TOO_LARGE("additions too large", "additions-too-large", "review", "uncertain"),
  NO_UNSPIKED_FLASK("no unspiked flask", "no-unspiked-flask", "review"),
  OVER_RANGE("over range", "over-range", "review"),
  REAGENT_BLANK("reagent blank", "below-detection", "report", "negative-result"),
  CONTROL_IN("control in limits", "", "report"),
  CONTROL_OUT("control out", "control-out", "review"),
  CONTROL_OUT_BESIDE("beside a control that is out", "control-out", "review");

  private final String words;
  private final String flag;
  private final String verdict;
  private final List<String> companions;

  Scenario(String words, String flag, String verdict, String... companions) {
    this.words = words;
    this.flag = flag;
    this.verdict = verdict;
    this.companions = List.of(companions);
  }

  /** As the truth file says it. */
  String words() {
    return words;
  }

  /** The flag that it has to raise; empty for none. */
  String flag() {
    return flag;
  }

  /** What the program has to say of it; empty where it must not appear at all. */
  String verdict() {
    return verdict;
  }

  /** Flags that may go with it: the same trouble seen from another side. */
  List<String> companions() {
    return companions;
  }

  /** What the exports call it. */
  String type() {
    return switch (this) {
      case REAGENT_BLANK -> "Blank";
      case CONTROL_IN, CONTROL_OUT -> "Control";
      default -> "Sample";
    };
  }
}
