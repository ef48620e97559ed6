package org.spikewright.mapping;

/**
 * What became of a file's rows. Data rows are the rows below the header that are not blank. Where a
 * row holds several readings, each cell that should hold one counts as a row. Headers that come
 * again within a table, titles of blocks, and what stands behind a declared end are skipped rows.
 *
 * @param rows data rows
 * @param readings rows that became a reading
 * @param rejections rows that could not be used
 * @param skipped rows that the mapping declares skipped
 */
public record Tally(long rows, long readings, long rejections, long skipped) {
  /** Nothing is dropped in silence: {@link IllegalStateException} when the sum is wrong. */
  public Tally {
    if (rows != readings + rejections + skipped) {
      throw new IllegalStateException(
          rows + " rows, but " + readings + " + " + rejections + " + " + skipped);
    }
  }
}
