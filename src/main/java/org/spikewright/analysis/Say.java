package org.spikewright.analysis;

import java.util.OptionalDouble;
import org.spikewright.judgement.Flag;
import org.spikewright.judgement.FlagKind;
import org.spikewright.judgement.Limit;
import org.spikewright.quantity.Numbers;

/** How evidence is said. */
final class Say {
  private Say() {}

  static String n(double value) {
    return Numbers.rounded(value, 3);
  }

  /** A share in percent without a sign: {@code 96 %}. */
  static String share(double share) {
    double percent = 100 * share;
    return Numbers.rounded(percent, Math.abs(percent) >= 100 ? 3 : 2) + " %";
  }

  static Flag review(FlagKind kind, double number, Limit limit, String sentence, String advice) {
    return new Flag(
        kind,
        Flag.Weight.REVIEW,
        OptionalDouble.of(number),
        OptionalDouble.of(limit.value()),
        limit.source(),
        sentence,
        advice);
  }

  static Flag plain(FlagKind kind, Flag.Weight weight, String sentence, String advice) {
    return new Flag(
        kind,
        weight,
        OptionalDouble.empty(),
        OptionalDouble.empty(),
        Flag.LimitSource.LABORATORY,
        sentence,
        advice);
  }
}
