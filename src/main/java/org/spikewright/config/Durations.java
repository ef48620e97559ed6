package org.spikewright.config;

import java.time.Duration;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/** Durations as people write them: {@code 500 ms}, {@code 10 s}, {@code 2 min}, {@code 4 h}. */
final class Durations {
  static final String EXPECTED = "a duration such as \"500 ms\", \"10 s\", \"2 min\" or \"4 h\"";
  private static final Pattern FORM = Pattern.compile("(\\d{1,9}) ?(ms|s|min|h|d)");

  private Durations() {}

  static Optional<Duration> parse(String text) {
    Matcher matcher = FORM.matcher(text.strip());
    if (!matcher.matches()) {
      return Optional.empty();
    }
    long count = Long.parseLong(matcher.group(1));
    return Optional.of(
        switch (matcher.group(2)) {
          case "ms" -> Duration.ofMillis(count);
          case "s" -> Duration.ofSeconds(count);
          case "min" -> Duration.ofMinutes(count);
          case "h" -> Duration.ofHours(count);
          default -> Duration.ofDays(count);
        });
  }
}
