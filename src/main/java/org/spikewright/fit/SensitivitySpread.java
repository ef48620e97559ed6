package org.spikewright.fit;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;

/**
 * The sensitivities of a night's series on a logarithmic scale: centre and robust spread.
 *
 * <p>Source: robust mean and standard deviation by Algorithm A of ISO 13528:2022, annex C (Huber's
 * proposal 2).
 *
 * @param centre of the natural logarithms
 * @param spread robust standard deviation of the logarithms, the fits' own errors included; 0 or
 *     more
 * @param typicalError median standard error of a logarithm from its fit
 * @param series how many
 */
public record SensitivitySpread(double centre, double spread, double typicalError, int series) {

  /** Fewer sensitivities say nothing of their spread. */
  private static final int LEAST = 5;

  /** Slopes that agree to this share are alike, whatever the digits say. */
  private static final double ALIKE = 1e-6;

  /** Effective degrees of freedom of the robust spread beside those of the plain one. */
  private static final double EFFICIENCY = 0.7;

  private static final double FAR = 1.5;
  private static final int ROUNDS = 200;

  static Optional<SensitivitySpread> of(List<PooledLine> lines, VariancePrior prior) {
    List<PooledLine> usable = lines.stream().filter(SensitivitySpread::hasOne).toList();
    if (usable.size() < LEAST) {
      return Optional.empty();
    }
    double[] logs =
        usable.stream()
            .mapToDouble(line -> Math.log(line.series().sensitivity().orElseThrow()))
            .toArray();
    double[] errors =
        usable.stream()
            .mapToDouble(line -> error(line.line(), moderated(line, prior)))
            .sorted()
            .toArray();
    double[] robust = algorithmA(logs);
    return Optional.of(
        new SensitivitySpread(robust[0], robust[1], errors[errors.length / 2], usable.size()));
  }

  private static boolean hasOne(PooledLine line) {
    double sensitivity = line.series().sensitivity().orElse(0);
    return sensitivity > 0 && sensitivity < Double.POSITIVE_INFINITY;
  }

  private static double moderated(PooledLine line, VariancePrior prior) {
    return prior.moderated(line.variance(), line.df()).value() * line.scale();
  }

  /** Standard error of the logarithm of the slope. */
  static double error(StraightLine line, double variance) {
    return Math.sqrt(variance / line.sxx()) / line.slope();
  }

  private static double[] algorithmA(double[] values) {
    double[] sorted = values.clone();
    Arrays.sort(sorted);
    double centre = median(sorted);
    double[] away = new double[sorted.length];
    for (int i = 0; i < away.length; i++) {
      away[i] = Math.abs(sorted[i] - centre);
    }
    Arrays.sort(away);
    double spread = 1.483 * median(away);
    for (int round = 0; round < ROUNDS; round++) {
      double[] clipped = new double[sorted.length];
      for (int i = 0; i < clipped.length; i++) {
        clipped[i] = Math.max(centre - FAR * spread, Math.min(centre + FAR * spread, sorted[i]));
      }
      double mean = StraightLine.mean(clipped);
      double squares = 0;
      for (double value : clipped) {
        squares += (value - mean) * (value - mean);
      }
      double next = 1.134 * Math.sqrt(squares / (clipped.length - 1));
      boolean settled = Math.abs(next - spread) <= 1e-9 * spread && round > 0;
      centre = mean;
      spread = next;
      if (settled) {
        break;
      }
    }
    return new double[] {centre, spread};
  }

  private static double median(double[] sorted) {
    int half = sorted.length / 2;
    return sorted.length % 2 == 1 ? sorted[half] : (sorted[half - 1] + sorted[half]) / 2;
  }

  /**
   * How far a sensitivity lies from the others.
   *
   * @param sensitivity as of the pool's series, above 0
   * @param error standard error of its logarithm from the fit; what exceeds the usual one widens
   *     the spread
   */
  public OddSlope test(double sensitivity, double error) {
    double beyond = Math.max(0, error * error - typicalError * typicalError);
    double away = Math.log(sensitivity) - centre;
    double sd = Math.sqrt(spread * spread * (1 + 1.0 / series) + beyond + ALIKE * ALIKE);
    double z = away / sd;
    double df = EFFICIENCY * (series - 1);
    return new OddSlope(z, df, StudentT.twoSided(z, df), Math.exp(Math.min(700, away)));
  }

  /**
   * A sensitivity beside the others of the night.
   *
   * @param z distance of the logarithms in robust standard deviations
   * @param df degrees of freedom of the spread
   * @param p two-sided probability of so large a distance
   * @param ratio to the centre of the others; 10 for a stock ten times too strong
   */
  public record OddSlope(double z, double df, double p, double ratio) {}
}
