package org.spikewright.testkit;

import ch.qos.logback.classic.Level;
import ch.qos.logback.classic.Logger;
import ch.qos.logback.classic.spi.ILoggingEvent;
import ch.qos.logback.core.AppenderBase;
import java.util.List;
import java.util.concurrent.CopyOnWriteArrayList;
import org.slf4j.LoggerFactory;

/** Collects what the program logs from INFO on, and keeps it from the console meanwhile. */
public final class LogLines extends AppenderBase<ILoggingEvent> implements AutoCloseable {
  private final List<String> lines = new CopyOnWriteArrayList<>();
  private final Logger logger = (Logger) LoggerFactory.getLogger("org.spikewright");
  private final Level level = logger.getLevel();

  private LogLines() {}

  /** Collects until closed. */
  public static LogLines collect() {
    LogLines lines = new LogLines();
    lines.setContext(lines.logger.getLoggerContext());
    lines.start();
    lines.logger.setLevel(Level.INFO);
    lines.logger.setAdditive(false);
    lines.logger.addAppender(lines);
    return lines;
  }

  @Override
  protected void append(ILoggingEvent event) {
    lines.add(event.getLevel() + " " + event.getFormattedMessage());
  }

  public List<String> all() {
    return List.copyOf(lines);
  }

  /** The lines that hold a text. */
  public List<String> with(String text) {
    return lines.stream().filter(line -> line.contains(text)).toList();
  }

  @Override
  public void close() {
    logger.detachAppender(this);
    logger.setAdditive(true);
    logger.setLevel(level);
    stop();
  }
}
