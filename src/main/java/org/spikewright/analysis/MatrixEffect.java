package org.spikewright.analysis;

import org.spikewright.fit.Equivalence;
import org.spikewright.series.SeriesKey;

/**
 * The sensitivity in a sample beside that of the external calibration.
 *
 * @param series the sample's series
 * @param batch its batch
 * @param solutions calibration solutions of different concentration
 * @param throughOrigin whether the calibration is a line through the origin, for lack of solutions
 * @param external slope of the calibration, signal per unit of the series' axis
 * @param inSample the series' sensitivity in the measured solution, likewise
 * @param unit of the axis
 * @param comparison ratio of the two with its interval and test
 */
public record MatrixEffect(
    SeriesKey series,
    String batch,
    int solutions,
    boolean throughOrigin,
    double external,
    double inSample,
    String unit,
    Equivalence comparison) {

  /** At 5 %, what the two one-sided tests and the interval allow to say. */
  public String words() {
    if (comparison.p() <= 0.05) {
      return "none beyond ± " + Say.share(comparison.margin());
    }
    boolean above =
        comparison.lower95().isPresent()
            && comparison.lower95().getAsDouble() > 1 + comparison.margin();
    boolean below =
        comparison.upper95().isPresent()
            && comparison.upper95().getAsDouble() < 1 - comparison.margin();
    return above || below ? "beyond ± " + Say.share(comparison.margin()) : "not settled";
  }
}
