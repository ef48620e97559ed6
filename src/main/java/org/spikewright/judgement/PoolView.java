package org.spikewright.judgement;

import java.util.Optional;
import org.spikewright.fit.Lent;
import org.spikewright.fit.PoolEvidence;

/**
 * What the night knows beside one series.
 *
 * @param lent what a pool lends to it; empty where none holds ten series
 * @param lender the pool that lends, for people; empty where none does
 * @param evidence of its own pool, whatever its size; empty where there is no pool
 */
public record PoolView(Optional<Lent> lent, String lender, Optional<PoolEvidence> evidence) {

  /** A series alone. */
  public static final PoolView ALONE = new PoolView(Optional.empty(), "", Optional.empty());
}
