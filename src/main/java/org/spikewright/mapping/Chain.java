package org.spikewright.mapping;

import java.util.Optional;
import org.spikewright.quantity.Dimension;

/**
 * Whether concentrations, portion and result are of kinds that lead from one to the other.
 *
 * <p>A concentration of what was added becomes the result by multiplication with digest volume (or
 * mass) over test portion; no factor turns a mass into an amount of substance but the molar mass.
 *
 * @param portion of the test portion, where there is one
 * @param digestIsWeighed whether the digest is known by its mass
 * @param molarMass whether the molar mass is known
 */
public record Chain(Optional<Dimension> portion, boolean digestIsWeighed, boolean molarMass) {

  /**
   * Why a result cannot be of this dimension.
   *
   * @param added of the stock or the stated addition
   * @param result of the result's unit
   * @return what the result should be instead, or empty when all is well
   */
  public Optional<String> fault(Dimension added, Dimension result) {
    boolean solid = portion.isPresent() && portion.get() == Dimension.MASS;
    if (portion.isPresent() && !solid && digestIsWeighed) {
      return Optional.of("a test_portion that is a mass, where the digest is one");
    }
    if (solid && isPerMass(added) && !digestIsWeighed) {
      return Optional.of("an addition per volume, where a mass is digested into a volume");
    }
    if (solid && !isPerMass(added) && digestIsWeighed) {
      return Optional.of("an addition per mass, where the digest is known by its mass");
    }
    Dimension due = solid ? perMass(added) : added;
    if (due == result || molarMass && isPerMass(due) == isPerMass(result)) {
      return Optional.empty();
    }
    if (isMass(due) != isMass(result) && !molarMass) {
      return Optional.of(
          due.words()
              + ", as the addition is "
              + added.words()
              + "; to go from mass to amount takes the molar mass: name molar_mass, or write both"
              + " in mass or both in amount");
    }
    String hint =
        isPerMass(result) && !solid
            ? "; a result per mass needs test_portion (a mass) and digest_volume"
            : "";
    return Optional.of(due.words() + ", as the addition is " + added.words() + hint);
  }

  /** Whether two concentrations can be added, with the molar mass where it is known. */
  public boolean addUp(Dimension one, Dimension other) {
    return one == other || molarMass && isPerMass(one) == isPerMass(other);
  }

  private static Dimension perMass(Dimension dimension) {
    return isMass(dimension) ? Dimension.MASS_PER_MASS : Dimension.AMOUNT_PER_MASS;
  }

  /** Whether a concentration is per mass of solution. */
  public static boolean isPerMass(Dimension dimension) {
    return dimension == Dimension.MASS_PER_MASS || dimension == Dimension.AMOUNT_PER_MASS;
  }

  static boolean isMass(Dimension dimension) {
    return dimension == Dimension.MASS_PER_VOLUME || dimension == Dimension.MASS_PER_MASS;
  }
}
