package org.spikewright.decode;

import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.Charset;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Optional;

/**
 * A text file and how its bytes become characters.
 *
 * @param path where it is
 * @param charset by its byte-order mark, else as declared, else UTF-8
 * @param markBytes length of the byte-order mark
 * @param how in words, why this encoding was taken
 */
record TextFile(Path path, Charset charset, int markBytes, String how) {

  /** Looks for a byte-order mark; without one the declared encoding counts, else UTF-8. */
  static TextFile of(Path path, Optional<Charset> declared) {
    byte[] head = new byte[3];
    try (InputStream in = Files.newInputStream(path)) {
      in.readNBytes(head, 0, head.length);
    } catch (IOException e) {
      throw new DiskFailure(e);
    }
    String marked = "as the mark at its beginning says";
    if (head[0] == (byte) 0xEF && head[1] == (byte) 0xBB && head[2] == (byte) 0xBF) {
      return new TextFile(path, StandardCharsets.UTF_8, 3, marked);
    }
    if (head[0] == (byte) 0xFF && head[1] == (byte) 0xFE) {
      return new TextFile(path, StandardCharsets.UTF_16LE, 2, marked);
    }
    if (head[0] == (byte) 0xFE && head[1] == (byte) 0xFF) {
      return new TextFile(path, StandardCharsets.UTF_16BE, 2, marked);
    }
    return declared
        .map(charset -> new TextFile(path, charset, 0, "as declared"))
        .orElseGet(() -> new TextFile(path, StandardCharsets.UTF_8, 0, "as no other is declared"));
  }

  /**
   * Opens it behind its byte-order mark.
   *
   * @param mostRecordChars characters that may be read for one record
   */
  StrictReader open(long mostRecordChars) {
    try {
      InputStream in = Files.newInputStream(path);
      in.skipNBytes(markBytes);
      return new StrictReader(this, in, mostRecordChars);
    } catch (IOException e) {
      throw new DiskFailure(e);
    }
  }
}
