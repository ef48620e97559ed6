package org.spikewright.testkit;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.LinkOption;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.util.List;
import java.util.stream.Stream;

/** The folders of an imaginary laboratory, with a mapping of timed and one of untimed exports. */
public final class Laboratory {
  /** Claims {@code bench/*}; readings are timed, in UTC. */
  public static final String BENCH = mapping("bench", "measured_at = \"time\"");

  /** Claims {@code plain/*}; no time is mapped. */
  public static final String PLAIN = mapping("plain", "");

  private final Path root;

  /** Makes the folders, with summaries at an hour that does not come during a test. */
  public Laboratory(Path root) {
    this.root = root;
    configure("06:30");
    write("mappings/bench.toml", BENCH);
    write("mappings/plain.toml", PLAIN);
    try {
      Files.createDirectories(inbox());
    } catch (IOException trouble) {
      throw new UncheckedIOException(trouble);
    }
  }

  /** Writes the configuration with another time of the nightly summary. */
  public void configure(String nightly) {
    write(
        "spikewright.toml",
        """
        [folders]
        watch     = "inbox"
        mappings  = "mappings"
        summaries = "summaries"
        ledger    = "ledger/spikewright.db"
        [laboratory]
        zone = "UTC"
        [schedule]
        nightly    = "%s"
        look_every = "200 ms"
        settle     = "300 ms"
        """
            .formatted(nightly));
  }

  /** A mapping of stated additions that claims every file of the folder it is named after. */
  public static String mapping(String name, String furtherColumn) {
    return """
        name  = "%1$s"
        files = "%1$s/*"
        [columns]
        sample   = "sample"
        analyte  = "analyte"
        signal   = "signal"
        addition = { header = "added", unit = "µg/L" }
        %2$s
        [fixed]
        design         = "stated"
        addition_terms = "sample"
        flasks         = 4
        [result]
        unit = "µg/L"
        """
        .formatted(name, furtherColumn);
  }

  public String conf() {
    return root.resolve("spikewright.toml").toString();
  }

  public Path root() {
    return root;
  }

  public Path inbox() {
    return root.resolve("inbox");
  }

  public Path rejected(String name) {
    return inbox().resolve("rejected").resolve(name);
  }

  public Path summaries() {
    return root.resolve("summaries");
  }

  /** Writes any file of the laboratory. */
  public Path write(String name, String text) {
    return write(root.resolve(name), text.getBytes(StandardCharsets.UTF_8));
  }

  /** Drops an export, whole at once. */
  public Path drop(String name, String text) {
    return drop(name, text.getBytes(StandardCharsets.UTF_8));
  }

  /** Drops an export, whole at once. */
  public Path drop(String name, byte[] bytes) {
    Path target = inbox().resolve(name);
    Path aside = write(target.resolveSibling("." + target.getFileName() + ".tmp"), bytes);
    try {
      return Files.move(aside, target, StandardCopyOption.ATOMIC_MOVE);
    } catch (IOException trouble) {
      throw new UncheckedIOException(trouble);
    }
  }

  private static Path write(Path file, byte[] bytes) {
    try {
      Files.createDirectories(file.getParent());
      return Files.write(file, bytes);
    } catch (IOException trouble) {
      throw new UncheckedIOException(trouble);
    }
  }

  /** Every file below a folder of the laboratory, relative to it, in order. */
  public List<String> files(String folder) {
    Path top = root.resolve(folder);
    if (!Files.exists(top)) {
      return List.of();
    }
    try (Stream<Path> below = Files.walk(top)) {
      return below
          .filter(path -> Files.isRegularFile(path, LinkOption.NOFOLLOW_LINKS))
          .map(path -> top.relativize(path).toString().replace('\\', '/'))
          .sorted()
          .toList();
    } catch (IOException trouble) {
      throw new UncheckedIOException(trouble);
    }
  }

  /** Files under done, without journals and the day of arrival: {@code bench/run1.csv}. */
  public List<String> done() {
    return files("inbox/done").stream()
        .map(name -> name.substring(name.indexOf('/') + 1))
        .filter(name -> !name.equals("spikewright-journal.csv"))
        .sorted()
        .toList();
  }

  /** The text of the one file under done with this name, whatever the day of its arrival. */
  public String doneText(String name) {
    List<String> found =
        files("inbox/done").stream().filter(file -> file.endsWith("/" + name)).toList();
    if (found.size() != 1) {
      throw new AssertionError(name + " is under done " + found.size() + " times: " + done());
    }
    return text("inbox/done/" + found.get(0));
  }

  /** The text of a file of the laboratory. */
  public String text(String name) {
    try {
      return Files.readString(root.resolve(name));
    } catch (IOException trouble) {
      throw new UncheckedIOException(trouble);
    }
  }
}
