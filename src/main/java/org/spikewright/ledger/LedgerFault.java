package org.spikewright.ledger;

/**
 * The ledger could not do what it was asked; nothing of it was kept. The caller abandons what it
 * was doing, says the message once and tries again later.
 */
public final class LedgerFault extends RuntimeException {
  private static final long serialVersionUID = 1L;

  private final String what;
  private final String where;
  private final String advice;

  /**
   * A fault with the three things a person needs.
   *
   * @param what what went wrong
   * @param where the ledger file
   * @param advice what a person can do
   */
  public LedgerFault(String what, String where, String advice, Throwable cause) {
    super(where + ": " + what + ". " + advice, cause);
    this.what = what;
    this.where = where;
    this.advice = advice;
  }

  /** What went wrong. */
  public String what() {
    return what;
  }

  /** The ledger file. */
  public String where() {
    return where;
  }

  /** What a person can do. */
  public String advice() {
    return advice;
  }
}
