package org.spikewright.app;

import ch.qos.logback.classic.spi.ILoggingEvent;
import ch.qos.logback.classic.spi.ThrowableProxyUtil;
import ch.qos.logback.core.LayoutBase;
import java.time.Instant;
import java.time.ZoneOffset;
import java.time.format.DateTimeFormatter;
import java.util.List;
import java.util.Locale;
import java.util.regex.Pattern;
import org.slf4j.event.KeyValuePair;

/**
 * One event as one line, whatever its message holds: moment in UTC, level, message, and what goes
 * with it as {@code name="value"}. The trace of a fault follows on lines of its own.
 */
final class LogLine extends LayoutBase<ILoggingEvent> {
  private static final DateTimeFormatter MOMENT =
      DateTimeFormatter.ofPattern("uuuu-MM-dd'T'HH:mm:ss.SSS'Z'", Locale.ROOT)
          .withZone(ZoneOffset.UTC);
  private static final Pattern LINE_ENDS = Pattern.compile("[\r\n\u2028\u2029\u0085]+");

  @Override
  public String doLayout(ILoggingEvent event) {
    StringBuilder said = new StringBuilder(String.valueOf(event.getFormattedMessage())).append(' ');
    List<KeyValuePair> pairs = event.getKeyValuePairs();
    if (pairs != null) {
      for (int i = 0; i < pairs.size(); i++) {
        said.append(i > 0 ? " " : "").append(pairs.get(i).key);
        said.append("=\"").append(pairs.get(i).value).append('"');
      }
    }
    String level = event.getLevel().toString();
    StringBuilder line = new StringBuilder(said.length() + 40);
    MOMENT.formatTo(Instant.ofEpochMilli(event.getTimeStamp()), line);
    line.append(' ').append(level).append(" ".repeat(Math.max(0, 5 - level.length()))).append(' ');
    line.append(LINE_ENDS.matcher(said).replaceAll(" ")).append(System.lineSeparator());
    if (event.getThrowableProxy() != null) {
      line.append(ThrowableProxyUtil.asString(event.getThrowableProxy()));
    }
    return line.toString();
  }
}
