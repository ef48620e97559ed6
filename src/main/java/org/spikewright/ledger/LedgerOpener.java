package org.spikewright.ledger;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.sql.SQLException;
import java.time.Duration;
import java.time.LocalTime;
import java.time.ZoneId;
import java.util.Optional;
import org.spikewright.reading.LabCalendar;

/**
 * Opens a ledger: claims it, looks at the file without changing it, and only then opens it to write
 * and brings its tables up to date. What does not look right is refused and left as it is.
 */
final class LedgerOpener {
  private final Path file;
  private final SqliteFile sqlite;

  private LedgerOpener(Path file) {
    this.file = file;
    this.sqlite = new SqliteFile(file);
  }

  static Opening open(
      Path file, LabCalendar calendar, Duration longestPause, boolean archiveHasFiles) {
    try {
      return new LedgerOpener(real(file)).open(calendar, longestPause, archiveHasFiles);
    } catch (IOException fault) {
      return unusable(file, fault);
    }
  }

  static Opening.ToRead openToRead(Path file, Duration longestPause) {
    return new LedgerOpener(file.toAbsolutePath()).openToRead(longestPause);
  }

  /** One ledger has one path, through whatever links it was named: the owner's lock needs that. */
  private static Path real(Path file) throws IOException {
    Path folder = file.toAbsolutePath().getParent();
    Files.createDirectories(folder);
    return Files.exists(file) ? file.toRealPath() : folder.toRealPath().resolve(file.getFileName());
  }

  private Opening open(LabCalendar calendar, Duration longestPause, boolean archiveHasFiles) {
    Optional<Owner> owner = Optional.empty();
    Opening opening = null;
    try {
      Owner.Claim claim = Owner.claim(file);
      owner = claim.owner();
      if (owner.isEmpty()) {
        return new Opening.OwnedByAnother(claim.holder());
      }
      Optional<Opening.Refused> refusal = refusal(archiveHasFiles);
      opening = refusal.isPresent() ? refusal.get() : opened(owner.get(), calendar, longestPause);
      return opening;
    } catch (IOException | SQLException | LedgerFault fault) {
      return unusable(file, fault);
    } finally {
      if (!(opening instanceof Opening.Opened)) {
        owner.ifPresent(LedgerOpener::release);
      }
    }
  }

  private Opening.ToRead openToRead(Duration longestPause) {
    try {
      if (sqlite.isBlank()) {
        return new Opening.Refused("there is no ledger " + file, "Check the configured path");
      }
      Optional<Opening.Refused> refusal = sqlite.refusalOfKind();
      if (refusal.isPresent()) {
        return refusal.get();
      }
      Sql sql = sqlite.openToRead();
      Optional<LabCalendar> calendar =
          Migrator.reached(sql) < Migrator.newest() ? Optional.empty() : calendar(sql);
      if (calendar.isEmpty()) {
        sql.close();
        return new Opening.Refused(
            "the ledger " + file + " was not started by this version of the program yet",
            "Start the program once, then read again");
      }
      return new Opening.Viewed(new LedgerView(sql, calendar.get(), longestPause));
    } catch (IOException | SQLException | LedgerFault fault) {
      return unusable(file, fault);
    }
  }

  private Optional<Opening.Refused> refusal(boolean archiveHasFiles) throws IOException {
    return sqlite.isBlank()
        ? sqlite.refusalOfBlank(archiveHasFiles)
        : sqlite.refusalOfExisting(archiveHasFiles);
  }

  private Opening opened(Owner owner, LabCalendar calendar, Duration longestPause)
      throws SQLException {
    Sql sql = sqlite.openToWrite();
    Opening opening = null;
    try {
      Migrator.run(sql);
      Optional<Opening.Refused> other = settle(sql, calendar);
      opening =
          other.isPresent()
              ? other.get()
              : new Opening.Opened(
                  new Ledger(sql, sqlite.openToRead(), owner, calendar, longestPause));
      return opening;
    } finally {
      if (!(opening instanceof Opening.Opened)) {
        sql.close();
      }
    }
  }

  /** Lab days are stored, so that another calendar would contradict what is there. */
  private Optional<Opening.Refused> settle(Sql sql, LabCalendar calendar) {
    Optional<LabCalendar> stored = calendar(sql);
    if (stored.isPresent() && stored.get().equals(calendar)) {
      return Optional.empty();
    }
    if (stored.isPresent() && new Arrivals(sql).newest() > 0) {
      return Optional.of(
          new Opening.Refused(
              "the lab days of the ledger "
                  + file
                  + " begin at "
                  + shown(stored.get())
                  + ", those of the configuration at "
                  + shown(calendar),
              "Set cut-off and zone back, or begin a new ledger with an empty archive"));
    }
    sql.run(
        "INSERT INTO calendar (zone, cut_off) VALUES (?, ?)",
        calendar.zone().getId(),
        calendar.cutOff().toString());
    return Optional.empty();
  }

  private static Optional<LabCalendar> calendar(Sql sql) {
    return sql.first(
        "SELECT zone, cut_off FROM calendar ORDER BY nth DESC LIMIT 1",
        row -> new LabCalendar(ZoneId.of(row.getString(1)), LocalTime.parse(row.getString(2))));
  }

  private static String shown(LabCalendar calendar) {
    return calendar.cutOff() + " " + calendar.zone().getId();
  }

  private static Opening.Refused unusable(Path file, Exception fault) {
    return new Opening.Refused(
        "the ledger " + file + " cannot be opened: " + fault,
        "Check the disk, and the rights on the folder and the file");
  }

  private static void release(Owner owner) {
    try {
      owner.close();
    } catch (IOException failure) {
      // The operating system frees the lock when this process ends.
    }
  }
}
