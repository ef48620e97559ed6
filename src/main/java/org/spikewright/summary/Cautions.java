package org.spikewright.summary;

import java.util.List;

/** What the workbook must not be taken for. */
final class Cautions {
  static final String REVIEW =
      "For review by qualified staff under the laboratory's own validated method and quality"
          + " system; local regulation goes first. Spikewright does not validate a method.";

  static final String ADDITIVE =
      "Standard additions correct a proportional matrix effect only: an additive interference, a"
          + " blank contribution or a spectral overlap stays in the result.";

  static final String HANDLING =
      "Advice says what to change, not how to handle it: acids (hydrofluoric and perchloric above"
          + " all), metals and samples are handled by the safety data sheets and the laboratory's"
          + " rules.";

  static final String VOLUMES =
      "Volumes are arithmetic, not a procedure: whether and how anything is prepared is decided by"
          + " qualified staff, under the laboratory's own method and rules.";

  static final List<String> ALL = List.of(REVIEW, ADDITIVE, HANDLING, VOLUMES);

  private Cautions() {}
}
