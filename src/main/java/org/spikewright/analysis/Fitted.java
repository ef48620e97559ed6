package org.spikewright.analysis;

import java.util.Iterator;
import java.util.Optional;
import org.spikewright.judgement.SeriesFit;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Gathered;

/**
 * What one series says by itself.
 *
 * @param gathered the series, or why there is none
 * @param fit its numbers; empty where there is no series
 */
public record Fitted(Gathered gathered, Optional<SeriesFit> fit) {

  /** Fits. Never throws on account of the numbers. */
  public static Fitted of(Gathered gathered) {
    return new Fitted(
        gathered,
        gathered instanceof AdditionSeries series
            ? Optional.of(SeriesFit.of(series))
            : Optional.empty());
  }

  /** Fits each series while it is walked. */
  public static Iterable<Fitted> each(Iterable<? extends Gathered> series) {
    return () -> {
      Iterator<? extends Gathered> walk = series.iterator();
      return new Iterator<>() {
        @Override
        public boolean hasNext() {
          return walk.hasNext();
        }

        @Override
        public Fitted next() {
          return of(walk.next());
        }
      };
    };
  }

  Optional<SeriesResult> result() {
    return fit.isPresent() && fit.get() instanceof SeriesFit.Fitted fitted
        ? Optional.of(fitted.result())
        : Optional.empty();
  }
}
