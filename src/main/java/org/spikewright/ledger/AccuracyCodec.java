package org.spikewright.ledger;

import java.time.LocalDate;
import java.util.List;
import java.util.Optional;
import org.spikewright.reading.Accuracies;
import org.spikewright.reading.Accuracies.Accuracy;
import org.spikewright.reading.Bottle;

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

  /** The named stock: its name marked, so that no name is no empty name; then its last day. */
  static void encodeBottle(Fields.Writer out, Optional<Bottle> bottle) {
    out.add(bottle.map(b -> "=" + b.name()).orElse(""));
    bottle.ifPresent(b -> out.add(b.expires().map(LocalDate::toString).orElse("")));
  }

  static Optional<Bottle> bottle(Fields.Reader in) {
    String name = in.text();
    if (name.isEmpty()) {
      return Optional.empty();
    }
    String expires = in.text();
    return Optional.of(
        new Bottle(
            name.substring(1),
            expires.isEmpty() ? Optional.empty() : Optional.of(LocalDate.parse(expires))));
  }

  private static Optional<Accuracy> one(Fields.Reader in) {
    String systematic = in.text();
    return systematic.isEmpty()
        ? Optional.empty()
        : Optional.of(
            new Accuracy(ExactDouble.parse(systematic), ExactDouble.parse(in.text()), in.text()));
  }
}
