package org.spikewright.decode;

import ch.qos.logback.classic.Level;
import ch.qos.logback.classic.Logger;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.Charset;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.slf4j.LoggerFactory;
import org.spikewright.table.Cell;
import org.spikewright.table.DecodeFault;
import org.spikewright.table.Row;
import org.spikewright.table.TableShape;

/** What came of decoding a file: the rows handed on, and the fault if there was one. */
record Decoded(List<Row> rows, Optional<DecodeFault> fault) {
  static {
    // Thousands of files are refused here on purpose; their accounts would drown the results.
    ((Logger) LoggerFactory.getLogger(FileDecoder.class)).setLevel(Level.ERROR);
  }

  static Decoded of(Path file, TableShape shape) {
    List<Row> rows = new ArrayList<>();
    Optional<DecodeFault> fault = FileDecoder.read(file, "run7", shape, rows::add);
    return new Decoded(rows, fault);
  }

  static Decoded of(Path file) {
    return of(file, TableShape.plain());
  }

  static Decoded of(Path folder, byte[] content, TableShape shape) {
    try {
      return of(Files.write(folder.resolve("file"), content), shape);
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
  }

  static TableShape separatedBy(char separator) {
    return shape(Optional.of(separator), Optional.empty());
  }

  static TableShape encodedIn(Charset charset) {
    return shape(Optional.of(','), Optional.of(charset));
  }

  static TableShape withHeader(String... words) {
    return new TableShape(Optional.empty(), '"', Optional.empty(), List.of(), List.of(words));
  }

  static TableShape sheets(String... names) {
    return new TableShape(Optional.of(','), '"', Optional.empty(), List.of(names), List.of());
  }

  private static TableShape shape(Optional<Character> separator, Optional<Charset> charset) {
    return new TableShape(separator, '"', charset, List.of(), List.of());
  }

  /** Each row as its number and what a person sees: {@code 3: a|b}. */
  List<String> shown() {
    return rows.stream().map(row -> row.number() + ": " + String.join("|", shown(row))).toList();
  }

  private static List<String> shown(Row row) {
    return row.cells().stream().map(Cell::shown).toList();
  }

  /** The first cell of the first row. */
  Cell first() {
    return rows.get(0).cell(0);
  }

  /** The fault on one line, for messages and comparisons by part. */
  String faultText() {
    return fault
        .map(f -> f.place() + " | " + f.found() + " | " + f.expected() + " | " + f.advice())
        .orElse("no fault");
  }
}
