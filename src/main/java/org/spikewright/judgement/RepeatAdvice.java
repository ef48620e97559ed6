package org.spikewright.judgement;

import java.util.List;
import java.util.OptionalDouble;
import org.spikewright.judgement.RepeatPlan.Prepared;

/** What to prepare because of what a series' flags say. */
public sealed interface RepeatAdvice {

  /**
   * The whole series again.
   *
   * @param plan what to prepare
   * @param basis what the plan rests on, in a sentence
   * @param before relative expanded uncertainty of the fit of the series as it is; empty where it
   *     has none
   */
  record Again(Prepared plan, String basis, OptionalDouble before) implements RepeatAdvice {}

  /**
   * Some flasks only; they join the series.
   *
   * @param flasks what to prepare
   * @param basis why these are enough, in a sentence
   */
  record SomeFlasks(List<FlaskNeeded> flasks, String basis) implements RepeatAdvice {
    /** Takes a copy. */
    public SomeFlasks {
      flasks = List.copyOf(flasks);
    }
  }

  /**
   * A flask to prepare.
   *
   * @param label the flask's label, or {@code new}
   * @param contents what goes into it
   */
  record FlaskNeeded(String label, String contents) {}

  /**
   * Something is to be done, but no plan can be made.
   *
   * @param found why, in a sentence
   * @param help what would help
   */
  record NoPlan(String found, String help) implements RepeatAdvice {}

  /** Nothing is to be prepared. */
  record Nothing() implements RepeatAdvice {}

  /** The advice for what the night says about a series. */
  static RepeatAdvice of(Outcome outcome, CriteriaBook book) {
    return new RepeatRules(outcome, book).advice();
  }
}
