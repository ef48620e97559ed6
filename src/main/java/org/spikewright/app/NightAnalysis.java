package org.spikewright.app;

import java.time.Instant;
import java.time.LocalDate;
import org.spikewright.analysis.Analysis;
import org.spikewright.analysis.Fitted;
import org.spikewright.analysis.Recall;
import org.spikewright.config.Settings;
import org.spikewright.judgement.Judge;
import org.spikewright.ledger.LedgerView;
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

  /** The analysis of a revision's series. */
  static Analysis of(Iterable<Fitted> series, Settings settings, Instant moment, Recall recall) {
    return Analysis.of(series, judge(settings, moment), settings.criteria(), recall);
  }
}
