package org.spikewright.analysis;

import java.util.OptionalDouble;
import org.spikewright.series.SeriesKey;

/**
 * A blank that was carried through the preparation and measured as a series.
 *
 * @param key whose history it continues
 * @param series the series it is
 * @param batch the batch it stands for
 * @param unit of value and limit
 * @param value found; the signed number, also where nothing was detected
 * @param standardUncertainty of the value; empty where there is none
 * @param detected whether the value is above its critical value
 * @param inSolution concentration in the digest or undiluted solution
 * @param solutionUnit of {@code inSolution}
 * @param most the laboratory's limit; empty when there is none
 * @param verdict in or out of that limit
 */
public record BlankResult(
    ControlKey key,
    SeriesKey series,
    String batch,
    String unit,
    double value,
    OptionalDouble standardUncertainty,
    boolean detected,
    double inSolution,
    String solutionUnit,
    OptionalDouble most,
    ControlResult.Verdict verdict) {

  /** The point that it adds to its history. */
  public ControlPoint point() {
    return new ControlPoint(
        series.labDay(), key, unit, value, OptionalDouble.empty(), OptionalDouble.empty(), most);
  }
}
