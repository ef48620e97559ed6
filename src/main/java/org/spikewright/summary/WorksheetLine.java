package org.spikewright.summary;

import java.util.List;
import java.util.OptionalDouble;
import org.spikewright.series.ToResult;

/**
 * A series computed a second time, by the formulas that stand on the Series sheet and from the
 * numbers shown there; what the live cells hold until the sheet is computed anew. It is written
 * apart from the fit on purpose: the check cells compare two computations.
 *
 * @param n flasks used
 * @param slope as SLOPE gives it
 * @param signalIntercept as INTERCEPT gives it
 * @param residualSd NaN with two flasks
 * @param concentration on the axis
 * @param result on the sample's scale
 * @param standardError on the sample's scale; NaN with two flasks
 * @param g Fieller's; NaN with two flasks
 * @param lower95 on the sample's scale; NaN when there is none
 * @param upper95 likewise
 * @param topX largest addition used
 * @param topSignal largest signal used, without its sign
 */
record WorksheetLine(
    int n,
    double slope,
    double signalIntercept,
    double residualSd,
    double concentration,
    double result,
    double standardError,
    double g,
    double lower95,
    double upper95,
    double topX,
    double topSignal) {

  /**
   * Computes.
   *
   * @param flasks of which at least two distinct additions were used
   * @param t two-sided 95 % quantile of Student's t; empty with two flasks
   */
  static WorksheetLine of(List<FlaskLine> flasks, ToResult scale, OptionalDouble t) {
    List<FlaskLine> used = flasks.stream().filter(FlaskLine::used).toList();
    double[] x = used.stream().mapToDouble(line -> line.x().getAsDouble()).toArray();
    double[] y = used.stream().mapToDouble(line -> line.signal().getAsDouble()).toArray();
    int n = x.length;
    double xBar = average(x);
    double yBar = average(y);
    double devsq = products(x, xBar, x, xBar);
    double slope = products(x, xBar, y, yBar) / devsq;
    double intercept = yBar - slope * xBar;
    double sd = n > 2 ? residualSd(x, y, intercept, slope) : Double.NaN;
    double factor = scale.dilution() * scale.perSample() * scale.unitFactor();
    double centre = yBar / slope;
    double ratio = t.orElse(Double.NaN) * sd / slope;
    double g = ratio * ratio / devsq;
    double half = Math.abs(ratio) * Math.sqrt((1 - g) / n + centre * centre / devsq);
    double sign = g < 1 ? 1 : Double.NaN;
    double concentration = intercept / slope;
    return new WorksheetLine(
        n,
        slope,
        intercept,
        sd,
        concentration,
        scale.value(concentration),
        sd / Math.abs(slope) * Math.sqrt(1.0 / n + centre * centre / devsq) * factor,
        g,
        sign * scale.value((centre - half) / (1 - g) - xBar),
        sign * scale.value((centre + half) / (1 - g) - xBar),
        largest(x),
        largest(y));
  }

  private static double residualSd(double[] x, double[] y, double intercept, double slope) {
    double squares = 0;
    for (int i = 0; i < x.length; i++) {
      double e = y[i] - intercept - slope * x[i];
      squares += e * e;
    }
    return Math.sqrt(squares / (x.length - 2));
  }

  private static double average(double[] values) {
    double sum = 0;
    for (double value : values) {
      sum += value;
    }
    return sum / values.length;
  }

  private static double products(double[] a, double aBar, double[] b, double bBar) {
    double sum = 0;
    for (int i = 0; i < a.length; i++) {
      sum += (a[i] - aBar) * (b[i] - bBar);
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
