package org.spikewright.analysis;

import java.util.List;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.reading.BatchReading;

/**
 * What is known of a lab day beside its series.
 *
 * @param criteria the limits of judgement
 * @param recall what its pools came to before, and what earlier days left behind
 * @param book what the laboratory says about its controls
 * @param besideSamples drift checks and calibration solutions
 * @param history of the controls on earlier lab days
 */
public record DayFacts(
    CriteriaBook criteria,
    Recall recall,
    ControlBook book,
    List<BatchReading> besideSamples,
    ControlHistory history) {

  /** A closed day without any past and without controls. */
  public static DayFacts of(CriteriaBook criteria) {
    return new DayFacts(
        criteria, Recall.NOTHING, ControlBook.EMPTY, List.of(), ControlHistory.NONE);
  }
}
