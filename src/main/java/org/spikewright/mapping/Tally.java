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
 * @param checks rows that became a reading of a drift check
 * @param calibrations rows that became a reading of a calibration solution
 */
public record Tally(
    long rows, long readings, long rejections, long skipped, long checks, long calibrations) {
  /** Nothing is dropped in silence: {@link IllegalStateException} when the sum is wrong. */
  public Tally {
    if (rows != readings + rejections + skipped + checks + calibrations) {
      throw new IllegalStateException(
          rows
              + " rows, but "
              + readings
              + " + "
              + rejections
              + " + "
              + skipped
              + " + "
              + checks
              + " + "
              + calibrations);
    }
  }

  /** A file without drift checks and calibration solutions. */
  public Tally(long rows, long readings, long rejections, long skipped) {
    this(rows, readings, rejections, skipped, 0, 0);
  }

  /** The rows beside the samples in words that continue a list; empty when there are none. */
  public String besideSamples() {
    return checks + calibrations == 0
        ? ""
        : ", " + checks + " of drift checks, " + calibrations + " of calibration solutions";
  }

  /**
   * Whether the file is worth keeping: it brought readings, or nothing but checks and calibration.
   */
  public boolean isOfUse() {
    return readings > 0 || rejections == 0 && checks + calibrations > 0;
  }
}
