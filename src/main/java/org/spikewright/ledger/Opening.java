package org.spikewright.ledger;

/** What came of opening a ledger to write in it. */
public sealed interface Opening {

  /** What came of opening a ledger only to read it. */
  sealed interface ToRead permits Viewed, Refused {}

  /** The ledger is open and ours until it is closed or the process ends. */
  record Opened(Ledger ledger) implements Opening {}

  /** The ledger is open for reading. */
  record Viewed(LedgerView view) implements ToRead {}

  /**
   * The file was left as it is.
   *
   * @param found what stood there
   * @param advice what a person can do
   */
  record Refused(String found, String advice) implements Opening, ToRead {}

  /**
   * Another process owns the ledger.
   *
   * @param holder which, with process id, host and start
   */
  record OwnedByAnother(String holder) implements Opening {}
}
