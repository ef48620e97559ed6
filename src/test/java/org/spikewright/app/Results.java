package org.spikewright.app;

import java.io.IOException;
import java.io.StringReader;
import java.io.UncheckedIOException;
import java.util.List;
import java.util.Set;
import org.apache.commons.csv.CSVFormat;
import org.apache.commons.csv.CSVParser;
import org.apache.commons.csv.CSVRecord;

/** Reads what the command results prints. */
final class Results {
  private Results() {}

  /** A column, row by row. */
  static List<String> column(String csv, String name) {
    return rows(csv).stream().map(row -> row.get(name)).toList();
  }

  /** Every row without some columns. */
  static List<String> without(String csv, Set<String> columns) {
    return rows(csv).stream()
        .map(
            row -> {
              var map = row.toMap();
              map.keySet().removeAll(columns);
              return new java.util.TreeMap<>(map).toString();
            })
        .toList();
  }

  private static List<CSVRecord> rows(String csv) {
    CSVFormat format = CSVFormat.RFC4180.builder().setHeader().setSkipHeaderRecord(true).get();
    try (CSVParser parser = format.parse(new StringReader(csv))) {
      return parser.getRecords();
    } catch (IOException impossible) {
      throw new UncheckedIOException(impossible);
    }
  }
}
