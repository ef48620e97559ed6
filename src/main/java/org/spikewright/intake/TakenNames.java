package org.spikewright.intake;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.HashMap;
import java.util.HashSet;
import java.util.Map;
import java.util.Set;
import java.util.function.Predicate;
import java.util.stream.Stream;

/**
 * The names under one folder of the archive, folded; read from the disk once, since listing a
 * folder for each of a hundred thousand names would take hours.
 */
final class TakenNames {
  private final Path watched;
  private final String root;
  private final Set<String> files = new HashSet<>();
  private final Set<String> folders = new HashSet<>();

  /** Names given out whose file has not arrived yet. */
  private final Set<String> given = new HashSet<>();

  /** Where counting goes on for names that came before. */
  private final Map<String, Integer> next = new HashMap<>();

  /**
   * @param root relative to the watched folder, such as {@code done/2025-01-15}
   */
  TakenNames(Path watched, String root) throws IOException {
    this.watched = watched;
    this.root = root;
    read();
  }

  private void read() throws IOException {
    files.clear();
    folders.clear();
    next.clear();
    Path top = watched.resolve(root);
    if (!Files.exists(top)) {
      return;
    }
    Path real = top.toRealPath();
    try (Stream<Path> below = Files.walk(real)) {
      below
          .filter(path -> !path.equals(real))
          .forEach(path -> add(path, root + "/" + ShownName.of(real.relativize(path))));
    } catch (UncheckedIOException trouble) {
      throw trouble.getCause();
    }
  }

  private void add(Path path, String target) {
    (Files.isDirectory(path) ? folders : files).add(SafeName.folded(target));
  }

  /** A file lies under a target, which may have been given out here. */
  void arrived(String target) {
    if (!target.startsWith(root + "/")) {
      return;
    }
    String folded = SafeName.folded(target);
    given.remove(folded);
    files.add(folded);
  }

  /**
   * A target that nobody has, and that is taken from now on.
   *
   * @param name relative to the watched folder
   * @param promised whether a target is promised to a file that is not there yet
   */
  String claim(String name, Predicate<String> promised) throws IOException {
    String[] parts = name.split("/", -1);
    String folder = root;
    for (int i = 0; i < parts.length - 1; i++) {
      folder = folder(folder, SafeName.of(parts[i]), promised);
    }
    SafeName last = SafeName.of(parts[parts.length - 1]);
    String first = SafeName.folded(folder + "/" + last.numbered(1));
    if (isRejected() && files.contains(first)) {
      // People take refused files away, to mend them and drop them again under the same name.
      read();
    }
    int number = next.getOrDefault(first, 1);
    String target = folder + "/" + last.numbered(number);
    while (isTaken(target, promised)) {
      number++;
      target = folder + "/" + last.numbered(number);
    }
    next.put(first, number + 1);
    given.add(SafeName.folded(target));
    return target;
  }

  /** A folder that is none yet, or is a folder; never the name of a file. */
  private String folder(String parent, SafeName part, Predicate<String> promised) {
    int number = 1;
    String folder = parent + "/" + part.numbered(number);
    while (isFile(SafeName.folded(folder)) || promised.test(folder)) {
      number++;
      folder = parent + "/" + part.numbered(number);
    }
    folders.add(SafeName.folded(folder));
    return folder;
  }

  private boolean isTaken(String target, Predicate<String> promised) {
    String folded = SafeName.folded(target);
    return isFile(folded)
        || folders.contains(folded)
        || hasLeftovers(folded)
        || promised.test(target);
  }

  private boolean isFile(String folded) {
    return files.contains(folded) || given.contains(folded);
  }

  /** Texts beside a file that is gone are evidence; an old reason gives way to the new one. */
  private boolean hasLeftovers(String folded) {
    return !isRejected()
        && Arrays.stream(Beside.values()).anyMatch(each -> files.contains(folded + each.ending()));
  }

  private boolean isRejected() {
    return root.equals(Archive.REJECTED);
  }
}
