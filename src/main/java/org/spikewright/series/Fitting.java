package org.spikewright.series;

import java.util.List;
import java.util.Map;
import java.util.concurrent.ConcurrentHashMap;
import org.spikewright.reading.FlaskFacts;

/**
 * Sets of facts that were found to fit together. The flasks of thousands of samples are made alike,
 * and whoever reads them back gives equal facts as one object; what fitted once need not be asked
 * again.
 */
final class Fitting {
  private static final int MOST = 4096;

  private final Map<Together, Boolean> known = new ConcurrentHashMap<>();

  /** Facts in the order of their flasks, told apart as objects. */
  private record Together(FlaskFacts... facts) {
    static Together of(List<FlaskDraft> flasks) {
      FlaskFacts[] facts = new FlaskFacts[flasks.size()];
      for (int i = 0; i < facts.length; i++) {
        facts[i] = flasks.get(i).facts();
      }
      return new Together(facts);
    }

    @Override
    public boolean equals(Object other) {
      if (!(other instanceof Together together) || facts.length != together.facts.length) {
        return false;
      }
      for (int i = 0; i < facts.length; i++) {
        if (facts[i] != together.facts[i]) {
          return false;
        }
      }
      return true;
    }

    @Override
    public int hashCode() {
      int hash = 0;
      for (FlaskFacts one : facts) {
        hash = 31 * hash + System.identityHashCode(one);
      }
      return hash;
    }
  }

  /** Whether the flasks' facts are known to fit together. */
  boolean areKnown(List<FlaskDraft> flasks) {
    return known.containsKey(Together.of(flasks));
  }

  /** Remembers that they do. */
  void add(List<FlaskDraft> flasks) {
    if (known.size() >= MOST) {
      known.clear();
    }
    known.put(Together.of(flasks), true);
  }
}
