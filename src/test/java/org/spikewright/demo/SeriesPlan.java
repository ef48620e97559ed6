package org.spikewright.demo;

/**
 * One series of the demo before noise.
 *
 * @param recipe how it is prepared and read
 * @param sample its identifier
 * @param site where it was taken; invented
 * @param truth the concentration in the sample, in the recipe's unit
 * @param aliquotMillilitres volume of sample solution in each flask or in the vessel
 * @param digest what was done before the aliquot
 * @param flasks how many were prepared
 * @param scenario what is the matter with it
 * @param note for the truth file
 */
record SeriesPlan(
    Recipe recipe,
    String sample,
    String site,
    double truth,
    double aliquotMillilitres,
    Digest digest,
    int flasks,
    Scenario scenario,
    String note) {

  /** A water without anything the matter. */
  static SeriesPlan water(Recipe recipe, String sample, double truth, int flasks) {
    double aliquot = recipe.growing() ? 10 : 20;
    return new SeriesPlan(
        recipe, sample, Sites.of(sample), truth, aliquot, Digest.NONE, flasks, Scenario.CLEAN, "");
  }

  /** A sediment without anything the matter. */
  static SeriesPlan sediment(String sample, double truth, int flasks, Digest digest) {
    return new SeriesPlan(
        Recipe.COPPER, sample, Sites.of(sample), truth, 10, digest, flasks, Scenario.CLEAN, "");
  }

  /** The same with another aliquot. */
  SeriesPlan aliquot(double millilitres) {
    return new SeriesPlan(recipe, sample, site, truth, millilitres, digest, flasks, scenario, note);
  }

  /** The same with something the matter. */
  SeriesPlan with(Scenario other, String why) {
    return new SeriesPlan(
        recipe, sample, site, truth, aliquotMillilitres, digest, flasks, other, why);
  }

  /** Addition to a flask counted from 1; in one vessel the total so far. */
  int additionMicrolitres(int flask) {
    return (flask - 1) * recipe.stepMicrolitres();
  }

  /** What is in a flask counted from 1, in µg/L, when all went as planned. */
  double inFlask(int flask) {
    return inFlask(flask, 1);
  }

  /** The same with a stock of so many times the strength it should have. */
  double inFlask(int flask, double strength) {
    int addition = additionMicrolitres(flask);
    double nanograms =
        digest.solution(truth) * aliquotMillilitres
            + strength * recipe.stockMilligramsPerLitre() * addition;
    return nanograms / recipe.volume(addition);
  }
}
