package org.spikewright.reading;

import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.quantity.Numbers;
import org.spikewright.quantity.Quantity;

/**
 * What was done to the sample before the aliquot was taken. Flasks that differ here are separate
 * series of one sample. The aliquot itself is never part of it.
 *
 * @param name the preparation as mapped; empty when it is the set of the other four
 * @param dilution volume after over volume taken, the product over all dilutions; 1 or more
 * @param testPortion mass or volume of sample taken for a digest
 * @param digestVolume volume the digest was made up to; its mass where it was weighed
 * @param dryMassFraction dry mass over moist mass, above 0 and at most 1
 */
public record Preparation(
    Optional<String> name,
    double dilution,
    Optional<Quantity> testPortion,
    Optional<Quantity> digestVolume,
    OptionalDouble dryMassFraction) {

  /** Nothing was done: the sample itself was aliquoted. */
  public static final Preparation NONE =
      new Preparation(
          Optional.empty(), 1, Optional.empty(), Optional.empty(), OptionalDouble.empty());

  /** As a person reads it, and the text that orders preparations; empty when nothing was done. */
  public String shown() {
    if (name.isPresent()) {
      return name.get();
    }
    StringBuilder words = new StringBuilder();
    if (dilution != 1) {
      words.append("diluted ").append(Numbers.plain(dilution)).append("-fold");
    }
    testPortion.ifPresent(portion -> words.append(comma(words)).append(portion));
    digestVolume.ifPresent(volume -> words.append(comma(words)).append("in ").append(volume));
    dryMassFraction.ifPresent(
        dry -> words.append(comma(words)).append("dry fraction ").append(Numbers.plain(dry)));
    return words.toString();
  }

  private static String comma(StringBuilder words) {
    return words.isEmpty() ? "" : ", ";
  }
}
