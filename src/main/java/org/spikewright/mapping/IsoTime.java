package org.spikewright.mapping;

import java.time.DateTimeException;
import java.time.LocalDateTime;
import java.time.ZoneOffset;
import java.util.Optional;

/**
 * A date and time in the forms of ISO 8601 that exports use: {@code 2025-01-15T18:30}, with a blank
 * for the T, with seconds, with a fraction after point or comma, with an offset ({@code Z}, {@code
 * +01:00}) or without.
 *
 * @param local the date and time as written
 * @param offset as written
 */
record IsoTime(LocalDateTime local, Optional<ZoneOffset> offset) {

  /** Reads a text; empty when it is not such a date and time, or no date of the calendar. */
  static Optional<IsoTime> parse(String text) {
    boolean shape =
        text.length() >= 16
            && text.charAt(4) == '-'
            && text.charAt(7) == '-'
            && (text.charAt(10) == 'T' || text.charAt(10) == ' ')
            && text.charAt(13) == ':';
    if (!shape) {
      return Optional.empty();
    }
    boolean seconds = text.length() >= 19 && text.charAt(16) == ':';
    int end = seconds ? 19 : 16;
    int fractionEnd = seconds ? fractionEnd(text) : end;
    int second = seconds ? digits(text, 17, 19) : 0;
    int nano = fractionEnd > end ? nano(text, end + 1, fractionEnd) : 0;
    int[] parts = {
      digits(text, 0, 4),
      digits(text, 5, 7),
      digits(text, 8, 10),
      digits(text, 11, 13),
      digits(text, 14, 16),
      second,
      nano
    };
    return at(parts, text.substring(fractionEnd).strip());
  }

  private static Optional<IsoTime> at(int[] parts, String offset) {
    for (int part : parts) {
      if (part < 0) {
        return Optional.empty();
      }
    }
    try {
      LocalDateTime local =
          LocalDateTime.of(parts[0], parts[1], parts[2], parts[3], parts[4], parts[5], parts[6]);
      return Optional.of(
          new IsoTime(
              local, offset.isEmpty() ? Optional.empty() : Optional.of(ZoneOffset.of(offset))));
    } catch (DateTimeException e) {
      return Optional.empty();
    }
  }

  private static int fractionEnd(String text) {
    if (text.length() < 21 || text.charAt(19) != '.' && text.charAt(19) != ',') {
      return 19;
    }
    int end = 20;
    while (end < text.length() && end < 29 && digits(text, end, end + 1) >= 0) {
      end++;
    }
    return end > 20 ? end : 19;
  }

  private static int nano(String text, int from, int to) {
    int value = digits(text, from, to);
    for (int i = to - from; i < 9; i++) {
      value *= 10;
    }
    return value;
  }

  /** The number that these characters write, or −1 when one is no digit. */
  private static int digits(String text, int from, int to) {
    int value = 0;
    for (int i = from; i < to; i++) {
      char c = text.charAt(i);
      if (c < '0' || c > '9') {
        return -1;
      }
      value = value * 10 + c - '0';
    }
    return value;
  }
}
