package org.spikewright.fit;

import java.util.List;
import java.util.Optional;

/**
 * Tonight's noise beside that of the remembered nights.
 *
 * <p>Source: rank test of Wilcoxon and Mann and Whitney in its form for large samples, on the
 * probabilities that the common prior gives to each series' variance, which allows for unlike
 * degrees of freedom.
 *
 * @param ratio of the standard deviations, tonight over remembered, above 0
 * @param z standardised difference of the mean probabilities; above 0 for more noise tonight
 * @param p two-sided probability of so large a difference on nights alike
 */
public record NoiseHistory(double ratio, double z, double p) {

  private static final int LEAST = 5;

  static Optional<NoiseHistory> of(
      List<PooledLine> tonight, List<PooledLine> remembered, VariancePrior prior) {
    if (tonight.size() < LEAST || remembered.size() < LEAST) {
      return Optional.empty();
    }
    double[] now = probabilities(tonight, prior);
    double[] before = probabilities(remembered, prior);
    double spread =
        Math.sqrt(squares(now) + squares(before))
            / Math.sqrt(now.length + before.length - 2)
            * Math.sqrt(1.0 / now.length + 1.0 / before.length);
    double difference = StraightLine.mean(now) - StraightLine.mean(before);
    double z = difference == 0 ? 0 : difference / Math.max(spread, 1e-9);
    return PooledPriors.ofLines(tonight)
        .flatMap(
            a -> PooledPriors.ofLines(remembered).map(b -> Math.sqrt(a.variance() / b.variance())))
        .filter(ratio -> ratio > 0 && ratio < Double.POSITIVE_INFINITY)
        .map(
            ratio ->
                new NoiseHistory(ratio, z, StudentT.twoSided(z, now.length + before.length - 2)));
  }

  private static double[] probabilities(List<PooledLine> lines, VariancePrior prior) {
    return lines.stream().mapToDouble(line -> 1 - prior.tail(line.variance(), line.df())).toArray();
  }

  private static double squares(double[] values) {
    double mean = StraightLine.mean(values);
    double sum = 0;
    for (double value : values) {
      sum += (value - mean) * (value - mean);
    }
    return sum;
  }
}
