package org.spikewright.reading;

import java.util.Collections;
import java.util.Map;
import java.util.TreeMap;

/**
 * What stands on the laboratory's shelf and may be called by name.
 *
 * @param stocks by name, in the order of their names
 * @param glassware pipettes, flasks, burettes and balances by name, likewise
 */
public record Shelf(Map<String, Stock> stocks, Map<String, Tool> glassware) {
  /** Nothing has a name. */
  public static final Shelf EMPTY = new Shelf(Map.of(), Map.of());

  /** Copies the maps. */
  public Shelf {
    stocks = Collections.unmodifiableMap(new TreeMap<>(stocks));
    glassware = Collections.unmodifiableMap(new TreeMap<>(glassware));
  }
}
