package org.spikewright.analysis;

import java.util.Iterator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.fit.PooledSeries;
import org.spikewright.judgement.Around;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.Flag;
import org.spikewright.judgement.Judge;
import org.spikewright.judgement.Outcome;
import org.spikewright.judgement.PoolView;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Ungrouped;

/**
 * A lab day's series, judged with what the night knows. The series are walked once to learn what
 * they say together, and again whenever the outcomes are walked; both walks give the same whenever
 * they are made, since everything is a pure function of the series and of what is recalled.
 */
public final class Analysis implements Iterable<Outcome> {
  private final Iterable<Fitted> series;
  private final Judge judge;
  private final NightEvidence evidence;
  private final Map<PoolKey, List<PooledSeries>> toRemember;

  private Analysis(
      Iterable<Fitted> series,
      Judge judge,
      NightEvidence evidence,
      Map<PoolKey, List<PooledSeries>> toRemember) {
    this.series = series;
    this.judge = judge;
    this.evidence = evidence;
    this.toRemember = toRemember;
  }

  /**
   * Looks at a lab day.
   *
   * @param series of one lab day, ordered by key; can be walked more than once
   * @param judge of the revision
   * @param book the limits by which the night's own tests are made
   * @param recall what is known of the day and of those before it
   */
  public static Analysis of(
      Iterable<Fitted> series, Judge judge, CriteriaBook book, Recall recall) {
    Pools pools = new Pools();
    for (Fitted fitted : series) {
      Optional<SeriesResult> result = fitted.result();
      result.ifPresent(found -> pools.add(found.series(), found));
    }
    NightEvidence evidence = recall.stored().orElseGet(() -> pools.evidence(book, recall));
    return new Analysis(series, judge, evidence, pools.toRemember());
  }

  /** The outcomes of series of a lab day whose evidence is known already. */
  public static Iterable<Outcome> with(
      Iterable<Fitted> series, Judge judge, NightEvidence evidence) {
    return new Analysis(series, judge, evidence, Map.of());
  }

  /** What the night knows. */
  public NightEvidence evidence() {
    return evidence;
  }

  /** What later nights are to remember, by pool. */
  public Map<PoolKey, List<PooledSeries>> toRemember() {
    return toRemember;
  }

  /** The outcomes, in the order of the series. */
  @Override
  public Iterator<Outcome> iterator() {
    Iterator<Fitted> walk = series.iterator();
    return new Iterator<>() {
      @Override
      public boolean hasNext() {
        return walk.hasNext();
      }

      @Override
      public Outcome next() {
        return outcome(walk.next());
      }
    };
  }

  /** What the night says about one series. */
  public Outcome outcome(Fitted fitted) {
    return fitted.gathered() instanceof AdditionSeries found
        ? judge.judge(found, fitted.fit().orElseThrow(), around())
        : judge.judge((Ungrouped) fitted.gathered());
  }

  private Around around() {
    return new Around() {
      @Override
      public PoolView pool(AdditionSeries one) {
        return evidence.of(one);
      }

      @Override
      public List<Flag> flags(AdditionSeries one, SeriesResult result) {
        return List.of();
      }
    };
  }
}
