package org.spikewright.decode;

import java.io.IOException;
import java.io.Reader;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * The records of a text as long as no quotation mark stands in it, which in most exports is to the
 * end: lines, cut at separators. Where the first mark stands a parser has to take over.
 */
final class PlainRecords {
  private static final int CHARS = 1 << 14;

  /** What follows. */
  enum Next {
    RECORD,
    /** A record in which a quotation mark stands. */
    QUOTED,
    END
  }

  private final Reader reader;
  private final char separator;
  private final char quote;
  private final List<String> fields = new ArrayList<>();
  private char[] chars = new char[CHARS];

  /** Where the record at hand begins in {@link #chars}, and where they end. */
  private int begin;

  private int end;
  private long lines;

  PlainRecords(Reader reader, char separator, char quote) {
    this.reader = reader;
    this.separator = separator;
    this.quote = quote;
  }

  /** How many lines were taken. */
  long lines() {
    return lines;
  }

  /** The fields of the last record. */
  String[] fields() {
    return fields.toArray(String[]::new);
  }

  /** Goes to the next record; one with a quotation mark is not taken. */
  Next next() throws IOException {
    fields.clear();
    int field = 0;
    int i = 0;
    // Places count from the beginning of the record, since more characters may move it.
    while (begin + i < end || more()) {
      char c = chars[begin + i];
      if (c == quote) {
        return Next.QUOTED;
      }
      if (c == separator) {
        add(field, i);
        field = i + 1;
      } else if (c == '\n' || c == '\r') {
        add(field, i);
        lineEnds(i, c);
        return Next.RECORD;
      }
      i++;
    }
    if (i == 0) {
      return Next.END;
    }
    add(field, i);
    begin = end;
    return Next.RECORD;
  }

  private void add(int from, int to) {
    fields.add(new String(chars, begin + from, to - from));
  }

  /** A carriage return and a line feed behind it end one line. */
  private void lineEnds(int at, char c) throws IOException {
    boolean two = c == '\r' && (begin + at + 1 < end || more()) && chars[begin + at + 1] == '\n';
    begin += at + (two ? 2 : 1);
    lines++;
  }

  /** Reads on behind what is there of the record at hand; false at the end. */
  private boolean more() throws IOException {
    if (begin > 0) {
      System.arraycopy(chars, begin, chars, 0, end - begin);
      end -= begin;
      begin = 0;
    }
    if (end == chars.length) {
      chars = Arrays.copyOf(chars, 2 * end);
    }
    int count = reader.read(chars, end, chars.length - end);
    end += Math.max(count, 0);
    return count > 0;
  }

  /** Everything from the record on that was not taken. */
  Reader rest() {
    return new Reader() {
      @Override
      public int read(char[] to, int from, int length) throws IOException {
        if (begin == end) {
          return reader.read(to, from, length);
        }
        int count = Math.min(length, end - begin);
        System.arraycopy(chars, begin, to, from, count);
        begin += count;
        return count;
      }

      @Override
      public void close() throws IOException {
        reader.close();
      }
    };
  }
}
