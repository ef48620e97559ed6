package org.spikewright.demo;

import java.math.BigDecimal;
import java.nio.charset.Charset;
import java.time.LocalDateTime;
import java.time.format.DateTimeFormatter;
import java.util.List;
import java.util.Locale;

/**
 * The furnace's export: semicolons, decimal commas, Windows-1252, CRLF, six lines of run
 * information above the header, calibration and rinse rows among the samples.
 */
final class FurnaceExport {
  static final Charset ENCODING = Charset.forName("windows-1252");
  static final String HEADER =
      "Sample label;Element;Position;Rep;Type;Aliquot (mL);Spike (µL);Peak area (s);Time;Batch;Comment";

  private static final DateTimeFormatter TIME =
      DateTimeFormatter.ofPattern("dd.MM.yyyy HH:mm:ss", Locale.ROOT);

  /** Microlitres of stock in a millilitre of each calibration solution. */
  private static final int[] STANDARDS = {0, 1, 2, 4};

  private static final double CHECK_AREA = 0.23;
  private static final double CHECK_SD = 0.01;

  private final DemoNight.Export export;
  private final String batch;
  private final StringBuilder text = new StringBuilder();

  private FurnaceExport(DemoNight.Export export, String batch) {
    this.export = export;
    this.batch = batch;
  }

  /** The whole export. */
  static byte[] bytes(DemoNight.Export export, String batch) {
    FurnaceExport furnace = new FurnaceExport(export, batch);
    furnace.write();
    return furnace.text.toString().getBytes(ENCODING);
  }

  /** The export as a full disk left it: its last row ends inside a quoted comment. */
  static byte[] cut(DemoNight.Export export, String batch) {
    String whole = new String(bytes(export, batch), ENCODING);
    int quote = whole.indexOf('"', whole.length() * 3 / 4);
    return whole.substring(0, quote + 7).getBytes(ENCODING);
  }

  private void write() {
    String element = export.plans().get(0).recipe().analyte();
    line("Run;" + export.name());
    line("Laboratory;Brackwater Trace Laboratory");
    line("Started;" + TIME.format(export.start()));
    line("Programme;" + element + " in estuary water, standard additions");
    line("Analyst;Q.X.");
    line("Room;21,4 °C ± 0,5 °C");
    line(HEADER);
    calibration(element);
    List<ReadingRow> readings = export.readings();
    check(element, readings.get(0).at().minusSeconds(60));
    for (int i = 0; i < readings.size(); i++) {
      if (i > 0 && readings.get(i).plan() != readings.get(i - 1).plan()) {
        rinse(element, readings.get(i).at().minusSeconds(70));
      }
      reading(readings.get(i));
    }
    check(element, readings.get(readings.size() - 1).at().plusSeconds(130));
  }

  private void reading(ReadingRow row) {
    line(
        String.join(
            ";",
            row.plan().sample(),
            row.plan().recipe().analyte(),
            Integer.toString(row.flask()),
            Integer.toString(row.replicate()),
            row.plan().scenario().type(),
            number(row.plan().aliquotMillilitres()),
            Integer.toString(row.additionMicrolitres()),
            comma(row.signal()),
            TIME.format(row.at()),
            batch,
            quoted(row.plan().site())));
  }

  private void calibration(String element) {
    LocalDateTime at = export.start().minusSeconds(600);
    Recipe recipe = export.plans().get(0).recipe();
    for (int standard : STANDARDS) {
      double concentration = standard * recipe.stockMilligramsPerLitre();
      double area = 0.0008 + recipe.sensitivity() * concentration;
      String type = standard == 0 ? "Calibration zero" : "Calibration";
      String said = String.format(Locale.ROOT, "%.4f", area);
      notSample("Cal " + number(concentration), element, type, said, at);
      at = at.plusSeconds(150);
    }
  }

  /** The drift check: one solution, read before the samples and after them. */
  private void check(String element, LocalDateTime at) {
    if (!export.checked()) {
      return;
    }
    double drawn = Measurement.random("check " + element + " " + at).nextGaussian();
    double area = CHECK_AREA * (1 + CHECK_SD * drawn);
    String label = "CHK-" + element.toUpperCase(Locale.ROOT);
    notSample(label, element, "Check", String.format(Locale.ROOT, "%.4f", area), at);
  }

  private void rinse(String element, LocalDateTime at) {
    notSample("Rinse", element, "Rinse", "0.0006", at);
  }

  private void notSample(String label, String element, String type, String area, LocalDateTime at) {
    line(
        String.join(
            ";", label, element, "0", "1", type, "", "", comma(area), TIME.format(at), batch, ""));
  }

  private void line(String line) {
    text.append(line).append("\r\n");
  }

  private static String comma(String number) {
    return number.replace('.', ',');
  }

  private static String number(double value) {
    return comma(BigDecimal.valueOf(value).stripTrailingZeros().toPlainString());
  }

  private static String quoted(String site) {
    return '"' + site.replace("\"", "\"\"") + '"';
  }
}
