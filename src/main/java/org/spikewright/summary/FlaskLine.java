package org.spikewright.summary;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.SortedSet;
import java.util.TreeSet;
import java.util.stream.Collectors;
import org.spikewright.fit.DeletedResidual;
import org.spikewright.judgement.ElectrodeResult;
import org.spikewright.judgement.Flag;
import org.spikewright.judgement.FlagKind;
import org.spikewright.judgement.Outcome;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.reading.Recorded;
import org.spikewright.reading.Signal;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;

/**
 * One flask beside the line of its series.
 *
 * @param flask the flask
 * @param used whether the line was fitted to it
 * @param x on the axis, as fitted; empty when not used
 * @param signal as fitted, after the volume factor; empty when not used
 * @param fitted the line's signal there; empty when not used
 * @param residual signal minus fitted; empty when not used
 * @param weight of the flask in its line, their mean being 1; empty where all weigh the same
 * @param deletedT its deleted residual t; empty where that does not exist
 * @param remark why it was not used, or that it is the odd one; may be empty
 */
record FlaskLine(
    Flask flask,
    boolean used,
    OptionalDouble x,
    OptionalDouble signal,
    OptionalDouble fitted,
    OptionalDouble residual,
    OptionalDouble weight,
    OptionalDouble deletedT,
    String remark) {

  /** The remark at the flask that an odd-flask flag is about. */
  static final String ODD = "odd flask";

  /** Every flask of a series, in the order of the series, whether used or not. */
  static List<FlaskLine> of(Outcome outcome) {
    if (!(outcome.gathered() instanceof AdditionSeries series)) {
      return List.of();
    }
    List<Flask> fitted = outcome.result().map(SeriesResult::flasks).orElse(List.of());
    Set<Integer> odd = oddPoints(outcome);
    List<FlaskLine> lines = new ArrayList<>(series.flasks().size());
    int point = 0;
    for (Flask flask : series.flasks()) {
      // The line's points are in the order of the flasks, of which it may leave some out.
      if (point < fitted.size() && fitted.get(point).label().equals(flask.label())) {
        lines.add(used(outcome.result().orElseThrow(), point, odd.contains(point)));
        point++;
      } else {
        lines.add(
            outcome
                .electrode()
                .filter(electrode -> electrode.flasks().contains(flask))
                .map(electrode -> beside(electrode, flask))
                .orElseGet(() -> unused(flask, outcome)));
      }
      if (!flask.secondRun().isEmpty()) {
        lines.add(secondRun(flask.second()));
      }
    }
    return lines;
  }

  private static FlaskLine used(SeriesResult result, int i, boolean odd) {
    Optional<DeletedResidual> deleted =
        i < result.residuals().size() ? result.residuals().get(i) : Optional.empty();
    double x = result.line().x()[i];
    return new FlaskLine(
        result.flasks().get(i),
        true,
        OptionalDouble.of(x),
        OptionalDouble.of(result.line().y()[i]),
        OptionalDouble.of(result.line().at(x)),
        OptionalDouble.of(result.line().residual(i)),
        result.line().isUnweighted()
            ? OptionalDouble.empty()
            : OptionalDouble.of(result.line().weights()[i]),
        deleted.isPresent() ? finite(deleted.get().t()) : OptionalDouble.empty(),
        odd ? ODD : "");
  }

  /** A state of the vessel beside the electrode's curve. */
  private static FlaskLine beside(ElectrodeResult electrode, Flask flask) {
    double fitted = electrode.at(flask);
    return new FlaskLine(
        flask,
        true,
        OptionalDouble.of(flask.x()),
        OptionalDouble.of(flask.y()),
        finite(fitted),
        finite(flask.y() - fitted),
        OptionalDouble.empty(),
        OptionalDouble.empty(),
        "");
  }

  private static FlaskLine unused(Flask flask, Outcome outcome) {
    OptionalDouble none = OptionalDouble.empty();
    return new FlaskLine(flask, false, none, none, none, none, none, none, why(flask, outcome));
  }

  private static FlaskLine secondRun(Flask flask) {
    OptionalDouble none = OptionalDouble.empty();
    return new FlaskLine(
        flask, false, none, none, none, none, none, none, "second run: the first gives the result");
  }

  private static String why(Flask flask, Outcome outcome) {
    if (flask.isUsable()) {
      return outcome.result().isPresent() ? "left out of the line" : "no line could be fitted";
    }
    String states =
        flask.readings().stream()
            .map(recorded -> recorded.reading().signal())
            .filter(Signal.NoNumber.class::isInstance)
            .map(signal -> ((Signal.NoNumber) signal).state().word())
            .distinct()
            .collect(Collectors.joining(", "));
    return states.isEmpty() ? "no reading" : "no reading is a number: " + states;
  }

  /** The points that an odd-flask or odd-level flag is about. */
  private static Set<Integer> oddPoints(Outcome outcome) {
    boolean flagged =
        outcome.flags().stream()
            .map(Flag::kind)
            .anyMatch(kind -> kind == FlagKind.ODD_FLASK || kind == FlagKind.ODD_LEVEL);
    return flagged
        ? outcome.result().flatMap(SeriesResult::judgedOdd).stream()
            .flatMapToInt(odd -> Arrays.stream(odd.flasks()))
            .boxed()
            .collect(Collectors.toSet())
        : Set.of();
  }

  static OptionalDouble finite(double value) {
    return Double.isFinite(value) ? OptionalDouble.of(value) : OptionalDouble.empty();
  }

  /** The files the flask's readings came from, sorted. */
  List<String> files() {
    SortedSet<String> files = new TreeSet<>();
    for (Recorded recorded : flask.readings()) {
      files.add(recorded.reading().position().source().file());
    }
    return List.copyOf(files);
  }

  /** The cells the flask's readings came from, in the order of the readings. */
  List<String> cells() {
    Set<String> cells = new LinkedHashSet<>();
    for (Recorded recorded : flask.readings()) {
      cells.add(recorded.reading().position().within());
    }
    return List.copyOf(cells);
  }
}
