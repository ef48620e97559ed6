package org.spikewright.ledger;

import org.spikewright.judgement.Verdict;

/** In which order results are read back. */
public enum ResultOrder {
  /** By the key of the series. */
  BY_KEY,
  /** Verdicts that need a person first (repeat, review, waiting, report), then by key. */
  BY_SEVERITY;

  static int severity(Verdict verdict) {
    return switch (verdict) {
      case REPEAT -> 0;
      case REVIEW -> 1;
      case WAITING -> 2;
      case REPORT -> 3;
    };
  }
}
