package org.spikewright.ledger;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.channels.FileLock;
import java.nio.channels.OverlappingFileLockException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.ConcurrentHashMap;

/**
 * The single owner of a ledger: a lock on a file beside it, whose text says who holds it. The
 * operating system frees the lock when the process ends, however it ends.
 */
final class Owner implements AutoCloseable {
  // Where locks bind readers too, the text must lie outside the locked part.
  private static final long LOCKED_BYTE = 1L << 40;

  /**
   * Ledgers owned by this very process. Asked before the lock file is opened, since closing any
   * channel on a file frees all of the process's locks on it on some systems.
   */
  private static final Map<Path, String> OURS = new ConcurrentHashMap<>();

  private final Path ledger;
  private final FileChannel channel;
  private final FileLock lock;

  private Owner(Path ledger, FileChannel channel, FileLock lock) {
    this.ledger = ledger;
    this.channel = channel;
    this.lock = lock;
  }

  /** What came of asking: the ownership, or who has it. */
  record Claim(Optional<Owner> owner, String holder) {}

  /**
   * Claims a ledger.
   *
   * @param ledger its file, absolute
   */
  static Claim claim(Path ledger) throws IOException {
    String self = describeSelf();
    String other = OURS.putIfAbsent(ledger, self);
    if (other != null) {
      return new Claim(Optional.empty(), other);
    }
    Path file = ledger.resolveSibling(ledger.getFileName() + ".owner");
    Optional<Owner> owner = Optional.empty();
    try {
      owner = lock(ledger, file);
      if (owner.isEmpty()) {
        return new Claim(owner, holder(file));
      }
      owner.get().sign(self);
      return new Claim(owner, self);
    } finally {
      if (owner.isEmpty()) {
        OURS.remove(ledger);
      }
    }
  }

  @Override
  public void close() throws IOException {
    try {
      lock.release();
    } finally {
      channel.close();
      OURS.remove(ledger);
    }
  }

  private static Optional<Owner> lock(Path ledger, Path file) throws IOException {
    FileChannel channel =
        FileChannel.open(
            file, StandardOpenOption.CREATE, StandardOpenOption.READ, StandardOpenOption.WRITE);
    try {
      FileLock lock = channel.tryLock(LOCKED_BYTE, 1, false);
      if (lock != null) {
        return Optional.of(new Owner(ledger, channel, lock));
      }
    } catch (OverlappingFileLockException ours) {
      // Ours under another name. Closing this channel would free the lock that is held.
      return Optional.empty();
    }
    channel.close();
    return Optional.empty();
  }

  private void sign(String self) throws IOException {
    channel.truncate(0);
    channel.write(ByteBuffer.wrap((self + "\n").getBytes(StandardCharsets.UTF_8)), 0);
  }

  private static String holder(Path file) throws IOException {
    byte[] text = Files.readAllBytes(file);
    String holder = new String(text, StandardCharsets.UTF_8).strip();
    return holder.isEmpty() ? "a process that did not say its name" : holder;
  }

  private static String describeSelf() {
    ProcessHandle self = ProcessHandle.current();
    String start = self.info().startInstant().map(at -> ", started " + at).orElse("");
    return "process " + self.pid() + " on " + host() + start;
  }

  /** The machine's name without asking a name server. */
  private static String host() {
    Path kernel = Path.of("/proc/sys/kernel/hostname");
    try {
      if (Files.isReadable(kernel)) {
        return Files.readString(kernel).strip();
      }
    } catch (IOException unreadable) {
      // The environment may know.
    }
    String named = System.getenv("COMPUTERNAME");
    return named == null ? "an unnamed machine" : named;
  }
}
