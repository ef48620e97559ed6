package org.spikewright.decode;

import org.spikewright.table.Row;
import org.spikewright.table.RowSink;

/**
 * Hands rows on, but for rows in which nothing stands. Remembers where it was, and keeps what the
 * sink throws apart from what the file provokes.
 */
final class Delivery implements RowSink {
  private final RowSink sink;
  private Row last;

  Delivery(RowSink sink) {
    this.sink = sink;
  }

  @Override
  public boolean accept(Row row) {
    if (row.isBlank()) {
      return true;
    }
    last = row;
    try {
      return sink.accept(row);
    } catch (RuntimeException | StackOverflowError e) {
      throw new SinkThrew(e);
    }
  }

  /** Where the file broke, as near as the rows handed on tell: {@code after line 12}. */
  String place() {
    return last == null ? "the file" : "after " + last.position().within();
  }

  /** Carries what the sink threw past the place that catches. */
  static final class SinkThrew extends RuntimeException {
    private static final long serialVersionUID = 1L;

    SinkThrew(Throwable thrown) {
      super(null, thrown, false, false);
    }

    /** Throws what the sink threw, as it was. */
    RuntimeException unwrapped() {
      if (getCause() instanceof Error error) {
        throw error;
      }
      throw (RuntimeException) getCause();
    }
  }
}
