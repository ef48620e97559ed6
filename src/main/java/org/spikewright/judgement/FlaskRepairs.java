package org.spikewright.judgement;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.DoubleStream;
import org.spikewright.fit.DeletedResidual;
import org.spikewright.fit.QuadraticFit;
import org.spikewright.judgement.RepeatAdvice.FlaskNeeded;
import org.spikewright.judgement.RepeatAdvice.SomeFlasks;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Quantity;
import org.spikewright.reading.Addition;
import org.spikewright.reading.Addition.OfStock;
import org.spikewright.reading.FlaskFacts;
import org.spikewright.series.Flask;

/** Single flasks that mend a series, where the rest of it is good. */
final class FlaskRepairs {
  /** An addition within this share of a step of the grid stands on it. */
  private static final double ON_GRID = 0.25;

  private static final String BESIDE =
      "Measure another flask of the series again beside it, to see whether the sensitivity is still"
          + " the same.";

  private final RepeatNeeds needs;

  FlaskRepairs(RepeatNeeds needs) {
    this.needs = needs;
  }

  /**
   * The odd flask alone, where leaving it out explains the flasks better than a bend does: both
   * spend one parameter, so the smaller sum of squares decides.
   */
  Optional<SomeFlasks> oddFlask() {
    if (needs.oddest().isEmpty()) {
      return Optional.empty();
    }
    int odd = needs.oddest().get();
    Optional<DeletedResidual> without = DeletedResidual.of(needs.line(), odd, 0);
    Optional<QuadraticFit> bow = QuadraticFit.of(needs.line());
    double rest =
        without.map(w -> w.without().residualSumOfSquares()).orElse(Double.POSITIVE_INFINITY);
    if (!(rest < bow.map(QuadraticFit::residualSumOfSquares).orElse(Double.POSITIVE_INFINITY))) {
      return Optional.empty();
    }
    Flask flask = needs.flasks().get(odd);
    return Optional.of(
        new SomeFlasks(
            List.of(new FlaskNeeded(flask.label(), contents(flask.facts(), added(flask)))),
            "One flask off the line explains the flasks better than a bend: prepare it alone. "
                + BESIDE));
  }

  /** The flasks that the method expects and the series has not. */
  Optional<SomeFlasks> missing() {
    int missing = needs.series().method().expectedFlasks() - needs.series().preparedFlasks();
    boolean unspiked = needs.flasks().stream().anyMatch(Flask::isUnspiked);
    List<Double> levels = gaps(Math.max(missing, unspiked ? 0 : 1));
    FlaskFacts facts = needs.flasks().get(needs.flasks().size() - 1).facts();
    if (levels.isEmpty()) {
      return Optional.empty();
    }
    double unit = facts.addition().amount().value() / needs.topAddition();
    return Optional.of(
        new SomeFlasks(
            levels.stream()
                .map(x -> new FlaskNeeded("new", contents(facts, amount(facts, x * unit))))
                .toList(),
            (unspiked
                    ? "The flasks that are missing complete the series. "
                    : "With an unspiked flask the line is not carried back over a gap. ")
                + BESIDE));
  }

  /** So many levels that are missing: gaps of the even grid first, then steps beyond its top. */
  private List<Double> gaps(int count) {
    double[] there = needs.flasks().stream().mapToDouble(Flask::x).sorted().toArray();
    double[] grid = DoubleStream.concat(DoubleStream.of(0), DoubleStream.of(there)).toArray();
    double step = Double.POSITIVE_INFINITY;
    for (int i = 1; i < grid.length; i++) {
      step = grid[i] > grid[i - 1] ? Math.min(step, grid[i] - grid[i - 1]) : step;
    }
    List<Double> gaps = new ArrayList<>();
    double finest = step;
    for (int i = 0; gaps.size() < count && i <= grid.length + count; i++) {
      double level = i * finest;
      if (DoubleStream.of(there).noneMatch(x -> Math.abs(x - level) < ON_GRID * finest)) {
        gaps.add(level);
      }
    }
    return gaps;
  }

  private static Quantity added(Flask flask) {
    return flask.facts().addition().amount();
  }

  private static Quantity amount(FlaskFacts facts, double value) {
    return new Quantity(Deliveries.tidy(value), facts.addition().amount().unit());
  }

  private static String contents(FlaskFacts facts, Quantity added) {
    List<String> parts = new ArrayList<>();
    facts.aliquot().ifPresent(volume -> parts.add(volume.quantity() + " of sample"));
    parts.add(addition(facts.addition(), added));
    facts.finalVolume().map(Measured::quantity).ifPresent(v -> parts.add("made up to " + v));
    return String.join(", ", parts);
  }

  private static String addition(Addition addition, Quantity added) {
    if (added.value() == 0) {
      return "no addition";
    }
    return addition instanceof OfStock spike
        ? added + " of stock " + spike.stock().quantity()
        : "addition " + added;
  }
}
