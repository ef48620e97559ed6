package org.spikewright.summary;

import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.fit.StraightLine;
import org.spikewright.judgement.Flag;
import org.spikewright.judgement.Outcome;
import org.spikewright.judgement.RepeatAdvice;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.judgement.Verdict;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.SeriesKey;

/**
 * Where each series stands on the Series sheet, and the few numbers that other sheets need of it;
 * made by one walk over the outcomes, of which it holds none.
 *
 * @param entries by key; only series that the Series sheet holds
 * @param lastRow the last row of the Series sheet, from 1
 * @param mostFlasks the largest number of flask rows of a series
 * @param differing how many live checks differ from the stored numbers
 * @param forReview how many series for review have something to prepare
 * @param curves how many series have an electrode's curve instead of a line
 * @param pools flasks of each pool beside its noise
 * @param plotted the flasks of the series that the Plot sheet shows first
 */
record SeriesIndex(
    Map<SeriesKey, Entry> entries,
    int lastRow,
    int mostFlasks,
    int differing,
    int forReview,
    int curves,
    PoolFlasks pools,
    List<FlaskLine> plotted) {

  /** No series begins below this row, so that the sheet never continues on a second one. */
  static final int LAST_START = 1_000_000;

  /** Nobody prepares more in a day; and the plans are held until the sheets are written. */
  static final int MOST_PLANS = 2_000;

  /**
   * One series.
   *
   * @param firstRow of its block, from 1
   * @param firstFlask the row of its first flask, from 1
   * @param flasks how many rows of flasks
   * @param axisUnit unit of the additions; empty without a series
   * @param slope signal per axis unit
   * @param signalIntercept signal
   * @param concentration where the line meets zero, as a positive number on the axis
   * @param lower95 lower end of the reported interval, on the axis
   * @param upper95 upper end likewise
   * @param topX largest addition, on the axis
   * @param advice what to do, for series to repeat only
   * @param repeat what to prepare; empty for series beyond the {@link #MOST_PLANS} that are planned
   */
  record Entry(
      int firstRow,
      int firstFlask,
      int flasks,
      String axisUnit,
      OptionalDouble slope,
      OptionalDouble signalIntercept,
      OptionalDouble concentration,
      OptionalDouble lower95,
      OptionalDouble upper95,
      OptionalDouble topX,
      List<String> advice,
      Optional<RepeatAdvice> repeat) {}

  /** Whether the Series sheet holds a series with this verdict, while it has room. */
  static boolean holds(Night night, Verdict verdict) {
    return Night.isDetailed(night.seriesCount(), verdict);
  }

  static SeriesIndex of(Night night, Optional<SeriesKey> toPlot) {
    Map<SeriesKey, Entry> entries = new HashMap<>();
    List<FlaskLine> plotted = List.of();
    PoolFlasks pools = new PoolFlasks();
    int row = SeriesSheet.HEAD_ROWS + 1;
    int mostFlasks = 0;
    int differing = 0;
    int plans = 0;
    int forReview = 0;
    int curves = 0;
    for (Outcome outcome : night.outcomes()) {
      if (!holds(night, outcome.verdict()) || row > LAST_START) {
        continue;
      }
      SeriesBlock block = SeriesBlock.of(outcome, row);
      Optional<RepeatAdvice> repeat =
          plans < MOST_PLANS
              ? Optional.of(RepeatAdvice.of(outcome, night.criteria()))
              : Optional.empty();
      boolean planned =
          repeat.filter(advice -> !(advice instanceof RepeatAdvice.Nothing)).isPresent();
      plans += planned ? 1 : 0;
      forReview += planned && outcome.verdict() == Verdict.REVIEW ? 1 : 0;
      outcome.result().ifPresent(pools::add);
      curves += outcome.electrode().isPresent() ? 1 : 0;
      entries.put(outcome.gathered().key(), entry(outcome, block, repeat));
      mostFlasks = Math.max(mostFlasks, block.flasks().size());
      differing += block.differing();
      if (toPlot.isPresent() && toPlot.get().equals(outcome.gathered().key())) {
        plotted = block.flasks();
      }
      row += block.height();
    }
    return new SeriesIndex(
        entries, row - 1, mostFlasks, differing, forReview, curves, pools, plotted);
  }

  private static Entry entry(Outcome outcome, SeriesBlock block, Optional<RepeatAdvice> repeat) {
    Optional<SeriesResult> result = outcome.result();
    Optional<StraightLine> line = result.map(SeriesResult::line);
    OptionalDouble none = OptionalDouble.empty();
    return new Entry(
        block.firstRow(),
        block.firstFlask(),
        block.flasks().size(),
        outcome.gathered() instanceof AdditionSeries series ? series.axisUnit().symbol() : "",
        line.map(found -> FlaskLine.finite(found.slope())).orElse(none),
        line.map(found -> FlaskLine.finite(found.signalIntercept())).orElse(none),
        result.map(found -> FlaskLine.finite(found.estimate().value())).orElse(none),
        result.map(found -> found.reportedEstimate().lower95()).orElse(none),
        result.map(found -> found.reportedEstimate().upper95()).orElse(none),
        block.flasks().stream()
            .map(FlaskLine::x)
            .filter(OptionalDouble::isPresent)
            .mapToDouble(OptionalDouble::getAsDouble)
            .max(),
        advice(outcome),
        repeat);
  }

  private static List<String> advice(Outcome outcome) {
    return outcome.verdict() == Verdict.REPEAT
        ? outcome.flags().stream()
            .filter(flag -> flag.weight() != Flag.Weight.NOTE)
            .map(Flag::advice)
            .filter(advice -> !advice.isBlank())
            .distinct()
            .toList()
        : List.of();
  }
}
