package org.spikewright.reading;

import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.quantity.Measured;

/**
 * The three blanks, never merged.
 *
 * @param baseline the signal of this matrix without analyte, in signal units, subtracted from each
 *     signal
 * @param method the reagent or method blank carried through the preparation, as a concentration in
 *     the digest or undiluted sample solution, subtracted there
 * @param solvent analyte in the spiking solvent that the stock's value does not include, added to
 *     the stock's concentration
 */
public record Blanks(
    OptionalDouble baseline, Optional<Measured> method, Optional<Measured> solvent) {
  /** No blank was mapped. */
  public static final Blanks NONE =
      new Blanks(OptionalDouble.empty(), Optional.empty(), Optional.empty());
}
