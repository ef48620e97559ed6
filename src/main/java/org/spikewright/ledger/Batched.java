package org.spikewright.ledger;

import java.sql.PreparedStatement;

/** Rows that are inserted unless they are there, some thousands at a time. */
final class Batched {
  private static final int SIZE = 4096;

  private final Sql sql;
  private final PreparedStatement insert;
  private int waiting;

  Batched(Sql sql, String insert) {
    this.sql = sql;
    this.insert = sql.preparedForBatches(insert);
  }

  void add(Object... values) {
    sql.guarded(
        c -> {
          Sql.bind(insert, values);
          insert.addBatch();
          return true;
        });
    if (++waiting == SIZE) {
      flush();
    }
  }

  void flush() {
    if (waiting > 0) {
      waiting = 0;
      sql.guarded(c -> insert.executeBatch());
    }
  }
}
