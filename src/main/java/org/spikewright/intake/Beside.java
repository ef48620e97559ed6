package org.spikewright.intake;

/** A text that lies beside a filed file, under the file's name and an ending. */
public enum Beside {
  /** Why the file was refused. */
  REASON(".reason.txt"),
  /** Which of its rows were not used, and why. */
  ROWS(".rows.txt"),
  /** What else is to be known about it. */
  NOTE(".note.txt");

  private final String ending;

  Beside(String ending) {
    this.ending = ending;
  }

  /** What follows the file's name. */
  public String ending() {
    return ending;
  }
}
