package org.spikewright.fit;

import java.util.List;
import java.util.Optional;

/**
 * How the noise grows with the signal: s(y)² = σ_0² + (ρ·y)².
 *
 * <p>Source: Thompson, Analyst 113 (1988) 1579 (the form); Carroll and Ruppert, Transformation and
 * Weighting in Regression (1988), ch. 3 (fit to squared residuals by reweighted least squares).
 *
 * @param constant σ_0, in signal units as read, 0 or more
 * @param proportional ρ, a share of the signal, 0 or more
 */
public record NoiseFunction(double constant, double proportional) {

  /** The scale of an instrument's pool: noise relative to the signal, whatever the analyte. */
  public static final NoiseFunction RELATIVE = new NoiseFunction(0, 1);

  /** No flask counts as more than a thousand times more exact than another of its series. */
  private static final double LEAST_SHARE = 1e-6;

  /**
   * Checks the ranges.
   *
   * @throws IllegalArgumentException when a number is below 0 or none
   */
  public NoiseFunction {
    if (!(constant >= 0 && proportional >= 0)) {
      throw new IllegalArgumentException("noise function " + constant + ", " + proportional);
    }
  }

  /**
   * The noise of single readings, from the scatter of the readings of each flask; robust to a few
   * bad flasks.
   *
   * @return empty without a flask that was read twice
   */
  public static Optional<NoiseFunction> ofReadings(List<PooledSeries> series) {
    return NoiseFit.ofReadings(series);
  }

  /**
   * The noise of flasks, from their scatter about ordinary lines; robust to a few bad series. It
   * holds the noise of the mean of a flask's readings and that of the preparation.
   *
   * @param lean what to take for granted where the series cannot tell constant from proportional
   *     noise, as three flasks of like samples cannot: constant for equal weights, else
   *     proportional
   * @return empty without a series of three flasks
   */
  public static Optional<NoiseFunction> ofFlasks(List<PooledSeries> series, Weighting lean) {
    return NoiseFit.ofFlasks(series, lean);
  }

  /** Variance at a signal as read. */
  public double variance(double signal) {
    double relative = proportional * signal;
    return constant * constant + relative * relative;
  }

  /** Standard deviation at a signal as read. */
  public double sd(double signal) {
    return Math.hypot(constant, proportional * signal);
  }

  /** Whether it says that there is no noise at all. */
  public boolean isZero() {
    return constant == 0 && proportional == 0;
  }

  /**
   * The weights of a line's flasks, 1/(f·s(ŷ/f))², from the fitted signals; their mean is 1.
   *
   * @param line the line so far, at first an ordinary one
   * @param factor the volume factor of each flask
   * @return all 1 where the function is zero
   */
  public double[] weights(StraightLine line, double[] factor) {
    double[] variances = variances(line, factor);
    double largest = 0;
    for (double variance : variances) {
      largest = Math.max(largest, variance);
    }
    double[] weights = StraightLine.ones(variances.length);
    if (!(largest > 0 && largest < Double.POSITIVE_INFINITY)) {
      return weights;
    }
    for (int i = 0; i < weights.length; i++) {
      weights[i] = 1 / Math.max(variances[i] / largest, LEAST_SHARE);
    }
    double mean = StraightLine.mean(weights);
    for (int i = 0; i < weights.length; i++) {
      weights[i] /= mean;
    }
    return weights;
  }

  /**
   * The line weighted by this function: weights from the ordinary line's fitted signals, then once
   * more from the weighted line's.
   *
   * @param ordinary the ordinary line
   * @param factor the volume factor of each flask
   */
  public StraightLine weighted(StraightLine ordinary, double[] factor) {
    StraightLine line = ordinary;
    for (int pass = 0; pass < 2; pass++) {
      if (StraightLine.fit(line.x(), line.y(), weights(line, factor))
          instanceof StraightLine next) {
        line = next;
      }
    }
    return line;
  }

  /**
   * What this function expects the residual variance of a line to be: the mean of (f·s(ŷ/f))² over
   * the flasks, the weighted mean where the line is weighted. Signal units squared; at least the
   * square of the numbers' last digits.
   *
   * @param factor the volume factor of each flask
   */
  public double scale(StraightLine line, double[] factor) {
    double[] variances = variances(line, factor);
    double least = line.rounding() * line.rounding();
    return Math.max(StraightLine.mean(variances, line.weights()), Math.max(least, 1e-160));
  }

  private double[] variances(StraightLine line, double[] factor) {
    double[] variances = new double[line.n()];
    for (int i = 0; i < variances.length; i++) {
      double sd = factor[i] * sd(line.at(line.x()[i]) / factor[i]);
      variances[i] = sd * sd;
    }
    return variances;
  }
}
