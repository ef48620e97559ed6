package org.spikewright.demo;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.apache.commons.csv.CSVFormat;
import org.apache.commons.csv.CSVParser;
import org.apache.commons.csv.CSVRecord;

/** The demo's reference files, row by row. */
final class ReferenceTable {
  static final Path FOLDER = Path.of("src", "test", "resources", "reference");

  private static final CSVFormat FORMAT =
      CSVFormat.DEFAULT.builder().setCommentMarker('#').setHeader().setSkipHeaderRecord(true).get();

  private ReferenceTable() {}

  /** The truth, one row a series. */
  static List<CSVRecord> truth() {
    return rows("demo-truth.csv");
  }

  /** What R made of each series. */
  static List<CSVRecord> series() {
    return rows("demo-r.csv");
  }

  /** What R made of each flask, in flask order within its series. */
  static List<CSVRecord> flasks() {
    return rows("demo-r-flasks.csv");
  }

  /** The words that tell series apart. */
  static String key(CSVRecord row) {
    return row.get("instrument") + " " + row.get("sample") + " " + row.get("analyte");
  }

  static double number(CSVRecord row, String column) {
    return Double.parseDouble(row.get(column));
  }

  private static List<CSVRecord> rows(String name) {
    try (CSVParser parser =
        FORMAT.parse(Files.newBufferedReader(FOLDER.resolve(name), StandardCharsets.UTF_8))) {
      return parser.getRecords();
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
  }
}
