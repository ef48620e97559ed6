package org.spikewright.judgement;

import static org.spikewright.judgement.Flags.n;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.Collectors;
import org.spikewright.fit.BendTest;
import org.spikewright.fit.NativeEstimate;
import org.spikewright.fit.NoisyTest;
import org.spikewright.fit.OddFlask;
import org.spikewright.fit.SensitivitySpread.OddSlope;
import org.spikewright.judgement.Flag.LimitSource;
import org.spikewright.judgement.Flag.Weight;
import org.spikewright.quantity.Numbers;

/** Flags on the line: is it straight, does one flask stand off, is the slope established. */
final class LineFlags {
  /** With so few flasks a bend and an odd flask look alike. */
  private static final int FEW = 4;

  private final SeriesResult result;
  private final Criteria criteria;
  private final StatisticalFamily family;
  private final String unit;

  LineFlags(SeriesResult result, Criteria criteria) {
    this.result = result;
    this.criteria = criteria;
    this.family = StatisticalFamily.of(result, criteria.of(Criterion.FALSE_ALARMS));
    this.unit = result.series().toResult().unit().symbol();
  }

  List<Flag> all() {
    List<Flag> flags = new ArrayList<>();
    if (family.stands(FlagKind.BENT)) {
      bent().ifPresent(flags::add);
    }
    if (family.stands(FlagKind.ODD_FLASK)) {
      flags.add(odd(family.odd().orElseThrow()));
    }
    if (family.stands(FlagKind.NOISY)) {
      flags.add(noisy(family.noisy().orElseThrow()));
    }
    if (family.stands(FlagKind.SUSPECTED_SLIP)) {
      family.slips().flatMap(slips -> SlipWords.flag(slips, result, rate())).ifPresent(flags::add);
    }
    if (family.stands(FlagKind.ODD_SLOPE)) {
      flags.add(oddSlope(family.oddSlope().orElseThrow()));
    }
    slope().ifPresent(flags::add);
    correlation().ifPresent(flags::add);
    return flags;
  }

  private Limit rate() {
    return criteria.of(Criterion.FALSE_ALARMS);
  }

  /** A bend counts when it also moves the result; the bent value is never reported in silence. */
  private Optional<Flag> bent() {
    BendTest bend = family.bend().orElseThrow();
    String advice = bendAdvice();
    OptionalDouble bentAxis = bend.nativeConcentration();
    if (bentAxis.isEmpty()) {
      return Optional.of(
          Flags.against(
              FlagKind.BENT,
              Weight.REPEAT,
              family.bendP().orElseThrow(),
              rate(),
              "The line bends so much that the bent line does not reach zero signal.",
              advice));
    }
    double bentValue = result.series().toResult().value(bentAxis.getAsDouble());
    double straight = result.value();
    double change = (bentValue - straight) / Math.abs(straight);
    Limit toRepeat = criteria.of(Criterion.BEND_TO_REPEAT);
    Limit toReview = criteria.of(Criterion.BEND_TO_REVIEW);
    boolean repeat = toRepeat.on() && over(change, toRepeat);
    if (!repeat && !(toReview.on() && over(change, toReview))) {
      return Optional.empty();
    }
    return Optional.of(
        Flags.against(
            FlagKind.BENT,
            repeat ? Weight.REPEAT : Weight.REVIEW,
            change,
            repeat ? toRepeat : toReview,
            "The line bends: straight-line result "
                + n(straight)
                + ", bent-line "
                + n(bentValue)
                + " "
                + unit
                + ", "
                + Flags.percent(change)
                + ".",
            advice));
  }

  private String bendAdvice() {
    String plain =
        "Prepare again with smaller additions or a diluted sample, inside the straight range.";
    return looksLikeBoth()
        ? "With so few flasks a bend and one odd flask look alike: more levels would tell them"
            + " apart. "
            + plain
        : plain;
  }

  private boolean looksLikeBoth() {
    return family.stands(FlagKind.BENT)
        && family.stands(FlagKind.ODD_FLASK)
        && result.line().n() <= FEW;
  }

  private static boolean over(double change, Limit limit) {
    return !(Math.abs(change) <= limit.value());
  }

  private Flag odd(OddFlask odd) {
    String otherWords =
        NativeEstimate.of(odd.without())
            .map(without -> result.series().toResult().value(without.value()))
            .filter(other -> odd.without().slope() > 0 && Double.isFinite(other))
            .map(other -> n(other) + " " + unit)
            .orElse("no result");
    boolean level = odd.kind() == OddFlask.Kind.LEVEL;
    String labels =
        Arrays.stream(odd.flasks())
            .mapToObj(i -> result.flasks().get(i).label())
            .collect(Collectors.joining(", "));
    return new Flag(
        level ? FlagKind.ODD_LEVEL : FlagKind.ODD_FLASK,
        Weight.REVIEW,
        OptionalDouble.of(odd.t()),
        OptionalDouble.of(rate().value()),
        rate().source(),
        (level ? "The level of flasks " : "Flask ")
            + labels
            + " lies "
            + n(Math.abs(odd.t()))
            + " standard deviations "
            + (odd.t() > 0 ? "above" : "below")
            + " the line through the others: result "
            + n(result.value())
            + ", without it "
            + otherWords
            + ".",
        oddAdvice(level));
  }

  /** A single flask is remade only where it explains the data better than a bend does. */
  private String oddAdvice(boolean level) {
    if (looksLikeBoth()) {
      return "With so few flasks a bend and one odd flask look alike: prepare the series again with"
          + " more levels.";
    }
    if (level) {
      return "Check the volume added at this level against the bench sheet; it stays in the result"
          + " until a person decides.";
    }
    boolean bendExplainsBetter =
        family.bendP().isPresent()
            && family.stands(FlagKind.BENT)
            && family.bendP().getAsDouble() < family.odd().orElseThrow().p();
    return bendExplainsBetter
        ? "A bend explains the points better than this one flask does; see the plot."
        : "Prepare and measure this flask again; it stays in the result until a person decides.";
  }

  private Flag noisy(NoisyTest noisy) {
    return Flags.against(
        FlagKind.NOISY,
        Weight.REVIEW,
        noisy.p(),
        rate(),
        "The flasks scatter "
            + n(noisy.ratio())
            + " times as much about their line as is usual in "
            + result.borrowed().orElseThrow().lender()
            + ".",
        "Look for the cause at the bench: mixing, pipetting, contamination, an unsteady signal.");
  }

  private Flag oddSlope(OddSlope odd) {
    return Flags.against(
        FlagKind.ODD_SLOPE,
        Weight.REVIEW,
        odd.p(),
        rate(),
        "The sensitivity is "
            + n(odd.ratio())
            + " times that of the other series of "
            + result.borrowed().orElseThrow().lender()
            + ".",
        "Check which stock was used and its concentration, the volumes, and the matrix.");
  }

  private Optional<Flag> slope() {
    NativeEstimate estimate = result.reportedEstimate();
    if (estimate.g().isEmpty() || estimate.isBounded()) {
      return Optional.empty();
    }
    return Optional.of(
        new Flag(
            FlagKind.SLOPE_NOT_ESTABLISHED,
            Weight.REPEAT,
            estimate.g(),
            OptionalDouble.of(1),
            LimitSource.PUBLISHED,
            "The slope is not established (g = "
                + n(estimate.g().getAsDouble())
                + "): the scatter is as large as the effect of the additions.",
            "Prepare again with larger additions and look for the cause of the scatter."));
  }

  private Optional<Flag> correlation() {
    OptionalDouble r = result.line().correlation();
    Limit limit = criteria.of(Criterion.LEAST_CORRELATION);
    if (!limit.on() || r.isEmpty() || r.getAsDouble() >= limit.value()) {
      return Optional.empty();
    }
    return Optional.of(
        Flags.against(
            FlagKind.LOW_CORRELATION,
            Weight.NOTE,
            r.getAsDouble(),
            limit,
            "Correlation coefficient "
                + Numbers.rounded(r.getAsDouble(), 4)
                + ", below "
                + Numbers.plain(limit.value())
                + ".",
            "Look at the plot; the coefficient does not tell scatter from a bend."));
  }
}
