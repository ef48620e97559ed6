package org.spikewright.table;

/** Takes rows one by one, in file order. */
@FunctionalInterface
public interface RowSink {
  /**
   * Takes the next row.
   *
   * @return whether more rows are wanted; on false the decoder stops and reports no fault
   */
  boolean accept(Row row);

  /** Is told before the first row of a text file how it is cut. */
  default void begins(TextForm form) {}
}
