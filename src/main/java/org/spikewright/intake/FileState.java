package org.spikewright.intake;

import java.time.Instant;

/**
 * What a file in the watched folder has come to. Each state offers only the steps that are legal
 * from there: {@code Seen → Settled → Handled}, with {@code Waiting} where a settled file does not
 * open. A changed file is seen anew, whatever it was.
 */
public sealed interface FileState {

  /** The file as it was when it was last seen to change. */
  Sighting sighting();

  /** The state of a file not known before, or known otherwise. */
  static FileState first(Sighting sighting, Instant now, SettleRule rule) {
    return rule.settle().isZero() ? new Settled(sighting) : new Seen(sighting, now);
  }

  /** The state after a further look found the file. */
  default FileState seenAgain(Sighting latest, Instant now, SettleRule rule) {
    if (!latest.fingerprint().equals(sighting().fingerprint())) {
      return first(latest, now, rule);
    }
    return this instanceof Seen seen ? seen.heldStill(now, rule) : this;
  }

  /**
   * It may still be written.
   *
   * @param since when it was last seen to change, by our clock
   */
  record Seen(Sighting sighting, Instant since) implements FileState {
    private FileState heldStill(Instant now, SettleRule rule) {
      if (now.isBefore(since)) {
        // The clock was set back: count from here, rather than wait until it has caught up.
        return new Seen(sighting, now);
      }
      return rule.isMet(since, now) ? new Settled(sighting) : this;
    }
  }

  /** It held still. */
  record Settled(Sighting sighting) implements FileState {
    Waiting waiting(String reason, Instant now) {
      return new Waiting(sighting, reason, now);
    }

    Handled handled() {
      return new Handled(sighting);
    }
  }

  /**
   * It held still, but does not open.
   *
   * @param reason in words, such as {@code permission denied}
   * @param since when that was first found
   */
  record Waiting(Sighting sighting, String reason, Instant since) implements FileState {
    Settled opens() {
      return new Settled(sighting);
    }

    Waiting still(String why) {
      return new Waiting(sighting, why, since);
    }
  }

  /** It was dealt with and left where it lies. */
  record Handled(Sighting sighting) implements FileState {}
}
