package org.spikewright.ledger;

import java.io.IOException;
import java.io.InputStream;
import java.nio.ByteBuffer;
import java.nio.channels.FileChannel;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.sql.Connection;
import java.sql.SQLException;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.sqlite.SQLiteConfig;
import org.sqlite.SQLiteOpenMode;

/** Everything that is particular to SQLite: how its file is opened, checked and tidied. */
final class SqliteFile {
  /** Tells our files from other programs' SQLite files; the letters "SpWr". */
  private static final int APPLICATION = 0x53705772;

  private static final byte[] HEADER = "SQLite format 3\0".getBytes(StandardCharsets.US_ASCII);
  private static final int BUSY_MILLIS = 10_000;
  private static final int CACHE_KIB = 24 * 1024;
  private static final int JOURNAL_KEPT_BYTES = 16 * 1024 * 1024;
  private static final String RESTORE =
      "Keep the file, stop, and restore the newest backup; it was left untouched";

  private final Path path;

  SqliteFile(Path path) {
    this.path = path;
  }

  /** Whether there is nothing yet: no file, or the empty one that SQLite makes first. */
  boolean isBlank() throws IOException {
    return !Files.exists(path) || Files.size(path) == 0;
  }

  /** Why a blank file must not be taken for a first start. */
  Optional<Opening.Refused> refusalOfBlank(boolean archiveHasFiles) throws IOException {
    Path journal = journal();
    boolean journalLeft = Files.exists(journal) && Files.size(journal) > 0;
    String state = Files.exists(path) ? "is empty" : "is missing";
    if (archiveHasFiles) {
      return refused(
          "the ledger " + path + " " + state + ", but the archive holds files read before",
          "Restore the newest backup of the ledger; to begin anew, move the archived files away");
    }
    if (journalLeft) {
      return refused(
          "the ledger " + path + " " + state + ", but its journal " + journal + " is there",
          "Restore the newest backup of the ledger, or move the journal away to begin anew");
    }
    return Optional.empty();
  }

  /** Whether an existing file is a ledger that this program can read; changes nothing. */
  Optional<Opening.Refused> refusalOfKind() throws IOException {
    if (!hasHeader()) {
      return refused(path + " is not a ledger: it does not begin as a database", RESTORE);
    }
    try (Sql sql = new Sql(connect(true), path.toString())) {
      return refusalOfKind(sql);
    } catch (LedgerFault | SQLException fault) {
      return unreadable(fault);
    }
  }

  /** Looks at the whole of an existing file without changing it. */
  Optional<Opening.Refused> refusalOfExisting(boolean archiveHasFiles) throws IOException {
    if (!hasHeader()) {
      return refusalOfKind();
    }
    if (!hasNumberOfPages()) {
      return refused("the ledger " + path + " is cut off: its size is not what it says", RESTORE);
    }
    try (Sql sql = new Sql(connect(true), path.toString())) {
      Optional<Opening.Refused> foreign = refusalOfDamage(sql).or(() -> refusalOfKind(sql));
      if (foreign.isPresent() || !archiveHasFiles) {
        return foreign;
      }
      if (Migrator.reached(sql) == 0 || sql.number("SELECT MAX(number) FROM arrival").isEmpty()) {
        return refused(
            "the ledger " + path + " knows no delivery, but the archive holds files read before",
            "Restore the newest backup of the ledger; to begin anew, move the archived files away");
      }
      return Optional.empty();
    } catch (LedgerFault | SQLException fault) {
      return unreadable(fault);
    }
  }

  /** Opens for writing, making the file when there is none. */
  Sql openToWrite() throws SQLException {
    Sql sql = new Sql(connect(false), path.toString());
    if (Migrator.reached(sql) == 0) {
      sql.script(List.of("PRAGMA application_id = " + APPLICATION));
      syncFolder();
    }
    return sql;
  }

  /** Opens for reading beside a writer. */
  Sql openToRead() throws SQLException {
    return new Sql(connect(true), path.toString());
  }

  /** Moves what the journal holds into the file itself. */
  static void checkpoint(Sql sql) {
    sql.list("PRAGMA wal_checkpoint(TRUNCATE)", row -> row.getInt(1));
  }

  private Connection connect(boolean readOnly) throws SQLException {
    SQLiteConfig config = new SQLiteConfig();
    config.setBusyTimeout(BUSY_MILLIS);
    config.setCacheSize(-CACHE_KIB);
    config.setTempStore(SQLiteConfig.TempStore.MEMORY);
    if (readOnly) {
      config.setReadOnly(true);
    } else {
      config.setOpenMode(SQLiteOpenMode.CREATE);
      config.setJournalMode(SQLiteConfig.JournalMode.WAL);
      config.setSynchronous(SQLiteConfig.SynchronousMode.FULL);
      config.setJournalSizeLimit(JOURNAL_KEPT_BYTES);
      config.setTransactionMode(SQLiteConfig.TransactionMode.IMMEDIATE);
    }
    return config.createConnection("jdbc:sqlite:" + path);
  }

  private Optional<Opening.Refused> unreadable(Exception fault) {
    return refused(path + " cannot be read as a ledger: " + fault.getMessage(), RESTORE);
  }

  private Optional<Opening.Refused> refusalOfDamage(Sql sql) {
    List<String> faults = sql.list("PRAGMA quick_check(1)", row -> row.getString(1));
    if (!faults.equals(List.of("ok"))) {
      return refused("the ledger " + path + " is damaged: " + String.join("; ", faults), RESTORE);
    }
    return Optional.empty();
  }

  private Optional<Opening.Refused> refusalOfKind(Sql sql) {
    // A first start that was cut short leaves a database without tables.
    boolean unused = sql.number("SELECT COUNT(*) FROM sqlite_master").orElse(0) == 0;
    if (!unused && sql.number("PRAGMA application_id").orElse(0) != APPLICATION) {
      return refused(
          path + " is a database of another program",
          "Name another file for the ledger in the configuration; this one was left untouched");
    }
    if (Migrator.reached(sql) > Migrator.newest()) {
      return refused(
          "the ledger " + path + " was written by a newer version of the program",
          "Start the newer version, or restore a backup from before it");
    }
    return Optional.empty();
  }

  /**
   * Whether the file has the size its header states. SQLite takes a last page that is cut off as if
   * zeros followed. With a journal the file may lag behind; then the journal makes it whole.
   */
  private boolean hasNumberOfPages() throws IOException {
    Path journal = journal();
    if (Files.exists(journal) && Files.size(journal) > 0) {
      return true;
    }
    try (InputStream in = Files.newInputStream(path)) {
      ByteBuffer header = ByteBuffer.wrap(in.readNBytes(100));
      if (header.limit() < 100) {
        return false;
      }
      int stated = Short.toUnsignedInt(header.getShort(16));
      long pageSize = stated == 1 ? 65_536 : stated;
      return Files.size(path) == pageSize * Integer.toUnsignedLong(header.getInt(28));
    }
  }

  private Path journal() {
    return path.resolveSibling(path.getFileName() + "-wal");
  }

  private boolean hasHeader() throws IOException {
    try (InputStream in = Files.newInputStream(path)) {
      return Arrays.equals(in.readNBytes(HEADER.length), HEADER);
    }
  }

  /** The file's name itself must outlive a power cut; not every system can promise that. */
  private void syncFolder() {
    try (FileChannel folder = FileChannel.open(path.getParent(), StandardOpenOption.READ)) {
      folder.force(true);
    } catch (IOException unsupported) {
      // Windows cannot open a folder; its file systems keep names by themselves.
    }
  }

  private static Optional<Opening.Refused> refused(String found, String advice) {
    return Optional.of(new Opening.Refused(found, advice));
  }
}
