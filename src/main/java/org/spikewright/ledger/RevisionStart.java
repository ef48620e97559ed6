package org.spikewright.ledger;

import java.time.Instant;
import java.time.LocalDate;

/**
 * What a revision is made from, fixed before it is made.
 *
 * @param labDay the lab day
 * @param moment the instant it stands for; kept to the millisecond
 * @param inProgress whether the lab day had not closed at that moment
 * @param arrivalLimit number of the last delivery that it takes in
 * @param settingsSha256 of the settings' text, in hexadecimal
 * @param settingsText the settings as they stood
 * @param programVersion the program's version
 */
public record RevisionStart(
    LocalDate labDay,
    Instant moment,
    boolean inProgress,
    long arrivalLimit,
    String settingsSha256,
    String settingsText,
    String programVersion) {}
