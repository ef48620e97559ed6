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
 * @param charset by its byte-order mark, else UTF-8 where it is that, else as declared
 * @param markBytes length of the byte-order mark
 * @param how in words, why this encoding was taken
 */
record TextFile(Path path, Charset charset, int markBytes, String how) {

  /**
   * Looks for a byte-order mark; without one a file that holds UTF-8 is UTF-8, whatever is
   * declared; else the declared encoding counts. Where none is declared, UTF-8 is taken, and the
   * first byte that is none refuses the file.
   */
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
    if (declared.isEmpty()) {
      return new TextFile(path, StandardCharsets.UTF_8, 0, "as no other is declared");
    }
    boolean utf8 = declared.get().equals(StandardCharsets.UTF_8);
    return !utf8 && Utf8Check.holdsUtf8(path)
        ? new TextFile(path, StandardCharsets.UTF_8, 0, "as its bytes are that throughout")
        : new TextFile(path, declared.get(), 0, "as declared");
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
