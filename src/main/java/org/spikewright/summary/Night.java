package org.spikewright.summary;

import java.time.Instant;
import java.time.LocalDate;
import java.time.ZoneId;
import java.util.List;
import org.spikewright.analysis.Evidence;
import org.spikewright.analysis.NightEvidence;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.Outcome;
import org.spikewright.judgement.Verdict;

/**
 * Everything a revision of a lab day's summary is made from. The three sequences can be walked more
 * than once and may be long: no more than one element of each is held at a time.
 *
 * @param labDay the lab day
 * @param revision from 1
 * @param moment the instant the revision stands for
 * @param inProgress whether the lab day had not closed at that moment
 * @param zone in which times are shown
 * @param laboratory the laboratory's name; may be empty
 * @param seriesCount how many elements {@code results} has
 * @param results verdicts that need a person first, then by key
 * @param outcomes by key; only those that are {@link #isDetailed} need be there
 * @param files by arrival
 * @param refused by arrival and place
 * @param settings in order; the limits follow from {@code criteria} and need not be among them
 * @param criteria the limits of judgement
 * @param evidence what the lab day's pools say
 * @param controls what the night's controls, blanks, checks and series say about each other
 */
public record Night(
    LocalDate labDay,
    int revision,
    Instant moment,
    boolean inProgress,
    ZoneId zone,
    String laboratory,
    int seriesCount,
    Iterable<ResultRow> results,
    Iterable<Outcome> outcomes,
    List<FileEntry> files,
    Iterable<RefusedRow> refused,
    List<Setting> settings,
    CriteriaBook criteria,
    NightEvidence evidence,
    Evidence.Found controls) {

  /** Up to so many series, the Series sheet holds every one. */
  static final int EVERY_SERIES = 2000;

  /** Whether the Series sheet of so many series holds those with this verdict. */
  public static boolean isDetailed(int seriesCount, Verdict verdict) {
    return seriesCount <= EVERY_SERIES || verdict != Verdict.REPORT;
  }
}
