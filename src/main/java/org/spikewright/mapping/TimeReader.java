package org.spikewright.mapping;

import java.time.DateTimeException;
import java.time.Instant;
import java.time.LocalDateTime;
import java.time.ZoneOffset;
import java.time.format.DateTimeFormatter;
import java.time.temporal.ChronoField;
import java.time.temporal.ChronoUnit;
import java.time.temporal.TemporalAccessor;
import java.util.List;
import java.util.Optional;
import org.spikewright.mapping.Rejection.Reason;
import org.spikewright.table.Cell;

/**
 * Reads the times of one file, in row order. A local time in the hour that a clock change repeats
 * takes the earlier offset, unless that would go back before the row above and the later one would
 * not; one in the hour that a clock change skips is no time.
 */
final class TimeReader {
  private static final int LONGEST = 100;

  private final TimeForm form;
  private final Optional<DateTimeFormatter> formatter;
  private final String expected;
  private Instant previous = Instant.MIN;
  private String lastText = "";
  private Understood<Instant> last;

  TimeReader(TimeForm form) {
    this.form = form;
    this.formatter = form.pattern().map(TimeForm::formatter);
    this.expected =
        "a date and time "
            + form.pattern()
                .map(pattern -> "written " + pattern)
                .orElse("such as 2025-01-15 18:30:00");
  }

  /** Reads one cell, or a date and a time in two. */
  Understood<Instant> read(List<Cell> cells) {
    Optional<LocalDateTime> moment = moment(cells);
    if (moment.isPresent()) {
      return placed(moment.get(), moment.get().toString());
    }
    String text = text(cells);
    if (text.length() > LONGEST) {
      return notATime(text);
    }
    // Flasks and analytes are often read at one time; the same text next to itself is the same
    // time.
    if (last == null || !text.equals(lastText)) {
      last = formatter.isPresent() ? byPattern(formatter.get(), text) : iso(text);
      lastText = text;
    }
    return last;
  }

  private static String text(List<Cell> cells) {
    if (cells.size() == 1) {
      return cells.get(0).shown().strip();
    }
    StringBuilder joined = new StringBuilder();
    for (Cell cell : cells) {
      joined.append(joined.isEmpty() ? "" : " ").append(cell.shown().strip());
    }
    return joined.toString();
  }

  /**
   * A cell the sheet stores as a moment; of two, the date of the first and the time of the second.
   */
  private static Optional<LocalDateTime> moment(List<Cell> cells) {
    if (!(cells.get(0) instanceof Cell.Moment first)) {
      return Optional.empty();
    }
    if (cells.size() == 1) {
      return Optional.of(first.value());
    }
    return cells.size() == 2 && cells.get(1) instanceof Cell.Moment second
        ? Optional.of(first.value().toLocalDate().atTime(second.value().toLocalTime()))
        : Optional.empty();
  }

  private Understood<Instant> byPattern(DateTimeFormatter pattern, String text) {
    try {
      TemporalAccessor parsed = pattern.parse(text);
      return parsed.isSupported(ChronoField.INSTANT_SECONDS)
          ? known(Instant.from(parsed))
          : placed(LocalDateTime.from(parsed), text);
    } catch (DateTimeException e) {
      return notATime(text);
    }
  }

  private Understood<Instant> iso(String text) {
    Optional<IsoTime> time = IsoTime.parse(text);
    if (time.isEmpty()) {
      return notATime(text);
    }
    return time.get().offset().isPresent()
        ? known(time.get().local().toInstant(time.get().offset().get()))
        : placed(time.get().local(), text);
  }

  private Understood<Instant> placed(LocalDateTime local, String found) {
    List<ZoneOffset> offsets = form.zone().getRules().getValidOffsets(local);
    if (offsets.isEmpty()) {
      return new Understood.Nothing<>(
          Reason.NOT_A_TIME,
          found + ", which the clock change in " + form.zone() + " skipped",
          expected);
    }
    Instant earlier = local.toInstant(offsets.get(0));
    if (offsets.size() > 1 && earlier.isBefore(previous)) {
      Instant later = local.toInstant(offsets.get(1));
      return known(later.isBefore(previous) ? earlier : later);
    }
    return known(earlier);
  }

  private Understood<Instant> known(Instant instant) {
    previous = instant.truncatedTo(ChronoUnit.MILLIS);
    return new Understood.Value<>(previous);
  }

  private Understood<Instant> notATime(String text) {
    return new Understood.Nothing<>(Reason.NOT_A_TIME, text, expected);
  }
}
