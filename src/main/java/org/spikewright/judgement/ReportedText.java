package org.spikewright.judgement;

import java.util.OptionalDouble;
import org.spikewright.fit.Detection;
import org.spikewright.quantity.Numbers;

/** The text to report: value ± U by U's two significant digits, or "&lt; limit". */
final class ReportedText {
  private static final int DIGITS = 2;

  private ReportedText() {}

  static String of(SeriesResult result) {
    OptionalDouble limit = result.series().method().reportingLimit();
    if (limit.isPresent() && result.value() < limit.getAsDouble()) {
      return "< " + Numbers.plain(limit.getAsDouble());
    }
    if (isBelowDetection(result)) {
      return "< " + Numbers.rounded(result.detection().orElseThrow().detectionLimit(), DIGITS);
    }
    OptionalDouble expanded = expandedUncertainty(result);
    if (expanded.isEmpty()) {
      return Numbers.rounded(result.value(), 3);
    }
    double u = expanded.getAsDouble();
    if (!(u > 0)) {
      return Numbers.rounded(result.value(), 6);
    }
    return Numbers.roundedLike(result.value(), u, DIGITS)
        + " ± "
        + Numbers.roundedLike(u, u, DIGITS);
  }

  /** Whether the result does not exceed the critical value. */
  static boolean isBelowDetection(SeriesResult result) {
    return result
        .detection()
        .map(Detection::criticalValue)
        .filter(critical -> critical > 0 && result.value() <= critical)
        .isPresent();
  }

  /** The expanded uncertainty of the budget; empty where the fit has no uncertainty. */
  static OptionalDouble expandedUncertainty(SeriesResult result) {
    return result
        .budget()
        .map(budget -> OptionalDouble.of(budget.expandedUncertainty()))
        .orElseGet(OptionalDouble::empty);
  }
}
