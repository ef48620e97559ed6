package org.spikewright.testkit;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.concurrent.TimeUnit;

/** The program in a process of its own, started from the class path of the tests. */
public final class Program implements AutoCloseable {
  private static final String MAIN = "org.spikewright.app.Main";
  private static final Duration LONGEST = Duration.ofSeconds(60);

  /** How it ended and what it said. */
  public record Ended(int code, String out, String err) {}

  private final Process process;
  private final Path out;
  private final Path err;

  private Program(Process process, Path out, Path err) {
    this.process = process;
    this.out = out;
    this.err = err;
  }

  /** Starts the program, with further options of the virtual machine or none. */
  public static Program start(List<String> jvm, String... args) {
    return start(jvm, MAIN, Map.of(), args);
  }

  /** Starts a main class. */
  public static Program start(
      List<String> jvm, String main, Map<String, String> environment, String... args) {
    try {
      Path out = Files.createTempFile("program", ".out");
      Path err = Files.createTempFile("program", ".err");
      List<String> command = new ArrayList<>();
      command.add(Path.of(System.getProperty("java.home"), "bin", "java").toString());
      command.addAll(
          List.of(
              "-Xmx256m",
              "-XX:TieredStopAtLevel=1",
              "-XX:+UseSerialGC",
              "-Djava.awt.headless=true"));
      command.addAll(jvm);
      command.addAll(List.of("-cp", System.getProperty("java.class.path"), main));
      command.addAll(List.of(args));
      ProcessBuilder builder = new ProcessBuilder(command);
      builder.environment().putAll(environment);
      builder.redirectOutput(out.toFile()).redirectError(err.toFile());
      return new Program(builder.start(), out, err);
    } catch (IOException trouble) {
      throw new UncheckedIOException(trouble);
    }
  }

  /** Runs the program to its end. */
  public static Ended run(String... args) {
    return run(List.of(), args);
  }

  /** Runs the program to its end, with further options of the virtual machine. */
  public static Ended run(List<String> jvm, String... args) {
    try (Program program = start(jvm, args)) {
      return program.ended(LONGEST);
    }
  }

  /** Waits for its end. */
  public Ended ended(Duration atMost) {
    try {
      if (!process.waitFor(atMost.toMillis(), TimeUnit.MILLISECONDS)) {
        throw new AssertionError("still runs after " + atMost + "; it said: " + err());
      }
      return new Ended(process.exitValue(), text(out), err());
    } catch (InterruptedException interrupted) {
      throw new IllegalStateException(interrupted);
    }
  }

  /** What it said on standard error so far. */
  public String err() {
    return text(err);
  }

  public boolean isRunning() {
    return process.isAlive();
  }

  public long pid() {
    return process.pid();
  }

  /** SIGTERM, as a service manager ends a service. */
  public void terminate() {
    process.destroy();
  }

  /** SIGKILL, as the kernel ends a process. */
  public void kill() {
    process.destroyForcibly();
    ended(LONGEST);
  }

  @Override
  public void close() {
    process.destroyForcibly();
    try {
      process.waitFor();
      Files.deleteIfExists(out);
      Files.deleteIfExists(err);
    } catch (IOException | InterruptedException trouble) {
      throw new IllegalStateException(trouble);
    }
  }

  private static String text(Path file) {
    try {
      return new String(Files.readAllBytes(file), StandardCharsets.UTF_8);
    } catch (IOException trouble) {
      throw new UncheckedIOException(trouble);
    }
  }
}
