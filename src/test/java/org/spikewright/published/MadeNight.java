package org.spikewright.published;

import java.io.IOException;
import java.io.OutputStream;
import java.nio.charset.Charset;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.LocalDateTime;
import java.time.format.DateTimeFormatter;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Random;
import org.apache.poi.ss.usermodel.CellStyle;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.ss.usermodel.Sheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;

/**
 * Some series whose truth is known, and the same readings as three instruments would export them.
 */
final class MadeNight {
  static final double ALIQUOT = 10;
  static final double STOCK = 10;
  static final double FINAL = 50;

  private static final List<String> HEADER =
      List.of("sample", "flask", "replicate", "added_mL", "signal", "measured_at", "batch");
  private static final LocalDateTime START = LocalDateTime.of(2026, 3, 4, 18, 0);

  /** One reading: the number of its sample, flask and replicate, and the signal's digits. */
  private record Taken(int sample, int flask, int replicate, String signal, LocalDateTime at) {
    List<String> cells(String prefix, DateTimeFormatter time) {
      return List.of(
          prefix + sample,
          Integer.toString(flask),
          Integer.toString(replicate),
          Integer.toString(flask),
          signal,
          time.format(at),
          "N1");
    }
  }

  private final List<Taken> readings = new ArrayList<>();
  private final double[] truth;

  /** So many samples at five additions of 0 to 4 mL, two readings each, of 1 % noise. */
  MadeNight(int samples, long seed) {
    Random random = new Random(seed);
    truth = new double[samples];
    LocalDateTime at = START;
    for (int sample = 0; sample < samples; sample++) {
      truth[sample] = 1 + 2 * random.nextDouble();
      double sensitivity = 0.5 + random.nextDouble();
      for (int flask = 0; flask < 5; flask++) {
        double inFlask = (truth[sample] * ALIQUOT + STOCK * flask) / FINAL;
        double prepared = sensitivity * inFlask * (1 + 0.01 * random.nextGaussian());
        for (int replicate = 1; replicate <= 2; replicate++) {
          double read = prepared * (1 + 0.003 * random.nextGaussian());
          String digits = String.format(Locale.ROOT, "%.5f", read);
          readings.add(new Taken(sample, flask, replicate, digits, at));
          at = at.plusSeconds(40);
        }
      }
    }
  }

  /** What a sample holds, in mg/L. */
  double truth(int sample) {
    return truth[sample];
  }

  Path plain(Path file) throws IOException {
    DateTimeFormatter time = DateTimeFormatter.ofPattern("yyyy-MM-dd HH:mm:ss", Locale.ROOT);
    return write(file, ",", "\n", StandardCharsets.UTF_8, cells("S-", time));
  }

  Path european(Path file) throws IOException {
    DateTimeFormatter time = DateTimeFormatter.ofPattern("dd.MM.yyyy HH:mm:ss", Locale.ROOT);
    List<List<String>> rows = new ArrayList<>();
    for (List<String> cells : cells("Fluß-Mü-", time)) {
      List<String> row = new ArrayList<>(cells);
      row.set(4, row.get(4).replace('.', ','));
      rows.add(row);
    }
    return write(file, ";", "\r\n", Charset.forName("windows-1252"), rows);
  }

  Path spreadsheet(Path file) throws IOException {
    try (XSSFWorkbook book = new XSSFWorkbook();
        OutputStream out = Files.newOutputStream(file)) {
      CellStyle date = book.createCellStyle();
      date.setDataFormat(book.createDataFormat().getFormat("yyyy-mm-dd hh:mm:ss"));
      Sheet sheet = book.createSheet("night");
      Row header = sheet.createRow(0);
      for (int i = 0; i < HEADER.size(); i++) {
        header.createCell(i).setCellValue(HEADER.get(i));
      }
      for (Taken taken : readings) {
        Row row = sheet.createRow(sheet.getLastRowNum() + 1);
        row.createCell(0).setCellValue("S-" + taken.sample());
        row.createCell(1).setCellValue(taken.flask());
        row.createCell(2).setCellValue(taken.replicate());
        row.createCell(3).setCellValue(taken.flask());
        row.createCell(4).setCellValue(Double.parseDouble(taken.signal()));
        row.createCell(5).setCellValue(taken.at());
        row.getCell(5).setCellStyle(date);
        row.createCell(6).setCellValue("N1");
      }
      book.write(out);
    }
    return file;
  }

  private List<List<String>> cells(String prefix, DateTimeFormatter time) {
    return readings.stream().map(taken -> taken.cells(prefix, time)).toList();
  }

  private static Path write(
      Path file, String separator, String end, Charset charset, List<List<String>> rows)
      throws IOException {
    StringBuilder text = new StringBuilder(String.join(separator, HEADER)).append(end);
    rows.forEach(row -> text.append(String.join(separator, row)).append(end));
    return Files.writeString(file, text, charset);
  }
}
