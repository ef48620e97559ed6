package org.spikewright.app;

import static org.assertj.core.api.Assertions.assertThat;

import java.time.Duration;
import java.time.Instant;
import java.time.LocalDate;
import java.time.LocalTime;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.List;
import java.util.TreeSet;
import java.util.stream.Stream;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;

class NightlyTimeTest {
  private static Stream<Arguments> zonesAndTimes() {
    // Berlin and New York skip 02:30 in spring and have 01:30 or 02:30 twice in autumn; Cairo skips
    // midnight itself.
    return Stream.of("Europe/Berlin", "America/New_York", "Africa/Cairo")
        .flatMap(
            zone ->
                Stream.of("00:00", "00:30", "01:30", "02:00", "02:30", "06:30", "23:30", "23:59")
                    .map(time -> Arguments.of(zone, time)));
  }

  @ParameterizedTest(name = "{0} {1}")
  @MethodSource("zonesAndTimes")
  void eachLocalDateHasExactlyOneNightlyTime(String zoneName, String time) {
    ZoneId zone = ZoneId.of(zoneName);
    LocalTime nightly = LocalTime.parse(time);
    Instant from = LocalDate.of(2025, 1, 1).atTime(12, 0).atZone(zone).toInstant();
    Instant to = LocalDate.of(2027, 1, 1).atTime(12, 0).atZone(zone).toInstant();
    TreeSet<Instant> instants = new TreeSet<>();
    Instant before = Instant.MIN;
    for (Instant now = from; now.isBefore(to); now = now.plus(Duration.ofMinutes(10))) {
      Instant latest = Daemon.latest(now, nightly, zone);
      assertThat(latest).as("at %s", now).isBeforeOrEqualTo(now).isAfterOrEqualTo(before);
      before = latest;
      instants.add(latest);
    }

    List<LocalDate> dates = instants.stream().map(at -> at.atZone(zone).toLocalDate()).toList();

    List<LocalDate> every = new ArrayList<>();
    for (LocalDate day = dates.get(0); !day.isAfter(dates.get(dates.size() - 1)); ) {
      every.add(day);
      day = day.plusDays(1);
    }
    assertThat(dates).containsExactlyElementsOf(every).hasSizeGreaterThanOrEqualTo(730);
    for (Instant at : instants) {
      LocalTime local = at.atZone(zone).toLocalTime();
      Duration late = Duration.between(nightly, local);
      assertThat(late).as("%s", at).isIn(Duration.ZERO, Duration.ofHours(1));
    }
  }
}
