package org.spikewright.config;

import java.nio.file.Path;
import java.time.Duration;
import java.time.LocalTime;
import org.spikewright.analysis.ControlBook;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.reading.LabCalendar;
import org.spikewright.reading.Shelf;

/**
 * The configuration of one laboratory.
 *
 * @param watch the watched folder; absolute, like every path here
 * @param mappings the folder of mappings
 * @param summaries the folder that summaries are written to; outside {@code watch}
 * @param ledger the ledger's file; outside {@code watch}
 * @param leave whether files are left where they are, for shares that are only read
 * @param laboratory the laboratory's name, as it heads the workbook; may be empty
 * @param calendar the lab day
 * @param nightly local time at which summaries are made
 * @param lookEvery time between two looks into the watched folder
 * @param settle how long a file must hold still before it is read
 * @param longestPause longest pause between readings of one series
 * @param waitForFlasks how long a series short of its flasks is waited for
 * @param criteria the limits of judgement
 * @param shelf the stocks and the glassware that mappings may name
 * @param controls what the laboratory knows of its controls
 * @param sha256 in hexadecimal, of the file's bytes; with tables beside it, of {@code text}
 * @param text the file's text; with tables beside it the texts of all, one after the other, which
 *     {@link #read} takes apart again
 */
public record Settings(
    Path watch,
    Path mappings,
    Path summaries,
    Path ledger,
    boolean leave,
    String laboratory,
    LabCalendar calendar,
    LocalTime nightly,
    Duration lookEvery,
    Duration settle,
    Duration longestPause,
    Duration waitForFlasks,
    CriteriaBook criteria,
    Shelf shelf,
    ControlBook controls,
    String sha256,
    String text) {

  /** Reads a configuration file, and the tables of stocks and glassware beside it. */
  public static Loaded<Settings> load(Path file) {
    return SettingsFile.load(file);
  }

  /**
   * Reads a configuration's text, and the tables of stocks and glassware where they stand in it. No
   * file is read.
   *
   * @param file where it stands or would stand; paths are relative to its folder
   */
  public static Loaded<Settings> read(Path file, String text) {
    return SettingsFile.read(file, text);
  }
}
