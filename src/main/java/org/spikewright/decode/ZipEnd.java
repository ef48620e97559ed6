package org.spikewright.decode;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.ByteOrder;
import java.nio.channels.SeekableByteChannel;
import java.nio.file.Files;
import java.nio.file.Path;

/**
 * The end record of a zip archive. It is looked at before the archive is opened, since opening
 * takes the whole directory into memory, and since a file without one is simply not whole.
 */
final class ZipEnd {
  private static final int SIGNATURE = 0x06054b50;
  private static final int RECORD = 22;
  private static final int DIRECTORY_SIZE_AT = 12;
  private static final int COMMENT_LENGTH_AT = 20;
  private static final int MOST_COMMENT = 0xFFFF;

  private ZipEnd() {}

  /**
   * Checks that the end record is there and its directory of bearable size.
   *
   * @throws Unreadable when not
   */
  static void check(Path file) {
    ByteBuffer tail = tail(file);
    for (int at = tail.limit() - RECORD; at >= 0; at--) {
      if (tail.getInt(at) == SIGNATURE && commentReachesEnd(tail, at)) {
        checkSize(Integer.toUnsignedLong(tail.getInt(at + DIRECTORY_SIZE_AT)));
        return;
      }
    }
    throw new Unreadable(
        "the file",
        "a workbook that breaks off: its closing directory is missing",
        "a whole XLSX file",
        "if it was still being copied, drop it again; else copy it again from where it was made");
  }

  private static boolean commentReachesEnd(ByteBuffer tail, int at) {
    int comment = tail.getShort(at + COMMENT_LENGTH_AT) & 0xFFFF;
    return at + RECORD + comment <= tail.limit();
  }

  private static void checkSize(long bytes) {
    if (bytes > Limits.DIRECTORY_BYTES) {
      throw new Unreadable(
          "the file",
          "an archive whose directory takes " + bytes + " bytes",
          "a workbook, whose directory takes a few thousand bytes",
          "open the file in a spreadsheet program and save the table as a new XLSX file");
    }
  }

  private static ByteBuffer tail(Path file) {
    try (SeekableByteChannel channel = Files.newByteChannel(file)) {
      long size = channel.size();
      int length = (int) Math.min(size, RECORD + MOST_COMMENT);
      ByteBuffer tail = ByteBuffer.allocate(length).order(ByteOrder.LITTLE_ENDIAN);
      channel.position(size - length);
      while (tail.hasRemaining() && channel.read(tail) >= 0) {
        continue;
      }
      return tail.flip();
    } catch (IOException e) {
      throw new DiskFailure(e);
    }
  }
}
