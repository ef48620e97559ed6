package org.spikewright.intake;

import java.io.BufferedReader;
import java.io.IOException;
import java.nio.channels.Channels;
import java.nio.channels.FileChannel;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;

/** The journal beside one lab day's files: appended to, never rewritten. */
final class Journal {
  /** Never the name of a filed file: see {@link SafeName}. */
  static final String FILE_NAME = "spikewright-journal.csv";

  private static final String HEADER = "arrival,sha256,original_name,mapping_sha256";

  private final Path file;
  private final Disk disk;
  private final Set<Long> arrivals = new HashSet<>();
  private long length = -1;

  Journal(Path folder, Disk disk) {
    this.file = folder.resolve(FILE_NAME);
    this.disk = disk;
  }

  /** Whether this is the journal of a folder. */
  boolean isOf(Path folder) {
    return file.getParent().equals(folder);
  }

  /** Adds a line and makes it last; nothing happens when the arrival has one. */
  void append(Journalled entry) throws IOException {
    try (FileChannel channel =
        FileChannel.open(
            file, StandardOpenOption.CREATE, StandardOpenOption.READ, StandardOpenOption.WRITE)) {
      if (channel.size() != length) {
        length = learn();
      }
      if (arrivals.contains(entry.arrival())) {
        // It may have been written by a call that could not make it last.
        channel.force(true);
        return;
      }
      String text = (length == 0 ? HEADER + "\n" : "") + entry.line() + "\n";
      byte[] bytes = text.getBytes(StandardCharsets.UTF_8);
      long before = length;
      length = -1;
      disk.append(channel, before, bytes);
      if (before == 0) {
        disk.sync(file.getParent());
      }
      length = before + bytes.length;
      arrivals.add(entry.arrival());
    }
  }

  /**
   * Reads the lines; a last line without an end was torn by a crash and does not count.
   *
   * @throws IOException when the file cannot be read, or a line is damaged: its number is named
   */
  List<Journalled> entries() throws IOException {
    List<Journalled> entries = new ArrayList<>();
    try (FileChannel channel = FileChannel.open(file, StandardOpenOption.READ);
        BufferedReader lines =
            new BufferedReader(Channels.newReader(channel, StandardCharsets.UTF_8))) {
      long number = 1;
      for (Optional<String> line = whole(lines); line.isPresent(); line = whole(lines)) {
        if (number > 1 || !line.get().equals(HEADER)) {
          entries.add(parse(number, line.get()));
        }
        number++;
      }
    } catch (NoSuchFileException none) {
      return List.of();
    }
    return entries;
  }

  private Journalled parse(long number, String line) throws IOException {
    try {
      return Journalled.parse(line);
    } catch (IllegalArgumentException damaged) {
      String place = file.getFileName() + " line " + number;
      throw new IOException(place + " is damaged: " + damaged.getMessage(), damaged);
    }
  }

  /** The next line that has an end. */
  private static Optional<String> whole(BufferedReader lines) throws IOException {
    StringBuilder line = new StringBuilder();
    for (int next = lines.read(); next >= 0; next = lines.read()) {
      if (next == '\n') {
        return Optional.of(line.toString());
      }
      line.append((char) next);
    }
    return Optional.empty();
  }

  /** Learns which arrivals have a line, and returns the length up to the last whole line. */
  private long learn() throws IOException {
    arrivals.clear();
    byte[] content = Files.readAllBytes(file);
    int start = 0;
    for (int i = 0; i < content.length; i++) {
      if (content[i] == '\n') {
        learn(new String(content, start, i - start, StandardCharsets.UTF_8));
        start = i + 1;
      }
    }
    return start;
  }

  private void learn(String line) {
    int comma = line.indexOf(',');
    String first = comma < 0 ? line : line.substring(0, comma);
    if (first.matches("[0-9]{1,18}")) {
      arrivals.add(Long.parseLong(first));
    }
  }
}
