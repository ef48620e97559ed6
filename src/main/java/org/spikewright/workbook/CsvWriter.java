package org.spikewright.workbook;

import java.io.BufferedWriter;
import java.io.IOException;
import java.io.OutputStream;
import java.io.OutputStreamWriter;
import java.io.Writer;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.List;
import org.spikewright.summary.CsvPlan;

/**
 * Writes files for machines: UTF-8 without a mark, comma, line feed, decimal point, fields quoted
 * where they need it (RFC 4180).
 */
public final class CsvWriter {
  private CsvWriter() {}

  /**
   * Writes a file, whole or not at all.
   *
   * @return the SHA-256 of its bytes, in hexadecimal
   */
  public static String write(CsvPlan plan, Path target) throws WriteFault {
    return Aside.write(target, out -> print(plan, out));
  }

  /** Prints to a stream, which is flushed and left open. */
  public static void print(CsvPlan plan, OutputStream out) throws IOException {
    Writer writer = new BufferedWriter(new OutputStreamWriter(out, StandardCharsets.UTF_8));
    StringBuilder record = new StringBuilder(256);
    print(plan.header(), record, writer);
    for (List<String> line : plan.lines()) {
      print(line, record, writer);
    }
    writer.flush();
  }

  private static void print(List<String> fields, StringBuilder record, Writer writer)
      throws IOException {
    record.setLength(0);
    for (int i = 0; i < fields.size(); i++) {
      if (i > 0) {
        record.append(',');
      }
      String field = fields.get(i);
      if (needsQuotes(field, i == 0)) {
        record.append('"').append(field.replace("\"", "\"\"")).append('"');
      } else {
        record.append(field);
      }
    }
    writer.append(record.append('\n'));
  }

  /**
   * Beyond what RFC 4180 asks for, blanks at an end, a mark that some programs take for a
   * comment's, and an empty first field, which could pass for an empty line, stand in quotes.
   */
  private static boolean needsQuotes(String field, boolean first) {
    if (field.isEmpty()) {
      return first;
    }
    char begin = field.charAt(0);
    if (begin <= '#' || field.charAt(field.length() - 1) <= ' ') {
      return true;
    }
    for (int i = 0; i < field.length(); i++) {
      char c = field.charAt(i);
      if (c == ',' || c == '"' || c == '\n' || c == '\r') {
        return true;
      }
    }
    return false;
  }
}
