package org.spikewright.decode;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.util.Iterator;
import org.apache.commons.csv.CSVException;
import org.apache.commons.csv.CSVFormat;
import org.apache.commons.csv.CSVParser;
import org.apache.commons.csv.CSVRecord;

/** The records of a text file under one separator, each with the line on which it begins. */
final class CsvRecords implements AutoCloseable {
  private final TextFile file;
  private final char separator;
  private final char quote;
  private final StrictReader reader;
  private final CSVParser parser;
  private final Iterator<CSVRecord> records;
  private long line;

  CsvRecords(TextFile file, char separator, char quote) throws IOException {
    this.file = file;
    this.separator = separator;
    this.quote = quote;
    this.reader = file.open(Limits.RECORD_CHARS);
    this.parser = CSVParser.builder().setReader(reader).setFormat(format(separator, quote)).get();
    this.records = parser.iterator();
  }

  /** Blanks around fields stay, empty lines count, a backslash is a character like any other. */
  private static CSVFormat format(char separator, char quote) {
    return CSVFormat.DEFAULT
        .builder()
        .setDelimiter(separator)
        .setQuote(quote)
        .setIgnoreEmptyLines(false)
        .get();
  }

  /**
   * Whether there is a further record.
   *
   * @throws Unreadable when it cannot be made out
   */
  boolean hasNext() {
    line = parser.getCurrentLineNumber() + 1;
    reader.recordBegins(line);
    try {
      return records.hasNext();
    } catch (UncheckedIOException e) {
      if (e.getCause() instanceof CSVException) {
        throw new QuoteTrouble(separator, quote).explained(file, line);
      }
      throw e;
    }
  }

  CSVRecord next() {
    return records.next();
  }

  /** The line on which the record begins that {@link #next} gives, as a person counts, from 1. */
  long line() {
    return line;
  }

  @Override
  public void close() throws IOException {
    parser.close();
  }
}
