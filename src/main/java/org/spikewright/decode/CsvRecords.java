package org.spikewright.decode;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.util.Iterator;
import java.util.Optional;
import org.apache.commons.csv.CSVException;
import org.apache.commons.csv.CSVFormat;
import org.apache.commons.csv.CSVParser;
import org.apache.commons.csv.CSVRecord;

/**
 * The records of a text file under one separator, each with the line on which it begins. Up to the
 * first quotation mark lines are cut at separators, which is many times faster than parsing them.
 */
final class CsvRecords implements AutoCloseable {
  private final TextFile file;
  private final char separator;
  private final char quote;
  private final StrictReader reader;
  private final PlainRecords plain;
  private Optional<Parsed> parsed = Optional.empty();
  private String[] record = {};
  private long line;

  /** From the first quotation mark on. */
  private record Parsed(CSVParser parser, Iterator<CSVRecord> records) {}

  CsvRecords(TextFile file, char separator, char quote) {
    this.file = file;
    this.separator = separator;
    this.quote = quote;
    this.reader = file.open(Limits.RECORD_CHARS);
    this.plain = new PlainRecords(reader, separator, quote);
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
   * Goes to the next record.
   *
   * @return false at the end
   * @throws Unreadable when it cannot be made out
   */
  boolean next() throws IOException {
    line = plain.lines() + parsed.map(p -> p.parser().getCurrentLineNumber()).orElse(0L) + 1;
    reader.recordBegins(line);
    if (parsed.isEmpty()) {
      PlainRecords.Next next = plain.next();
      if (next == PlainRecords.Next.RECORD) {
        record = plain.fields();
      }
      if (next != PlainRecords.Next.QUOTED) {
        return next == PlainRecords.Next.RECORD;
      }
      CSVParser parser =
          CSVParser.builder().setReader(plain.rest()).setFormat(format(separator, quote)).get();
      parsed = Optional.of(new Parsed(parser, parser.iterator()));
    }
    return parse(parsed.get().records());
  }

  private boolean parse(Iterator<CSVRecord> records) {
    try {
      if (!records.hasNext()) {
        return false;
      }
      record = records.next().values();
      return true;
    } catch (UncheckedIOException e) {
      if (e.getCause() instanceof CSVException) {
        throw new QuoteTrouble(separator, quote).explained(file, line);
      }
      throw e;
    }
  }

  /** The fields of the record, which are the caller's. */
  String[] record() {
    return record;
  }

  /** The line on which the record begins, as a person counts, from 1. */
  long line() {
    return line;
  }

  @Override
  public void close() throws IOException {
    reader.close();
  }
}
