package org.spikewright.app;

import java.time.LocalDate;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import org.spikewright.analysis.Analysis;
import org.spikewright.analysis.DayFacts;
import org.spikewright.analysis.Fitted;
import org.spikewright.analysis.Learnt;
import org.spikewright.app.NightAnalysis.RevisionMoment;
import org.spikewright.config.Settings;
import org.spikewright.judgement.Judge;
import org.spikewright.judgement.Outcome;
import org.spikewright.ledger.LedgerView;
import org.spikewright.ledger.ResultOrder;
import org.spikewright.ledger.RevisionRecord;
import org.spikewright.reading.Subject;
import org.spikewright.summary.Night;
import org.spikewright.summary.ResultRow;

/**
 * What the files of a revision are written from; each can be walked more than once.
 *
 * @param outcomes of every series, by key
 * @param detailed of the series that the workbook shows flask by flask, by key
 * @param byKey the results by key
 * @param worstFirst the results that need a person first
 * @param learnt what the night knows
 * @param inMemory whether it may be walked by several threads
 */
record NightSource(
    Iterable<Outcome> outcomes,
    Iterable<Outcome> detailed,
    Iterable<ResultRow> byKey,
    Iterable<ResultRow> worstFirst,
    Learnt learnt,
    boolean inMemory) {

  /** From what was judged a moment ago. */
  static NightSource kept(List<Outcome> outcomes, List<ResultRow> rows, Learnt learnt) {
    return new NightSource(
        outcomes,
        outcomes.stream().filter(o -> Night.isDetailed(rows.size(), o.verdict())).toList(),
        rows,
        rows.stream().sorted(ResultOrder.BY_SEVERITY.comparator()).toList(),
        learnt,
        true);
  }

  /** From the ledger, looked at and judged again: everything follows from what it fixed. */
  static NightSource from(LedgerView ledger, Settings settings, RevisionRecord revision) {
    DayFacts facts =
        NightAnalysis.facts(ledger, settings, revision.labDay(), RevisionMoment.of(revision));
    Learnt learnt = Learnt.of(Fitted.each(series(ledger, settings, revision)), facts);
    return from(ledger, settings, revision, learnt);
  }

  /** From the ledger, judged again with what the night is known to know. */
  static NightSource from(
      LedgerView ledger, Settings settings, RevisionRecord revision, Learnt learnt) {
    LocalDate day = revision.labDay();
    Judge judge = NightAnalysis.judge(settings, revision.moment());
    DaySeries series = series(ledger, settings, revision);
    Iterable<ResultRow> worstFirst =
        ledger.results(day, revision.revision(), ResultOrder.BY_SEVERITY);
    Set<Subject> detailed = new HashSet<>();
    for (ResultRow row : worstFirst) {
      if (Night.isDetailed(revision.results(), row.verdict())) {
        detailed.add(row.key().subject());
      }
    }
    return new NightSource(
        new Analysis(Fitted.each(series), judge, learnt),
        new Analysis(Fitted.each(series.of(detailed)), judge, learnt),
        ledger.results(day, revision.revision(), ResultOrder.BY_KEY),
        worstFirst,
        learnt,
        false);
  }

  private static DaySeries series(LedgerView ledger, Settings settings, RevisionRecord revision) {
    return NightAnalysis.series(ledger, settings, revision.labDay(), revision.arrivalLimit());
  }
}
