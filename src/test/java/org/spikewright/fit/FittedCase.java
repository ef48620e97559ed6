package org.spikewright.fit;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import java.util.stream.IntStream;
import org.apache.commons.csv.CSVRecord;
import org.spikewright.reference.ReferenceTable;

/** A case of the reference set with every quantity that the fit gives for it, by its short name. */
record FittedCase(String id, StraightLine line, Map<String, Double> quantities) {

  private static final List<CSVRecord> POINTS = ReferenceTable.rows("points.csv");

  static List<String> ids() {
    return POINTS.stream().map(row -> row.get("case")).distinct().toList();
  }

  static FittedCase of(String id) {
    FittedCase fitted = of(id, POINTS.stream().filter(row -> row.get("case").equals(id)).toList());
    if (id.equals("LA06")) {
      addKnownUncertainty(fitted.quantities, fitted.line);
    }
    return fitted;
  }

  /** Fits rows with the columns x and y. */
  static FittedCase of(String id, List<CSVRecord> rows) {
    double[] x = rows.stream().mapToDouble(row -> ReferenceTable.number(row, "x")).toArray();
    double[] y = rows.stream().mapToDouble(row -> ReferenceTable.number(row, "y")).toArray();
    StraightLine line = (StraightLine) StraightLine.fit(x, y);
    Map<String, Double> all = new TreeMap<>();
    addLine(all, line);
    addNative(all, NativeEstimate.of(line).orElseThrow());
    addCurve(all, line);
    addOdd(all, line);
    return new FittedCase(id, line, all);
  }

  double get(String quantity) {
    Double value = quantities.get(quantity);
    if (value == null) {
      throw new IllegalArgumentException(id + " has no quantity " + quantity);
    }
    return value;
  }

  private static void addLine(Map<String, Double> all, StraightLine line) {
    all.put("n", (double) line.n());
    all.put("xbar", line.xMean());
    all.put("ybar", line.yMean());
    all.put("Sxx", line.sxx());
    all.put("SST", line.syy());
    all.put("SSE", line.residualSumOfSquares());
    all.put("a", line.signalIntercept());
    all.put("b", line.slope());
    all.put("s", line.residualSd().orElseThrow());
    all.put("se_a", line.interceptStandardError().orElseThrow());
    all.put("se_b", line.slopeStandardError().orElseThrow());
    all.put("cov_ab", line.covariance().orElseThrow());
    double r = line.correlation().orElseThrow();
    all.put("r", r);
    all.put("R2", r * r);
    all.put(
        "leverage_max", IntStream.range(0, line.n()).mapToDouble(line::leverage).max().orElse(0));
  }

  private static void addNative(Map<String, Double> all, NativeEstimate estimate) {
    double x0 = estimate.value();
    double reach = estimate.t().orElseThrow() * estimate.standardError().orElseThrow();
    all.put("x0", x0);
    all.put("se_x0", estimate.standardError().orElseThrow());
    all.put("t95", estimate.t().orElseThrow());
    all.put("ci_lo_x0", x0 - reach);
    all.put("ci_hi_x0", x0 + reach);
    all.put("g_fieller", estimate.g().orElseThrow());
    if (estimate.isBounded()) {
      all.put("fi_lo_x0", estimate.lower95().orElseThrow());
      all.put("fi_hi_x0", estimate.upper95().orElseThrow());
    } else {
      all.put("fieller_bounded", 0.0);
    }
  }

  private static void addCurve(Map<String, Double> all, StraightLine line) {
    QuadraticFit.of(line)
        .filter(curve -> curve.residualDf() > 0)
        .ifPresent(
            curve -> {
              all.put("q_a", curve.c0());
              all.put("q_b", curve.c1());
              all.put("q_c", curve.c2());
              all.put("q_SSE", curve.residualSumOfSquares());
              all.put("q_s", Math.sqrt(curve.residualSumOfSquares() / curve.residualDf()));
              all.put("q_se_a", curve.c0StandardError().orElseThrow());
              all.put("q_se_b", curve.c1StandardError().orElseThrow());
              all.put("q_se_c", curve.c2StandardError().orElseThrow());
            });
    BendTest.of(line)
        .ifPresent(
            test -> {
              all.put("quad_t", test.t());
              all.put("mandel_F", test.t() * test.t());
              all.put("mandel_p", test.pTwoSided());
            });
  }

  private static void addOdd(Map<String, Double> all, StraightLine line) {
    double largest = 0;
    for (int i = 0; i < line.n(); i++) {
      Optional<DeletedResidual> odd = DeletedResidual.of(line, i, 0);
      if (odd.isPresent()) {
        all.put("rstudent" + (i + 1), odd.get().t());
      }
      if (odd.isPresent() && Math.abs(odd.get().t()) > largest) {
        largest = Math.abs(odd.get().t());
        all.put("del_point", i + 1.0);
        all.put("del_t_max", largest);
      }
    }
    // A scatter of rounding only: the reference engine divides by 0.
    if (largest > 1e9) {
      all.remove("del_t_max");
      all.put("del_infinite", 1.0);
    }
  }

  /** ISO/TS 28037: every signal has the standard uncertainty 0.5, known. */
  private static void addKnownUncertainty(Map<String, Double> all, StraightLine line) {
    double u = 0.5;
    double seB = u / Math.sqrt(line.sxx());
    all.put("chi2", line.residualSumOfSquares() / (u * u));
    all.put("known_se_b", seB);
    all.put("known_se_a", u * Math.sqrt(1.0 / line.n() + line.xMean() * line.xMean() / line.sxx()));
    all.put("known_cov_ab", -line.xMean() * seB * seB);
  }
}
