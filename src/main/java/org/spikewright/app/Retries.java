package org.spikewright.app;

import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import java.util.HashMap;
import java.util.Map;
import org.spikewright.intake.Sighting;

/**
 * When a file that could not be taken in is tried again: at once when it has changed, else after a
 * pause that doubles with each failure, from 1 s up to a minute.
 */
final class Retries {
  private static final Duration FIRST = Duration.ofSeconds(1);
  static final Duration LONGEST = Duration.ofMinutes(1);

  /** What failed, when it may be tried again, and the pause until then. */
  private record Later(Sighting file, Instant from, Duration pause) {}

  private final Map<Path, Later> later = new HashMap<>();

  boolean isDue(Sighting file, Instant now) {
    Later known = later.get(file.path());
    return known == null || !known.file().equals(file) || !now.isBefore(known.from());
  }

  void failed(Sighting file, Instant now) {
    Later known = later.get(file.path());
    Duration pause = known == null ? FIRST : known.pause().multipliedBy(2);
    Duration capped = pause.compareTo(LONGEST) > 0 ? LONGEST : pause;
    later.put(file.path(), new Later(file, now.plus(capped), capped));
  }

  void over(Sighting file) {
    later.remove(file.path());
  }
}
