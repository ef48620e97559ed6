package org.spikewright.summary;

import org.spikewright.judgement.FlagKind;
import org.spikewright.judgement.Verdict;

/** What verdicts and flags mean, in words for the bench. */
final class Words {
  private Words() {}

  /** What is to happen. */
  static String meaning(Verdict verdict) {
    return switch (verdict) {
      case REPORT -> "can be reported";
      case REVIEW -> "a person decides";
      case REPEAT -> "not reportable; see To repeat";
      case WAITING -> "flasks still due; not judged yet";
    };
  }

  /** The look that repeats what the word says. */
  static Look look(Verdict verdict) {
    return switch (verdict) {
      case REPORT -> Look.REPORT;
      case REVIEW -> Look.REVIEW;
      case REPEAT -> Look.REPEAT;
      case WAITING -> Look.WAITING;
    };
  }

  /** What a flag says about a series. */
  static String meaning(FlagKind kind) {
    return switch (kind) {
      case NO_SERIES -> "the readings form no series";
      case NO_ADDITIONS -> "nothing was added to any flask";
      case SLOPE_NOT_ESTABLISHED -> "the signal does not clearly rise with the addition";
      case BENT -> "the line bends, and the bend moves the result";
      case ODD_FLASK -> "one flask lies off the line through the others";
      case ODD_LEVEL -> "all flasks of one level of addition lie off the line";
      case NOISY -> "the flasks scatter more than those of the night's other series";
      case SUSPECTED_SLIP -> "a simple slip at the bench would explain the points";
      case ODD_SLOPE -> "the sensitivity differs from the night's other series";
      case SHARED_BEND -> "the night's lines bend together";
      case LEVEL_OFF -> "one level of addition is off all over the night";
      case NIGHT_DRIFT -> "the signals drift over the night";
      case ELECTRODE_SLOPE -> "the electrode's slope is far from theory";
      case BEND_ALLOWANCE -> "the data leave a larger bend open than the method allows";
      case UNCERTAIN -> "the uncertainty misses its target";
      case LOW_CORRELATION -> "the correlation is low (it does not see bending)";
      case NO_UNSPIKED_FLASK -> "no flask without addition";
      case FEW_FLASKS -> "fewer flasks than the method expects";
      case ADDITIONS_TOO_SMALL -> "the additions are small beside what is there";
      case ADDITIONS_TOO_LARGE -> "the additions are large beside what is there";
      case UNEVEN_ADDITIONS -> "the additions leave a wide gap, or repeat";
      case OUTSIDE_WORKING_RANGE -> "the result lies outside the method's working range";
      case SCATTERED_READINGS -> "the readings of one flask scatter";
      case BLANK_MISSING -> "the method asks for a blank and there is none";
      case BLANK_HIGH -> "the blank is large beside the result";
      case CHECK_READING_OFF -> "a check reading moved";
      case CONTROL_OUT -> "a control sample of the batch is out of its limits";
      case RECOVERY_OUT -> "a recovery of the batch is out of its limits";
      case DUPLICATES_APART -> "duplicates of the batch lie apart";
      case SERIES_DISAGREE -> "series of one sample disagree";
      case SIMILAR_ID -> "two sample IDs differ only in case or blanks";
      case OVER_RANGE -> "a reading above the instrument's range";
      case LEFT_OUT -> "a reading below range, or missing, was left out";
      case BELOW_DETECTION -> "not detected";
      case NEAR_DETECTION -> "detected, but too little to be measured well";
      case NEGATIVE_RESULT -> "the line meets zero signal on the wrong side";
      case UNEQUAL_ALIQUOTS -> "the aliquots differ from flask to flask";
      case EXPIRED_STOCK -> "the stock was past its last day";
      case READINGS_AS_FLASKS -> "readings were counted as flasks, as the laboratory has set";
      case NO_FIT_UNCERTAINTY -> "too few flasks for an uncertainty of the fit";
      case SUPERSEDED_READING -> "a later delivery replaced a reading";
      case SECOND_RUN -> "a flask was measured a second time";
      case EXPORTED_AGAIN -> "the same series came under another batch name";
      case WAITING -> "flasks are still due";
    };
  }

  /** Whether a flag is one of the statistical tests that share the false-alarm rate. */
  static boolean isTested(FlagKind kind) {
    return switch (kind) {
      case BENT, ODD_FLASK, ODD_LEVEL, NOISY, SUSPECTED_SLIP, ODD_SLOPE -> true;
      default -> false;
    };
  }
}
