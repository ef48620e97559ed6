package org.spikewright.reading;

import java.time.LocalDate;
import java.util.Map;
import java.util.Optional;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.PlusMinus;
import org.spikewright.reading.Accuracies.Accuracy;

/**
 * A named stock.
 *
 * @param name as mappings and bench data call it
 * @param all its concentration, where it is the same for every analyte
 * @param each its concentration by analyte, where it differs or holds only these
 * @param means what the number after ± is
 * @param certificate where the value comes from, in words; may be empty
 * @param expires the last day on which it may be used, where there is one
 */
public record Stock(
    String name,
    Optional<Measured> all,
    Map<String, Measured> each,
    PlusMinus means,
    String certificate,
    Optional<LocalDate> expires) {

  /** Copies the map. */
  public Stock {
    each = Map.copyOf(each);
  }

  /** Its concentration of an analyte; empty when it is not said to hold it. */
  public Optional<Measured> of(String analyte) {
    Measured own = each.get(analyte);
    return own == null ? all : Optional.of(own);
  }

  /** How well its concentration of an analyte is known; empty when no ± is declared. */
  public Optional<Accuracy> accuracy(String analyte) {
    Optional<Measured> value = of(analyte);
    if (value.isEmpty() || value.get().tolerance().isEmpty()) {
      return Optional.empty();
    }
    return Accuracy.of(value.get(), means, name)
        .map(
            accuracy ->
                certificate.isEmpty()
                    ? accuracy
                    : new Accuracy(
                        accuracy.systematic(), 0, accuracy.origin() + "; " + certificate));
  }

  /** What a flask remembers of it. */
  public Bottle bottle() {
    return new Bottle(name, expires);
  }
}
