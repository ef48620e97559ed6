package org.spikewright.app;

import java.time.Instant;
import java.time.LocalDate;
import org.spikewright.analysis.DayFacts;
import org.spikewright.config.Settings;
import org.spikewright.judgement.Judge;
import org.spikewright.ledger.LedgerView;
import org.spikewright.ledger.RevisionRecord;
import org.spikewright.ledger.RevisionStart;
import org.spikewright.series.Gathering;
import org.spikewright.series.GatheringRules;

/** The functional core, set up by a configuration. */
final class NightAnalysis {
  private NightAnalysis() {}

  /** The series of a lab day, from deliveries up to a number. */
  static DaySeries series(LedgerView ledger, Settings settings, LocalDate day, long upTo) {
    Gathering gathering =
        new Gathering(new GatheringRules(settings.calendar(), settings.longestPause()));
    return new DaySeries(ledger, gathering, day, upTo);
  }

  /** The judge of a revision. */
  static Judge judge(Settings settings, Instant moment) {
    return new Judge(settings.criteria(), moment, settings.waitForFlasks());
  }

  /** What is known beside the series of a revision. */
  static DayFacts facts(
      LedgerView ledger, Settings settings, LocalDate day, RevisionMoment revision) {
    return new DayFacts(
        settings.criteria(),
        ledger.recall(day, revision.inProgress()),
        settings.controls(),
        ledger.besideSamples(day, revision.arrivalLimit()),
        ledger.controlHistory(day, revision.moment()));
  }

  /**
   * What a revision was fixed by.
   *
   * @param moment the instant it stands for
   * @param inProgress whether the lab day had not closed
   * @param arrivalLimit number of the last delivery that counts
   */
  record RevisionMoment(Instant moment, boolean inProgress, long arrivalLimit) {
    static RevisionMoment of(RevisionStart start) {
      return new RevisionMoment(start.moment(), start.inProgress(), start.arrivalLimit());
    }

    static RevisionMoment of(RevisionRecord record) {
      return new RevisionMoment(record.moment(), record.inProgress(), record.arrivalLimit());
    }
  }
}
