package org.spikewright.config;

import java.util.ArrayList;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.mapping.Fact;
import org.spikewright.quantity.Unit;

/** Which facts a mapping names, where first, and in what units; faulty ones count as named. */
final class Named {
  /**
   * A unit that a fact has at one of its places.
   *
   * @param unit the unit
   * @param at where it stands
   * @param analyte whose, where it is given for each
   */
  record Known(Unit unit, At at, Optional<String> analyte) {}

  private final Map<Fact, At> places = new EnumMap<>(Fact.class);
  private final Map<Fact, List<Known>> units = new EnumMap<>(Fact.class);

  void add(Fact fact, At at) {
    places.putIfAbsent(fact, at);
  }

  void unit(Fact fact, Known known) {
    units.computeIfAbsent(fact, key -> new ArrayList<>()).add(known);
  }

  boolean has(Fact fact) {
    return places.containsKey(fact);
  }

  At at(Fact fact) {
    return places.getOrDefault(fact, At.START);
  }

  List<Known> units(Fact fact) {
    return units.getOrDefault(fact, List.of());
  }
}
