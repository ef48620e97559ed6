package org.spikewright.decode;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.BufferedWriter;
import java.io.IOException;
import java.io.OutputStream;
import java.io.Reader;
import java.lang.management.ManagementFactory;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.Random;
import org.apache.commons.csv.CSVFormat;
import org.apache.commons.csv.CSVParser;
import org.apache.commons.csv.CSVRecord;
import org.apache.poi.ss.usermodel.Sheet;
import org.apache.poi.xssf.streaming.SXSSFWorkbook;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.table.DecodeFault;
import org.spikewright.table.Row;
import org.spikewright.table.TableShape;
import org.spikewright.testkit.Program;

/**
 * Decodes a large text file beside a plain walk of the CSV library over its records, in the same
 * run. Both look at each cell once. Run by itself with {@code -Psimulation}; prints what it
 * measures.
 */
@Tag("simulation")
class DecodeSpeedTest {
  private static final int ROWS = 500_000;
  private static final int ROUNDS = 7;
  private static final double MOST = 1.3;

  @TempDir Path folder;

  @Test
  void decoding_takes_little_longer_than_the_records_themselves() throws IOException {
    Path file = file();
    double ours = Double.POSITIVE_INFINITY;
    double plain = Double.POSITIVE_INFINITY;
    for (int round = 0; round < ROUNDS; round++) {
      long start = processor();
      long decoded = decoded(file);
      long middle = processor();
      long walked = walked(file);
      long end = processor();
      assertThat(decoded).isEqualTo(walked);
      ours = Math.min(ours, (middle - start) / 1e9);
      plain = Math.min(plain, (end - middle) / 1e9);
    }
    System.out.printf(
        Locale.ROOT,
        "%d rows, %.1f MB: decoded in %.2f s, records alone %.2f s, ratio %.2f%n",
        ROWS,
        Files.size(file) / 1e6,
        ours,
        plain,
        ours / plain);
    assertThat(ours / plain).isLessThanOrEqualTo(MOST);
  }

  /** The heap holds neither the sheet nor a list of its rows. */
  @Test
  void a_large_sheet_is_read_in_a_small_heap() throws IOException {
    Path file = folder.resolve("large.xlsx");
    try (SXSSFWorkbook book = new SXSSFWorkbook(100);
        OutputStream out = Files.newOutputStream(file)) {
      Sheet sheet = book.createSheet("S");
      for (int r = 0; r < ROWS; r++) {
        org.apache.poi.ss.usermodel.Row row = sheet.createRow(r);
        row.createCell(0).setCellValue("S" + r / 15);
        for (int c = 1; c < 8; c++) {
          row.createCell(c).setCellValue(r + c / 7.0);
        }
      }
      book.write(out);
    }
    try (Program program =
        Program.start(List.of("-Xmx256m"), LargeSheet.class.getName(), Map.of(), file.toString())) {
      assertThat(program.ended(Duration.ofMinutes(10)).out())
          .isEqualTo(ROWS + " rows, " + 8 * ROWS + " cells" + System.lineSeparator());
    }
  }

  private Path file() throws IOException {
    Random random = new Random(17);
    Path file = folder.resolve("large.csv");
    try (BufferedWriter out = Files.newBufferedWriter(file, StandardCharsets.UTF_8)) {
      out.write("sample,analyte,added_mL,final_mL,replicate,signal,measured_at,note\n");
      for (int i = 0; i < ROWS; i++) {
        out.write(
            String.format(
                Locale.ROOT,
                "S%06d,A%02d,%d,50,%d,%.5f,2025-01-15T18:%02d:%02d,%s%n",
                i / 15,
                i % 7,
                i % 5,
                i % 3,
                random.nextDouble(),
                i / 60 % 60,
                i % 60,
                i % 50 == 0 ? "\"late, µ\"" : ""));
      }
    }
    return file;
  }

  private static long decoded(Path file) {
    long[] chars = new long[1];
    Optional<DecodeFault> fault =
        FileDecoder.read(
            file,
            "large.csv",
            TableShape.plain(),
            row -> {
              chars[0] += chars(row);
              return true;
            });
    assertThat(fault).isEmpty();
    return chars[0];
  }

  private static long chars(Row row) {
    long chars = 0;
    for (int i = 0; i < row.cells().size(); i++) {
      chars += row.cell(i).shown().length();
    }
    return chars;
  }

  private static long walked(Path file) throws IOException {
    long chars = 0;
    CSVFormat format = CSVFormat.DEFAULT.builder().setIgnoreEmptyLines(false).get();
    try (Reader in = Files.newBufferedReader(file, StandardCharsets.UTF_8);
        CSVParser parser = CSVParser.builder().setReader(in).setFormat(format).get()) {
      for (CSVRecord csv : parser) {
        for (int i = 0; i < csv.size(); i++) {
          chars += csv.get(i).length();
        }
      }
    }
    return chars;
  }

  /** Processor time of this thread: others share the machine. */
  private static long processor() {
    return ManagementFactory.getThreadMXBean().getCurrentThreadCpuTime();
  }
}
