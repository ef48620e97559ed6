package org.spikewright.ledger;

import java.util.Comparator;
import org.spikewright.judgement.Verdict;
import org.spikewright.summary.ResultRow;

/** In which order results are read back. */
public enum ResultOrder {
  /** By the key of the series. */
  BY_KEY,
  /** Verdicts that need a person first (repeat, review, waiting, report), then by key. */
  BY_SEVERITY;

  /** The order itself. */
  public Comparator<ResultRow> comparator() {
    Comparator<ResultRow> byKey = Comparator.comparing(ResultRow::key);
    return this == BY_KEY
        ? byKey
        : Comparator.comparingInt((ResultRow row) -> severity(row.verdict())).thenComparing(byKey);
  }

  static int severity(Verdict verdict) {
    return switch (verdict) {
      case REPEAT -> 0;
      case REVIEW -> 1;
      case WAITING -> 2;
      case REPORT -> 3;
    };
  }
}
