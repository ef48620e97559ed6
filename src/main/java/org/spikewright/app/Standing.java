package org.spikewright.app;

import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import org.slf4j.Logger;

/** Troubles that last: each is said once when it begins or changes, and once when it is over. */
final class Standing {
  private final Logger log;
  private final Map<String, String> troubles = new TreeMap<>();

  Standing(Logger log) {
    this.log = log;
  }

  void trouble(String key, String text) {
    if (!text.equals(troubles.put(key, text))) {
      log.warn("{}", text);
    }
  }

  void over(String key) {
    String text = troubles.remove(key);
    if (text != null) {
      log.warn("over: {}", text);
    }
  }

  /** What lasts now, ordered by key. */
  List<String> texts() {
    return List.copyOf(troubles.values());
  }
}
