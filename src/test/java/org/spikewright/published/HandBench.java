package org.spikewright.published;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;

/** Mappings and exports of a bench whose additions stand at 0, 1, 2 … mg/L, to check by hand. */
final class HandBench {
  private HandBench() {}

  /** Two-sided 95 % quantiles of Student's t, from any table, to more digits. */
  static final double T2 = 4.302652729749464;

  static final double T3 = 3.182446305283710;

  static final double[] SCATTERED = {0.503, 0.748, 1.006, 1.249};

  static String madeUp(String fixed, String more) {
    return """
        name  = "bench"
        files = "*.csv"
        [columns]
        sample          = "sample"
        signal          = "signal"
        addition_volume = { header = "added", unit = "mL" }
        [fixed]
        analyte        = "Cd"
        design         = "made up"
        final_volume   = "50 mL"
        stock          = "10 mg/L"
        %s
        %s
        """
        .formatted(fixed, more);
  }

  static final String PLAIN = madeUp("aliquot_volume = \"10 mL\"", "[result]\nunit = \"mg/L\"");

  static String withMethod(String method) {
    return PLAIN + "\n[method]\n" + method;
  }

  static PublishedCase read(Path folder, String mapping, String... lines) throws IOException {
    Path file = Files.write(folder.resolve("run.csv"), List.of(lines));
    return PublishedCase.read(mapping, file, "run.csv");
  }

  /** Flasks with 0, 1, 2 … mL, which with 10 mL of 10 mg/L stand at 0, 1, 2 … mg/L. */
  static String[] series(double... signals) {
    String[] lines = new String[signals.length + 1];
    lines[0] = "sample,added,signal";
    for (int i = 0; i < signals.length; i++) {
      lines[i + 1] = "BW-1," + i + "," + signals[i];
    }
    return lines;
  }

  static double[] steps(int n, double step) {
    double[] x = new double[n];
    for (int i = 0; i < n; i++) {
      x[i] = i * step;
    }
    return x;
  }
}
