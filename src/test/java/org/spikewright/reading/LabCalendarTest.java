package org.spikewright.reading;

import static org.assertj.core.api.Assertions.assertThat;

import java.time.Duration;
import java.time.Instant;
import java.time.LocalDate;
import java.time.LocalTime;
import java.time.ZoneId;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class LabCalendarTest {
  private static final LabCalendar LISBON = at("Europe/Lisbon", "06:00");

  private static LabCalendar at(String zone, String cutOff) {
    return new LabCalendar(ZoneId.of(zone), LocalTime.parse(cutOff));
  }

  @ParameterizedTest(name = "{0} belongs to {1}")
  @CsvSource({
    "2025-01-15T18:00:00Z,2025-01-15",
    "2025-01-16T05:59:59.999Z,2025-01-15",
    "2025-01-16T06:00:00Z,2025-01-16",
    "2025-07-16T04:59:59Z,2025-07-15",
    "2025-07-16T05:00:00Z,2025-07-16"
  })
  void aLabDayRunsFromCutOffToCutOff(Instant instant, LocalDate day) {
    assertThat(LISBON.dayOf(instant)).isEqualTo(day);
  }

  @ParameterizedTest(name = "{0} cut-off {1}: {2} lasts {3} h")
  @CsvSource({
    "Europe/Berlin,06:00,2025-03-29,23",
    "Europe/Berlin,06:00,2025-10-25,25",
    "Europe/Berlin,06:00,2025-10-26,24",
    "Europe/Berlin,02:30,2025-03-29,23.5",
    "Europe/Berlin,02:30,2025-03-30,23.5",
    "Africa/Cairo,00:00,2025-04-25,23",
    "UTC,06:00,2025-03-29,24"
  })
  void clockChangesMakeItShorterOrLonger(String zone, String cutOff, LocalDate day, double hours) {
    LabCalendar calendar = at(zone, cutOff);
    Duration length = Duration.between(calendar.startOf(day), calendar.endOf(day));
    // 02:30 is skipped on 30 March in Berlin: that day begins at 03:00 summer time, 01:00 UTC.
    assertThat(length.toMinutes()).isEqualTo(Math.round(hours * 60));
  }

  @Test
  void daysTileTheYearWithoutGapOrOverlapInEveryZoneTried() {
    for (String zone :
        new String[] {
          "Europe/Berlin",
          "America/New_York",
          "Africa/Cairo",
          "Asia/Kolkata",
          "Australia/Lord_Howe",
          "America/Sao_Paulo",
          "UTC"
        }) {
      for (String cutOff : new String[] {"00:00", "02:00", "02:30", "06:00", "23:59"}) {
        LabCalendar calendar = at(zone, cutOff);
        LocalDate last = LocalDate.of(2026, 1, 2);
        for (LocalDate day = LocalDate.of(2024, 12, 30);
            day.isBefore(last);
            day = day.plusDays(1)) {
          Instant start = calendar.startOf(day);
          assertThat(calendar.endOf(day)).isEqualTo(calendar.startOf(day.plusDays(1)));
          assertThat(calendar.dayOf(start)).as(zone + " " + cutOff + " " + day).isEqualTo(day);
          assertThat(calendar.dayOf(start.minusMillis(1)))
              .as(zone + " " + cutOff + " before " + day)
              .isEqualTo(day.minusDays(1));
        }
      }
    }
  }
}
