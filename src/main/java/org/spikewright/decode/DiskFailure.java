package org.spikewright.decode;

import java.io.IOException;
import java.io.InputStream;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;

/** The disk or share failed, not the content: trying again later may help. */
final class DiskFailure extends UncheckedIOException {
  private static final long serialVersionUID = 1L;

  DiskFailure(IOException cause) {
    super(cause.getMessage() == null ? cause.toString() : cause.getMessage(), cause);
  }

  /**
   * Reads the file to its end and forgets it. The libraries report damage and a failing disk by the
   * same exceptions; content is to blame only when all bytes can be had.
   *
   * @throws DiskFailure when they cannot
   */
  static void assertBytesReadable(Path file) {
    byte[] buffer = new byte[1 << 16];
    try (InputStream in = Files.newInputStream(file)) {
      while (in.read(buffer) >= 0) {
        continue;
      }
    } catch (IOException e) {
      throw new DiskFailure(e);
    }
  }
}
