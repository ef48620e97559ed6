package org.spikewright.testkit;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.TimeUnit;

/** The program in a process of its own, as a person starts it. */
public final class Program {
  private static final long PATIENCE_SECONDS = 180;

  /**
   * What a run came to.
   *
   * @param exitCode as the process ended
   * @param out what it printed, in UTF-8
   * @param err what it logged and complained about
   */
  public record Run(int exitCode, String out, String err) {}

  private Program() {}

  /** Runs a command to its end; its output passes through files in {@code folder}. */
  public static Run run(Path folder, String... arguments) {
    List<String> command = new ArrayList<>();
    command.add(Path.of(System.getProperty("java.home"), "bin", "java").toString());
    command.add("-Djava.awt.headless=true");
    command.add("-cp");
    command.add(
        System.getProperty("surefire.test.class.path", System.getProperty("java.class.path")));
    command.add("org.spikewright.app.Main");
    command.addAll(List.of(arguments));
    Path out = folder.resolve("program.out");
    Path err = folder.resolve("program.err");
    try {
      Process process =
          new ProcessBuilder(command)
              .redirectOutput(out.toFile())
              .redirectError(err.toFile())
              .start();
      if (!process.waitFor(PATIENCE_SECONDS, TimeUnit.SECONDS)) {
        process.destroyForcibly();
        throw new AssertionError("still running: " + command);
      }
      return new Run(process.exitValue(), text(out), text(err));
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    } catch (InterruptedException e) {
      Thread.currentThread().interrupt();
      throw new AssertionError(e);
    }
  }

  private static String text(Path file) throws IOException {
    return Files.readString(file, StandardCharsets.UTF_8);
  }
}
