package org.spikewright.judgement;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Function;
import org.spikewright.fit.AdditionBudget;
import org.spikewright.fit.Budget;
import org.spikewright.fit.Contribution;
import org.spikewright.fit.Preparation;
import org.spikewright.fit.Preparation.Delivery;
import org.spikewright.fit.Preparation.Input;
import org.spikewright.fit.Preparation.OneVessel;
import org.spikewright.fit.Preparation.Part;
import org.spikewright.reading.Accuracies;
import org.spikewright.reading.Accuracies.Accuracy;
import org.spikewright.reading.Design;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;
import org.spikewright.series.ToResult;

/** The uncertainty budget of a result, from its line and what is known of its quantities. */
final class ResultBudget {
  private final List<Flask> flasks;
  private final ToResult scale;
  private final Accuracies known;

  private ResultBudget(AdditionSeries series, List<Flask> flasks) {
    this.flasks = flasks;
    this.scale = series.toResult();
    // A pipette is known for each volume by itself; the largest addition decides the slope.
    this.known =
        flasks.stream()
            .max(Comparator.comparingDouble(Flask::x))
            .orElseThrow()
            .facts()
            .accuracies();
  }

  /**
   * The budget on the result's scale.
   *
   * @param fit what the reported interval says of the fit, in axis units
   * @param allowance half-width of what a bend may add, in axis units; empty where it does not
   *     count
   * @return empty when a number is too large to compute with
   */
  static Optional<Budget> of(SeriesResult result, Part fit, OptionalDouble allowance) {
    AdditionSeries series = result.series();
    ResultBudget budget = new ResultBudget(series, result.flasks());
    double perSolution = budget.scale.perSample() * budget.scale.unitFactor();
    if (!(perSolution > 0) || !(budget.scale.dilution() >= 1)) {
      return Optional.empty();
    }
    Preparation preparation =
        new Preparation(
            budget.parts(),
            budget.scale.dilution(),
            budget.scale.methodBlank(),
            perSolution,
            series.design() == Design.ONE_VESSEL ? budget.vessel() : Optional.empty());
    Optional<Budget> made =
        AdditionBudget.of(result.line(), result.estimate().value(), Optional.of(fit), preparation);
    return allowance.isEmpty()
        ? made
        : made.flatMap(b -> withBend(b, budget.scale.length(allowance.getAsDouble())));
  }

  private static Optional<Budget> withBend(Budget budget, double halfWidth) {
    List<Contribution> others = new ArrayList<>(budget.others());
    others.add(
        Contribution.absolute(
            "bend",
            "bend that the data leave open",
            halfWidth / Math.sqrt(3),
            Double.POSITIVE_INFINITY));
    return Budget.of(budget.fit(), others);
  }

  private Map<Input, Part> parts() {
    Map<Input, Part> parts = new EnumMap<>(Input.class);
    put(parts, Input.STOCK, known.stock());
    put(parts, Input.ALIQUOT, known.aliquot());
    put(parts, Input.ADDITIONS, known.addition());
    put(parts, Input.DILUTION, known.dilution());
    put(parts, Input.DIGEST_VOLUME, known.digestVolume());
    put(parts, Input.PORTION, known.testPortion());
    put(parts, Input.DRY_MASS, known.dryMass());
    if (scale.dilution() != flasks.get(0).facts().preparation().dilution()) {
      // Only additions in flask terms bring the final volume into the result.
      put(parts, Input.FINAL_VOLUME, known.finalVolume());
    }
    if (scale.methodBlankUncertainty() > 0) {
      parts.put(Input.BLANK, Part.known(scale.methodBlankUncertainty()));
    }
    return parts;
  }

  private static void put(Map<Input, Part> parts, Input input, Optional<Accuracy> accuracy) {
    accuracy.ifPresent(a -> parts.put(input, Part.known(a.systematic())));
  }

  private Optional<OneVessel> vessel() {
    FlaskFacts facts = flasks.get(0).facts();
    double first = flasks.get(0).delivered();
    // The factor is 1 + v/V_0, so that two steps give V_0 whatever way it was stated.
    double start = startVolume(first);
    double aliquot =
        facts
            .aliquot()
            .map(a -> a.quantity().value() * a.quantity().unit().perBase())
            .orElse(start);
    if (!(start >= aliquot) || !(aliquot > 0)) {
      return Optional.empty();
    }
    double other =
        aliquot < start && Double.isFinite(start)
            ? start * share(known.startVolume(), Accuracy::systematic)
            : 0;
    List<Double> added = flasks.stream().map(Flask::delivered).toList();
    return Optional.of(new OneVessel(start, aliquot, other, added, deliveries()));
  }

  private double startVolume(double first) {
    for (Flask flask : flasks) {
      if (flask.volumeFactor() > 1) {
        return flask.delivered() / (flask.volumeFactor() - 1);
      }
    }
    return first > 0 ? first : Double.POSITIVE_INFINITY;
  }

  private List<Delivery> deliveries() {
    List<Delivery> deliveries = new ArrayList<>();
    double x = 0;
    double volume = 0;
    for (int i = 0; i < flasks.size(); i++) {
      Flask flask = flasks.get(i);
      double step = flask.delivered() - volume;
      if (step > 0) {
        double random = share(flask.facts().accuracies().addition(), Accuracy::random) * step;
        deliveries.add(new Delivery(i, (flask.x() - x) / step, random));
        x = flask.x();
        volume = flask.delivered();
      }
    }
    return deliveries;
  }

  private static double share(Optional<Accuracy> accuracy, Function<Accuracy, Double> part) {
    return accuracy.map(part).orElse(0.0);
  }
}
