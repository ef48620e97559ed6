package org.spikewright.intake;

import java.io.IOException;
import java.io.InputStream;
import java.nio.file.FileSystemException;
import java.nio.file.Files;
import java.nio.file.LinkOption;
import java.nio.file.Path;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.HexFormat;
import java.util.zip.CRC32;

/** The identity of a content: the SHA-256 of its bytes. */
public final class FileDigest {

  /** Hexadecimal digits of a digest. */
  public static final int LENGTH = 64;

  private FileDigest() {}

  /**
   * Digests a regular file, in little memory whatever its size; links are not followed.
   *
   * @return 64 lower-case hexadecimal digits
   * @throws IOException when it cannot be read to its end, or is no regular file
   */
  public static String of(Path file) throws IOException {
    return contentOf(file).sha256();
  }

  /**
   * What a file holds.
   *
   * @param sha256 names the content
   * @param crc32 tells, much faster, whether a file still holds it; no name
   */
  public record Content(String sha256, long crc32) {}

  /** Digests a regular file in both ways at once; as {@link #of}. */
  public static Content contentOf(Path file) throws IOException {
    MessageDigest digest = sha256();
    CRC32 sum = new CRC32();
    read(
        file,
        (chunk, length) -> {
          digest.update(chunk, 0, length);
          sum.update(chunk, 0, length);
        });
    return new Content(HexFormat.of().formatHex(digest.digest()), sum.getValue());
  }

  /** The check sum alone; otherwise as {@link #of}. */
  public static long crc32(Path file) throws IOException {
    CRC32 sum = new CRC32();
    read(file, (chunk, length) -> sum.update(chunk, 0, length));
    return sum.getValue();
  }

  private interface Chunks {
    void take(byte[] chunk, int length);
  }

  private static void read(Path file, Chunks chunks) throws IOException {
    if (Files.exists(file, LinkOption.NOFOLLOW_LINKS)
        && !Files.isRegularFile(file, LinkOption.NOFOLLOW_LINKS)) {
      throw new FileSystemException(file.toString(), null, "not a regular file");
    }
    try (InputStream bytes = Files.newInputStream(file, LinkOption.NOFOLLOW_LINKS)) {
      byte[] chunk = new byte[1 << 16];
      for (int got = bytes.read(chunk); got >= 0; got = bytes.read(chunk)) {
        chunks.take(chunk, got);
      }
    }
  }

  static MessageDigest sha256() {
    try {
      return MessageDigest.getInstance("SHA-256");
    } catch (NoSuchAlgorithmException impossible) {
      throw new IllegalStateException("every Java has SHA-256", impossible);
    }
  }
}
