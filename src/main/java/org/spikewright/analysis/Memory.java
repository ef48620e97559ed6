package org.spikewright.analysis;

import java.util.List;
import java.util.Map;
import org.spikewright.fit.PooledSeries;

/**
 * What earlier lab days left behind, so that a night of five series can still borrow.
 *
 * @param series some of their series, by pool, oldest lab day first
 * @param nights how many lab days they come from
 */
public record Memory(Map<PoolKey, List<PooledSeries>> series, int nights) {

  /** How many lab days back noise is remembered. */
  public static final int NIGHTS = 20;

  /** A cold start. */
  public static final Memory NONE = new Memory(Map.of(), 0);

  List<PooledSeries> of(PoolKey pool) {
    return series.getOrDefault(pool, List.of());
  }
}
