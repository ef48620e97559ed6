package org.spikewright.decode;

import org.spikewright.table.Row;
import org.spikewright.table.RowSink;
import org.spikewright.table.TableShape.EmptyRows;
import org.spikewright.table.TextForm;

/**
 * Hands rows on, mostly but for rows in which nothing stands. Remembers where it was, and keeps
 * what the sink throws apart from what the file provokes.
 */
final class Delivery implements RowSink {
  private final RowSink sink;
  private final EmptyRows emptyRows;
  private Row last;

  Delivery(RowSink sink, EmptyRows emptyRows) {
    this.sink = sink;
    this.emptyRows = emptyRows;
  }

  @Override
  public void begins(TextForm form) {
    try {
      sink.begins(form);
    } catch (RuntimeException | StackOverflowError e) {
      throw new SinkThrew(e);
    }
  }

  @Override
  public boolean accept(Row row) {
    if (emptyRows == EmptyRows.PASSED_OVER && row.isBlank()) {
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
