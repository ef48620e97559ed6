package org.spikewright.summary;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.Collectors;
import org.spikewright.judgement.PlanWords;
import org.spikewright.judgement.RepeatAdvice;
import org.spikewright.judgement.RepeatAdvice.Again;
import org.spikewright.judgement.RepeatAdvice.NoPlan;
import org.spikewright.judgement.RepeatAdvice.SomeFlasks;
import org.spikewright.judgement.RepeatPlan.Portion;
import org.spikewright.judgement.RepeatPlan.Prepared;

/**
 * Advice as the To repeat sheet words it.
 *
 * @param prepare what to do before the additions, a sentence each
 * @param flasks what goes into each flask, a line each
 * @param order of measurement; empty without a plan
 * @param before relative expanded uncertainty of the fit as it is
 * @param after the same as expected
 */
record RepeatWords(
    List<String> prepare,
    List<String> flasks,
    String order,
    OptionalDouble before,
    OptionalDouble after) {

  static RepeatWords of(Optional<SeriesIndex.Entry> entry) {
    if (entry.isEmpty()) {
      return only(List.of());
    }
    if (entry.get().repeat().isEmpty()) {
      return only(
          with(
              entry.get().advice(),
              "Not planned here: only the first "
                  + SeriesIndex.MOST_PLANS
                  + " series are; use the command plan."));
    }
    RepeatAdvice advice = entry.get().repeat().get();
    if (advice instanceof Again again) {
      return of(again);
    }
    if (advice instanceof SomeFlasks some) {
      List<String> flasks =
          some.flasks().stream().map(flask -> flask.label() + ": " + flask.contents()).toList();
      return new RepeatWords(
          List.of(some.basis()), flasks, "", OptionalDouble.empty(), OptionalDouble.empty());
    }
    return advice instanceof NoPlan none
        ? only(with(entry.get().advice(), "No plan: " + none.found() + " " + none.help()))
        : only(entry.get().advice());
  }

  private static RepeatWords of(Again again) {
    Prepared plan = again.plan();
    List<String> prepare = new ArrayList<>();
    prepare.add("Prepare the series again. " + again.basis());
    prepare.addAll(PlanWords.preparation(plan));
    String pipettes =
        plan.portions().stream()
            .map(Portion::pipette)
            .filter(pipette -> !pipette.isEmpty())
            .distinct()
            .collect(Collectors.joining(", "));
    if (!pipettes.isEmpty()) {
      prepare.add("Pipette: " + pipettes + ".");
    }
    prepare.add("Replicates of each flask: " + plan.replicates() + ".");
    prepare.addAll(plan.remarks());
    List<String> flasks =
        plan.portions().stream()
            .map(portion -> portion.number() + ": " + PlanWords.amount(plan, portion))
            .toList();
    return new RepeatWords(
        prepare,
        flasks,
        PlanWords.order(plan),
        again.before(),
        OptionalDouble.of(plan.forecast().relativeUncertainty()));
  }

  private static RepeatWords only(List<String> prepare) {
    return new RepeatWords(prepare, List.of(), "", OptionalDouble.empty(), OptionalDouble.empty());
  }

  private static List<String> with(List<String> lines, String last) {
    List<String> all = new ArrayList<>(lines);
    all.add(last);
    return all;
  }
}
