package org.spikewright.judgement;

import static org.spikewright.judgement.Flags.n;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.fit.BendAllowance;
import org.spikewright.fit.Detection;
import org.spikewright.judgement.Flag.LimitSource;
import org.spikewright.judgement.Flag.Weight;
import org.spikewright.quantity.Numbers;
import org.spikewright.reading.MethodFacts.WorkingRange;
import org.spikewright.series.Flask;

/** Flags on the size of the result: its uncertainty, its additions, its detection limit. */
final class ResultFlags {
  private final SeriesResult result;
  private final Criteria criteria;
  private final String unit;
  private final boolean belowDetection;

  ResultFlags(SeriesResult result, Criteria criteria) {
    this.result = result;
    this.criteria = criteria;
    this.unit = result.series().toResult().unit().symbol();
    this.belowDetection = ReportedText.isBelowDetection(result);
  }

  List<Flag> all() {
    List<Flag> flags = new ArrayList<>();
    if (result.reportedStandardError().isEmpty()) {
      flags.add(
          Flags.plain(
              FlagKind.NO_FIT_UNCERTAINTY,
              Weight.REVIEW,
              "Two flasks give a line but say nothing about its uncertainty.",
              "Prepare at least two further flasks."));
    }
    detection().ifPresent(flags::add);
    workingRange().ifPresent(flags::add);
    bendAllowance().ifPresent(flags::add);
    if (result.value() < 0) {
      flags.add(
          Flags.plain(
              FlagKind.NEGATIVE_RESULT,
              Weight.NOTE,
              "The result is negative: " + n(result.value()) + " " + unit + ".",
              "Check the blanks; a value below zero within its uncertainty means nothing found."));
    }
    if (!belowDetection) {
      uncertain().ifPresent(flags::add);
      tooSmall().ifPresent(flags::add);
    }
    overTrustedRange()
        .or(() -> belowDetection ? Optional.empty() : tooLarge())
        .ifPresent(flags::add);
    return flags;
  }

  private Optional<Flag> detection() {
    if (result.detection().isEmpty()) {
      return Optional.empty();
    }
    Detection detection = result.detection().get();
    if (belowDetection) {
      return Optional.of(
          Flags.plain(
              FlagKind.BELOW_DETECTION,
              Weight.NOTE,
              "Not detected: "
                  + n(result.value())
                  + " is not above the critical value "
                  + n(detection.criticalValue())
                  + " "
                  + unit
                  + "; detection limit "
                  + n(detection.detectionLimit())
                  + ".",
              "Report as below the detection limit."));
    }
    return result.value() > 0 && result.value() < detection.detectionLimit()
        ? Optional.of(
            Flags.plain(
                FlagKind.NEAR_DETECTION,
                Weight.NOTE,
                "Detected, but below the detection limit "
                    + n(detection.detectionLimit())
                    + " "
                    + unit
                    + ".",
                "Mark the result as between critical value and detection limit."))
        : Optional.empty();
  }

  private Optional<Flag> workingRange() {
    Optional<WorkingRange> range = result.series().method().workingRange();
    boolean outside =
        range.isPresent()
            && !belowDetection
            && !(result.value() >= range.get().lower() && result.value() <= range.get().upper());
    return outside
        ? Optional.of(
            Flags.plain(
                FlagKind.OUTSIDE_WORKING_RANGE,
                Weight.NOTE,
                "The result "
                    + n(result.value())
                    + " "
                    + unit
                    + " lies outside the method's working range, "
                    + Numbers.plain(range.get().lower())
                    + " to "
                    + Numbers.plain(range.get().upper())
                    + ".",
                "Dilute the sample, or take another method."))
        : Optional.empty();
  }

  /** A note only where the method sets a limit; the number itself always stands in the results. */
  private Optional<Flag> bendAllowance() {
    OptionalDouble limit = result.series().method().bendAllowance();
    Optional<BendAllowance> allowance = result.allowance();
    if (limit.isEmpty() || allowance.isEmpty() || belowDetection) {
      return Optional.empty();
    }
    OptionalDouble bias = allowance.get().bias();
    double relative =
        bias.isPresent() ? bias.getAsDouble() / Math.abs(result.estimate().value()) : 1;
    if (bias.isPresent() && relative <= limit.getAsDouble()) {
      return Optional.empty();
    }
    String open =
        bias.isPresent()
            ? "a bend that moves the result by up to " + n(100 * relative) + " %"
            : "a bend without any bound";
    return Optional.of(
        Flags.against(
            FlagKind.BEND_ALLOWANCE,
            Weight.NOTE,
            relative,
            new Limit(limit.getAsDouble(), true, LimitSource.LABORATORY, "the method's limit"),
            "The data leave open "
                + open
                + "; the method allows "
                + n(100 * limit.getAsDouble())
                + " %.",
            "More levels, or less scatter, would tell."));
  }

  private Optional<Flag> uncertain() {
    Limit limit = target();
    OptionalDouble relative = relativeUncertainty();
    if (!limit.on() || relative.isEmpty() || relative.getAsDouble() <= limit.value()) {
      return Optional.empty();
    }
    return Optional.of(
        Flags.against(
            FlagKind.UNCERTAIN,
            Weight.REVIEW,
            relative.getAsDouble(),
            limit,
            "The expanded uncertainty is "
                + n(100 * relative.getAsDouble())
                + " % of the result; the target is "
                + Numbers.plain(100 * limit.value())
                + " %.",
            "More flasks, or additions of two to three times what is there."));
  }

  private Limit target() {
    OptionalDouble own = result.series().method().targetUncertainty();
    Limit general = criteria.of(Criterion.TARGET_UNCERTAINTY);
    return own.isPresent()
        ? new Limit(own.getAsDouble(), general.on(), LimitSource.LABORATORY, "the method's target")
        : general;
  }

  private OptionalDouble relativeUncertainty() {
    OptionalDouble expanded = ReportedText.expandedUncertainty(result);
    return expanded.isPresent() && result.value() != 0
        ? OptionalDouble.of(expanded.getAsDouble() / Math.abs(result.value()))
        : OptionalDouble.empty();
  }

  private Optional<Flag> tooSmall() {
    Limit limit = criteria.of(Criterion.LEAST_TOP_ADDITION);
    double ratio = topAddition() / found();
    if (!limit.on() || !(found() > 0) || ratio >= limit.value()) {
      return Optional.empty();
    }
    OptionalDouble relative = relativeUncertainty();
    boolean meetsTarget = relative.isPresent() && relative.getAsDouble() <= target().value();
    return Optional.of(
        Flags.against(
            FlagKind.ADDITIONS_TOO_SMALL,
            meetsTarget ? Weight.NOTE : Weight.REPEAT,
            ratio,
            limit,
            "The largest addition is "
                + n(ratio)
                + " times what is there; at least "
                + Numbers.plain(limit.value())
                + " times is needed"
                + (meetsTarget ? ", but the uncertainty meets its target." : "."),
            "Prepare again with the largest addition at 1.5 to 3 times what is there."));
  }

  private Optional<Flag> tooLarge() {
    double floor = result.detection().map(Detection::detectionLimit).orElse(0.0);
    double reference = Math.max(found(), floor);
    if (!(reference > 0)) {
      return Optional.empty();
    }
    double ratio = topAddition() / reference;
    Limit review = criteria.of(Criterion.LARGEST_TOP_ADDITION);
    Limit note = criteria.of(Criterion.LARGE_TOP_ADDITION);
    boolean isReview = review.on() && ratio > review.value();
    if (!isReview && !(note.on() && ratio > note.value())) {
      return Optional.empty();
    }
    return Optional.of(
        Flags.against(
            FlagKind.ADDITIONS_TOO_LARGE,
            isReview ? Weight.REVIEW : Weight.NOTE,
            ratio,
            isReview ? review : note,
            "The largest addition is " + n(ratio) + " times what is there.",
            "Use additions of 1.5 to 3 times what is there; the unspiked flask hardly counts"
                + " here."));
  }

  /** What was found by the line, before any blank is subtracted. */
  private double found() {
    return result.series().toResult().length(result.estimate().value());
  }

  private double topAddition() {
    double x = result.flasks().stream().mapToDouble(Flask::x).max().orElse(0);
    return result.series().toResult().length(x);
  }

  private Optional<Flag> overTrustedRange() {
    OptionalDouble trusted = result.series().method().trustedSignal();
    double top = result.flasks().stream().mapToDouble(Flask::meanAsRead).max().orElse(0);
    if (trusted.isEmpty() || top <= trusted.getAsDouble()) {
      return Optional.empty();
    }
    Limit limit =
        new Limit(
            trusted.getAsDouble(), true, LimitSource.LABORATORY, "the mapping's trusted_signal");
    return Optional.of(
        Flags.against(
            FlagKind.ADDITIONS_TOO_LARGE,
            Weight.REVIEW,
            top,
            limit,
            "The highest signal "
                + n(top)
                + " lies above the trusted range ("
                + Numbers.plain(limit.value())
                + ").",
            "Use smaller additions or dilute the sample."));
  }
}
