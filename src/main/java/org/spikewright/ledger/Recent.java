package org.spikewright.ledger;

import java.util.LinkedHashMap;
import java.util.Map;

/** The entries used last, up to a limit, so that memory does not grow with a delivery. */
final class Recent<K, V> extends LinkedHashMap<K, V> {
  private static final long serialVersionUID = 1L;

  private final int limit;

  Recent(int limit) {
    super(16, 0.75f, true);
    this.limit = limit;
  }

  @Override
  protected boolean removeEldestEntry(Map.Entry<K, V> eldest) {
    return size() > limit;
  }
}
