package org.spikewright.series;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Design;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.reading.InternalStandard;
import org.spikewright.reading.InternalStandard.Given;

/**
 * The factors that signals are multiplied by before the line. Without an internal standard they
 * allow for aliquot and final volume; one that was in the flask has cancelled the final volume, one
 * that was weighed in leaves its own mass, one added on line cancels neither.
 */
final class VolumeFactor {
  private VolumeFactor() {}

  static boolean isWeighedIn(FlaskFacts facts) {
    return given(facts).equals(Optional.of(Given.WEIGHED_IN));
  }

  private static boolean isInTheFlask(FlaskFacts facts) {
    return given(facts).equals(Optional.of(Given.IN_THE_FLASK));
  }

  private static Optional<Given> given(FlaskFacts facts) {
    return facts.internalStandard().map(InternalStandard::given);
  }

  /**
   * Made up by volume or by mass: (V_t/V_x)·(mean V_x/mean V_t), with an internal standard in the
   * flask mean V_x/V_x, with one weighed in m_is/m_x in base units.
   */
  static double[] madeUp(List<FlaskFacts> flasks) {
    FlaskFacts first = flasks.get(0);
    Unit unit = first.aliquot().orElseThrow().quantity().unit();
    double[] taken = Axis.each(flasks, facts -> facts.aliquot().orElseThrow().in(unit));
    if (isWeighedIn(first)) {
      return Axis.each(
          flasks,
          facts ->
              Axis.inBase(facts.internalStandard().orElseThrow().mass().orElseThrow())
                  / Axis.inBase(facts.aliquot().orElseThrow()));
    }
    boolean cancelled = isInTheFlask(first) || first.finalVolume().isEmpty();
    double[] total =
        Axis.each(flasks, facts -> cancelled ? 1 : facts.finalVolume().orElseThrow().in(unit));
    double[] factor = new double[taken.length];
    if (allEqual(taken) && allEqual(total)) {
      Arrays.fill(factor, 1);
      return factor;
    }
    double ratio = Arrays.stream(taken).sum() / Arrays.stream(total).sum();
    for (int i = 0; i < factor.length; i++) {
      factor[i] = total[i] / taken[i] * ratio;
    }
    return factor;
  }

  /**
   * One vessel: (V_0 + Σv)/V_0; 1 where an internal standard went into the vessel once, and for the
   * potential of an electrode, whose own equation holds the volumes.
   */
  static double[] vessel(List<FlaskFacts> flasks, Quantity start) {
    FlaskFacts first = flasks.get(0);
    boolean none = first.design() == Design.ELECTRODE || isInTheFlask(first);
    return Axis.each(
        flasks, facts -> none ? 1 : 1 + facts.addition().amount().in(start.unit()) / start.value());
  }

  private static boolean allEqual(double[] values) {
    for (double value : values) {
      if (value != values[0]) {
        return false;
      }
    }
    return true;
  }
}
