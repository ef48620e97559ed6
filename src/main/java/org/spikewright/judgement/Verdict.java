package org.spikewright.judgement;

/** What is to happen with a result. */
public enum Verdict {
  /** Fit to be reported. */
  REPORT("report"),
  /** A person decides. */
  REVIEW("review"),
  /** Not reportable; goes to the repeat plan. */
  REPEAT("repeat"),
  /** Flasks are still due; not judged yet. */
  WAITING("waiting");

  private final String word;

  Verdict(String word) {
    this.word = word;
  }

  /** The word shown to people. */
  public String word() {
    return word;
  }
}
