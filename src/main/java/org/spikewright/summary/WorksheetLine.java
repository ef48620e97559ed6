package org.spikewright.summary;

import java.util.List;
import org.spikewright.series.ToResult;

/**
 * A series computed a second time, by the formulas that stand on the Series sheet and from the
 * numbers shown there; what the live cells hold until the sheet is computed anew. It is written
 * apart from the fit on purpose: the check cells compare two computations.
 *
 * @param n flasks used
 * @param weight the sum of their weights; n where they weigh the same
 * @param xMean weighted mean of the additions
 * @param yMean weighted mean of the signals
 * @param sxx weighted sum of squares of the additions about their mean
 * @param slope as SLOPE gives it where the flasks weigh the same
 * @param signalIntercept as INTERCEPT gives it likewise
 * @param residualSd NaN with two flasks
 * @param topX largest addition used
 * @param topSignal largest signal used, without its sign
 */
record WorksheetLine(
    int n,
    double weight,
    double xMean,
    double yMean,
    double sxx,
    double slope,
    double signalIntercept,
    double residualSd,
    double topX,
    double topSignal) {

  /**
   * What a standard deviation of a flask makes of the line, on the sample's scale; NaN where the
   * standard deviation is none.
   *
   * @param standardError of the result
   * @param g Fieller's
   * @param lower95 lower end of Fieller's interval; NaN when there is none
   * @param upper95 upper end likewise
   */
  record Spread(double standardError, double g, double lower95, double upper95) {}

  /**
   * Computes.
   *
   * @param flasks of which at least two distinct additions were used
   */
  static WorksheetLine of(List<FlaskLine> flasks) {
    List<FlaskLine> used = flasks.stream().filter(FlaskLine::used).toList();
    double[] x = used.stream().mapToDouble(line -> line.x().getAsDouble()).toArray();
    double[] y = used.stream().mapToDouble(line -> line.signal().getAsDouble()).toArray();
    double[] w = used.stream().mapToDouble(line -> line.weight().orElse(1)).toArray();
    int n = x.length;
    double weight = 0;
    for (double one : w) {
      weight += one;
    }
    double xMean = sum(w, x) / weight;
    double yMean = sum(w, y) / weight;
    double sxx = products(w, x, xMean, x, xMean);
    double slope = products(w, x, xMean, y, yMean) / sxx;
    double intercept = yMean - slope * xMean;
    return new WorksheetLine(
        n,
        weight,
        xMean,
        yMean,
        sxx,
        slope,
        intercept,
        n > 2 ? residualSd(w, x, y, intercept, slope) : Double.NaN,
        largest(x),
        largest(y));
  }

  /** Where the line meets zero, as a positive number on the axis. */
  double concentration() {
    return signalIntercept / slope;
  }

  /**
   * Fieller's interval and the standard error.
   *
   * @param sd standard deviation of a flask of weight 1
   * @param t quantile of Student's t
   */
  Spread spread(double sd, double t, ToResult scale) {
    double factor = scale.dilution() * scale.perSample() * scale.unitFactor();
    double centre = yMean / slope;
    double ratio = t * sd / slope;
    double g = ratio * ratio / sxx;
    double half = Math.abs(ratio) * Math.sqrt((1 - g) / weight + centre * centre / sxx);
    double sign = g < 1 ? 1 : Double.NaN;
    return new Spread(
        sd / Math.abs(slope) * Math.sqrt(1.0 / weight + centre * centre / sxx) * factor,
        g,
        sign * scale.value((centre - half) / (1 - g) - xMean),
        sign * scale.value((centre + half) / (1 - g) - xMean));
  }

  private static double residualSd(
      double[] w, double[] x, double[] y, double intercept, double slope) {
    double squares = 0;
    for (int i = 0; i < x.length; i++) {
      double e = y[i] - intercept - slope * x[i];
      squares += w[i] * e * e;
    }
    return Math.sqrt(squares / (x.length - 2));
  }

  private static double sum(double[] w, double[] values) {
    double sum = 0;
    for (int i = 0; i < w.length; i++) {
      sum += w[i] * values[i];
    }
    return sum;
  }

  private static double products(double[] w, double[] a, double aMean, double[] b, double bMean) {
    double sum = 0;
    for (int i = 0; i < a.length; i++) {
      sum += w[i] * (a[i] - aMean) * (b[i] - bMean);
    }
    return sum;
  }

  private static double largest(double[] values) {
    double largest = 0;
    for (double value : values) {
      largest = Math.max(largest, Math.abs(value));
    }
    return largest;
  }
}
