package org.spikewright.ledger;

import java.time.Instant;
import java.time.LocalDate;
import org.spikewright.reading.LabCalendar;

/** Lab days as the ledger counts them, from 1970-01-01; remembers the last one asked for. */
final class DayIndex {
  private final LabCalendar calendar;
  private long from = 1;
  private long to = 0;
  private long day;

  DayIndex(LabCalendar calendar) {
    this.calendar = calendar;
  }

  /** The lab day of an instant in milliseconds. */
  long of(long millis) {
    if (!(millis >= from && millis < to)) {
      LocalDate date = calendar.dayOf(Instant.ofEpochMilli(millis));
      day = date.toEpochDay();
      from = calendar.startOf(date).toEpochMilli();
      to = calendar.endOf(date).toEpochMilli();
    }
    return day;
  }

  /** When a lab day begins, in milliseconds. */
  long start(long epochDay) {
    return calendar.startOf(LocalDate.ofEpochDay(epochDay)).toEpochMilli();
  }
}
