package org.spikewright.judgement;

import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.fit.BendAllowance;
import org.spikewright.fit.Budget;
import org.spikewright.fit.Lent;
import org.spikewright.fit.ModeratedSeries;
import org.spikewright.fit.NativeEstimate;
import org.spikewright.fit.Preparation.Part;
import org.spikewright.fit.StraightLine;
import org.spikewright.reading.Calculation.Interval;
import org.spikewright.series.ToResult;

/** Adds to a series' own numbers what its pool lends, and then the budget. */
final class Moderating {
  private Moderating() {}

  static SeriesResult of(SeriesResult own, PoolView view) {
    SeriesResult result = view.lent().flatMap(lent -> borrowed(own, view, lent)).orElse(own);
    return with(result, result.borrowed(), budget(result));
  }

  private static Optional<SeriesResult> borrowed(SeriesResult own, PoolView view, Lent lent) {
    ModeratedSeries series =
        ModeratedSeries.of(own.line(), own.pooled(), lent, Resolution.of(own.flasks()));
    Optional<SeriesResult> base = base(own, series.line());
    if (base.isEmpty() || series.estimate().isEmpty()) {
      return Optional.empty();
    }
    ToResult scale = own.series().toResult();
    NativeEstimate estimate = series.estimate().get();
    Borrowed borrowed =
        new Borrowed(
            view.lender(),
            lent,
            series,
            SeriesFit.onScale(estimate.standardError(), scale::length),
            SeriesFit.onScale(estimate.lower95(), scale::value),
            SeriesFit.onScale(estimate.upper95(), scale::value),
            SeriesFit.detection(
                series.line(),
                OptionalDouble.of(series.variance().sd()),
                series.variance().df(),
                scale),
            own.series().method().calculation().interval() != Interval.OWN);
    return SeriesFit.areFinite(
            borrowed.standardError(), borrowed.lower95(), borrowed.upper95(), borrowed.detection())
        ? Optional.of(with(base.get(), Optional.of(borrowed), Optional.empty()))
        : Optional.empty();
  }

  /** The own numbers of the line that the method asks for; empty where they are not finite. */
  private static Optional<SeriesResult> base(SeriesResult own, StraightLine line) {
    return line == own.line()
        ? Optional.of(own)
        : NativeEstimate.of(line)
            .map(estimate -> SeriesFit.result(own.series(), own.flasks(), line, estimate))
            .filter(SeriesFit::isFinite);
  }

  private static Optional<Budget> budget(SeriesResult result) {
    Optional<Borrowed> pool = result.reportedPool();
    NativeEstimate estimate = result.reportedEstimate();
    double df = pool.map(p -> p.series().variance().df()).orElse(result.line().residualDf() + 0.0);
    if (estimate.standardError().isEmpty() || !(df > 0)) {
      return Optional.empty();
    }
    Part fit = new Part(estimate.standardError().getAsDouble(), df);
    return ResultBudget.of(result, fit, countedAllowance(result));
  }

  /** The bend allowance counts where the method sets a limit to it. */
  private static OptionalDouble countedAllowance(SeriesResult result) {
    return result.series().method().bendAllowance().isPresent()
        ? result.allowance().map(BendAllowance::bias).orElse(OptionalDouble.empty())
        : OptionalDouble.empty();
  }

  private static SeriesResult with(
      SeriesResult r, Optional<Borrowed> borrowed, Optional<Budget> budget) {
    return new SeriesResult(
        r.series(),
        r.flasks(),
        r.line(),
        r.pooled(),
        r.estimate(),
        r.bend(),
        r.residuals(),
        r.odd(),
        r.ownDetection(),
        r.value(),
        r.standardError(),
        r.lower95(),
        r.upper95(),
        borrowed,
        budget);
  }
}
