package org.spikewright.judgement;

import java.util.Collections;
import java.util.EnumSet;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Collectors;
import org.spikewright.judgement.Flag.Weight;
import org.spikewright.judgement.RepeatAdvice.Again;
import org.spikewright.judgement.RepeatAdvice.NoPlan;
import org.spikewright.judgement.RepeatAdvice.Nothing;
import org.spikewright.judgement.RepeatAdvice.SomeFlasks;
import org.spikewright.judgement.RepeatPlan.Prepared;
import org.spikewright.judgement.RepeatPlan.Refused;
import org.spikewright.reading.Design;
import org.spikewright.series.AdditionSeries;

/** Which flag asks for which advice. */
final class RepeatRules {
  /** Flags that a new series answers. */
  private static final Set<FlagKind> WHOLE =
      EnumSet.of(
          FlagKind.SLOPE_NOT_ESTABLISHED,
          FlagKind.BENT,
          FlagKind.ODD_FLASK,
          FlagKind.UNCERTAIN,
          FlagKind.ADDITIONS_TOO_SMALL,
          FlagKind.ADDITIONS_TOO_LARGE,
          FlagKind.OVER_RANGE,
          FlagKind.NO_FIT_UNCERTAINTY,
          FlagKind.NO_UNSPIKED_FLASK,
          FlagKind.FEW_FLASKS);

  /** Flags that flasks beside those already measured answer. */
  private static final Set<FlagKind> MISSING =
      EnumSet.of(FlagKind.NO_UNSPIKED_FLASK, FlagKind.FEW_FLASKS);

  /** Flags for which missing flasks are no answer. */
  private static final Set<FlagKind> MORE_THAN_MISSING =
      EnumSet.of(
          FlagKind.SLOPE_NOT_ESTABLISHED,
          FlagKind.BENT,
          FlagKind.ODD_FLASK,
          FlagKind.ADDITIONS_TOO_SMALL,
          FlagKind.ADDITIONS_TOO_LARGE,
          FlagKind.OVER_RANGE);

  private final Outcome outcome;
  private final CriteriaBook book;
  private final Set<FlagKind> kinds;

  RepeatRules(Outcome outcome, CriteriaBook book) {
    this.outcome = outcome;
    this.book = book;
    this.kinds =
        outcome.flags().stream()
            .filter(flag -> flag.weight() != Weight.NOTE)
            .map(Flag::kind)
            .collect(Collectors.toCollection(() -> EnumSet.noneOf(FlagKind.class)));
  }

  RepeatAdvice advice() {
    boolean repeat = outcome.verdict() == Verdict.REPEAT;
    if (!repeat && outcome.verdict() != Verdict.REVIEW) {
      return new Nothing();
    }
    if (!(outcome.gathered() instanceof AdditionSeries series) || outcome.result().isEmpty()) {
      return repeat ? withoutLine() : new Nothing();
    }
    RepeatNeeds needs = RepeatNeeds.of(outcome.result().get());
    if (!repeat && series.design() != Design.ONE_VESSEL) {
      Optional<SomeFlasks> some = someFlasks(needs);
      if (some.isPresent()) {
        return some.get();
      }
    }
    return repeat || !Collections.disjoint(kinds, WHOLE) ? again(needs) : new Nothing();
  }

  private Optional<SomeFlasks> someFlasks(RepeatNeeds needs) {
    FlaskRepairs repairs = new FlaskRepairs(needs);
    if (kinds.contains(FlagKind.ODD_FLASK)) {
      return repairs.oddFlask();
    }
    return !Collections.disjoint(kinds, MISSING) && Collections.disjoint(kinds, MORE_THAN_MISSING)
        ? repairs.missing()
        : Optional.empty();
  }

  private RepeatAdvice again(RepeatNeeds needs) {
    Criteria criteria = book.of(needs.series().method().name());
    Optional<RepeatSizing> sizing =
        RepeatSizing.of(needs, kinds, criteria.of(Criterion.BEND_TO_REVIEW).value() / 2);
    if (sizing.isEmpty()) {
      return new NoPlan(
          "Nothing says how large the additions must be: the line gives no native concentration"
              + " above zero.",
          "Plan with an expected concentration, by the command plan.");
    }
    Limit target = criteria.of(Criterion.TARGET_UNCERTAINTY);
    Optional<RepeatAsk> ask = sizing.get().ask(target, book.repeat());
    if (ask.isEmpty()) {
      return new NoPlan(
          "The export does not say the volumes that a plan needs.",
          "Plan with the volumes, by the command plan.");
    }
    RepeatPlan plan = Planner.plan(ask.get());
    return plan instanceof Prepared prepared
        ? new Again(prepared, sizing.get().basis(), needs.relativeUncertainty())
        : new NoPlan(((Refused) plan).found(), ((Refused) plan).help());
  }

  private NoPlan withoutLine() {
    if (kinds.contains(FlagKind.NO_SERIES) || kinds.contains(FlagKind.NO_ADDITIONS)) {
      return new NoPlan(
          "No volumes can be planned before the readings form a series.",
          "Complete the data first; for a new preparation use the command plan.");
    }
    return new NoPlan(
        "Nothing says how large the additions must be: no line could be drawn.",
        "Plan with an expected concentration, by the command plan.");
  }
}
