package org.spikewright.intake;

import java.nio.file.Path;
import java.time.Instant;

/**
 * A file as one look found it.
 *
 * @param path where it lies; the only way to open it
 * @param name relative to the watched folder, parts separated by {@code /}, made safe to show: see
 *     {@link ShownName}
 * @param size in bytes
 * @param modified as the file system keeps it
 * @param fileKey as in {@link Fingerprint}
 */
public record Sighting(Path path, String name, long size, Instant modified, Object fileKey) {

  static Sighting of(Path path, String name, Fingerprint found) {
    return new Sighting(path, name, found.size(), found.modified(), found.fileKey());
  }

  /** What tells whether the file has changed since. */
  public Fingerprint fingerprint() {
    return new Fingerprint(size, modified, fileKey);
  }
}
