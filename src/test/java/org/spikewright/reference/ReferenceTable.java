package org.spikewright.reference;

import java.io.IOException;
import java.io.InputStream;
import java.io.InputStreamReader;
import java.io.Reader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.List;
import org.apache.commons.csv.CSVFormat;
import org.apache.commons.csv.CSVRecord;

/** A table of reference numbers with its provenance in comment lines above the header. */
public final class ReferenceTable {
  private static final CSVFormat FORMAT =
      CSVFormat.DEFAULT.builder().setCommentMarker('#').setHeader().setSkipHeaderRecord(true).get();

  private ReferenceTable() {}

  /** The rows of {@code src/test/resources/reference/<name>}, by column name. */
  public static List<CSVRecord> rows(String name) {
    try (InputStream in = ReferenceTable.class.getResourceAsStream("/reference/" + name)) {
      if (in == null) {
        throw new IllegalArgumentException("no reference table " + name);
      }
      return rows(new InputStreamReader(in, StandardCharsets.UTF_8));
    } catch (IOException e) {
      throw new UncheckedIOException(e);
    }
  }

  /** The rows of a table from anywhere. */
  public static List<CSVRecord> rows(Reader reader) throws IOException {
    return FORMAT.parse(reader).getRecords();
  }

  /** A number of a row; {@code Inf} is allowed. */
  public static double number(CSVRecord row, String column) {
    String text = row.get(column);
    return text.equals("Inf") ? Double.POSITIVE_INFINITY : Double.parseDouble(text);
  }
}
