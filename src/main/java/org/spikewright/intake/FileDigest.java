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
    if (Files.exists(file, LinkOption.NOFOLLOW_LINKS)
        && !Files.isRegularFile(file, LinkOption.NOFOLLOW_LINKS)) {
      throw new FileSystemException(file.toString(), null, "not a regular file");
    }
    MessageDigest digest = sha256();
    try (InputStream bytes = Files.newInputStream(file, LinkOption.NOFOLLOW_LINKS)) {
      byte[] chunk = new byte[1 << 16];
      for (int got = bytes.read(chunk); got >= 0; got = bytes.read(chunk)) {
        digest.update(chunk, 0, got);
      }
    }
    return HexFormat.of().formatHex(digest.digest());
  }

  static MessageDigest sha256() {
    try {
      return MessageDigest.getInstance("SHA-256");
    } catch (NoSuchAlgorithmException impossible) {
      throw new IllegalStateException("every Java has SHA-256", impossible);
    }
  }
}
