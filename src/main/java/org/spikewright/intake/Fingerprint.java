package org.spikewright.intake;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.LinkOption;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.nio.file.attribute.BasicFileAttributes;
import java.time.Instant;
import java.util.Optional;

/**
 * What tells cheaply that a file has changed: never what a file is. That is its {@link FileDigest}.
 *
 * @param size in bytes
 * @param modified as the file system keeps it; may lie in the future or before 1970
 * @param fileKey the file system's own identity of the file; {@link #NO_KEY} where it gives none
 */
public record Fingerprint(long size, Instant modified, Object fileKey) {

  /** Stands for the key where a file system gives none, as on Windows. */
  public static final Object NO_KEY = "";

  /**
   * The fingerprint of what lies at a path now; links are not followed.
   *
   * @return empty when nothing lies there, or no regular file does
   * @throws IOException when the file system does not say
   */
  public static Optional<Fingerprint> of(Path path) throws IOException {
    try {
      BasicFileAttributes found =
          Files.readAttributes(path, BasicFileAttributes.class, LinkOption.NOFOLLOW_LINKS);
      return found.isRegularFile() ? Optional.of(from(found)) : Optional.empty();
    } catch (NoSuchFileException gone) {
      return Optional.empty();
    }
  }

  static Fingerprint from(BasicFileAttributes found) {
    Object key = found.fileKey() == null ? NO_KEY : found.fileKey();
    return new Fingerprint(found.size(), found.lastModifiedTime().toInstant(), key);
  }

  /** Whether size and modification time agree: all that a copy on another disk can keep. */
  boolean looksLike(Fingerprint other) {
    return size == other.size && modified.equals(other.modified);
  }
}
