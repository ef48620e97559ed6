package org.spikewright.intake;

import java.io.BufferedWriter;
import java.io.File;
import java.io.IOException;
import java.io.OutputStreamWriter;
import java.nio.ByteBuffer;
import java.nio.channels.Channels;
import java.nio.channels.FileChannel;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.LinkOption;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.nio.file.StandardOpenOption;
import java.nio.file.attribute.FileTime;

/**
 * The steps that change a disk, one method each, so that a test can end the program between any
 * two. Each step is either whole after a crash or leaves something that no reader takes for a
 * result: a name that begins with a dot.
 */
class Disk {
  private static final int CHUNK = 1 << 16;

  /** Windows keeps folders in order itself and does not let them be opened. */
  private static final boolean SYNCS_FOLDERS = File.separatorChar == '/';

  /** Called before each step; a test may end the program here. */
  void before(String step) {}

  /** Renames in one instant, or throws {@link java.nio.file.AtomicMoveNotSupportedException}. */
  void rename(Path from, Path to) throws IOException {
    before("rename");
    Files.move(from, to, StandardCopyOption.ATOMIC_MOVE);
  }

  void delete(Path file) throws IOException {
    before("delete");
    Files.delete(file);
  }

  /** Creates a folder whose parent exists, and makes its entry last. */
  void createFolder(Path folder) throws IOException {
    before("create folder");
    Files.createDirectory(folder);
    sync(folder.getParent());
  }

  /** Makes a folder's entries last through a power cut. */
  void sync(Path folder) throws IOException {
    before("sync folder");
    if (SYNCS_FOLDERS) {
      try (FileChannel channel = FileChannel.open(folder, StandardOpenOption.READ)) {
        channel.force(true);
      }
    }
  }

  /** Copies bytes to a new or left-over file, with the time of modification, and syncs it. */
  void copy(Path from, Path to, FileTime modified) throws IOException {
    before("create copy");
    try (FileChannel source =
            FileChannel.open(from, StandardOpenOption.READ, LinkOption.NOFOLLOW_LINKS);
        FileChannel target = openToWrite(to)) {
      ByteBuffer chunk = ByteBuffer.allocate(CHUNK);
      while (source.read(chunk) >= 0) {
        chunk.flip();
        before("write");
        while (chunk.hasRemaining()) {
          target.write(chunk);
        }
        chunk.clear();
      }
      before("set time");
      Files.setLastModifiedTime(to, modified);
      before("sync file");
      target.force(true);
    }
  }

  /** Writes lines in UTF-8 to a new or left-over file and syncs it. */
  void write(Path file, Iterable<String> lines) throws IOException {
    before("create file");
    try (FileChannel channel = openToWrite(file)) {
      BufferedWriter writer =
          new BufferedWriter(
              new OutputStreamWriter(Channels.newOutputStream(channel), StandardCharsets.UTF_8),
              CHUNK);
      before("write");
      for (String line : lines) {
        writer.write(line);
        writer.newLine();
      }
      writer.flush();
      before("sync file");
      channel.force(true);
    }
  }

  /** Cuts a file to a length, adds bytes at its end and syncs it. */
  void append(FileChannel channel, long length, byte[] bytes) throws IOException {
    before("truncate");
    channel.truncate(length);
    before("write");
    ByteBuffer rest = ByteBuffer.wrap(bytes);
    channel.position(length);
    while (rest.hasRemaining()) {
      channel.write(rest);
    }
    before("sync file");
    channel.force(true);
  }

  private static FileChannel openToWrite(Path file) throws IOException {
    return FileChannel.open(
        file,
        StandardOpenOption.WRITE,
        StandardOpenOption.CREATE,
        StandardOpenOption.TRUNCATE_EXISTING,
        LinkOption.NOFOLLOW_LINKS);
  }
}
