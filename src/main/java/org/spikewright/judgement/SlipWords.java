package org.spikewright.judgement;

import static org.spikewright.judgement.Flags.n;

import java.util.Optional;
import java.util.stream.Collectors;
import org.spikewright.fit.Slips;
import org.spikewright.fit.Slips.Slip;
import org.spikewright.judgement.Flag.Weight;

/** A suspected slip of preparation, put as a question; the data stay as they are. */
final class SlipWords {
  private SlipWords() {}

  static Optional<Flag> flag(Slips slips, SeriesResult result, Limit rate) {
    return slips
        .best()
        .map(
            best ->
                Flags.against(
                    FlagKind.SUSPECTED_SLIP,
                    Weight.REVIEW,
                    slips.p(),
                    rate,
                    question(best, result) + also(slips, result),
                    "Ask at the bench; nothing is changed by itself."));
  }

  private static String question(Slip slip, SeriesResult result) {
    double value = result.series().toResult().value(slip.nativeConcentration());
    String then =
        Double.isFinite(value)
            ? " The result would then be "
                + n(value)
                + " "
                + result.series().toResult().unit().symbol()
                + " instead of "
                + n(result.value())
                + "."
            : "";
    return "Could it be that " + what(slip, result) + "?" + then;
  }

  private static String also(Slips slips, SeriesResult result) {
    return slips.alsoPossible().isEmpty()
        ? ""
        : " Or that "
            + slips.alsoPossible().stream()
                .map(slip -> what(slip, result))
                .collect(Collectors.joining(", or that "))
            + "?";
  }

  private static String what(Slip slip, SeriesResult result) {
    String flasks =
        slip.points().stream()
            .map(i -> result.flasks().get(i).label())
            .collect(Collectors.joining(" and "));
    return switch (slip.kind()) {
      case SWAPPED -> "flasks " + flasks + " were swapped";
      case MISSED -> "the addition to flask " + flasks + " was missed";
      case DOUBLED -> "the addition to flask " + flasks + " was made twice";
      case SHIFTED_UP -> "the labels are shifted by one level, upwards";
      case SHIFTED_DOWN -> "the labels are shifted by one level, downwards";
      case GROWING_VOLUME -> "the volume grew and the signals were not corrected for it";
      case STOCK_TENFOLD -> "the stock was ten times as strong as stated";
      case STOCK_TENTH -> "the stock was a tenth as strong as stated";
    };
  }
}
