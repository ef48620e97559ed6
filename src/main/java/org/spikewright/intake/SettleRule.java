package org.spikewright.intake;

import java.time.Duration;
import java.time.Instant;

/**
 * When a file counts as written to its end: size, modification time and file key have held still
 * for the settle time by our own clock, over at least two looks. The file's age does not matter:
 * copies keep old times, and clocks of instruments are wrong.
 *
 * @param settle 0 or more; 0 takes a file at the first look
 */
public record SettleRule(Duration settle) {
  /** {@link IllegalArgumentException} for a negative time. */
  public SettleRule {
    if (settle.isNegative()) {
      throw new IllegalArgumentException("settle time " + settle + " is below 0");
    }
  }

  /** Whether a file that has held still since one instant has settled at another. */
  boolean isMet(Instant since, Instant now) {
    return Duration.between(since, now).compareTo(settle) >= 0;
  }
}
