package org.spikewright.analysis;

import java.util.OptionalDouble;
import java.util.stream.Collectors;
import org.spikewright.analysis.ControlRule.Kind;
import org.spikewright.judgement.Flag;
import org.spikewright.judgement.FlagKind;
import org.spikewright.reading.Subject;
import org.spikewright.series.SeriesKey;

/** The flags that what stands beside a series brings to it. */
final class BatchFlags {
  private BatchFlags() {}

  static BatchKey key(SeriesKey series, String batch) {
    Subject subject = series.subject();
    return new BatchKey(subject.instrument(), batch, subject.analyte(), subject.line());
  }

  static Flag of(ControlResult control) {
    boolean spiked = control.key().kind() == Kind.SPIKED_CONTROL;
    return new Flag(
        spiked ? FlagKind.RECOVERY_OUT : FlagKind.CONTROL_OUT,
        Flag.Weight.REVIEW,
        control.plotted(),
        OptionalDouble.empty(),
        Flag.LimitSource.LABORATORY,
        capital(control.key().kind().word())
            + " "
            + control.series().subject().sample()
            + " of the batch is out: "
            + found(control)
            + control.words()
            + ".",
        "Find out why before results of this batch are used, and measure the control again.");
  }

  private static String found(ControlResult control) {
    if (control.value().isEmpty()) {
      return "";
    }
    String words = "found " + Say.n(control.value().getAsDouble()) + " " + control.unit();
    if (control.reference().isPresent()) {
      String what = control.key().kind() == Kind.SPIKED_CONTROL ? "added " : "known ";
      words += ", " + what + Say.n(control.reference().getAsDouble()) + " " + control.unit();
    }
    if (control.recovery().isPresent()) {
      words += ", recovery " + Say.share(control.recovery().getAsDouble());
    }
    return words + "; ";
  }

  static Flag of(DuplicateResult duplicate) {
    return new Flag(
        FlagKind.DUPLICATES_APART,
        Flag.Weight.REVIEW,
        duplicate.difference(),
        duplicate.limit(),
        Flag.LimitSource.LABORATORY,
        "Duplicates of the batch lie apart: "
            + duplicate.original()
            + " "
            + Say.n(duplicate.originalValue().orElseThrow())
            + " and "
            + duplicate.series().subject().sample()
            + " "
            + Say.n(duplicate.value())
            + " "
            + duplicate.unit()
            + ", a difference of "
            + Say.share(duplicate.difference().orElseThrow())
            + "; the limit is "
            + Say.share(duplicate.limit().orElseThrow())
            + ".",
        "Prepare both again; look for a mix-up or an uneven sample.");
  }

  static Flag of(BlankResult blank) {
    return new Flag(
        FlagKind.BLANK_HIGH,
        Flag.Weight.REVIEW,
        OptionalDouble.of(blank.value()),
        blank.most(),
        Flag.LimitSource.LABORATORY,
        "Blank "
            + blank.series().subject().sample()
            + " of the batch holds "
            + Say.n(blank.value())
            + " "
            + blank.unit()
            + "; the limit is "
            + Say.n(blank.most().orElseThrow())
            + ".",
        "Find out where it comes from before results of this batch are used.");
  }

  static Flag of(Agreement agreement) {
    String values = agreement.values().stream().map(Say::n).collect(Collectors.joining(", "));
    return new Flag(
        FlagKind.SERIES_DISAGREE,
        Flag.Weight.REVIEW,
        OptionalDouble.of(agreement.combination().p()),
        OptionalDouble.of(agreement.limit()),
        Flag.LimitSource.LABORATORY,
        "The "
            + agreement.series().size()
            + " series of this sample disagree: "
            + values
            + " "
            + agreement.unit()
            + " (chi-square "
            + Say.n(agreement.combination().chiSquare())
            + ", p "
            + Say.n(agreement.combination().p())
            + ").",
        "Look for what differs between them: dilution, digest, instrument; report none alone.");
  }

  private static String capital(String words) {
    return Character.toUpperCase(words.charAt(0)) + words.substring(1);
  }
}
