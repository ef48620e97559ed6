package org.spikewright.layouts;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.util.ArrayList;
import java.util.List;
import java.util.Random;

/** What was measured: every reading of a few series, in decimals. */
record Truth(List<Measured> readings) {
  static final List<String> SAMPLES = List.of("W-1", "W-2 ä", "K 3");
  static final List<String> ANALYTES = List.of("Cd", "Pb");
  static final List<BigDecimal> ADDED =
      List.of(BigDecimal.ZERO, new BigDecimal("0.5"), new BigDecimal("1.25"), new BigDecimal("2"));
  static final int REPLICATES = 3;

  /** One reading. */
  record Measured(
      String sample, String analyte, BigDecimal added, int replicate, BigDecimal signal) {}

  static Truth of(long seed) {
    Random random = new Random(seed);
    List<Measured> readings = new ArrayList<>();
    for (String sample : SAMPLES) {
      for (String analyte : ANALYTES) {
        double unspiked = 0.2 + random.nextDouble();
        for (BigDecimal added : ADDED) {
          for (int replicate = 1; replicate <= REPLICATES; replicate++) {
            double signal = unspiked + 0.3 * added.doubleValue() + 0.01 * random.nextGaussian();
            readings.add(
                new Measured(
                    sample,
                    analyte,
                    added,
                    replicate,
                    BigDecimal.valueOf(signal).setScale(4, RoundingMode.HALF_EVEN)));
          }
        }
      }
    }
    return new Truth(readings);
  }

  /** The readings of one flask. */
  List<Measured> flask(String sample, String analyte, BigDecimal added) {
    return readings.stream()
        .filter(r -> r.sample().equals(sample) && r.analyte().equals(analyte))
        .filter(r -> r.added().equals(added))
        .toList();
  }

  BigDecimal signal(String sample, String analyte, BigDecimal added, int replicate) {
    return flask(sample, analyte, added).get(replicate - 1).signal();
  }
}
