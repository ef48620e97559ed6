package org.spikewright.workbook;

import java.io.File;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Comparator;
import java.util.List;
import java.util.stream.Stream;
import org.apache.poi.util.TempFile;
import org.apache.poi.util.TempFileCreationStrategy;

/**
 * The folder in which POI keeps what it streams, so that a killed program leaves nothing in the
 * machine's common folder and the next start can sweep.
 */
final class PoiFolder implements AutoCloseable {
  private static final String PREFIX = "workbook-";

  private final Path folder;

  private PoiFolder(Path folder) {
    this.folder = folder;
  }

  /** A new folder under a given one. */
  static PoiFolder under(Path temporaryFolder) throws IOException {
    Files.createDirectories(temporaryFolder);
    return new PoiFolder(Files.createTempDirectory(temporaryFolder, PREFIX));
  }

  /** From now on POI's temporary files of this thread lie here, until this is closed. */
  void adopt() {
    TempFile.setThreadLocalTempFileCreationStrategy(new In(folder));
  }

  /** Deletes what a killed program left. */
  static void sweep(Path temporaryFolder) throws IOException {
    if (!Files.isDirectory(temporaryFolder)) {
      return;
    }
    try (Stream<Path> entries = Files.list(temporaryFolder)) {
      for (Path entry : entries.toList()) {
        boolean ours = entry.getFileName().toString().startsWith(PREFIX);
        if (ours && Files.isDirectory(entry, java.nio.file.LinkOption.NOFOLLOW_LINKS)) {
          delete(entry);
        }
      }
    }
  }

  @Override
  public void close() throws IOException {
    TempFile.setThreadLocalTempFileCreationStrategy(null);
    delete(folder);
  }

  private static void delete(Path folder) throws IOException {
    List<Path> deepestFirst;
    try (Stream<Path> tree = Files.walk(folder)) {
      deepestFirst = tree.sorted(Comparator.reverseOrder()).toList();
    } catch (UncheckedIOException fault) {
      throw fault.getCause();
    }
    for (Path path : deepestFirst) {
      Files.deleteIfExists(path);
    }
  }

  private record In(Path folder) implements TempFileCreationStrategy {
    @Override
    public File createTempFile(String prefix, String suffix) throws IOException {
      return Files.createTempFile(folder, prefix, suffix).toFile();
    }

    @Override
    public File createTempDirectory(String prefix) throws IOException {
      return Files.createTempDirectory(folder, prefix).toFile();
    }
  }
}
