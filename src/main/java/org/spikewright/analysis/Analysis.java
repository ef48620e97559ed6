package org.spikewright.analysis;

import java.util.Iterator;
import org.spikewright.judgement.Judge;
import org.spikewright.judgement.Outcome;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Ungrouped;

/**
 * A lab day's series, judged with what the night knows. The series are walked once to learn what
 * they say together, and again whenever the outcomes are walked; both walks give the same whenever
 * they are made, since everything is a pure function of the series and of what is known beside
 * them.
 */
public final class Analysis implements Iterable<Outcome> {
  private final Iterable<Fitted> series;
  private final Judge judge;
  private final Learnt learnt;

  /**
   * An analysis by what was learnt before.
   *
   * @param series of one lab day, ordered by key; can be walked more than once
   * @param judge of the revision
   */
  public Analysis(Iterable<Fitted> series, Judge judge, Learnt learnt) {
    this.series = series;
    this.judge = judge;
    this.learnt = learnt;
  }

  /** Looks at a lab day. */
  public static Analysis of(Iterable<Fitted> series, Judge judge, DayFacts facts) {
    return new Analysis(series, judge, Learnt.of(series, facts));
  }

  /** What the first walk has learnt. */
  public Learnt learnt() {
    return learnt;
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
        ? judge.judge(found, fitted.fit().orElseThrow(), learnt)
        : judge.judge((Ungrouped) fitted.gathered());
  }
}
