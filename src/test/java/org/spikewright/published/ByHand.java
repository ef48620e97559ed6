package org.spikewright.published;

/**
 * A line through points by the formulas of a textbook, as a person would check a result: sums, no
 * library, nothing of the program.
 *
 * @param n points
 * @param slope signal per axis unit
 * @param intercept signal
 * @param sd residual standard deviation
 * @param xMean mean addition
 * @param yMean mean signal
 * @param sxx sum of squared deviations of x
 */
record ByHand(
    int n, double slope, double intercept, double sd, double xMean, double yMean, double sxx) {

  static ByHand line(double[] x, double[] y) {
    int n = x.length;
    double xMean = 0;
    double yMean = 0;
    for (int i = 0; i < n; i++) {
      xMean += x[i] / n;
      yMean += y[i] / n;
    }
    double sxx = 0;
    double sxy = 0;
    for (int i = 0; i < n; i++) {
      sxx += (x[i] - xMean) * (x[i] - xMean);
      sxy += (x[i] - xMean) * (y[i] - yMean);
    }
    double slope = sxy / sxx;
    double intercept = yMean - slope * xMean;
    double squares = 0;
    for (int i = 0; i < n; i++) {
      double residual = y[i] - intercept - slope * x[i];
      squares += residual * residual;
    }
    return new ByHand(n, slope, intercept, Math.sqrt(squares / (n - 2)), xMean, yMean, sxx);
  }

  /** Where the line meets zero signal, as a positive number. */
  double found() {
    return intercept / slope;
  }

  /** Its standard error. */
  double standardError() {
    return sd / slope * Math.sqrt(1.0 / n + Math.pow(yMean / slope, 2) / sxx);
  }

  /** The standard error where nothing is there. */
  double standardErrorAtZero() {
    return sd / slope * Math.sqrt(1.0 / n + xMean * xMean / sxx);
  }

  /** Fieller's limits: the roots c of (a − c·b)² = t²·var(a − c·b), lower first. */
  double[] limits(double t) {
    double varB = sd * sd / sxx;
    double varA = sd * sd * (1.0 / n + xMean * xMean / sxx);
    double covAb = -xMean * varB;
    double p = slope * slope - t * t * varB;
    double q = intercept * slope - t * t * covAb;
    double r = intercept * intercept - t * t * varA;
    double root = Math.sqrt(q * q - p * r);
    return new double[] {(q - root) / p, (q + root) / p};
  }
}
