package org.spikewright.fit;

/**
 * How a pool is looked at.
 *
 * @param weighting how the method has its lines weighted
 * @param side which bends are looked for
 * @param falseAlarms rate of false alarms of each test over the night, above 0 and below 1
 */
public record PoolOptions(Weighting weighting, BendTest.Side side, double falseAlarms) {

  /** Ordinary lines, saturation, 1 %. */
  public static final PoolOptions DEFAULT =
      new PoolOptions(Weighting.EQUAL, BendTest.Side.SATURATION, 0.01);

  /**
   * Checks the rate.
   *
   * @throws IllegalArgumentException when it is out of range
   */
  public PoolOptions {
    if (!(falseAlarms > 0 && falseAlarms < 1)) {
      throw new IllegalArgumentException("false alarm rate " + falseAlarms);
    }
  }

  /** The same with another weighting. */
  public PoolOptions with(Weighting other) {
    return new PoolOptions(other, side, falseAlarms);
  }

  /** The same with another side. */
  public PoolOptions with(BendTest.Side other) {
    return new PoolOptions(weighting, other, falseAlarms);
  }
}
