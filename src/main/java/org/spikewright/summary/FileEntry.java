package org.spikewright.summary;

import java.time.Instant;

/**
 * One delivery, as the Files sheet shows it.
 *
 * @param arrival its number
 * @param name as delivered, relative to the watched folder
 * @param arrivedAt when it was read
 * @param size in bytes
 * @param sha256 of its bytes, in hexadecimal
 * @param mapping the mapping's name; empty when none applied
 * @param mappingSha256 of the mapping's text; empty likewise
 * @param outcome {@code read}, {@code refused} or {@code known} (the same content again)
 * @param rows data rows
 * @param readings rows that became a reading
 * @param rejections rows not used
 * @param skipped rows that the mapping skips
 * @param besideSamples rows of drift checks and calibration solutions that were read
 * @param repeated readings that were known already
 * @param reason why it was refused, or what is to be noted; empty when nothing is
 * @param archivedAs where it lies now, relative to the watched folder
 */
public record FileEntry(
    long arrival,
    String name,
    Instant arrivedAt,
    long size,
    String sha256,
    String mapping,
    String mappingSha256,
    String outcome,
    long rows,
    long readings,
    long rejections,
    long skipped,
    long besideSamples,
    long repeated,
    String reason,
    String archivedAs) {

  /** A delivery without drift checks and calibration solutions. */
  public FileEntry(
      long arrival,
      String name,
      Instant arrivedAt,
      long size,
      String sha256,
      String mapping,
      String mappingSha256,
      String outcome,
      long rows,
      long readings,
      long rejections,
      long skipped,
      long repeated,
      String reason,
      String archivedAs) {
    this(
        arrival,
        name,
        arrivedAt,
        size,
        sha256,
        mapping,
        mappingSha256,
        outcome,
        rows,
        readings,
        rejections,
        skipped,
        0,
        repeated,
        reason,
        archivedAs);
  }
}
