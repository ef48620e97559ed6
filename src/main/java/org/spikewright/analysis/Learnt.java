package org.spikewright.analysis;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import org.spikewright.fit.PooledSeries;
import org.spikewright.judgement.Around;
import org.spikewright.judgement.Flag;
import org.spikewright.judgement.PoolView;
import org.spikewright.judgement.SeriesFit;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.series.AdditionSeries;

/**
 * What a first walk over a lab day's series has learnt, by which a second one judges them.
 *
 * @param pools what the night knows of noise, bends and slopes
 * @param batches what controls, blanks and other series of a sample say
 * @param ids the sample IDs of the day
 * @param toRemember what later nights are to remember, by pool
 */
public record Learnt(
    NightEvidence pools,
    Evidence batches,
    SimilarIds ids,
    Map<PoolKey, List<PooledSeries>> toRemember)
    implements Around {

  /** Nothing. */
  public static final Learnt NOTHING =
      new Learnt(NightEvidence.NONE, Evidence.NONE, new SimilarIds(), Map.of());

  /**
   * Walks a lab day's series once.
   *
   * @param series ordered by key
   */
  public static Learnt of(Iterable<Fitted> series, DayFacts facts) {
    Pools pools = new Pools();
    SimilarIds ids = new SimilarIds();
    BatchEvidence batches =
        new BatchEvidence(facts.book(), facts.criteria(), facts.besideSamples(), facts.history());
    for (Fitted fitted : series) {
      ids.add(fitted.gathered().key().subject().sample());
      if (fitted.result().isPresent()) {
        SeriesResult result = fitted.result().get();
        pools.add(result.series(), result);
        batches.add(result.series(), result);
      } else if (fitted.fit().isPresent()
          && fitted.fit().get() instanceof SeriesFit.Unfitted unfitted) {
        batches.addWithout((AdditionSeries) fitted.gathered(), unfitted.reason());
      }
    }
    Recall recall = facts.recall();
    return new Learnt(
        recall.stored().orElseGet(() -> pools.evidence(facts.criteria(), recall)),
        batches.evidence(),
        ids,
        pools.toRemember());
  }

  @Override
  public PoolView pool(AdditionSeries series) {
    return pools.of(series);
  }

  @Override
  public List<Flag> flags(AdditionSeries series, SeriesResult result) {
    List<Flag> flags = new ArrayList<>(batches.flagsFor(series, result));
    ids.flagFor(series.key().subject().sample()).ifPresent(flags::add);
    return flags;
  }
}
