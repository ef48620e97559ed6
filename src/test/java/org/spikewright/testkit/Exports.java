package org.spikewright.testkit;

import java.time.LocalDate;
import java.time.LocalDateTime;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Random;
import org.spikewright.quantity.Numbers;

/** Exports of an imaginary instrument, as the mappings of {@link Laboratory} expect them. */
public final class Exports {
  /** The header of exports that {@link Laboratory#BENCH} reads. */
  public static final String HEADER = "sample,analyte,added,signal,time";

  /** A lab day that closed long ago. */
  public static final LocalDate DAY = LocalDate.of(2026, 3, 4);

  private Exports() {}

  /** Rows of a series of four flasks, two readings each; the same for the same sample. */
  public static List<String> rows(String sample, double concentration) {
    Random random = new Random(sample.hashCode());
    LocalDateTime time = DAY.atTime(9, 0).plusSeconds(60L * (sample.hashCode() & 0xff));
    List<String> rows = new ArrayList<>();
    for (int flask = 0; flask < 4; flask++) {
      double added = 5.0 * flask;
      for (int reading = 0; reading < 2; reading++) {
        double noise = 1 + 0.004 * random.nextGaussian();
        double signal = 0.02 * (concentration + added) * noise;
        rows.add(
            String.format(
                Locale.ROOT, "%s,Cd,%s,%.5f,%s", sample, Numbers.plain(added), signal, time));
        time = time.plusSeconds(61);
      }
    }
    return rows;
  }

  /** A whole export of these samples. */
  public static String of(String... samples) {
    List<String> rows = new ArrayList<>();
    for (String sample : samples) {
      rows.addAll(rows(sample, 4 + (sample.hashCode() & 7)));
    }
    return text(rows);
  }

  /** A whole export of these rows. */
  public static String text(List<String> rows) {
    return HEADER + "\n" + String.join("\n", rows) + "\n";
  }

  /** An export of so many series. */
  public static String large(String stem, int series) {
    List<String> rows = new ArrayList<>();
    for (int i = 0; i < series; i++) {
      rows.addAll(rows(stem + i, 4 + i % 7));
    }
    return text(rows);
  }
}
