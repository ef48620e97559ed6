package org.spikewright.judgement;

/** The flags, most serious family first; the name is stable and stands in the results file. */
public enum FlagKind {
  NO_SERIES("no-series"),
  NO_ADDITIONS("no-additions"),
  SLOPE_NOT_ESTABLISHED("slope-not-established"),
  BENT("bent"),
  ODD_FLASK("odd-flask"),
  UNCERTAIN("uncertain"),
  LOW_CORRELATION("low-correlation"),
  NO_UNSPIKED_FLASK("no-unspiked-flask"),
  FEW_FLASKS("few-flasks"),
  ADDITIONS_TOO_SMALL("additions-too-small"),
  ADDITIONS_TOO_LARGE("additions-too-large"),
  OVER_RANGE("over-range"),
  LEFT_OUT("left-out"),
  BELOW_DETECTION("below-detection"),
  NEAR_DETECTION("near-detection"),
  NEGATIVE_RESULT("negative-result"),
  UNEQUAL_ALIQUOTS("unequal-aliquots"),
  READINGS_AS_FLASKS("readings-as-flasks"),
  NO_FIT_UNCERTAINTY("no-fit-uncertainty"),
  SUPERSEDED_READING("superseded-reading"),
  SECOND_RUN("second-run"),
  EXPORTED_AGAIN("exported-again"),
  WAITING("waiting");

  private final String shortName;

  FlagKind(String shortName) {
    this.shortName = shortName;
  }

  /** The short name: lower case with hyphens. */
  public String shortName() {
    return shortName;
  }
}
