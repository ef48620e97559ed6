package org.spikewright.ledger;

import java.sql.Connection;
import java.sql.PreparedStatement;
import java.sql.ResultSet;
import java.sql.SQLException;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalLong;
import org.sqlite.SQLiteErrorCode;
import org.sqlite.SQLiteException;

/**
 * A thin layer over one connection: prepared statements are kept, texts go through {@link
 * StoredText}, and every failure becomes a {@link LedgerFault}. After a failure inside a
 * transaction nothing more can be done in it, because the database may have given it up already and
 * would take further statements for single ones.
 */
final class Sql implements AutoCloseable {

  /** Reads one row. */
  @FunctionalInterface
  interface RowReader<T> {
    T read(ResultSet row) throws SQLException;
  }

  /** Something done with the connection. */
  @FunctionalInterface
  interface Deed<T> {
    T on(Connection connection) throws SQLException;
  }

  private final Connection connection;
  private final String where;
  private final Map<String, PreparedStatement> prepared = new HashMap<>();
  private boolean inTransaction;
  private boolean broken;

  Sql(Connection connection, String where) {
    this.connection = connection;
    this.where = where;
  }

  /** A kept statement; the caller reads its rows to the end before it asks for it again. */
  PreparedStatement prepared(String sql) {
    PreparedStatement known = prepared.get(sql);
    return known != null ? known : guarded(c -> keep(sql, c.prepareStatement(sql)));
  }

  /** A kept statement for batches, without what an abandoned delivery may have left in it. */
  PreparedStatement preparedForBatches(String sql) {
    PreparedStatement statement = prepared(sql);
    return guarded(
        c -> {
          statement.clearBatch();
          return statement;
        });
  }

  /** All rows, read before this returns. */
  <T> List<T> list(String sql, RowReader<T> reader, Object... arguments) {
    PreparedStatement statement = prepared(sql);
    return guarded(
        c -> {
          bind(statement, arguments);
          List<T> rows = new ArrayList<>();
          try (ResultSet found = statement.executeQuery()) {
            while (found.next()) {
              rows.add(reader.read(found));
            }
          }
          return rows;
        });
  }

  /** The first row. */
  <T> Optional<T> first(String sql, RowReader<T> reader, Object... arguments) {
    PreparedStatement statement = prepared(sql);
    return guarded(
        c -> {
          bind(statement, arguments);
          try (ResultSet found = statement.executeQuery()) {
            return found.next() ? Optional.of(reader.read(found)) : Optional.empty();
          }
        });
  }

  /** The number in the first column of the first row; empty when there is no row or it is NULL. */
  OptionalLong number(String sql, Object... arguments) {
    PreparedStatement statement = prepared(sql);
    return guarded(
        c -> {
          bind(statement, arguments);
          try (ResultSet found = statement.executeQuery()) {
            if (!found.next()) {
              return OptionalLong.empty();
            }
            long number = found.getLong(1);
            return found.wasNull() ? OptionalLong.empty() : OptionalLong.of(number);
          }
        });
  }

  /** Runs a statement that changes rows; gives how many it changed. */
  int run(String sql, Object... arguments) {
    PreparedStatement statement = prepared(sql);
    return guarded(
        c -> {
          bind(statement, arguments);
          return statement.executeUpdate();
        });
  }

  /** Runs statements that make or drop things. */
  void script(List<String> statements) {
    guarded(
        c -> {
          try (var statement = c.createStatement()) {
            for (String sql : statements) {
              statement.execute(sql);
            }
          }
          return true;
        });
  }

  /** Begins a transaction; {@link IllegalStateException} inside another. */
  void begin() {
    if (inTransaction) {
      throw new IllegalStateException("the ledger is already taking a delivery or a revision");
    }
    guarded(
        c -> {
          c.setAutoCommit(false);
          return true;
        });
    inTransaction = true;
  }

  /** Makes the transaction durable. */
  void commit() {
    guarded(
        c -> {
          c.commit();
          return true;
        });
    inTransaction = false;
    guarded(
        c -> {
          c.setAutoCommit(true);
          return true;
        });
  }

  /** Forgets the transaction. Never fails: the database forgets it anyway when it cannot go on. */
  void rollback() {
    inTransaction = false;
    broken = false;
    dropStatements();
    try {
      connection.rollback();
    } catch (SQLException given) {
      // The database gave the transaction up by itself, as it does when the disk is full.
    }
    try {
      connection.setAutoCommit(true);
    } catch (SQLException given) {
      // Likewise; the connection is out of the transaction all the same.
    }
  }

  boolean inTransaction() {
    return inTransaction;
  }

  /** Does something with the connection and turns a failure into a fault. */
  <T> T guarded(Deed<T> deed) {
    if (broken) {
      throw new IllegalStateException("this delivery or revision failed before and must be closed");
    }
    try {
      return deed.on(connection);
    } catch (SQLException failure) {
      broken = inTransaction;
      if (!inTransaction) {
        dropStatements();
      }
      throw fault(failure);
    }
  }

  @Override
  public void close() {
    if (inTransaction) {
      rollback();
    }
    guarded(
        c -> {
          c.close();
          return true;
        });
  }

  static void bind(PreparedStatement statement, Object... arguments) throws SQLException {
    for (int i = 0; i < arguments.length; i++) {
      if (arguments[i] instanceof String text) {
        statement.setString(i + 1, StoredText.encode(text));
      } else if (arguments[i] instanceof OptionalLong number) {
        statement.setObject(i + 1, number.isPresent() ? number.getAsLong() : null);
      } else {
        statement.setObject(i + 1, arguments[i]);
      }
    }
  }

  /** A number that may be absent. */
  static OptionalDouble optionalDouble(ResultSet row, int column) throws SQLException {
    double number = row.getDouble(column);
    return row.wasNull() ? OptionalDouble.empty() : OptionalDouble.of(number);
  }

  static String text(ResultSet row, int column) throws SQLException {
    return StoredText.decode(row.getString(column));
  }

  private PreparedStatement keep(String sql, PreparedStatement statement) {
    prepared.put(sql, statement);
    return statement;
  }

  /** After a failure a kept statement may be of no more use; all are prepared anew when needed. */
  private void dropStatements() {
    for (PreparedStatement statement : prepared.values()) {
      try {
        statement.close();
      } catch (SQLException closed) {
        // It is closed all the same.
      }
    }
    prepared.clear();
  }

  private LedgerFault fault(SQLException failure) {
    SQLiteErrorCode code = failure instanceof SQLiteException known ? known.getResultCode() : null;
    return new LedgerFault(what(code, failure), where, advice(code), failure);
  }

  private static String what(SQLiteErrorCode code, SQLException failure) {
    if (code == null) {
      return "the ledger did not answer: " + failure.getMessage();
    }
    return switch (code) {
      case SQLITE_FULL -> "the disk is full";
      case SQLITE_BUSY, SQLITE_LOCKED, SQLITE_BUSY_SNAPSHOT -> "another program holds the ledger";
      case SQLITE_CORRUPT, SQLITE_NOTADB -> "the ledger is damaged";
      default ->
          code.name().startsWith("SQLITE_READONLY")
              ? "the ledger cannot be written to"
              : "the ledger could not be read or written (" + failure.getMessage() + ")";
    };
  }

  private static String advice(SQLiteErrorCode code) {
    if (code == SQLiteErrorCode.SQLITE_FULL) {
      return "Nothing was recorded; make room, it will be tried again";
    }
    if (code == SQLiteErrorCode.SQLITE_CORRUPT || code == SQLiteErrorCode.SQLITE_NOTADB) {
      return "Stop the program, keep the file and restore the newest backup";
    }
    return "Nothing was recorded; check the disk and the rights on the folder, it will be tried again";
  }
}
