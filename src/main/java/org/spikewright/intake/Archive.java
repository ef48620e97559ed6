package org.spikewright.intake;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.LinkOption;
import java.nio.file.NotDirectoryException;
import java.nio.file.Path;
import java.time.DateTimeException;
import java.time.LocalDate;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Predicate;
import java.util.function.Supplier;
import java.util.stream.Stream;

/**
 * The two reserved folders of the watched folder: {@code done/<lab day>/} and {@code rejected/}. A
 * target is a path in one of them, relative to the watched folder, parts separated by {@code /}.
 * The folders themselves may be links to another disk; nothing below them may be.
 *
 * <p>Order of calls for a file that was read: choose a target, record it, {@link #move}, {@link
 * #journal}. For a refused one: choose, record, {@link #refuse}. After a restart {@link #resume}
 * settles every move that was recorded and not known to be finished. For one thread.
 */
public final class Archive {
  /** Where files lie that were read. */
  public static final String DONE = "done";

  /** Where files lie that were refused, each with its reason. */
  public static final String REJECTED = "rejected";

  /** Lab days, and the rejected folder, whose names are kept in memory. */
  private static final int REMEMBERED = 3;

  private final Path watched;
  private final Disk disk;
  private final Map<String, TakenNames> taken = new LinkedHashMap<>();
  private Optional<Journal> journal = Optional.empty();

  public Archive(Path watched) {
    this(watched, new Disk());
  }

  Archive(Path watched, Disk disk) {
    this.watched = watched;
    this.disk = disk;
  }

  /**
   * A target for a file that was read, such as {@code done/2025-01-15/furnace/run7.csv}: not taken
   * on the disk nor chosen before, by {@link #folded} name; safe on every common file system; with
   * room for {@link Beside} texts.
   *
   * @param labDay of arrival
   * @param name as in {@link Sighting}
   * @param promised whether a target was promised to a file that is not there yet
   * @throws IOException when the archive cannot be listed
   */
  public String doneName(LocalDate labDay, String name, Predicate<String> promised)
      throws IOException {
    return names(DONE + "/" + labDay).claim(name, promised);
  }

  /** Likewise for a refused file, such as {@code rejected/furnace/run7.csv}. */
  public String rejectedName(String name, Predicate<String> promised) throws IOException {
    return names(REJECTED).claim(name, promised);
  }

  /** Folds case and composition: targets that differ here differ on every file system. */
  public static String folded(String target) {
    return SafeName.folded(target);
  }

  /**
   * Where a target lies.
   *
   * @throws IllegalArgumentException for a path outside the archive
   */
  public Path at(String target) {
    boolean inside =
        target.matches("(" + DONE + "|" + REJECTED + ")(/[^/\\\\]+)+")
            && Arrays.stream(target.split("/")).noneMatch(part -> part.matches("\\.+"));
    if (!inside) {
      throw new IllegalArgumentException("'" + target + "' lies outside the archive");
    }
    return watched.resolve(target);
  }

  /**
   * Files a file away that was read, overwriting nothing. A copy that an interrupted call has left
   * under the target counts as the file.
   *
   * @param from as in {@link Sighting}
   * @param expected what it was when it was read
   * @throws IllegalStateException when a file is to go to {@code rejected/} without its reason
   */
  public Filed move(Path from, Fingerprint expected, String target) {
    return file(from, target, filing -> filing.move(expected));
  }

  /**
   * Refuses a file: writes the reason, then moves the file beside it, so that no refused file is
   * ever seen without one. The reason is taken away again when the file was withdrawn.
   */
  public Filed refuse(Path from, Fingerprint expected, String target, String reason) {
    return withReason(from, target, reason, () -> move(from, expected, target));
  }

  /**
   * Finds out what became of a {@link #move} that may have been interrupted, and finishes it, by
   * content.
   *
   * @param from where the file lay
   * @param sha256 of its bytes
   */
  public Filed resume(Path from, String sha256, String target) {
    return file(from, target, filing -> filing.resume(sha256));
  }

  /** Likewise for a {@link #refuse}. */
  public Filed resumeRefusal(Path from, String sha256, String target, String reason) {
    return withReason(from, target, reason, () -> resume(from, sha256, target));
  }

  /** Writes a text beside a target, whole or not at all, replacing an earlier one. */
  public void note(String target, Beside kind, String text) throws IOException {
    note(target, kind, text.lines()::iterator);
  }

  /** Likewise, line by line, for texts that may be long. */
  public void note(String target, Beside kind, Iterable<String> lines) throws IOException {
    Path file = beside(at(target), kind);
    makeFolders(file.getParent());
    Path temporary = file.resolveSibling(Filing.dotName(target + kind.ending()) + ".tmp");
    try {
      disk.write(temporary, lines);
    } catch (IOException trouble) {
      Files.deleteIfExists(temporary);
      throw trouble;
    }
    disk.rename(temporary, file);
    disk.sync(file.getParent());
  }

  /** Adds a line to a lab day's journal, once for each arrival; the day's folder exists already. */
  public void journal(LocalDate day, Journalled entry) throws IOException {
    Path folder = watched.resolve(DONE).resolve(day.toString());
    if (journal.isEmpty() || !journal.get().isOf(folder)) {
      journal = Optional.of(new Journal(folder, disk));
    }
    journal.get().append(entry);
  }

  /**
   * A lab day's journal, in the order it was written; empty when there is none.
   *
   * @throws IOException when it cannot be read, or a line is damaged
   */
  public List<Journalled> journalOf(LocalDate day) throws IOException {
    return new Journal(watched.resolve(DONE).resolve(day.toString()), disk).entries();
  }

  /** The lab days that have a folder, in order. */
  public List<LocalDate> days() throws IOException {
    Path done = watched.resolve(DONE);
    if (!Files.exists(done)) {
      return List.of();
    }
    try (Stream<Path> folders = Files.list(done)) {
      return folders.flatMap(folder -> day(folder).stream()).sorted().toList();
    } catch (UncheckedIOException trouble) {
      throw trouble.getCause();
    }
  }

  /**
   * Whether {@code done/} holds any file: then an empty ledger is a lost one, not a new one.
   *
   * @throws IOException when that cannot be told
   */
  public boolean hasFiles() throws IOException {
    Path done = watched.resolve(DONE);
    if (!Files.exists(done)) {
      return false;
    }
    try (Stream<Path> below = Files.walk(done.toRealPath())) {
      return below.anyMatch(path -> Files.isRegularFile(path, LinkOption.NOFOLLOW_LINKS));
    } catch (UncheckedIOException trouble) {
      throw trouble.getCause();
    }
  }

  /** One way of filing. */
  private interface Way {
    Filed take(Filing filing) throws IOException;
  }

  private Filed file(Path from, String target, Way way) {
    Path to = at(target);
    if (target.startsWith(REJECTED + "/") && exists(from) && !exists(reasonOf(target))) {
      throw new IllegalStateException("no reason lies beside " + target);
    }
    try {
      if (exists(from)) {
        // Only then: an unmounted share must not get an archive of its own.
        makeFolders(to.getParent());
      }
      Filed filed = way.take(new Filing(from, to, target, disk));
      if (filed instanceof Filed.Moved) {
        taken.values().forEach(names -> names.arrived(target));
      }
      return filed;
    } catch (IOException trouble) {
      return failed(trouble);
    }
  }

  private Filed withReason(Path from, String target, String reason, Supplier<Filed> filing) {
    Path to = at(target);
    try {
      boolean due = exists(to) ? !exists(reasonOf(target)) : exists(from);
      if (due) {
        note(target, Beside.REASON, reason);
      }
      Filed filed = filing.get();
      if (filed instanceof Filed.Withdrawn && !exists(to) && exists(reasonOf(target))) {
        disk.delete(reasonOf(target));
      }
      return filed;
    } catch (IOException trouble) {
      return failed(trouble);
    }
  }

  private Path reasonOf(String target) {
    return beside(at(target), Beside.REASON);
  }

  private static boolean exists(Path path) {
    return Files.exists(path, LinkOption.NOFOLLOW_LINKS);
  }

  private TakenNames names(String root) throws IOException {
    TakenNames known = taken.remove(root);
    TakenNames names = known == null ? new TakenNames(watched, root) : known;
    taken.put(root, names);
    if (taken.size() > REMEMBERED) {
      taken.remove(taken.keySet().iterator().next());
    }
    return names;
  }

  private void makeFolders(Path folder) throws IOException {
    Path place = watched;
    for (Path part : watched.relativize(folder)) {
      boolean top = place.equals(watched);
      place = place.resolve(part);
      LinkOption[] options = top ? new LinkOption[0] : new LinkOption[] {LinkOption.NOFOLLOW_LINKS};
      if (Files.isDirectory(place, options)) {
        continue;
      }
      if (exists(place)) {
        throw new NotDirectoryException(place.toString());
      }
      disk.createFolder(place);
    }
  }

  private static Path beside(Path file, Beside kind) {
    return file.resolveSibling(file.getFileName() + kind.ending());
  }

  private static Optional<LocalDate> day(Path folder) {
    try {
      return Optional.of(LocalDate.parse(folder.getFileName().toString()));
    } catch (DateTimeException other) {
      return Optional.empty();
    }
  }

  private static Filed failed(IOException trouble) {
    return new Filed.Failed(Trouble.words(trouble));
  }
}
