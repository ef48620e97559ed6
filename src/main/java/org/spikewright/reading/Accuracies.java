package org.spikewright.reading;

import java.util.Optional;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.PlusMinus;
import org.spikewright.quantity.Quantity;

/**
 * How well the quantities of a flask are known, each as relative standard uncertainties; what is
 * empty was not declared and counts nowhere.
 *
 * @param stock of the stock's concentration; random part 0
 * @param aliquot of the aliquot
 * @param addition of the volume (or mass) of stock delivered; in one vessel of the step's own
 *     delivery where the mapping says what each step added, of the total where it says totals;
 *     empty where nothing was added
 * @param finalVolume of the final volume
 * @param startVolume of the volume in one vessel before the first addition
 * @param dilution of the product of all dilutions before the aliquot
 * @param testPortion of the mass or volume taken for a digest
 * @param digestVolume of the volume the digest was made up to
 * @param dryMass of the dry-mass fraction
 */
public record Accuracies(
    Optional<Accuracy> stock,
    Optional<Accuracy> aliquot,
    Optional<Accuracy> addition,
    Optional<Accuracy> finalVolume,
    Optional<Accuracy> startVolume,
    Optional<Accuracy> dilution,
    Optional<Accuracy> testPortion,
    Optional<Accuracy> digestVolume,
    Optional<Accuracy> dryMass) {

  /** Nothing was declared. */
  public static final Accuracies NONE =
      new Accuracies(
          Optional.empty(),
          Optional.empty(),
          Optional.empty(),
          Optional.empty(),
          Optional.empty(),
          Optional.empty(),
          Optional.empty(),
          Optional.empty(),
          Optional.empty());

  /**
   * How well one quantity is known.
   *
   * @param systematic relative standard uncertainty shared by every use of the same tool, 0 or more
   * @param random relative standard uncertainty from one use to the next, 0 or more
   * @param origin in words, such as {@code "pipette P200: ± 1.2 µL, rectangular"}; stands in the
   *     budget
   */
  public record Accuracy(double systematic, double random, String origin) {

    /**
     * From a number after ±, which is taken as systematic.
     *
     * @param owner whose number it is; empty for the quantity's own
     * @return empty when no number is declared, or the value is 0
     */
    public static Optional<Accuracy> of(Measured value, PlusMinus means, String owner) {
      double size = Math.abs(value.quantity().value());
      if (value.tolerance().isEmpty() || !(size > 0)) {
        return Optional.empty();
      }
      double tolerance = value.tolerance().getAsDouble();
      String words = "± " + new Quantity(tolerance, value.quantity().unit()) + ", " + means.words();
      return Optional.of(
          new Accuracy(
              means.standard(tolerance) / size, 0, owner.isEmpty() ? words : owner + ": " + words));
    }
  }
}
