package org.spikewright.app;

import java.time.Clock;
import java.time.Instant;

/** A clock that nobody sets while the program runs: its start, plus the time elapsed since. */
final class Steady {
  private final Instant start;
  private final long startNanos = System.nanoTime();

  Steady(Clock clock) {
    this.start = clock.instant();
  }

  Instant now() {
    return start.plusNanos(System.nanoTime() - startNanos);
  }
}
