package org.spikewright.judgement;

import static org.spikewright.judgement.Flags.n;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import org.spikewright.fit.BendTest;
import org.spikewright.fit.DeletedResidual;
import org.spikewright.fit.NativeEstimate;
import org.spikewright.judgement.Flag.LimitSource;
import org.spikewright.judgement.Flag.Weight;
import org.spikewright.quantity.Numbers;

/** Flags on the line: is it straight, does one flask stand off, is the slope established. */
final class LineFlags {
  private record Odd(int index, DeletedResidual residual) {}

  private final SeriesResult result;
  private final Criteria criteria;
  private final String unit;

  LineFlags(SeriesResult result, Criteria criteria) {
    this.result = result;
    this.criteria = criteria;
    this.unit = result.series().toResult().unit().symbol();
  }

  List<Flag> all() {
    List<Flag> flags = new ArrayList<>();
    Optional<Odd> odd = oddest();
    Family family = new Family();
    result.bend().ifPresent(bend -> family.add(FlagKind.BENT, bend.pOneSided()));
    odd.ifPresent(
        flask -> family.add(FlagKind.ODD_FLASK, flask.residual().p() * result.line().n()));
    Set<FlagKind> significant =
        criteria.of(Criterion.FALSE_ALARMS).on()
            ? family.significant(criteria.of(Criterion.FALSE_ALARMS).value())
            : Set.of();
    if (significant.contains(FlagKind.BENT)) {
      bent().ifPresent(flags::add);
    }
    if (significant.contains(FlagKind.ODD_FLASK)) {
      flags.add(oddFlask(odd.orElseThrow()));
    }
    slope().ifPresent(flags::add);
    correlation().ifPresent(flags::add);
    return flags;
  }

  private Optional<Odd> oddest() {
    Optional<Odd> oddest = Optional.empty();
    for (int i = 0; i < result.residuals().size(); i++) {
      Optional<DeletedResidual> residual = result.residuals().get(i);
      if (residual.isPresent()
          && (oddest.isEmpty() || residual.get().p() < oddest.get().residual().p())) {
        oddest = Optional.of(new Odd(i, residual.get()));
      }
    }
    return oddest;
  }

  /** A bend counts when it also moves the result; the bent value is never reported in silence. */
  private Optional<Flag> bent() {
    BendTest bend = result.bend().orElseThrow();
    OptionalDouble bentAxis = bend.nativeConcentration();
    if (bentAxis.isEmpty()) {
      return Optional.of(
          Flags.against(
              FlagKind.BENT,
              Weight.REPEAT,
              bend.pOneSided(),
              criteria.of(Criterion.FALSE_ALARMS),
              "The line bends so much that the bent line does not reach zero signal.",
              "Prepare again with smaller additions or a diluted sample."));
    }
    double bentValue = result.series().toResult().value(bentAxis.getAsDouble());
    double straight = result.value();
    double change = (bentValue - straight) / Math.abs(straight);
    boolean repeat =
        criteria.of(Criterion.BEND_TO_REPEAT).on()
            && over(change, criteria.of(Criterion.BEND_TO_REPEAT));
    if (!repeat
        && !(criteria.of(Criterion.BEND_TO_REVIEW).on()
            && over(change, criteria.of(Criterion.BEND_TO_REVIEW)))) {
      return Optional.empty();
    }
    return Optional.of(
        Flags.against(
            FlagKind.BENT,
            repeat ? Weight.REPEAT : Weight.REVIEW,
            change,
            repeat ? criteria.of(Criterion.BEND_TO_REPEAT) : criteria.of(Criterion.BEND_TO_REVIEW),
            "The line bends: straight-line result "
                + n(straight)
                + ", bent-line "
                + n(bentValue)
                + " "
                + unit
                + ", "
                + Flags.percent(change)
                + ".",
            "Prepare again with smaller additions or a diluted sample, inside the straight range."));
  }

  private static boolean over(double change, Limit limit) {
    return !(Math.abs(change) <= limit.value());
  }

  private Flag oddFlask(Odd odd) {
    String otherWords =
        NativeEstimate.of(odd.residual().without())
            .map(without -> result.series().toResult().value(without.value()))
            .filter(other -> odd.residual().without().slope() > 0 && Double.isFinite(other))
            .map(other -> n(other) + " " + unit)
            .orElse("no result");
    return new Flag(
        FlagKind.ODD_FLASK,
        Weight.REVIEW,
        OptionalDouble.of(odd.residual().t()),
        OptionalDouble.of(criteria.of(Criterion.FALSE_ALARMS).value()),
        criteria.of(Criterion.FALSE_ALARMS).source(),
        "Flask "
            + result.flasks().get(odd.index()).label()
            + " lies "
            + n(Math.abs(odd.residual().t()))
            + " standard deviations "
            + (odd.residual().t() > 0 ? "above" : "below")
            + " the line through the others: result "
            + n(result.value())
            + ", without it "
            + otherWords
            + ".",
        "Prepare and measure this flask again; it stays in the result until a person decides.");
  }

  private Optional<Flag> slope() {
    NativeEstimate estimate = result.estimate();
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
