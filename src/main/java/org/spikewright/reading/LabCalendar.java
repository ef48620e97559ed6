package org.spikewright.reading;

import java.time.Instant;
import java.time.LocalDate;
import java.time.LocalDateTime;
import java.time.LocalTime;
import java.time.ZoneId;
import java.time.zone.ZoneOffsetTransition;

/**
 * Lab days run from cut-off to cut-off and bear the date on which they begin.
 *
 * @param zone the laboratory's zone
 * @param cutOff local time at which a lab day begins
 */
public record LabCalendar(ZoneId zone, LocalTime cutOff) {

  /** The lab day an instant belongs to. */
  public LocalDate dayOf(Instant instant) {
    LocalDate date = instant.atZone(zone).toLocalDate();
    return instant.isBefore(startOf(date)) ? date.minusDays(1) : date;
  }

  /** When a lab day begins; a cut-off that a clock change skips begins at the end of the gap. */
  public Instant startOf(LocalDate day) {
    LocalDateTime local = day.atTime(cutOff);
    ZoneOffsetTransition change = zone.getRules().getTransition(local);
    return change != null && change.isGap() ? change.getInstant() : local.atZone(zone).toInstant();
  }

  /** When a lab day ends: the instant the next one begins. */
  public Instant endOf(LocalDate day) {
    return startOf(day.plusDays(1));
  }
}
