package org.spikewright.intake;

import java.io.IOException;
import java.nio.channels.FileChannel;
import java.nio.file.LinkOption;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.time.Instant;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeMap;

/**
 * The watched folder, looked at again and again: change events do not reach network shares.
 *
 * <p>A look lists the folder and its subfolders, never {@code done/} and {@code rejected/} at the
 * top, follows no link and opens nothing but regular files. Names that begin with a dot or {@code
 * ~$}, or end in .tmp, .part or .crdownload, are passed over. A listing that fails, or is suddenly
 * empty, is no evidence that files are gone: what is known about them is kept, and the next look
 * decides. Memory and time grow with the number of files that lie there, not with their sizes.
 *
 * <p>For one thread.
 */
public final class Inbox {
  private final Path watched;
  private final SettleRule rule;
  private final Opening opening;
  private Map<Path, FileState> states = new HashMap<>();
  private Map<String, Standing> standing = new TreeMap<>();
  private boolean heldSomething;

  /** Tries whether a file opens. */
  interface Opening {
    void open(Path file) throws IOException;
  }

  /** A notice that has begun and not ended. */
  private record Standing(Path place, String text) {}

  public Inbox(Path watched, SettleRule rule) {
    this(watched, rule, Inbox::open);
  }

  Inbox(Path watched, SettleRule rule, Opening opening) {
    this.watched = watched;
    this.rule = rule;
    this.opening = opening;
  }

  /**
   * Looks once.
   *
   * @param now by a clock that nobody sets while the program runs, so that a corrected system clock
   *     does not make a file settle early: a start time plus the time elapsed since
   */
  public Look look(Instant now) {
    Listing listing = Listing.of(watched);
    boolean suddenlyEmpty = listing.empty.contains(watched) && heldSomething;
    heldSomething |= !listing.empty.contains(watched) && !listing.unseen.contains(watched);
    if (suddenlyEmpty) {
      listing.unseen.add(watched);
      listing.oddities.add(emptied());
    }
    track(listing, now);
    Look found =
        new Look(new ArrayList<>(), new ArrayList<>(), new ArrayList<>(), new ArrayList<>());
    Map<String, Standing> current = new TreeMap<>();
    for (Listing.Oddity oddity : listing.oddities) {
      current.put(oddity.key(), new Standing(oddity.place(), oddity.text()));
    }
    for (Sighting sighting : listing.files) {
      report(states.get(sighting.path()), now, found, current);
    }
    tell(current, listing.unseen, found.notices());
    return found;
  }

  /**
   * Remembers that a file was dealt with although it stays where it lies, so that it is not ready
   * again until it changes. Nothing happens when it has changed already. The memory does not
   * outlive this object.
   */
  public void handled(Sighting sighting) {
    states.computeIfPresent(
        sighting.path(),
        (path, state) ->
            state instanceof FileState.Settled settled && settled.sighting().equals(sighting)
                ? settled.handled()
                : state);
  }

  /** Every notice that has begun and not ended, ordered by key. */
  public List<Notice> standing() {
    return standing.entrySet().stream()
        .map(each -> new Notice(each.getKey(), Notice.Phase.BEGINS, each.getValue().text()))
        .toList();
  }

  private Listing.Oddity emptied() {
    return new Listing.Oddity(
        watched,
        "empty",
        "the watched folder is suddenly empty, without even the archive's own folders. Is the"
            + " share mounted? Nothing is taken as deleted; it is looked at again.");
  }

  private void track(Listing listing, Instant now) {
    Map<Path, FileState> next = new HashMap<>(listing.files.size() * 2);
    for (Sighting sighting : listing.files) {
      FileState known = states.get(sighting.path());
      next.put(
          sighting.path(),
          known == null
              ? FileState.first(sighting, now, rule)
              : known.seenAgain(sighting, now, rule));
    }
    states.forEach(
        (path, state) -> {
          boolean mayReturn =
              isBelow(path, listing.unseen)
                  || state instanceof FileState.Handled && isBelow(path, listing.empty);
          if (mayReturn) {
            next.putIfAbsent(path, state);
          }
        });
    states = next;
  }

  private boolean isBelow(Path path, Set<Path> folders) {
    if (folders.isEmpty()) {
      return false;
    }
    Path place = path;
    while (place != null && place.startsWith(watched)) {
      if (folders.contains(place)) {
        return true;
      }
      place = place.getParent();
    }
    return false;
  }

  private void report(FileState state, Instant now, Look found, Map<String, Standing> current) {
    if (state instanceof FileState.Seen seen) {
      found.settling().add(seen);
      return;
    }
    if (state instanceof FileState.Handled) {
      return;
    }
    Path path = state.sighting().path();
    Optional<String> refusal;
    try {
      refusal = tryToOpen(path);
    } catch (NoSuchFileException gone) {
      // Moved or deleted since the listing; the next look forgets it.
      return;
    }
    if (refusal.isEmpty()) {
      states.put(path, state instanceof FileState.Waiting waiting ? waiting.opens() : state);
      found.ready().add(state.sighting());
      return;
    }
    FileState.Waiting waiting =
        state instanceof FileState.Settled settled
            ? settled.waiting(refusal.get(), now)
            : ((FileState.Waiting) state).still(refusal.get());
    states.put(path, waiting);
    found.waiting().add(waiting);
    current.put("open:" + path, new Standing(path, unopened(waiting)));
  }

  /** Why a file does not open; empty when it does. */
  private Optional<String> tryToOpen(Path path) throws NoSuchFileException {
    try {
      opening.open(path);
      return Optional.empty();
    } catch (NoSuchFileException gone) {
      throw gone;
    } catch (IOException trouble) {
      return Optional.of(Trouble.words(trouble));
    }
  }

  private static void open(Path file) throws IOException {
    FileChannel.open(file, StandardOpenOption.READ, LinkOption.NOFOLLOW_LINKS).close();
  }

  private static String unopened(FileState.Waiting waiting) {
    return "'"
        + waiting.sighting().name()
        + "' does not open: "
        + waiting.reason()
        + ". It waits where it is and is tried again at each look.";
  }

  private void tell(Map<String, Standing> current, Set<Path> unseen, List<Notice> notices) {
    standing.forEach(
        (key, was) -> {
          if (!current.containsKey(key)) {
            if (isBelow(was.place(), unseen)) {
              current.put(key, was);
            } else {
              notices.add(new Notice(key, Notice.Phase.ENDS, was.text()));
            }
          }
        });
    current.forEach(
        (key, is) -> {
          if (!is.equals(standing.get(key))) {
            notices.add(new Notice(key, Notice.Phase.BEGINS, is.text()));
          }
        });
    standing = current;
  }
}
