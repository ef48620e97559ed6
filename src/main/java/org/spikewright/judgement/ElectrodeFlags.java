package org.spikewright.judgement;

import static org.spikewright.judgement.Flags.n;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.judgement.Flag.LimitSource;
import org.spikewright.judgement.Flag.Weight;
import org.spikewright.quantity.Numbers;
import org.spikewright.series.Flask;

/** Flags on known additions with an electrode: its slope, the size of the additions, the spread. */
final class ElectrodeFlags {
  private final ElectrodeResult result;
  private final Criteria criteria;

  ElectrodeFlags(ElectrodeResult result, Criteria criteria) {
    this.result = result;
    this.criteria = criteria;
  }

  List<Flag> all() {
    List<Flag> flags = new ArrayList<>();
    slope().ifPresent(flags::add);
    if (result.standardError().isEmpty()) {
      flags.add(
          Flags.plain(
              FlagKind.NO_FIT_UNCERTAINTY,
              Weight.REVIEW,
              "As many potentials as unknowns: they say nothing about the uncertainty.",
              "Make at least two further additions."));
    }
    if (result.value() < 0) {
      flags.add(
          Flags.plain(
              FlagKind.NEGATIVE_RESULT,
              Weight.NOTE,
              "The result is negative: " + n(result.value()) + ".",
              "Check the blanks."));
    }
    uncertain().ifPresent(flags::add);
    tooSmall().or(this::tooLarge).ifPresent(flags::add);
    return flags;
  }

  /** Without a temperature there is no theory to hold the slope against. */
  private Optional<Flag> slope() {
    OptionalDouble share = result.fit().slopeToTheory();
    if (share.isEmpty()) {
      return Optional.empty();
    }
    Limit least = criteria.of(Criterion.ELECTRODE_SLOPE_LEAST);
    Limit most = criteria.of(Criterion.ELECTRODE_SLOPE_MOST);
    boolean low = least.on() && !(share.getAsDouble() >= least.value());
    boolean high = most.on() && !(share.getAsDouble() <= most.value());
    if (!low && !high) {
      return Optional.empty();
    }
    return Optional.of(
        Flags.against(
            FlagKind.ELECTRODE_SLOPE,
            Weight.REVIEW,
            share.getAsDouble(),
            low ? least : most,
            "The slope of the electrode is "
                + n(result.fit().slope())
                + " mV per decade, "
                + n(100 * share.getAsDouble())
                + " % of theory.",
            "Check the electrode in two standards; clean or replace it, and check the temperature"
                + " and the charge in the mapping."));
  }

  private Optional<Flag> uncertain() {
    OptionalDouble own = result.series().method().targetUncertainty();
    Limit general = criteria.of(Criterion.TARGET_UNCERTAINTY);
    Limit limit =
        own.isPresent()
            ? new Limit(
                own.getAsDouble(), general.on(), LimitSource.LABORATORY, "the method's target")
            : general;
    double relative = result.expandedUncertainty().orElse(0) / Math.abs(result.value());
    if (!limit.on() || result.value() == 0 || relative <= limit.value()) {
      return Optional.empty();
    }
    return Optional.of(
        Flags.against(
            FlagKind.UNCERTAIN,
            Weight.REVIEW,
            relative,
            limit,
            "The expanded uncertainty of the fit is "
                + n(100 * relative)
                + " % of the result; the target is "
                + Numbers.plain(100 * limit.value())
                + " %.",
            "More additions, or larger ones; wait for steady potentials."));
  }

  private double topOverFound() {
    double top = result.flasks().stream().mapToDouble(Flask::x).max().orElse(0);
    return top / result.fit().nativeConcentration();
  }

  private Optional<Flag> tooSmall() {
    Limit limit = criteria.of(Criterion.LEAST_TOP_ADDITION);
    if (!limit.on() || topOverFound() >= limit.value()) {
      return Optional.empty();
    }
    return Optional.of(
        Flags.against(
            FlagKind.ADDITIONS_TOO_SMALL,
            Weight.REVIEW,
            topOverFound(),
            limit,
            "The additions come to " + n(topOverFound()) + " times what is there.",
            "Add about two to three times what is there, so that the potential moves by 20 mV or"
                + " more."));
  }

  private Optional<Flag> tooLarge() {
    Limit review = criteria.of(Criterion.LARGEST_TOP_ADDITION);
    Limit note = criteria.of(Criterion.LARGE_TOP_ADDITION);
    boolean isReview = review.on() && topOverFound() > review.value();
    if (!isReview && !(note.on() && topOverFound() > note.value())) {
      return Optional.empty();
    }
    return Optional.of(
        Flags.against(
            FlagKind.ADDITIONS_TOO_LARGE,
            isReview ? Weight.REVIEW : Weight.NOTE,
            topOverFound(),
            isReview ? review : note,
            "The additions come to " + n(topOverFound()) + " times what is there.",
            "Use smaller additions: here the first potential hardly counts."));
  }
}
