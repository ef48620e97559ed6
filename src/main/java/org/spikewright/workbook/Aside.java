package org.spikewright.workbook;

import java.io.BufferedOutputStream;
import java.io.IOException;
import java.io.OutputStream;
import java.io.UncheckedIOException;
import java.nio.channels.Channels;
import java.nio.channels.FileChannel;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.nio.file.StandardOpenOption;
import java.security.DigestOutputStream;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.HexFormat;

/**
 * Makes a file appear whole: written under a hidden name beside its place, synced, renamed, the
 * folder synced. A crash at any point leaves the old file, the new file or a hidden remainder that
 * the next writing of the same file replaces.
 */
final class Aside {
  private static final int BUFFER = 1 << 16;

  private Aside() {}

  /** Writes the content of a file. */
  @FunctionalInterface
  interface Content {
    void to(OutputStream out) throws IOException;
  }

  /**
   * Writes a file, replacing one that is there.
   *
   * @return the SHA-256 of its bytes, in hexadecimal
   */
  static String write(Path target, Content content) throws WriteFault {
    Path aside = target.resolveSibling("." + target.getFileName() + ".part");
    try {
      String digest = fill(aside, content);
      Files.move(
          aside, target, StandardCopyOption.ATOMIC_MOVE, StandardCopyOption.REPLACE_EXISTING);
      syncFolder(target.toAbsolutePath().getParent());
      return digest;
    } catch (IOException fault) {
      throw abandoned(aside, new WriteFault(target, fault));
    } catch (RuntimeException fault) {
      if (isFromDisk(fault)) {
        throw abandoned(aside, new WriteFault(target, fault));
      }
      throw abandoned(aside, fault);
    }
  }

  private static String fill(Path aside, Content content) throws IOException {
    MessageDigest sha256 = sha256();
    try (FileChannel channel =
        FileChannel.open(
            aside,
            StandardOpenOption.CREATE,
            StandardOpenOption.TRUNCATE_EXISTING,
            StandardOpenOption.WRITE)) {
      OutputStream out =
          new BufferedOutputStream(
              new DigestOutputStream(Channels.newOutputStream(channel), sha256), BUFFER);
      content.to(out);
      out.flush();
      channel.force(true);
    }
    return HexFormat.of().formatHex(sha256.digest());
  }

  /** POI wraps some failures of its temporary files in unchecked exceptions. */
  private static boolean isFromDisk(Throwable fault) {
    for (Throwable at = fault; at != null; at = at.getCause()) {
      boolean poi = at.getClass().getName().startsWith("org.apache.poi.");
      if (at instanceof IOException || at instanceof UncheckedIOException || poi) {
        return true;
      }
    }
    return false;
  }

  private static <E extends Exception> E abandoned(Path aside, E fault) {
    try {
      Files.deleteIfExists(aside);
    } catch (IOException second) {
      fault.addSuppressed(second);
    }
    return fault;
  }

  private static void syncFolder(Path folder) throws IOException {
    if (folder.getFileSystem().getSeparator().equals("\\")) {
      // Windows opens no folder as a channel; its rename is journaled.
      return;
    }
    try (FileChannel channel = FileChannel.open(folder, StandardOpenOption.READ)) {
      channel.force(true);
    }
  }

  private static MessageDigest sha256() {
    try {
      return MessageDigest.getInstance("SHA-256");
    } catch (NoSuchAlgorithmException impossible) {
      throw new IllegalStateException("every Java has SHA-256", impossible);
    }
  }
}
