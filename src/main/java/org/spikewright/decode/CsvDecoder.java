package org.spikewright.decode;

import java.io.IOException;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.Collections;
import java.util.Optional;
import org.spikewright.table.Cell;
import org.spikewright.table.Row;
import org.spikewright.table.RowSink;
import org.spikewright.table.Source;
import org.spikewright.table.TableShape;
import org.spikewright.table.TextForm;

/** Reads text files: CSV, TSV and their like. */
final class CsvDecoder {
  private CsvDecoder() {}

  /**
   * Hands on every record as a row of {@link Cell.Text} and {@link Cell#BLANK}, numbered by the
   * line on which it begins. The last record needs no line end.
   */
  static void read(Path path, String shownName, TableShape shape, RowSink sink) throws IOException {
    TextFile file = TextFile.of(path, shape.encoding());
    SeparatorSearch.Found found =
        shape.separator().isPresent()
            ? new SeparatorSearch.Found(shape.separator().get(), "as declared")
            : SeparatorSearch.in(file, shape.quote(), shape.header());
    char separator = found.separator();
    sink.begins(new TextForm(separator, found.how(), file.charset().name(), file.how()));
    Source source = new Source(shownName, Optional.empty());
    try (CsvRecords records = new CsvRecords(file, separator, shape.quote())) {
      while (records.next()) {
        Row row = row(source, records.line(), records.record());
        if (!sink.accept(row)) {
          return;
        }
      }
    }
  }

  private static Row row(Source source, long line, String[] fields) {
    Cell[] cells = new Cell[fields.length];
    for (int i = 0; i < cells.length; i++) {
      String text = fields[i];
      if (text.length() > Limits.FIELD_CHARS) {
        throw tooLong(line, i + 1);
      }
      cells[i] = text.isEmpty() ? Cell.BLANK : new Cell.Text(text);
    }
    return new Row(source, line, Collections.unmodifiableList(Arrays.asList(cells)));
  }

  private static Unreadable tooLong(long line, int column) {
    return new Unreadable(
        "line " + line,
        "a field of more than " + Limits.FIELD_CHARS + " characters in column " + column,
        "fields of at most " + Limits.FIELD_CHARS + " characters",
        "look at that line in a text editor: a quotation mark may have swallowed the rows below");
  }
}
