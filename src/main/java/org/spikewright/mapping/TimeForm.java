package org.spikewright.mapping;

import java.time.DateTimeException;
import java.time.ZoneId;
import java.time.ZoneOffset;
import java.time.ZonedDateTime;
import java.time.format.DateTimeFormatter;
import java.time.format.DateTimeFormatterBuilder;
import java.time.format.ResolverStyle;
import java.time.temporal.ChronoField;
import java.time.temporal.TemporalAccessor;
import java.time.temporal.TemporalQueries;
import java.util.Locale;
import java.util.Optional;

/**
 * How dates and times are written.
 *
 * @param pattern of {@link DateTimeFormatter}; empty for ISO 8601 with a T or a blank
 * @param zone in which a time without an offset is local
 */
public record TimeForm(Optional<String> pattern, ZoneId zone) {

  /**
   * Why a pattern cannot tell a date and a time of day; empty when it can. Fields that are missing
   * show when a moment is written and read back.
   */
  public static Optional<String> fault(String pattern) {
    try {
      DateTimeFormatter formatter = formatter(pattern);
      ZonedDateTime moment = ZonedDateTime.of(2021, 11, 23, 22, 45, 0, 0, ZoneOffset.UTC);
      TemporalAccessor back = formatter.parse(formatter.format(moment));
      boolean whole =
          back.query(TemporalQueries.localDate()) != null
              && back.query(TemporalQueries.localTime()) != null
              && back.get(ChronoField.HOUR_OF_DAY) == 22
              && back.get(ChronoField.MINUTE_OF_HOUR) == 45;
      return whole ? Optional.empty() : Optional.of("no full date and time of day in it");
    } catch (IllegalArgumentException | DateTimeException e) {
      return Optional.of(e.getMessage());
    }
  }

  /**
   * The formatter of a pattern: strict, so that 31.02. is refused; a plain {@code yyyy} means the
   * year; names of months are English whatever the machine's language.
   */
  static DateTimeFormatter formatter(String pattern) {
    return new DateTimeFormatterBuilder()
        .parseCaseInsensitive()
        .appendPattern(yearsWithoutEra(pattern))
        .toFormatter(Locale.ENGLISH)
        .withResolverStyle(ResolverStyle.STRICT);
  }

  /** Strict resolving wants an era beside {@code y}; {@code u} is the year without one. */
  private static String yearsWithoutEra(String pattern) {
    StringBuilder out = new StringBuilder(pattern.length());
    boolean quoted = false;
    boolean era = pattern.indexOf('G') >= 0;
    for (char c : pattern.toCharArray()) {
      quoted ^= c == '\'';
      out.append(c == 'y' && !quoted && !era ? 'u' : c);
    }
    return out.toString();
  }
}
