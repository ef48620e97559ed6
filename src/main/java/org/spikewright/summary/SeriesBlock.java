package org.spikewright.summary;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.function.ToDoubleFunction;
import org.spikewright.judgement.Flag;
import org.spikewright.judgement.Outcome;
import org.spikewright.judgement.Verdict;
import org.spikewright.quantity.Quantity;
import org.spikewright.reading.Subject;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;
import org.spikewright.series.SeriesKey;
import org.spikewright.series.Ungrouped;

/**
 * The rows of one series on the Series sheet: a heading, its flags, its flasks, and the stored
 * numbers over the same computed by live formulas.
 *
 * @param outcome what the night says about it
 * @param firstRow from 1
 * @param remarks the sentences under the heading
 * @param flasks its flasks
 * @param live stored and live numbers; empty where no line was fitted
 * @param evidence sentences under them
 */
record SeriesBlock(
    Outcome outcome,
    int firstRow,
    List<String> remarks,
    List<FlaskLine> flasks,
    Optional<LiveCells> live,
    List<String> evidence) {

  static SeriesBlock of(Outcome outcome, int firstRow) {
    List<String> remarks = remarks(outcome);
    List<FlaskLine> flasks = FlaskLine.of(outcome);
    int firstFlask = firstRow + 1 + remarks.size();
    return new SeriesBlock(
        outcome,
        firstRow,
        remarks,
        flasks,
        outcome.result().map(result -> LiveCells.of(result, flasks, firstFlask)),
        outcome
            .result()
            .map(EvidenceLines::of)
            .or(() -> outcome.electrode().map(EvidenceLines::of))
            .orElse(List.of()));
  }

  private static List<String> remarks(Outcome outcome) {
    List<String> remarks = new ArrayList<>();
    if (outcome.gathered() instanceof Ungrouped ungrouped && outcome.flags().isEmpty()) {
      remarks.add("no series: " + ungrouped.found() + "; a series needs " + ungrouped.expected());
    }
    for (Flag flag : outcome.flags()) {
      String weight = flag.weight().name().toLowerCase(Locale.ROOT);
      remarks.add(weight + ", " + flag.kind().shortName() + ": " + flag.sentence());
    }
    return remarks;
  }

  /** The row of the first flask, from 1; where it would stand if there is none. */
  int firstFlask() {
    return firstRow + 1 + remarks.size();
  }

  /** How many rows, with the empty one at the end. */
  int height() {
    int numbers = live.map(LiveCells::height).orElse(0);
    return 2 + remarks.size() + flasks.size() + numbers + evidence.size();
  }

  /** How many check cells say that stored and live numbers differ. */
  int differing() {
    return live.map(LiveCells::differing).orElse(0);
  }

  /** The rows, as many as {@link #height}. */
  List<List<CellPlan>> rows() {
    List<List<CellPlan>> rows = new ArrayList<>(height());
    rows.add(heading());
    for (String remark : remarks) {
      rows.add(List.of(CellPlan.EMPTY, CellPlan.text(remark, Look.FAINT)));
    }
    String unit = outcome.gathered() instanceof AdditionSeries s ? s.axisUnit().symbol() : "";
    Shown shown = Shown.of(flasks);
    for (FlaskLine line : flasks) {
      rows.add(flask(line, unit, shown));
    }
    live.ifPresent(cells -> rows.addAll(cells.rows()));
    for (String line : evidence) {
      rows.add(List.of(CellPlan.EMPTY, CellPlan.text(line, Look.FAINT)));
    }
    rows.add(List.of());
    return rows;
  }

  private List<CellPlan> heading() {
    SeriesKey key = outcome.gathered().key();
    Subject subject = key.subject();
    Verdict verdict = outcome.verdict();
    String line = subject.line().isEmpty() ? "" : " " + subject.line();
    StringBuilder whose = new StringBuilder(subject.sample().text() + " · " + subject.analyte());
    whose.append(line).append(" · ").append(subject.instrument());
    String batch =
        outcome.gathered() instanceof AdditionSeries s
            ? s.batchName()
            : ((Ungrouped) outcome.gathered()).batchName();
    whose.append(batch.isEmpty() ? "" : " · " + batch);
    whose.append(key.preparation().isEmpty() ? "" : " · " + key.preparation());
    whose.append(key.ordinal() > 1 ? " · series " + key.ordinal() : "");
    whose.append(outcome.reported().isEmpty() ? "" : " · reported: " + outcome.reported());
    return List.of(
        CellPlan.text(verdict.word(), Words.look(verdict)),
        CellPlan.text(whose.toString(), Look.STRONG));
  }

  /** Number formats that a series' flasks share, so that their decimals stand in line. */
  private record Shown(String x, String signal, String residual) {
    static Shown of(List<FlaskLine> flasks) {
      return new Shown(
          Formats.significant(largest(flasks, line -> line.x().orElse(0)), 4),
          Formats.significant(largest(flasks, line -> line.flask().meanSignal()), 5),
          Formats.significant(largest(flasks, line -> line.residual().orElse(0)), 3));
    }

    private static double largest(List<FlaskLine> flasks, ToDoubleFunction<FlaskLine> part) {
      return flasks.stream()
          .mapToDouble(part)
          .filter(Double::isFinite)
          .map(Math::abs)
          .max()
          .orElse(0);
    }
  }

  private static List<CellPlan> flask(FlaskLine line, String axisUnit, Shown shown) {
    Flask flask = line.flask();
    Quantity amount = flask.facts().addition().amount();
    // No abscissa without a signal: the worksheet functions skip a row with empty cells.
    return List.of(
        CellPlan.text(flask.label()),
        CellPlan.number(amount.value(), Formats.GENERAL),
        CellPlan.text(amount.unit().symbol()),
        CellPlan.number(line.x(), shown.x()),
        CellPlan.text(axisUnit),
        CellPlan.number(flask.meanSignal(), shown.signal()),
        CellPlan.number(flask.replicateSd(), Formats.significant(flask.replicateSd(), 3)),
        CellPlan.count(flask.numbers()),
        CellPlan.number(flask.volumeFactor(), "0.0000"),
        CellPlan.number(line.signal(), shown.signal()),
        CellPlan.number(line.fitted(), shown.signal()),
        CellPlan.number(line.residual(), shown.residual()),
        CellPlan.number(line.deletedT(), "0.00"),
        CellPlan.text(line.used() ? "yes" : "no"),
        CellPlan.text(line.remark(), line.used() ? Look.STRONG : Look.PLAIN),
        CellPlan.number(line.weight(), "0.000"),
        CellPlan.text(String.join("; ", line.files())),
        CellPlan.text(String.join("; ", line.cells())));
  }
}
