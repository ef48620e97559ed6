package org.spikewright.judgement;

import java.util.OptionalDouble;
import org.spikewright.judgement.Flag.LimitSource;
import org.spikewright.judgement.Flag.Weight;
import org.spikewright.quantity.Numbers;

/** The words and makings that all flags share. */
final class Flags {
  private Flags() {}

  /** A flag that rests on no number. */
  static Flag plain(FlagKind kind, Weight weight, String sentence, String advice) {
    return new Flag(
        kind,
        weight,
        OptionalDouble.empty(),
        OptionalDouble.empty(),
        LimitSource.ARITHMETIC,
        sentence,
        advice);
  }

  /** A flag that holds a number against a limit. */
  static Flag against(
      FlagKind kind, Weight weight, double number, Limit limit, String sentence, String advice) {
    return new Flag(
        kind,
        weight,
        OptionalDouble.of(number),
        OptionalDouble.of(limit.value()),
        limit.source(),
        sentence,
        advice);
  }

  /** A number in a sentence. */
  static String n(double value) {
    return Numbers.rounded(value, 3);
  }

  /** A share in a sentence, with its sign: {@code −13 %}. */
  static String percent(double share) {
    double percent = 100 * share;
    String digits = Numbers.rounded(Math.abs(percent), Math.abs(percent) >= 10 ? 2 : 1);
    return (percent < 0 ? "\u2212" : "+") + digits + " %";
  }
}
