package org.spikewright.intake;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.AtomicMoveNotSupportedException;
import java.nio.file.Files;
import java.nio.file.LinkOption;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.nio.file.attribute.FileTime;
import java.util.HexFormat;
import java.util.Optional;

/**
 * One file's way from the watched folder to its target. After a crash between any two of its disk
 * steps the same call finishes what was begun.
 *
 * <p>Within one file system it is a rename, then a look at what arrived: between the check before
 * and the rename another file may have taken the name, and then goes back. Across file systems it
 * is a copy under a dot name, a rename to the target, and only then the removal of the source,
 * which first goes aside under a dot name, to be looked at where nobody replaces it.
 */
final class Filing {
  private static final String CHANGED = "it changed after it was read";
  private static final String GONE = "it is no longer there";

  private final Path from;
  private final Path to;
  private final Path aside;
  private final Path copy;
  private final Disk disk;

  /**
   * @param target the same text after a restart, whatever the watched folder is called then
   */
  Filing(Path from, Path to, String target, Disk disk) {
    this.from = from;
    this.to = to;
    this.aside = from.resolveSibling(dotName(target) + ".moving");
    this.copy = to.resolveSibling(dotName(target) + ".tmp");
    this.disk = disk;
  }

  /** A name of our own for a file on its way to a target: short, and the same after a restart. */
  static String dotName(String target) {
    byte[] hash = FileDigest.sha256().digest(target.getBytes(StandardCharsets.UTF_8));
    return ".spikewright-" + HexFormat.of().formatHex(hash, 0, 8);
  }

  /** Files it away when it is as expected. */
  Filed move(Fingerprint expected) throws IOException {
    Optional<Filed> begun = finishRemoval();
    if (begun.isPresent()) {
      return begun.get();
    }
    Optional<Fingerprint> there = Fingerprint.of(from);
    if (!there.equals(Optional.of(expected))) {
      return alreadyMoved(expected, there.isPresent() ? CHANGED : GONE);
    }
    if (exists(to)) {
      return ontoTarget(expected);
    }
    try {
      disk.rename(from, to);
    } catch (AtomicMoveNotSupportedException otherDisk) {
      return across(expected);
    } catch (NoSuchFileException gone) {
      return exists(from) ? new Filed.Failed(Trouble.words(gone)) : new Filed.Withdrawn(GONE);
    }
    if (!Fingerprint.of(to).equals(Optional.of(expected))) {
      putBack(to);
      return new Filed.Withdrawn(CHANGED);
    }
    return moved();
  }

  /** Finishes, undoes or repeats a move that may have been interrupted, by content alone. */
  Filed resume(String sha256) throws IOException {
    boolean arrived = exists(to) && isContent(to, sha256);
    if (exists(aside)) {
      if (arrived && isContent(aside, sha256)) {
        disk.delete(aside);
        return moved();
      }
      putBack(aside);
    }
    Optional<Fingerprint> there = Fingerprint.of(from);
    boolean waits = there.isPresent() && isContent(from, sha256);
    if (arrived) {
      return waits ? ontoTarget(there.get()) : moved();
    }
    if (waits) {
      return move(there.get());
    }
    if (Files.isRegularFile(to, LinkOption.NOFOLLOW_LINKS)) {
      // Another file took the name between the check and the rename, and was never read.
      putBack(to);
      return new Filed.Withdrawn(CHANGED);
    }
    return new Filed.Withdrawn(there.isPresent() ? CHANGED : GONE);
  }

  /** A removal that was interrupted is finished first, or undone. */
  private Optional<Filed> finishRemoval() throws IOException {
    if (!exists(aside)) {
      return Optional.empty();
    }
    if (sameBytes(aside, to)) {
      disk.delete(aside);
      return Optional.of(moved());
    }
    putBack(aside);
    return Optional.empty();
  }

  /** An earlier call may have moved it; what lies in the watched folder now is then another. */
  private Filed alreadyMoved(Fingerprint expected, String otherwise) throws IOException {
    Optional<Fingerprint> arrived = Fingerprint.of(to);
    boolean isIt = arrived.isPresent() && arrived.get().looksLike(expected);
    return isIt ? moved() : new Filed.Withdrawn(otherwise);
  }

  private Filed ontoTarget(Fingerprint expected) throws IOException {
    if (!sameBytes(from, to)) {
      return occupied();
    }
    removeSource(expected);
    return moved();
  }

  private Filed occupied() {
    return new Filed.Occupied("something else lies under " + ShownName.of(to.getFileName()));
  }

  private Filed across(Fingerprint expected) throws IOException {
    try {
      disk.copy(from, copy, FileTime.from(expected.modified()));
    } catch (IOException trouble) {
      Files.deleteIfExists(copy);
      throw trouble;
    }
    boolean whole = Files.size(copy) == expected.size();
    if (!whole || !Fingerprint.of(from).equals(Optional.of(expected))) {
      disk.delete(copy);
      return new Filed.Withdrawn(CHANGED);
    }
    disk.rename(copy, to);
    disk.sync(to.getParent());
    removeSource(expected);
    return moved();
  }

  /** Removes the source if it is still what was filed; anything else stays for the next look. */
  private void removeSource(Fingerprint expected) throws IOException {
    try {
      disk.rename(from, aside);
    } catch (NoSuchFileException gone) {
      return;
    }
    if (Fingerprint.of(aside).equals(Optional.of(expected))) {
      disk.delete(aside);
    } else {
      putBack(aside);
    }
  }

  private Filed moved() throws IOException {
    disk.sync(to.getParent());
    if (Files.isDirectory(from.getParent())) {
      disk.sync(from.getParent());
    }
    return new Filed.Moved(to);
  }

  /** Returns a file to the watched folder, beside whatever has taken its name meanwhile. */
  private void putBack(Path stray) throws IOException {
    Path back = from;
    SafeName name = SafeName.of(from.getFileName().toString());
    for (int number = 2; exists(back); number++) {
      back = from.resolveSibling(name.numbered(number));
    }
    disk.rename(stray, back);
    disk.sync(from.getParent());
  }

  private static boolean exists(Path path) {
    return Files.exists(path, LinkOption.NOFOLLOW_LINKS);
  }

  private static boolean isContent(Path path, String sha256) throws IOException {
    return Files.isRegularFile(path, LinkOption.NOFOLLOW_LINKS)
        && FileDigest.of(path).equals(sha256);
  }

  private static boolean sameBytes(Path one, Path other) throws IOException {
    return Files.isRegularFile(one, LinkOption.NOFOLLOW_LINKS)
        && Files.isRegularFile(other, LinkOption.NOFOLLOW_LINKS)
        && Files.mismatch(one, other) < 0;
  }
}
