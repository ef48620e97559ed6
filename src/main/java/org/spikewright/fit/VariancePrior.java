package org.spikewright.fit;

import java.util.Optional;

/**
 * What the variances of a pool's series say of a variance before its own series is seen: it is
 * {@code variance·d_0/χ²} with {@code d_0} degrees of freedom, so that an estimate with ν of its
 * own follows {@code variance·F(ν, d_0)}.
 *
 * <p>Source: Smyth, Stat. Appl. Genet. Mol. Biol. 3 (2004) 3; robust after Phipson, Lee, Majewski,
 * Alexander and Smyth, Ann. Appl. Stat. 10 (2016) 946.
 *
 * @param df d_0, above 0; infinite where the series do not differ
 * @param variance s_0², on the pool's scale, above 0
 * @param series how many series it rests on
 */
public record VariancePrior(double df, double variance, int series) {

  private static final double INCREDIBLE = 0.01;

  /**
   * Checks the ranges.
   *
   * @throws IllegalArgumentException when a number is out of range or none
   */
  public VariancePrior {
    if (!(df > 0 && variance > 0 && variance < Double.POSITIVE_INFINITY && series > 0)) {
      throw new IllegalArgumentException(
          "prior " + variance + " with " + df + " df of " + series + " series");
    }
  }

  /**
   * The prior of a pool, by marginal likelihood, a few bad series being allowed for.
   *
   * @param variances on the pool's scale, each 0 or more
   * @param df the degrees of freedom of each, 1 or more
   * @return empty without variances, or when all are 0
   */
  public static Optional<VariancePrior> of(double[] variances, int[] df) {
    return PriorFit.of(variances, df);
  }

  /**
   * The moderated variance (d_0·s_0² + ν·s²)/(d_0 + ν), with d_0 + ν degrees of freedom.
   *
   * @param own s², on the pool's scale; not looked at when it has no degrees of freedom
   * @param ownDf ν, 0 or more
   */
  public Variance moderated(double own, double ownDf) {
    if (!(ownDf > 0)) {
      return new Variance(variance, df);
    }
    double share = ownDf / (df + ownDf);
    return new Variance((1 - share) * variance + share * own, df + ownDf);
  }

  /**
   * The probability of a variance this large or larger, by F(ν, d_0).
   *
   * @param own s², on the pool's scale
   * @param ownDf ν, above 0
   */
  public double tail(double own, double ownDf) {
    return FisherF.upper(own / variance, ownDf, df);
  }

  /**
   * A variance brought down to what the prior lets one series in a hundred exceed: a scatter beyond
   * that is no noise but something wrong in the series, and must not hide the flask that is wrong.
   */
  double credible(double own, double ownDf) {
    if (!(tail(own, ownDf) < INCREDIBLE)) {
      return own;
    }
    double low = 0;
    double high = own;
    for (int step = 0; step < 60; step++) {
      double middle = (low + high) / 2;
      if (tail(middle, ownDf) < INCREDIBLE) {
        high = middle;
      } else {
        low = middle;
      }
    }
    return high;
  }
}
