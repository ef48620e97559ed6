package org.spikewright.judgement;

/** The flags, causes before consequences; the name is stable and stands in the results file. */
public enum FlagKind {
  NO_SERIES("no-series"),
  NO_ADDITIONS("no-additions"),
  SLOPE_NOT_ESTABLISHED("slope-not-established"),
  BENT("bent"),
  SUSPECTED_SLIP("suspected-slip"),
  ODD_FLASK("odd-flask"),
  ODD_LEVEL("odd-level"),
  NOISY("noisy"),
  ODD_SLOPE("odd-slope"),
  SHARED_BEND("shared-bend"),
  LEVEL_OFF("level-off"),
  NIGHT_DRIFT("night-drift"),
  ELECTRODE_SLOPE("electrode-slope"),
  NO_UNSPIKED_FLASK("no-unspiked-flask"),
  FEW_FLASKS("few-flasks"),
  ADDITIONS_TOO_SMALL("additions-too-small"),
  ADDITIONS_TOO_LARGE("additions-too-large"),
  UNEVEN_ADDITIONS("uneven-additions"),
  UNCERTAIN("uncertain"),
  LOW_CORRELATION("low-correlation"),
  BEND_ALLOWANCE("bend-allowance"),
  OVER_RANGE("over-range"),
  LEFT_OUT("left-out"),
  OUTSIDE_WORKING_RANGE("outside-working-range"),
  SCATTERED_READINGS("scattered-readings"),
  BLANK_MISSING("blank-missing"),
  BLANK_HIGH("blank-high"),
  CHECK_READING_OFF("check-reading-off"),
  CONTROL_OUT("control-out"),
  RECOVERY_OUT("recovery-out"),
  DUPLICATES_APART("duplicates-apart"),
  SERIES_DISAGREE("series-disagree"),
  BELOW_DETECTION("below-detection"),
  NEAR_DETECTION("near-detection"),
  NEGATIVE_RESULT("negative-result"),
  UNEQUAL_ALIQUOTS("unequal-aliquots"),
  EXPIRED_STOCK("expired-stock"),
  READINGS_AS_FLASKS("readings-as-flasks"),
  NO_FIT_UNCERTAINTY("no-fit-uncertainty"),
  SIMILAR_ID("similar-id"),
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
