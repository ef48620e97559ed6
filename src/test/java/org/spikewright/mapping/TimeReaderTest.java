package org.spikewright.mapping;

import static org.assertj.core.api.Assertions.assertThat;

import java.time.Instant;
import java.time.LocalDateTime;
import java.time.ZoneId;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.spikewright.table.Cell;

class TimeReaderTest {
  private static final ZoneId BERLIN = ZoneId.of("Europe/Berlin");

  private static Understood<Instant> read(String format, String... texts) {
    TimeForm form = new TimeForm(Optional.ofNullable(format), BERLIN);
    return new TimeReader(form).read(Arrays.stream(texts).<Cell>map(Cell.Text::new).toList());
  }

  private static void isAt(Understood<Instant> time, String instant) {
    assertThat(time).isEqualTo(new Understood.Value<>(Instant.parse(instant)));
  }

  @ParameterizedTest(name = "{0} is {1}")
  @CsvSource({
    "2025-01-15T18:30,2025-01-15T17:30:00Z",
    "2025-01-15 18:30,2025-01-15T17:30:00Z",
    "2025-01-15 18:30:05,2025-01-15T17:30:05Z",
    "2025-01-15T18:30:05.123,2025-01-15T17:30:05.123Z",
    "'2025-01-15T18:30:05,5',2025-01-15T17:30:05.500Z",
    "2025-01-15T18:30:05.123456,2025-01-15T17:30:05.123Z",
    "2025-01-15T18:30Z,2025-01-15T18:30:00Z",
    "2025-01-15T18:30:00+02:00,2025-01-15T16:30:00Z",
    "2025-07-15 18:30,2025-07-15T16:30:00Z"
  })
  void readsIsoWithoutAFormat(String text, String instant) {
    isAt(read(null, text), instant);
  }

  @ParameterizedTest(name = "''{0}'' is no time")
  @ValueSource(
      strings = {
        "",
        "2025-01-15",
        "18:30",
        "2025-02-30 10:00",
        "2025-13-01 10:00",
        "2025-01-15 25:00",
        "2025-01-15 18:60",
        "15.01.2025 18:30",
        "2025-01-15 18:30:5",
        "2025-01-15T18:30:05.",
        "2025-01-15T18:30+99:00",
        "2025-01-15 18:30 CET",
        "２０２５-01-15 18:30",
        "2025-03-30 02:30"
      })
  void refusesWhatIsNoTimeOrWasSkipped(String text) {
    assertThat(read(null, text)).isInstanceOf(Understood.Nothing.class);
  }

  @Test
  void saysThatTheClockChangeSkippedIt() {
    Understood.Nothing<Instant> nothing =
        (Understood.Nothing<Instant>) read(null, "2025-03-30 02:30");
    assertThat(nothing.found()).contains("2025-03-30 02:30", "Europe/Berlin", "skipped");
    assertThat(nothing.reason()).isEqualTo(Rejection.Reason.NOT_A_TIME);
  }

  @ParameterizedTest(name = "{0} as {1} is {2}")
  @CsvSource({
    "dd.MM.yyyy HH:mm:ss,15.01.2025 18:30:00,2025-01-15T17:30:00Z",
    "d/M/yy h:mm a,5/1/25 6:30 pm,2025-01-05T17:30:00Z",
    "dd-MMM-yyyy HH:mm,15-Jan-2025 18:30,2025-01-15T17:30:00Z",
    "yyyy-MM-dd HH:mm XXX,2025-01-15 18:30 -05:00,2025-01-15T23:30:00Z",
    "yyyyMMddHHmmss,20250115183000,2025-01-15T17:30:00Z",
    "uuuu.MM.dd 'um' HH:mm,2025.01.15 um 18:30,2025-01-15T17:30:00Z"
  })
  void readsByADeclaredFormat(String format, String text, String instant) {
    assertThat(TimeForm.fault(format)).isEmpty();
    isAt(read(format, text), instant);
  }

  @Test
  void aFormatIsStrict() {
    assertThat(read("dd.MM.yyyy HH:mm", "31.02.2025 10:00")).isInstanceOf(Understood.Nothing.class);
    assertThat(read("dd.MM.yyyy HH:mm", "31.01.2025 10:00 ")).isInstanceOf(Understood.Value.class);
  }

  @ParameterizedTest(name = "{0} cannot tell date and time")
  @ValueSource(
      strings = {
        "dd.MM.yyyy",
        "HH:mm",
        "dd.MM.yyyy hh:mm",
        "dd.MM.yyyy HH",
        "dd.MM HH:mm",
        "b",
        "{"
      })
  void aFormatMustTellDateAndTime(String format) {
    assertThat(TimeForm.fault(format)).isPresent();
  }

  @Test
  void aDateAndATimeInTwoColumnsAreJoined() {
    isAt(read("dd.MM.yyyy HH:mm", "15.01.2025", "18:30"), "2025-01-15T17:30:00Z");
    assertThat(read("dd.MM.yyyy HH:mm", "15.01.2025", "")).isInstanceOf(Understood.Nothing.class);
    Cell date = new Cell.Moment(LocalDateTime.parse("2025-01-15T00:00"), "45672");
    Cell time = new Cell.Moment(LocalDateTime.parse("1899-12-31T18:30"), "0.77");
    isAt(
        new TimeReader(new TimeForm(Optional.empty(), BERLIN)).read(List.of(date, time)),
        "2025-01-15T17:30:00Z");
  }

  @Test
  void theRepeatedHourTakesTheEarlierOffsetUnlessRowOrderSaysOtherwise() {
    TimeReader reader = new TimeReader(new TimeForm(Optional.empty(), BERLIN));
    String[] local = {"02:10", "02:50", "02:10", "02:50", "03:10"};
    String[] utc = {"00:10", "00:50", "01:10", "01:50", "02:10"};
    for (int i = 0; i < local.length; i++) {
      Cell cell = new Cell.Text("2025-10-26 " + local[i]);
      isAt(reader.read(List.of(cell)), "2025-10-26T" + utc[i] + ":00Z");
    }
    // Rows that are not in order say nothing: both offsets lie before the row above.
    isAt(reader.read(List.of(new Cell.Text("2025-10-26 02:10"))), "2025-10-26T00:10:00Z");
  }
}
