package org.spikewright.judgement;

import static org.spikewright.judgement.Flag.LimitSource.COMMON_PRACTICE;
import static org.spikewright.judgement.Flag.LimitSource.LABORATORY;
import static org.spikewright.judgement.Flag.LimitSource.PUBLISHED;

import org.spikewright.judgement.Flag.LimitSource;

/** The limits of judgement, each with what holds where the laboratory sets nothing else. */
public enum Criterion {
  FALSE_ALARMS(
      "false_alarms",
      "False alarms per straight series",
      0.02,
      0.5,
      LABORATORY,
      "at most one false statistical flag in fifty straight series"),
  NIGHT_FALSE_ALARMS(
      "night_false_alarms",
      "False alarms per pool and night, of each test of the whole night",
      0.01,
      0.5,
      LABORATORY,
      "at most one false alarm of a night's test in a hundred nights"),
  BEND_TO_REVIEW(
      "bend_to_review",
      "Bend, relative change: review above",
      0.05,
      10,
      LABORATORY,
      "a bend that moves the result by more than 5 % needs a person"),
  BEND_TO_REPEAT(
      "bend_to_repeat",
      "Bend, relative change: repeat above",
      0.10,
      10,
      LABORATORY,
      "a bend that moves the result by more than 10 % spoils it"),
  NIGHT_EFFECT(
      "night_effect",
      "What the night shows, relative change: review above",
      0.05,
      10,
      LABORATORY,
      "what moves a result by less needs no person"),
  LEAST_CORRELATION(
      "least_correlation",
      "Correlation: note below",
      0.995,
      1,
      PUBLISHED,
      "EPA SW-846 method 7000B (2007) section 9.10.3; guidance; blind to bending"),
  LEAST_TOP_ADDITION(
      "least_top_addition",
      "Top addition over native: too small below",
      0.5,
      1000,
      COMMON_PRACTICE,
      "additions below half of what is there make the extrapolation long"),
  LARGE_TOP_ADDITION(
      "large_top_addition",
      "Top addition over native: note above",
      5,
      1000,
      COMMON_PRACTICE,
      "additions far above what is there leave the intercept poorly known"),
  LARGEST_TOP_ADDITION(
      "largest_top_addition",
      "Top addition over native: review above",
      10,
      1000,
      COMMON_PRACTICE,
      "the unspiked flask hardly counts beside such additions"),
  UNEVEN_ADDITIONS(
      "uneven_additions",
      "Widest gap between additions over the mean gap: review above",
      3,
      1000,
      COMMON_PRACTICE,
      "a wide gap leaves one flask alone to hold the line"),
  TARGET_UNCERTAINTY(
      "target_uncertainty",
      "Relative uncertainty to meet",
      0.25,
      10,
      LABORATORY,
      "relative expanded uncertainty where the method sets no target"),
  SCATTERED_READINGS(
      "scattered_readings",
      "Spread of a flask's readings over the noise function: review above",
      3,
      100,
      LABORATORY,
      "three times what the night's other flasks show"),
  SPREAD_OF_READINGS(
      "spread_of_readings",
      "Relative spread of a flask's readings: review above",
      0.10,
      10,
      COMMON_PRACTICE,
      "where the signal stands well above the noise"),
  BLANK_HIGH(
      "blank_high",
      "Blank over result: review above",
      0.10,
      10,
      COMMON_PRACTICE,
      "a blank of more than a tenth of the result"),
  CHECK_DRIFT(
      "check_drift",
      "Check readings, relative change: review above",
      0.10,
      10,
      COMMON_PRACTICE,
      "a check reading off by more than 10 %"),
  RECOVERY(
      "recovery",
      "Recovery, distance from 100 %: review above",
      0.20,
      10,
      COMMON_PRACTICE,
      "80 to 120 % where the method sets no limits"),
  DUPLICATES(
      "duplicates",
      "Relative difference of duplicates: review above",
      0.20,
      10,
      COMMON_PRACTICE,
      "20 % where the method sets no limit"),
  SERIES_AGREEMENT(
      "series_agreement",
      "Probability of series of one sample so far apart: review below",
      0.01,
      0.5,
      LABORATORY,
      "one in a hundred agreeing sets looks like that"),
  MATRIX_EFFECT(
      "matrix_effect",
      "Matrix effect, relative: equivalence margin",
      0.10,
      10,
      LABORATORY,
      "slopes within this margin count as equal"),
  ELECTRODE_SLOPE_LEAST(
      "electrode_slope_least",
      "Electrode slope over theory: review below",
      0.90,
      10,
      COMMON_PRACTICE,
      "a working electrode reaches 90 to 105 % of theory"),
  ELECTRODE_SLOPE_MOST(
      "electrode_slope_most",
      "Electrode slope over theory: review above",
      1.05,
      10,
      COMMON_PRACTICE,
      "a working electrode reaches 90 to 105 % of theory");

  private final String key;
  private final String words;
  private final double most;
  private final Limit byDefault;

  Criterion(
      String key, String words, double value, double most, LimitSource source, String reason) {
    this.key = key;
    this.words = words;
    this.most = most;
    this.byDefault = new Limit(value, true, source, reason);
  }

  /** The key in the configuration. */
  public String key() {
    return key;
  }

  /** What it limits, for people. */
  public String words() {
    return words;
  }

  /** The largest value that makes sense; every one is above 0. */
  public double most() {
    return most;
  }

  /** What holds where the laboratory sets nothing else. */
  public Limit byDefault() {
    return byDefault;
  }
}
