package org.spikewright.fit;

/**
 * Whether a series scatters more than its pool: its residual variance against the prior, by F.
 *
 * <p>Source: Smyth, Stat. Appl. Genet. Mol. Biol. 3 (2004) 3, section 4.
 *
 * @param ratio of the residual standard deviation to the pool's, 0 or more
 * @param df degrees of freedom of the series, 1 or more
 * @param priorDf those of the prior; infinite where its series do not differ
 * @param p one-sided
 */
public record NoisyTest(double ratio, double df, double priorDf, double p) {

  static NoisyTest of(StraightLine line, VariancePrior prior, double scale) {
    double floor = line.rounding() * line.rounding();
    int df = line.residualDf();
    double own = Math.max(line.residualSumOfSquares() / df, floor) / scale;
    return new NoisyTest(Math.sqrt(own / prior.variance()), df, prior.df(), prior.tail(own, df));
  }
}
