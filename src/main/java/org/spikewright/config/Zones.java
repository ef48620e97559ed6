package org.spikewright.config;

import java.time.DateTimeException;
import java.time.ZoneId;
import java.util.Optional;
import org.spikewright.mapping.Spelling;

/** Reads time zones wherever they stand. */
final class Zones {
  private Zones() {}

  static Optional<ZoneId> zone(Section section, String key) {
    String expected = "a time zone such as \"Europe/Lisbon\"";
    Optional<String> text = section.text(key, expected);
    try {
      return text.map(ZoneId::of);
    } catch (DateTimeException e) {
      section
          .faults()
          .add(
              section.at(key),
              "'" + text.get() + "' for " + section.named(key),
              expected,
              Spelling.nearest(text.get(), ZoneId.getAvailableZoneIds()));
      return Optional.empty();
    }
  }
}
