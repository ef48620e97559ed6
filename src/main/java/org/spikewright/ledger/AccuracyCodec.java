package org.spikewright.ledger;

import java.util.List;
import java.util.Optional;
import org.spikewright.reading.Accuracies;
import org.spikewright.reading.Accuracies.Accuracy;

/** How well a flask's quantities are known, as fields; one empty field when nothing is known. */
final class AccuracyCodec {
  private AccuracyCodec() {}

  static void encode(Fields.Writer out, Accuracies known) {
    if (known.equals(Accuracies.NONE)) {
      out.add("");
      return;
    }
    out.add("known");
    List.of(
            known.stock(),
            known.aliquot(),
            known.addition(),
            known.finalVolume(),
            known.startVolume(),
            known.dilution(),
            known.testPortion(),
            known.digestVolume(),
            known.dryMass())
        .forEach(accuracy -> encode(out, accuracy));
  }

  private static void encode(Fields.Writer out, Optional<Accuracy> accuracy) {
    out.add(accuracy.map(a -> ExactDouble.text(a.systematic())).orElse(""));
    accuracy.ifPresent(a -> out.add(ExactDouble.text(a.random())).add(a.origin()));
  }

  static Accuracies decode(Fields.Reader in) {
    if (in.text().isEmpty()) {
      return Accuracies.NONE;
    }
    return new Accuracies(
        one(in), one(in), one(in), one(in), one(in), one(in), one(in), one(in), one(in));
  }

  private static Optional<Accuracy> one(Fields.Reader in) {
    String systematic = in.text();
    return systematic.isEmpty()
        ? Optional.empty()
        : Optional.of(
            new Accuracy(ExactDouble.parse(systematic), ExactDouble.parse(in.text()), in.text()));
  }
}
