package org.spikewright.workbook;

import java.io.BufferedWriter;
import java.io.IOException;
import java.io.OutputStream;
import java.io.OutputStreamWriter;
import java.io.Writer;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.List;
import org.apache.commons.csv.CSVFormat;
import org.spikewright.summary.CsvPlan;

/**
 * Writes files for machines: UTF-8 without a mark, comma, line feed, decimal point, fields quoted
 * where they need it (RFC 4180).
 */
public final class CsvWriter {
  private static final CSVFormat FORMAT =
      CSVFormat.RFC4180.builder().setRecordSeparator('\n').get();

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
    FORMAT.printRecord(writer, plan.header().toArray());
    for (List<String> line : plan.lines()) {
      FORMAT.printRecord(writer, line.toArray());
    }
    writer.flush();
  }
}
