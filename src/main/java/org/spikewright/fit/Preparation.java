package org.spikewright.fit;

import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * What is known about how a series was prepared, as numbers: result = (C_x·dilution −
 * blank)·perSolution.
 *
 * @param parts the inputs whose uncertainty is known; one that is missing contributes nothing
 * @param dilution volume after over volume taken of the dilutions before the aliquot, 1 or more
 * @param blank concentration subtracted, in the unit of the undiluted solution; 0 without
 * @param perSolution what makes the result of the solution's concentration: digest volume over test
 *     portion over dry-mass fraction, above 0; 1 for a liquid
 * @param vessel how one vessel was filled; empty for flasks made up one by one, where the random
 *     part of the additions is in the scatter about the line already
 */
public record Preparation(
    Map<Input, Part> parts,
    double dilution,
    double blank,
    double perSolution,
    Optional<OneVessel> vessel) {

  /** Refuses what is out of range or no number: {@link IllegalArgumentException}. */
  public Preparation {
    if (!(Double.isFinite(dilution * perSolution) && dilution >= 1 && perSolution > 0)
        || !Double.isFinite(blank)) {
      throw new IllegalArgumentException(
          "dilution " + dilution + ", per solution " + perSolution + ", blank " + blank);
    }
    parts = Map.copyOf(parts);
  }

  /** An input of the result beside the signals. */
  public enum Input {
    /** Relative: concentration of the stock that was added. */
    STOCK("stock", "concentration of the stock"),
    /** Relative: the aliquot's volume or mass, as far as all flasks share it. */
    ALIQUOT("aliquot", "volume of the aliquot"),
    /** Relative: the part of the addition volumes that all additions share. */
    ADDITIONS("additions", "addition volumes, the part that all share"),
    /** Relative: the final volume; only where it does not cancel (additions in flask terms). */
    FINAL_VOLUME("final volume", "final volume of the flasks"),
    /** Relative: the dilution before the aliquot. */
    DILUTION("dilution", "dilution before the aliquot"),
    /** Relative: the digest's volume. */
    DIGEST_VOLUME("digest volume", "volume of the digest"),
    /** Relative: mass or volume of the test portion. */
    PORTION("test portion", "mass of the test portion"),
    /** Relative: the dry-mass fraction. */
    DRY_MASS("dry mass", "dry-mass fraction"),
    /** Absolute, in the unit of the undiluted solution: the blank that is subtracted. */
    BLANK("blank", "blank that is subtracted");

    final String label;
    final String what;

    Input(String label, String what) {
      this.label = label;
      this.what = what;
    }
  }

  /**
   * How well an input is known.
   *
   * @param standardUncertainty 0 or more; relative or absolute as {@link Input} says
   * @param df above 0, infinite where a tolerance is stated
   */
  public record Part(double standardUncertainty, double df) {
    /** Refuses what is out of range or no number: {@link IllegalArgumentException}. */
    public Part {
      if (!(standardUncertainty >= 0 && standardUncertainty <= Double.MAX_VALUE && df > 0)) {
        throw new IllegalArgumentException(standardUncertainty + " with " + df + " df");
      }
    }

    /** An uncertainty that is taken as known. */
    public static Part known(double standardUncertainty) {
      return new Part(standardUncertainty, Double.POSITIVE_INFINITY);
    }
  }

  /**
   * Successive additions to one vessel; all volumes in one unit.
   *
   * @param startVolume volume before the first addition, at least the aliquot; infinite where the
   *     signals were not multiplied by (start + added)/start
   * @param aliquot volume of the aliquot in it
   * @param otherUncertainty standard uncertainty of the rest of the start volume, 0 or more
   * @param added volume added in all up to each point of the line, in the line's order, 0 or more
   * @param deliveries in the order in which they were made
   */
  public record OneVessel(
      double startVolume,
      double aliquot,
      double otherUncertainty,
      List<Double> added,
      List<Delivery> deliveries) {

    /** Refuses what is out of range or no number: {@link IllegalArgumentException}. */
    public OneVessel {
      if (!(startVolume >= aliquot && aliquot > 0 && otherUncertainty >= 0)
          || !added.stream().allMatch(volume -> volume >= 0 && volume <= Double.MAX_VALUE)) {
        throw new IllegalArgumentException(startVolume + " with " + aliquot + ", added " + added);
      }
      added = List.copyOf(added);
      deliveries = List.copyOf(deliveries);
    }
  }

  /**
   * One addition to the vessel.
   *
   * @param firstPoint the first point of the line that has it, from 0; all later ones have it too
   * @param perVolume what a unit of volume adds to x: stock over aliquot
   * @param standardUncertainty of this delivery's volume, its random part, 0 or more
   */
  public record Delivery(int firstPoint, double perVolume, double standardUncertainty) {
    /** Refuses what is out of range or no number: {@link IllegalArgumentException}. */
    public Delivery {
      if (!(firstPoint >= 0 && Double.isFinite(perVolume))
          || !(standardUncertainty >= 0 && standardUncertainty <= Double.MAX_VALUE)) {
        throw new IllegalArgumentException(
            firstPoint + ": " + perVolume + ", " + standardUncertainty);
      }
    }
  }
}
