package org.spikewright.intake;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.DirectoryIteratorException;
import java.nio.file.DirectoryStream;
import java.nio.file.Files;
import java.nio.file.InvalidPathException;
import java.nio.file.LinkOption;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.nio.file.attribute.BasicFileAttributes;
import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.Deque;
import java.util.HashSet;
import java.util.List;
import java.util.Locale;
import java.util.Set;

/**
 * Everything in a watched folder at one moment. One folder is open at a time, however deep they
 * nest.
 */
final class Listing {
  /** Folders within folders that are looked into. */
  static final int DEEPEST = 16;

  /** Bytes of a path relative to the watched folder; with the archive's own part added it opens. */
  static final int LONGEST = 2_000;

  private static final List<String> RESERVED = List.of(Archive.DONE, Archive.REJECTED);
  private static final List<String> FILE_ENDINGS =
      List.of(".csv", ".txt", ".xls", ".xlsx", ".xlsm");
  private static final List<String> TEMPORARY_ENDINGS = List.of(".tmp", ".part", ".crdownload");

  /**
   * Something that is not read.
   *
   * @param place what it is about
   * @param kind the first part of a notice's key
   * @param text the whole sentence
   */
  record Oddity(Path place, String kind, String text) {
    String key() {
      return kind + ":" + place;
    }
  }

  /** Regular files, by name. */
  final List<Sighting> files = new ArrayList<>();

  /** What is skipped, and why. */
  final List<Oddity> oddities = new ArrayList<>();

  /** Places that could not be looked at: nothing is known about what lies there or below. */
  final Set<Path> unseen = new HashSet<>();

  /** Folders that hold nothing at all. */
  final Set<Path> empty = new HashSet<>();

  private final Path watched;
  private final Deque<Path> toVisit = new ArrayDeque<>();

  private Listing(Path watched) {
    this.watched = watched;
  }

  static Listing of(Path watched) {
    Listing listing = new Listing(watched);
    listing.toVisit.add(watched);
    while (!listing.toVisit.isEmpty()) {
      listing.visit(listing.toVisit.remove());
    }
    listing.files.sort(Comparator.comparing(Sighting::name).thenComparing(Sighting::path));
    return listing;
  }

  /** Whether a part of a path marks something that a program has not finished writing. */
  static boolean isTemporary(String part) {
    String lower = part.toLowerCase(Locale.ROOT);
    return lower.startsWith(".")
        || lower.startsWith("~$")
        || TEMPORARY_ENDINGS.stream().anyMatch(lower::endsWith);
  }

  private void visit(Path folder) {
    List<Path> entries = new ArrayList<>();
    try (DirectoryStream<Path> stream = Files.newDirectoryStream(folder)) {
      stream.forEach(entries::add);
    } catch (NoSuchFileException gone) {
      unseen.add(folder);
      if (folder.equals(watched)) {
        failed(folder, "is not there");
      }
      return;
    } catch (IOException trouble) {
      failed(folder, "cannot be listed: " + Trouble.words(trouble));
      return;
    } catch (DirectoryIteratorException trouble) {
      failed(folder, "cannot be listed: " + Trouble.words(trouble.getCause()));
      return;
    }
    if (entries.isEmpty()) {
      empty.add(folder);
    }
    entries.forEach(this::entry);
  }

  private void failed(Path folder, String what) {
    unseen.add(folder);
    String name = folder.equals(watched) ? "the watched folder" : "folder " + quoted(folder);
    oddities.add(
        new Oddity(
            folder,
            "folder",
            name + " " + what + ". Nothing is taken as deleted; it is tried again at each look."));
  }

  private void entry(Path entry) {
    if (isTemporary(entry.getFileName().toString())) {
      return;
    }
    try {
      BasicFileAttributes found =
          Files.readAttributes(entry, BasicFileAttributes.class, LinkOption.NOFOLLOW_LINKS);
      if (!isReserved(entry, found) && nameCanBeUsed(entry)) {
        sort(entry, found);
      }
    } catch (NoSuchFileException gone) {
      // It was moved or deleted between the listing and this: not there at this look.
      return;
    } catch (IOException trouble) {
      unseen.add(entry);
      oddities.add(
          new Oddity(
              entry,
              "look",
              quoted(entry)
                  + " cannot be looked at: "
                  + Trouble.words(trouble)
                  + ". It stays where it is and is tried again at each look."));
    }
  }

  private void sort(Path entry, BasicFileAttributes found) {
    if (found.isRegularFile()) {
      String name = ShownName.of(watched.relativize(entry));
      files.add(Sighting.of(entry, name, Fingerprint.from(found)));
    } else if (found.isDirectory() && !found.isOther()) {
      folder(entry);
    } else {
      String kind = found.isSymbolicLink() ? "a link" : "a pipe, socket or device";
      skip(entry, "is " + kind + ", not a regular file", "Put a copy of the file there instead.");
    }
  }

  private void folder(Path folder) {
    if (watched.relativize(folder).getNameCount() > DEEPEST) {
      skip(folder, "lies more than " + DEEPEST + " folders deep", "Move it further up.");
      return;
    }
    String name = folder.getFileName().toString().toLowerCase(Locale.ROOT);
    if (FILE_ENDINGS.stream().anyMatch(name::endsWith)) {
      skip(folder, "is a folder with the name of a file", "Rename it to have it looked into.");
      return;
    }
    toVisit.add(folder);
  }

  private boolean isReserved(Path entry, BasicFileAttributes found) throws IOException {
    String name = entry.getFileName().toString();
    if (!entry.getParent().equals(watched) || RESERVED.stream().noneMatch(name::equalsIgnoreCase)) {
      return false;
    }
    Path ours = watched.resolve(name.toLowerCase(Locale.ROOT));
    boolean same = ours.equals(entry) || Files.exists(ours) && Files.isSameFile(ours, entry);
    if (!same) {
      skip(entry, "has the name of a folder of the archive", "Rename it to have it read.");
    } else if (found.isRegularFile()) {
      skip(entry, "stands where the archive keeps a folder", "Nothing can be filed: rename it.");
    }
    return true;
  }

  private boolean nameCanBeUsed(Path entry) {
    if (!roundTrips(entry)) {
      skip(
          entry,
          "has a name that is no text in this machine's encoding",
          "Rename it, or start the program with LANG=C.UTF-8.");
      return false;
    }
    int length = ShownName.of(watched.relativize(entry)).getBytes(StandardCharsets.UTF_8).length;
    if (length > LONGEST) {
      skip(entry, "has a path of " + length + " bytes, more than " + LONGEST, "Move it up.");
      return false;
    }
    return true;
  }

  /** Whether a name's text leads back to the same file; it does not when bytes were replaced. */
  private static boolean roundTrips(Path entry) {
    try {
      return entry.getFileSystem().getPath(entry.toString()).equals(entry);
    } catch (InvalidPathException undecodable) {
      return false;
    }
  }

  private void skip(Path entry, String what, String advice) {
    oddities.add(
        new Oddity(entry, "skipped", quoted(entry) + " " + what + ". It is not read. " + advice));
  }

  private String quoted(Path place) {
    String name = ShownName.of(watched.relativize(place));
    // A name may be a thousand characters long; its beginning is enough to find it by.
    return "'" + (name.length() > 300 ? name.substring(0, 300) + "…" : name) + "'";
  }
}
