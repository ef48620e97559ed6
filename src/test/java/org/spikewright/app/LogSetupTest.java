package org.spikewright.app;

import static org.assertj.core.api.Assertions.assertThat;

import ch.qos.logback.classic.LoggerContext;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import org.slf4j.Logger;

class LogSetupTest {
  @TempDir Path folder;

  private static LoggerContext configured(String property, String value) {
    LoggerContext context = new LoggerContext();
    context.setMDCAdapter(new ch.qos.logback.classic.util.LogbackMDCAdapter());
    if (!property.isEmpty()) {
      context.putProperty(property, value);
    }
    LogSetup.setUp(context);
    return context;
  }

  @ParameterizedTest
  @ValueSource(strings = {"spikewright.log", "SPIKEWRIGHT_LOG"})
  void aNamedFileGetsTheBenchStoryOneLineAnEvent(String property) throws Exception {
    Path file = folder.resolve("spikewright.log");
    LoggerContext context = configured(property, file.toString());
    Logger story = context.getLogger("org.spikewright.app.Round");
    // Standard error would show these lines amid the test's own output.
    context.getLogger(Logger.ROOT_LOGGER_NAME).detachAppender("STDERR");

    story
        .atInfo()
        .addKeyValue("file", "a\nb.csv")
        .addKeyValue("rows", 12)
        .log("arrived\r\n2025-01-15T00:00:00Z ERROR forged");
    story.debug("not told");
    context.getLogger("org.quartz.core.QuartzScheduler").info("not told");
    context.getLogger("org.apache.poi.util.XMLHelper").info("not told");
    context.getLogger("org.quartz.core.QuartzScheduler").warn("told");
    context.stop();

    List<String> lines = Files.readAllLines(file);
    assertThat(lines).hasSize(2);
    assertThat(lines.get(0))
        .matches("\\d{4}-\\d\\d-\\d\\dT\\d\\d:\\d\\d:\\d\\d\\.\\d{3}Z INFO  arrived .*")
        .endsWith("forged file=\"a b.csv\" rows=\"12\"");
    assertThat(lines.get(1)).contains("WARN  told");
  }

  @Test
  void withoutANamedFileNoneIsWritten() {
    LoggerContext context = configured("", "");
    ch.qos.logback.classic.Logger root = context.getLogger(Logger.ROOT_LOGGER_NAME);
    assertThat(root.getAppender("STDERR")).isNotNull();
    assertThat(root.getAppender("FILE")).isNull();
    context.stop();
  }
}
