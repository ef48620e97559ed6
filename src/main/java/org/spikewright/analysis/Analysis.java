package org.spikewright.analysis;

import java.util.Iterator;
import org.spikewright.judgement.Judge;
import org.spikewright.judgement.Outcome;
import org.spikewright.series.Gathered;

/**
 * A lab day's series, judged. Nothing is held: each walk fits and judges anew, and gives the same
 * outcomes, since both are pure functions of the series.
 */
public final class Analysis implements Iterable<Outcome> {
  private final Iterable<Gathered> series;
  private final Judge judge;

  /**
   * An analysis.
   *
   * @param series of one lab day, ordered by key; can be walked more than once
   */
  public Analysis(Iterable<Gathered> series, Judge judge) {
    this.series = series;
    this.judge = judge;
  }

  /** The outcomes, in the order of the series. */
  @Override
  public Iterator<Outcome> iterator() {
    Iterator<Gathered> walk = series.iterator();
    return new Iterator<>() {
      @Override
      public boolean hasNext() {
        return walk.hasNext();
      }

      @Override
      public Outcome next() {
        return judge.judge(walk.next());
      }
    };
  }
}
