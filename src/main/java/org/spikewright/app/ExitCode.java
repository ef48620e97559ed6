package org.spikewright.app;

/** How a command ends. */
final class ExitCode {
  /** Done, also when input was refused: the summary says so. */
  static final int DONE = 0;

  /**
   * Input was refused, where the command was asked to say so; or what was asked is not possible.
   */
  static final int REFUSED = 1;

  /** The configuration or the command line is at fault. */
  static final int CONFIGURATION = 2;

  /** Something that should work does not. */
  static final int FAULT = 3;

  /** Another process owns the ledger. */
  static final int OTHER_OWNER = 4;

  private ExitCode() {}
}
