package org.spikewright.demo;

/**
 * How an analyte is prepared and read on an instrument. Millilitres of a solution in µg/L, and
 * microlitres of a stock in mg/L, both hold nanograms, so that no factor stands between them.
 *
 * @param instrument its name
 * @param analyte the element
 * @param unit the client's unit, in which the truth is told
 * @param stockMilligramsPerLitre the spiking stock
 * @param stepMicrolitres addition from one flask to the next
 * @param markMillilitres the volume each flask is made up to; in one vessel the volume before the
 *     first addition
 * @param growing whether the additions go into one vessel
 * @param readings of each flask
 * @param sensitivity signal per µg/L in the flask, in a matrix that does not suppress it
 * @param flaskSd relative standard deviation from flask to flask
 * @param floor standard deviation of the signal without any analyte, from flask to flask and from
 *     reading to reading
 * @param decimals of the signal as exported
 */
record Recipe(
    String instrument,
    String analyte,
    String unit,
    double stockMilligramsPerLitre,
    int stepMicrolitres,
    double markMillilitres,
    boolean growing,
    int readings,
    double sensitivity,
    double flaskSd,
    double floor,
    int decimals) {

  static final Recipe CADMIUM =
      new Recipe("furnace", "Cd", "µg/L", 1, 100, 100, false, 2, 0.068, 0.008, 0.0008, 4);
  static final Recipe LEAD =
      new Recipe("furnace", "Pb", "µg/L", 20, 50, 100, false, 3, 0.0052, 0.005, 0.0004, 4);
  static final Recipe NICKEL =
      new Recipe("plasma", "Ni", "µg/L", 5, 40, 50, false, 3, 2150, 0.008, 60, 1);
  static final Recipe COPPER =
      new Recipe("plasma", "Cu", "mg/kg dry", 2, 100, 50, false, 3, 3480, 0.009, 80, 1);
  static final Recipe ZINC =
      new Recipe("stripping", "Zn", "µg/L", 10, 100, 20, true, 3, 2.06, 0.008, 0.3, 2);

  /** Volume read after an addition, in mL. */
  double volume(int additionMicrolitres) {
    return growing ? markMillilitres + additionMicrolitres / 1000.0 : markMillilitres;
  }
}
