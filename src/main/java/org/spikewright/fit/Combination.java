package org.spikewright.fit;

import java.util.List;
import java.util.Optional;
import org.spikewright.quantity.Estimate;

/**
 * Several results of one sample as one, each weighted by its uncertainty.
 *
 * <p>Uncertainties from few flasks are themselves uncertain, so that the sum of squares is not
 * chi-square: its p is Welch's, which is chi-square's where all degrees of freedom are infinite,
 * and the internal uncertainty carries Meier's correction.
 *
 * <p>Source: Birge, Phys. Rev. 40 (1932) 207; Welch, Biometrika 38 (1951) 330; Meier, Biometrics 9
 * (1953) 59.
 *
 * @param mean weighted by 1/u²
 * @param internal standard uncertainty that the results' own uncertainties promise, with Meier's
 *     degrees of freedom
 * @param external standard uncertainty that their scatter shows, with n − 1 degrees of freedom
 * @param chiSquare Σ((value − mean)/u)²
 * @param n number of results, 2 or more
 * @param p probability of such a scatter or a larger one among results that agree
 */
public record Combination(
    double mean, Estimate internal, Estimate external, double chiSquare, int n, double p) {

  /**
   * Combines results.
   *
   * @param results in one unit, independent of each other
   * @return empty with fewer than two, when one has no uncertainty, or when a number is too large
   */
  public static Optional<Combination> of(List<Estimate> results) {
    int n = results.size();
    double least =
        results.stream().mapToDouble(Estimate::standardUncertainty).min().orElse(Double.NaN);
    if (n < 2 || !(least > 0)) {
      return Optional.empty();
    }
    double first = results.get(0).value();
    double weights = 0;
    double sum = 0;
    for (Estimate one : results) {
      double w = weight(one, least);
      weights += w;
      sum += w * (one.value() - first);
    }
    double mean = first + sum / weights;
    double chiSquare = 0;
    for (Estimate one : results) {
      double e = (one.value() - mean) / one.standardUncertainty();
      chiSquare += e * e;
    }
    double u = least / Math.sqrt(weights);
    if (!Double.isFinite(mean) || !(chiSquare < 1e300) || !(u * Math.sqrt(chiSquare) < 1e300)) {
      return Optional.empty();
    }
    return Optional.of(of(results, least, weights, mean, chiSquare));
  }

  private static Combination of(
      List<Estimate> results, double least, double weights, double mean, double chiSquare) {
    int n = results.size();
    double meier = 0;
    double reciprocal = 0;
    double welch = 0;
    for (Estimate one : results) {
      double share = weight(one, least) / weights;
      double df = one.degreesOfFreedom();
      meier += 4 * share * (1 - share) / df;
      reciprocal += share * share / df;
      welch += (1 - share) * (1 - share) / df;
    }
    double u = least / Math.sqrt(weights);
    double f = chiSquare / (n - 1) / (1 + 2 * (n - 2) * welch / (n * n - 1.0));
    double below = (n * n - 1.0) / (3 * welch);
    return new Combination(
        mean,
        new Estimate(mean, u * Math.sqrt(1 + meier), 1 / reciprocal),
        new Estimate(mean, u * Math.sqrt(chiSquare / (n - 1)), n - 1),
        chiSquare,
        n,
        FisherF.upper(f, n - 1, below));
  }

  private static double weight(Estimate one, double least) {
    double part = least / one.standardUncertainty();
    return part * part;
  }

  /** Birge's ratio, external over uncorrected internal uncertainty: about 1 when results agree. */
  public double birgeRatio() {
    return Math.sqrt(chiSquare / (n - 1));
  }

  /** The larger of the two uncertainties, which a cautious report uses. */
  public Estimate cautious() {
    return external.standardUncertainty() > internal.standardUncertainty() ? external : internal;
  }
}
