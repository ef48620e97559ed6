package org.spikewright.analysis;

import java.util.Collections;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import org.spikewright.fit.Lent;
import org.spikewright.fit.PoolEvidence;
import org.spikewright.judgement.PoolView;
import org.spikewright.series.AdditionSeries;

/**
 * What a lab day knows that one line does not.
 *
 * @param pools by pool, in order
 * @param instruments all pools of an instrument together, for those whose own is too small
 * @param nights how many earlier lab days it remembers; 0 for a cold start
 * @param isProvisional whether the lab day had not closed, so that the next revision pools anew
 */
public record NightEvidence(
    Map<PoolKey, PoolEvidence> pools,
    Map<String, PoolEvidence> instruments,
    int nights,
    boolean isProvisional) {

  /** Nothing is known. */
  public static final NightEvidence NONE = new NightEvidence(Map.of(), Map.of(), 0, false);

  /** Takes copies in order. */
  public NightEvidence {
    pools = Collections.unmodifiableMap(new TreeMap<>(pools));
    instruments = Collections.unmodifiableMap(new TreeMap<>(instruments));
  }

  /** What is known beside a series: its pool's, else its instrument's, else nothing. */
  public PoolView of(AdditionSeries series) {
    PoolKey key = PoolKey.of(series);
    Optional<PoolEvidence> own = Optional.ofNullable(pools.get(key));
    Optional<Lent> lent = own.flatMap(PoolEvidence::lent);
    if (lent.isPresent()) {
      return new PoolView(lent, key.shown(), own);
    }
    Optional<Lent> byInstrument =
        Optional.ofNullable(instruments.get(key.instrument()))
            .flatMap(PoolEvidence::lentByInstrument);
    return new PoolView(byInstrument, byInstrument.isPresent() ? key.instrument() : "", own);
  }
}
