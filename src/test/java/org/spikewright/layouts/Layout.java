package org.spikewright.layouts;

import static org.spikewright.layouts.Truth.ADDED;
import static org.spikewright.layouts.Truth.ANALYTES;
import static org.spikewright.layouts.Truth.REPLICATES;
import static org.spikewright.layouts.Truth.SAMPLES;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/** A way in which the truth lies in files, and the mapping that says so. */
enum Layout {
  LONG(
      """
      [columns]
      sample = "Sample"
      analyte = "El"
      replicate = "Rep"
      signal = "Abs"
      addition_volume = { header = "Spike mL", unit = "mL" }
      """) {
    @Override
    List<List<Object>> rows(Truth truth) {
      List<List<Object>> rows = begun(List.of("Export of today"), List.of());
      rows.add(List.of("Sample", "El", "Spike mL", "Rep", "Abs"));
      truth
          .readings()
          .forEach(
              r -> rows.add(List.of(r.sample(), r.analyte(), r.added(), number(r), r.signal())));
      return rows;
    }
  },
  WIDE_BY_REPLICATE(
      """
      [table]
      units_row = true
      [layout]
      kind = "wide by replicate"
      pattern = 'Abs (?<replicate>\\d)'
      [columns]
      sample = "Sample"
      analyte = "El"
      addition_volume = "Spike"
      """) {
    @Override
    List<List<Object>> rows(Truth truth) {
      List<List<Object>> rows = begun(List.of("Sample", "El", "Spike", "Abs 1", "Abs 2", "Abs 3"));
      rows.add(List.of("", "", "(mL)", "AU", "AU", "AU"));
      for (String sample : SAMPLES) {
        for (String analyte : ANALYTES) {
          for (BigDecimal added : ADDED) {
            List<Object> row = new ArrayList<>(List.of(sample, analyte, added));
            truth.flask(sample, analyte, added).forEach(r -> row.add(r.signal()));
            rows.add(row);
          }
        }
      }
      return rows;
    }
  },
  WIDE_BY_ANALYTE(
      """
      [table]
      header_rows = 2
      footer = ""
      [layout]
      kind = "wide by analyte"
      pattern = '(?<analyte>[A-Z][a-z]) / signal'
      beside = { addition_volume = { header = "{analyte} / spike", unit = "mL" } }
      [columns]
      sample = "Sample"
      replicate = "Rep"
      """) {
    @Override
    List<List<Object>> rows(Truth truth) {
      List<List<Object>> rows = begun(List.of("Sample", "Rep", "Cd", "", "Pb", ""));
      rows.add(List.of("", "", "signal", "spike", "signal", "spike"));
      for (String sample : SAMPLES) {
        for (BigDecimal added : ADDED) {
          for (int n = 1; n <= REPLICATES; n++) {
            List<Object> row = new ArrayList<>(List.of(sample, BigDecimal.valueOf(n)));
            for (String analyte : ANALYTES) {
              row.add(truth.signal(sample, analyte, added, n));
              row.add(added);
            }
            rows.add(row);
          }
        }
      }
      rows.add(List.of());
      rows.add(List.of("end", "of", "export"));
      return rows;
    }
  },
  WIDE_BY_FLASK(
      """
      [layout]
      kind = "wide by flask"
      pattern = '\\+ (?<added>.+)'
      addition_volume = { group = "added", unit = "mL" }
      [columns]
      sample = "Sample"
      analyte = "El"
      replicate = "Rep"
      """) {
    @Override
    List<List<Object>> rows(Truth truth) {
      // Headers are text in every kind of file, their numbers whole.
      List<List<Object>> rows =
          begun(List.of("Sample", "El", "Rep", "+ 0 mL", "+ 500 µL", "+ 1250 µL", "+ 2 mL"));
      for (String sample : SAMPLES) {
        for (String analyte : ANALYTES) {
          for (int n = 1; n <= REPLICATES; n++) {
            List<Object> row = new ArrayList<>(List.of(sample, analyte, BigDecimal.valueOf(n)));
            for (BigDecimal added : ADDED) {
              row.add(truth.signal(sample, analyte, added, n));
            }
            rows.add(row);
          }
        }
      }
      return rows;
    }
  },
  BLOCKS(
      """
      [table]
      tables = "all"
      footer = "Mean*"
      carry_down = ["analyte", "addition_volume"]
      [block]
      pattern = 'Sample: (?<sample>.+)'
      [columns]
      analyte = "El"
      replicate = "Rep"
      signal = "Abs"
      addition_volume = { header = "Spike", unit = "mL" }
      """) {
    @Override
    List<List<Object>> rows(Truth truth) {
      List<List<Object>> rows = begun();
      for (String sample : SAMPLES) {
        rows.add(List.of("Sample:", sample));
        rows.add(List.of("El", "Spike", "Rep", "Abs"));
        for (String analyte : ANALYTES) {
          Object element = analyte;
          for (BigDecimal added : ADDED) {
            Object spike = added;
            for (Truth.Measured r : truth.flask(sample, analyte, added)) {
              rows.add(List.of(element, spike, number(r), r.signal()));
              element = "";
              spike = "";
            }
          }
        }
        rows.add(List.of("Mean of all", "", "", new BigDecimal("0.5")));
      }
      return rows;
    }
  },
  ONE_FILE_A_SAMPLE(
      """
      [file]
      pattern = 'one/(?<sample>[^/]+)\\.[a-z]+'
      [columns]
      analyte = "El"
      replicate = "Rep"
      signal = "Abs"
      addition_volume = { header = "Spike", unit = "mL" }
      """) {
    @Override
    List<List<Object>> rows(Truth truth) {
      throw new UnsupportedOperationException("several files");
    }

    @Override
    Map<String, Map<String, List<List<Object>>>> files(Truth truth) {
      Map<String, Map<String, List<List<Object>>>> files = new LinkedHashMap<>();
      for (String sample : SAMPLES) {
        List<List<Object>> rows = begun(List.of("El", "Spike", "Rep", "Abs"));
        truth.readings().stream()
            .filter(r -> r.sample().equals(sample))
            .forEach(r -> rows.add(List.of(r.analyte(), r.added(), number(r), r.signal())));
        files.put("one/" + sample, Map.of("S", rows));
      }
      return files;
    }
  },
  MEAN_AND_SD(
      """
      [columns]
      sample = "Sample"
      analyte = "El"
      signal = "Mean"
      signal_sd = "SD"
      readings = "n"
      addition_volume = { header = "Spike", unit = "mL" }
      """) {
    @Override
    List<List<Object>> rows(Truth truth) {
      List<List<Object>> rows = begun(List.of("Sample", "El", "Spike", "Mean", "SD", "n"));
      for (String sample : SAMPLES) {
        for (String analyte : ANALYTES) {
          for (BigDecimal added : ADDED) {
            double[] signals =
                truth.flask(sample, analyte, added).stream()
                    .mapToDouble(r -> r.signal().doubleValue())
                    .toArray();
            rows.add(
                List.of(
                    sample,
                    analyte,
                    added,
                    printed(mean(signals)),
                    printed(sd(signals)),
                    BigDecimal.valueOf(signals.length)));
          }
        }
      }
      return rows;
    }
  };

  /** Digits to which means and standard deviations are printed. */
  static final int DIGITS = 7;

  private final String mapping;

  Layout(String mapping) {
    this.mapping = mapping;
  }

  abstract List<List<Object>> rows(Truth truth);

  /** Sheets by file name without extension. */
  Map<String, Map<String, List<List<Object>>>> files(Truth truth) {
    return Map.of("all/run", Map.of("S", rows(truth)));
  }

  /** The mapping: separator and decimal mark are left open. */
  String mapping() {
    String encoding = "encoding = \"windows-1252\"\n";
    String table =
        mapping.contains("[table]\n")
            ? mapping.replace("[table]\n", "[table]\n" + encoding)
            : "[table]\n" + encoding + mapping;
    return "name = \"matrix\"\nfiles = \"**\"\n"
        + table
        + """
        [fixed]
        batch = "B1"
        design = "made up"
        aliquot_volume = "10 mL"
        final_volume = "50 mL"
        stock = "10 mg/L"
        [result]
        unit = "mg/L"
        """;
  }

  static double mean(double[] values) {
    double sum = 0;
    for (double value : values) {
      sum += value;
    }
    return sum / values.length;
  }

  static double sd(double[] values) {
    double squares = 0;
    for (double value : values) {
      squares += Math.pow(value - mean(values), 2);
    }
    return Math.sqrt(squares / (values.length - 1));
  }

  private static BigDecimal printed(double value) {
    return BigDecimal.valueOf(value).round(new MathContext(DIGITS));
  }

  private static BigDecimal number(Truth.Measured reading) {
    return BigDecimal.valueOf(reading.replicate());
  }

  @SafeVarargs
  @SuppressWarnings("varargs")
  private static List<List<Object>> begun(List<Object>... first) {
    return new ArrayList<>(List.of(first));
  }
}
