package org.spikewright.intake;

import static org.junit.jupiter.api.Assumptions.assumeTrue;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.LinkOption;
import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import java.util.concurrent.TimeUnit;
import java.util.stream.Stream;

/** What the tests do to a watched folder. */
final class Folder {
  static final Instant START = Instant.parse("2025-01-15T08:00:00Z");
  static final SettleRule TEN_SECONDS = new SettleRule(Duration.ofSeconds(10));
  static final SettleRule AT_ONCE = new SettleRule(Duration.ZERO);

  private Folder() {}

  static Instant after(long seconds) {
    return START.plusSeconds(seconds);
  }

  static Path put(Path folder, String name, String content) {
    try {
      Path file = folder.resolve(name);
      Files.createDirectories(file.getParent());
      return Files.writeString(file, content);
    } catch (IOException trouble) {
      throw new UncheckedIOException(trouble);
    }
  }

  static List<String> names(List<Sighting> sightings) {
    return sightings.stream().map(Sighting::name).toList();
  }

  /** Every regular file below a folder with its text, by relative name; links are followed. */
  static Map<String, String> contents(Path folder) throws IOException {
    Map<String, String> contents = new TreeMap<>();
    try (Stream<Path> below = Files.walk(folder, java.nio.file.FileVisitOption.FOLLOW_LINKS)) {
      for (Path file : below.filter(Files::isRegularFile).toList()) {
        String name = folder.relativize(file).toString().replace('\\', '/');
        contents.put(name, new String(Files.readAllBytes(file), StandardCharsets.UTF_8));
      }
    }
    return contents;
  }

  /** Runs a shell command; the test is skipped where the shell or the command is missing. */
  static void shell(Path folder, String command) throws Exception {
    assumeTrue(Files.exists(Path.of("/bin/sh")), "no shell here to make special files with");
    Process process =
        new ProcessBuilder("/bin/sh", "-c", command).directory(folder.toFile()).start();
    assumeTrue(process.waitFor(20, TimeUnit.SECONDS), "the shell did not end: " + command);
    assumeTrue(process.exitValue() == 0, "the shell cannot do: " + command);
  }

  /** Unicode names need a machine whose names are in UTF-8. */
  static void needsUnicodeNames() {
    assumeTrue(
        "UTF-8".equals(System.getProperty("sun.jnu.encoding")),
        "file names here are in " + System.getProperty("sun.jnu.encoding") + ", not in UTF-8");
  }

  static boolean exists(Path path) {
    return Files.exists(path, LinkOption.NOFOLLOW_LINKS);
  }
}
