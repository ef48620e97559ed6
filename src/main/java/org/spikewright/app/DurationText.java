package org.spikewright.app;

import java.time.Duration;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import picocli.CommandLine.ITypeConverter;
import picocli.CommandLine.TypeConversionException;

/** A duration on the command line: {@code 0s}, {@code 500ms}, {@code 2min}, {@code 1h}. */
final class DurationText implements ITypeConverter<Duration> {
  private static final Pattern TEXT = Pattern.compile("(\\d{1,9}) ?(ms|s|min|h)");

  @Override
  public Duration convert(String text) {
    Matcher matcher = TEXT.matcher(text.strip());
    if (!matcher.matches()) {
      throw new TypeConversionException(
          "'" + text + "' is no duration; expected such as 0s, 500ms, 2min or 1h");
    }
    long count = Long.parseLong(matcher.group(1));
    return switch (matcher.group(2)) {
      case "ms" -> Duration.ofMillis(count);
      case "s" -> Duration.ofSeconds(count);
      case "min" -> Duration.ofMinutes(count);
      default -> Duration.ofHours(count);
    };
  }
}
