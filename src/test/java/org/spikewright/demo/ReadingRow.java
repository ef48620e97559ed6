package org.spikewright.demo;

import java.time.LocalDateTime;

/**
 * One reading as an export will say it.
 *
 * @param plan whose it is
 * @param flask from 1
 * @param replicate from 1
 * @param signal with a decimal point, or a word
 * @param at local time of measurement
 */
record ReadingRow(SeriesPlan plan, int flask, int replicate, String signal, LocalDateTime at) {

  /** What was added, in µL. */
  int additionMicrolitres() {
    return plan.additionMicrolitres(flask);
  }
}
