package org.spikewright.ledger;

import java.time.Instant;
import java.time.LocalDate;
import java.util.Optional;

/**
 * A revision as recorded.
 *
 * @param labDay the lab day
 * @param revision from 1
 * @param moment the instant it stands for, to the millisecond
 * @param inProgress whether the lab day had not closed at that moment
 * @param arrivalLimit number of the last delivery that it takes in
 * @param settingsSha256 of the settings' text, in hexadecimal
 * @param settingsText the settings as they stood
 * @param programVersion the program that made it
 * @param waitingUntil when the first of its waiting series has waited long enough
 * @param results how many results it shows
 * @param issued its files; empty while they are owed
 */
public record RevisionRecord(
    LocalDate labDay,
    int revision,
    Instant moment,
    boolean inProgress,
    long arrivalLimit,
    String settingsSha256,
    String settingsText,
    String programVersion,
    Optional<Instant> waitingUntil,
    int results,
    Optional<Issued> issued) {

  /**
   * The files in which a revision was issued.
   *
   * @param workbook the workbook's file name
   * @param workbookSha256 of its bytes, in hexadecimal
   * @param csv the results file's name
   * @param csvSha256 of its bytes, in hexadecimal
   */
  public record Issued(String workbook, String workbookSha256, String csv, String csvSha256) {}
}
