package org.spikewright.judgement;

import java.util.List;
import java.util.OptionalDouble;

/**
 * What a repeat plan must keep to.
 *
 * @param largestShare in one vessel, the largest share of the start volume that all additions
 *     together may come to; above 0, at most 1
 * @param flasks how many flasks (in one vessel: readings after an addition, and before the first) a
 *     plan has at least; 4 or more, so that a bend can be seen
 * @param mostFlasks how many it has at most, where a target asks for more; at least {@code flasks}
 * @param replicates readings of each flask; 1 or more
 * @param topAddition wanted top addition over the native concentration, {@link #LEAST_TOP} to
 *     {@link #MOST_TOP}
 * @param largestDilution the most that the sample is diluted; 1 or more
 * @param largestStockDilution the most that a stock is diluted; 1 or more
 * @param noise relative standard deviation of a flask where nothing is known; above 0
 * @param pipettes what volumes can be delivered with
 */
public record RepeatCaps(
    double largestShare,
    int flasks,
    int mostFlasks,
    int replicates,
    double topAddition,
    double largestDilution,
    double largestStockDilution,
    double noise,
    List<Pipette> pipettes) {

  /** A top addition is never below this many times the native concentration. */
  public static final double LEAST_TOP = 1.5;

  /** Nor above this many times. */
  public static final double MOST_TOP = 3;

  /** A bend shows itself only against at least so many flasks. */
  public static final int FEWEST_FLASKS = 4;

  /** Common practice, for the laboratory to change. */
  public static final RepeatCaps DEFAULTS =
      new RepeatCaps(
          0.10,
          4,
          12,
          3,
          2,
          1000,
          1000,
          0.02,
          List.of(
              new Pipette("10 µL to 100 µL", 10, 100, 0.1),
              new Pipette("100 µL to 1000 µL", 100, 1000, 1),
              new Pipette("1 mL to 10 mL", 1000, 10000, 10)));

  /** Takes a copy; refuses what makes no sense: {@link IllegalArgumentException}. */
  public RepeatCaps {
    pipettes = List.copyOf(pipettes);
    boolean counts = flasks >= FEWEST_FLASKS && mostFlasks >= flasks && replicates >= 1;
    boolean shares = largestShare > 0 && largestShare <= 1 && noise > 0 && noise < 1;
    boolean top = topAddition >= LEAST_TOP && topAddition <= MOST_TOP;
    boolean dilutions = largestDilution >= 1 && largestStockDilution >= 1;
    if (!(counts && shares && top && dilutions)) {
      throw new IllegalArgumentException("caps that no plan can keep to");
    }
  }

  /** The same with another number of flasks, where one is given. */
  public RepeatCaps withFlasks(int count) {
    return new RepeatCaps(
        largestShare,
        count,
        Math.max(count, mostFlasks),
        replicates,
        topAddition,
        largestDilution,
        largestStockDilution,
        noise,
        pipettes);
  }

  /** The same with other pipettes. */
  public RepeatCaps withPipettes(List<Pipette> others) {
    return new RepeatCaps(
        largestShare,
        flasks,
        mostFlasks,
        replicates,
        topAddition,
        largestDilution,
        largestStockDilution,
        noise,
        others);
  }

  /** The largest volume that a pipette delivers, in µL; empty without pipettes. */
  OptionalDouble highestVolume() {
    return pipettes.stream().mapToDouble(Pipette::highest).max();
  }

  /** The smallest volume that a pipette delivers, in µL; empty without pipettes. */
  OptionalDouble lowestVolume() {
    return pipettes.stream().mapToDouble(Pipette::lowest).min();
  }
}
