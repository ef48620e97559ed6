package org.spikewright.mapping;

import java.util.Optional;
import org.spikewright.quantity.Dimension;

/**
 * Whether concentrations, portion and result are of kinds that lead from one to the other.
 *
 * <p>A concentration of what was added becomes the result by multiplication with digest volume over
 * test portion; no factor turns a mass into an amount of substance but the molar mass, which
 * mappings do not give.
 */
public final class Chain {
  private Chain() {}

  /**
   * Why a result cannot be of this dimension.
   *
   * @param added of the stock or the stated addition
   * @param portion of the test portion, where there is one
   * @param result of the result's unit
   * @return what the result should be instead, or empty when all is well
   */
  public static Optional<String> fault(
      Dimension added, Optional<Dimension> portion, Dimension result) {
    boolean solid = portion.isPresent() && portion.get() == Dimension.MASS;
    if (solid && isPerMass(added)) {
      return Optional.of("an addition per volume, where a mass is digested into a volume");
    }
    Dimension due = solid ? perMass(added) : added;
    if (due == result) {
      return Optional.empty();
    }
    if (isMass(due) != isMass(result)) {
      return Optional.of(
          due.words()
              + ", as the addition is "
              + added.words()
              + "; to go from mass to amount takes the molar mass, which a mapping cannot give:"
              + " write both in mass or both in amount");
    }
    String hint =
        isPerMass(result) && !solid
            ? "; a result per mass needs test_portion (a mass) and digest_volume"
            : "";
    return Optional.of(due.words() + ", as the addition is " + added.words() + hint);
  }

  private static Dimension perMass(Dimension dimension) {
    return dimension == Dimension.MASS_PER_VOLUME
        ? Dimension.MASS_PER_MASS
        : Dimension.AMOUNT_PER_MASS;
  }

  private static boolean isPerMass(Dimension dimension) {
    return dimension == Dimension.MASS_PER_MASS || dimension == Dimension.AMOUNT_PER_MASS;
  }

  private static boolean isMass(Dimension dimension) {
    return dimension == Dimension.MASS_PER_VOLUME || dimension == Dimension.MASS_PER_MASS;
  }
}
