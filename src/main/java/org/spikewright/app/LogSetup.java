package org.spikewright.app;

import ch.qos.logback.classic.Level;
import ch.qos.logback.classic.Logger;
import ch.qos.logback.classic.LoggerContext;
import ch.qos.logback.classic.spi.Configurator;
import ch.qos.logback.classic.spi.ConfiguratorRank;
import ch.qos.logback.classic.spi.ILoggingEvent;
import ch.qos.logback.core.ConsoleAppender;
import ch.qos.logback.core.OutputStreamAppender;
import ch.qos.logback.core.encoder.Encoder;
import ch.qos.logback.core.encoder.LayoutWrappingEncoder;
import ch.qos.logback.core.rolling.RollingFileAppender;
import ch.qos.logback.core.rolling.SizeAndTimeBasedRollingPolicy;
import ch.qos.logback.core.spi.ContextAwareBase;
import ch.qos.logback.core.util.FileSize;
import java.nio.charset.StandardCharsets;
import java.util.Optional;

/**
 * Sets logging up: the bench-level story at INFO, everything else from WARN on, on standard error
 * always; in a rolling file as well when the system property {@code spikewright.log}, or the
 * environment variable {@code SPIKEWRIGHT_LOG}, names one. In code, because reading the same from
 * XML takes a quarter of a second at each start. {@code logback.configurationFile} goes before it.
 */
@ConfiguratorRank(ConfiguratorRank.CUSTOM_TOP_PRIORITY)
public final class LogSetup extends ContextAwareBase implements Configurator {
  private static final String OWN_FILE = "logback.configurationFile";
  private static final int DAYS_KEPT = 90;

  /** For the logging library, which finds it as a service. */
  public LogSetup() {}

  @Override
  public ExecutionStatus configure(LoggerContext log) {
    if (System.getProperty(OWN_FILE) != null) {
      return ExecutionStatus.INVOKE_NEXT_IF_ANY;
    }
    setUp(log);
    return ExecutionStatus.DO_NOT_INVOKE_NEXT_IF_ANY;
  }

  /** Sets a context up as it is in use. */
  static void setUp(LoggerContext log) {
    Logger root = log.getLogger(Logger.ROOT_LOGGER_NAME);
    root.setLevel(Level.WARN);
    log.getLogger("org.spikewright").setLevel(Level.INFO);
    log.getLogger("org.apache.poi").setLevel(Level.ERROR);
    root.addAppender(standardError(log));
    file(log).ifPresent(file -> root.addAppender(rolling(log, file)));
  }

  /** The file that is to be written too, if one is named. */
  private static Optional<String> file(LoggerContext log) {
    return Optional.ofNullable(log.getProperty("spikewright.log"))
        .or(() -> Optional.ofNullable(System.getProperty("spikewright.log")))
        .or(() -> Optional.ofNullable(log.getProperty("SPIKEWRIGHT_LOG")))
        .or(() -> Optional.ofNullable(System.getenv("SPIKEWRIGHT_LOG")));
  }

  private static ConsoleAppender<ILoggingEvent> standardError(LoggerContext log) {
    ConsoleAppender<ILoggingEvent> appender = new ConsoleAppender<>();
    appender.setTarget("System.err");
    return started(log, appender, "STDERR");
  }

  private static RollingFileAppender<ILoggingEvent> rolling(LoggerContext log, String file) {
    RollingFileAppender<ILoggingEvent> appender = new RollingFileAppender<>();
    appender.setFile(file);
    SizeAndTimeBasedRollingPolicy<ILoggingEvent> policy = new SizeAndTimeBasedRollingPolicy<>();
    policy.setContext(log);
    policy.setParent(appender);
    policy.setFileNamePattern(file + ".%d{yyyy-MM-dd, UTC}.%i.gz");
    policy.setMaxFileSize(FileSize.valueOf("10MB"));
    policy.setMaxHistory(DAYS_KEPT);
    policy.setTotalSizeCap(FileSize.valueOf("500MB"));
    appender.setContext(log);
    policy.start();
    appender.setRollingPolicy(policy);
    return started(log, appender, "FILE");
  }

  private static <A extends OutputStreamAppender<ILoggingEvent>> A started(
      LoggerContext log, A appender, String name) {
    appender.setContext(log);
    appender.setName(name);
    appender.setEncoder(encoder(log));
    appender.start();
    return appender;
  }

  private static Encoder<ILoggingEvent> encoder(LoggerContext log) {
    LogLine line = new LogLine();
    line.setContext(log);
    line.start();
    LayoutWrappingEncoder<ILoggingEvent> encoder = new LayoutWrappingEncoder<>();
    encoder.setContext(log);
    encoder.setCharset(StandardCharsets.UTF_8);
    encoder.setLayout(line);
    encoder.start();
    return encoder;
  }
}
