package org.spikewright.demo;

/**
 * How a sediment became a solution.
 *
 * @param batch the digestion it went through, together with others
 * @param portionGrams moist sediment taken
 * @param volumeMillilitres volume the digest was made up to
 * @param dilution volume after over volume taken, before the aliquot
 * @param dryPercent dry mass in percent of the moist mass
 */
record Digest(
    String batch, double portionGrams, double volumeMillilitres, int dilution, double dryPercent) {

  /** A water: nothing was done to it. */
  static final Digest NONE = new Digest("", 1, 1, 1, 100);

  /** As the laboratory makes them: to 50 mL, then one part and nine. */
  static Digest of(String batch, double portionGrams, double dryPercent) {
    return new Digest(batch, portionGrams, 50, 10, dryPercent);
  }

  /**
   * The concentration in the solution that was aliquoted.
   *
   * @param truth in µg/L for a water, in mg/kg dry for a sediment
   * @return in µg/L
   */
  double solution(double truth) {
    if (equals(NONE)) {
      return truth;
    }
    double micrograms = truth * dryPercent / 100 * portionGrams;
    return micrograms / (volumeMillilitres / 1000) / dilution;
  }
}
