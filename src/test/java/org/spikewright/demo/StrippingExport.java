package org.spikewright.demo;

import java.io.ByteArrayOutputStream;
import java.nio.charset.StandardCharsets;
import java.time.format.DateTimeFormatter;
import java.util.Locale;

/** The stripping voltammeter's export: tabs, UTF-16LE with its byte-order mark, CRLF. */
final class StrippingExport {
  static final String HEADER =
      "Sample\tMetal\tStep\tAdded so far (µL)\tScan\tPeak (nA)\tRead at\tRemark";

  private static final DateTimeFormatter TIME =
      DateTimeFormatter.ofPattern("yyyy-MM-dd HH:mm:ss", Locale.ROOT);

  private StrippingExport() {}

  /** The whole export. */
  static byte[] bytes(DemoNight.Export export) {
    StringBuilder text = new StringBuilder(HEADER).append("\r\n");
    for (ReadingRow row : export.readings()) {
      text.append(
              String.join(
                  "\t",
                  row.plan().sample(),
                  row.plan().recipe().analyte(),
                  Integer.toString(row.flask()),
                  Integer.toString(row.additionMicrolitres()),
                  Integer.toString(row.replicate()),
                  row.signal(),
                  TIME.format(row.at()),
                  row.plan().site().replace('"', '\'')))
          .append("\r\n");
    }
    ByteArrayOutputStream bytes = new ByteArrayOutputStream();
    bytes.write(0xFF);
    bytes.write(0xFE);
    bytes.writeBytes(text.toString().getBytes(StandardCharsets.UTF_16LE));
    return bytes.toByteArray();
  }
}
