package org.spikewright.summary;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.OptionalDouble;
import java.util.stream.Collectors;
import org.spikewright.fit.Budget;
import org.spikewright.fit.KnownAdditions;
import org.spikewright.judgement.Borrowed;
import org.spikewright.judgement.ElectrodeResult;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.quantity.Numbers;

/** What a result rests on, in sentences under its flasks on the Series sheet. */
final class EvidenceLines {
  private final SeriesResult result;
  private final RowEvidence evidence;
  private final String unit;

  private EvidenceLines(SeriesResult result) {
    this.result = result;
    this.evidence = RowEvidence.of(result);
    this.unit = " " + result.series().toResult().unit().symbol();
  }

  /** Of an electrode, for whose curve worksheets have no function. */
  static List<String> of(ElectrodeResult result) {
    KnownAdditions.Fitted fit = result.fit();
    String unit = " " + result.series().toResult().unit().symbol();
    StringBuilder curve = new StringBuilder("Curve of the electrode: slope ");
    curve.append(Numbers.rounded(fit.slope(), 4).replace('-', '−')).append(" mV per decade");
    if (fit.slopeToTheory().isPresent()) {
      double share = 100 * fit.slopeToTheory().getAsDouble();
      curve.append(String.format(Locale.ROOT, ", %.1f %% of theory", share));
    }
    curve.append("; ").append(fit.df()).append(" degrees of freedom");
    if (fit.residualSd().isPresent()) {
      curve.append("; the potentials lie ").append(n(fit.residualSd().getAsDouble()));
      curve.append(" mV from it (residual sd)");
    }
    StringBuilder spread = new StringBuilder("Result " + n(result.value()) + unit);
    if (result.standardError().isPresent()) {
      spread.append("; 95 % interval of the fit ");
      spread.append(range(result.lower95(), result.upper95())).append(unit);
    }
    if (result.expandedUncertainty().isPresent()) {
      spread.append("; U = ").append(n(result.expandedUncertainty().getAsDouble())).append(unit);
      spread.append(", of the fit alone");
    }
    spread.append(". Worksheets have no function for this curve: nothing here is computed live.");
    return List.of(curve.append('.').toString(), spread.toString());
  }

  static List<String> of(SeriesResult result) {
    EvidenceLines made = new EvidenceLines(result);
    List<String> lines = new ArrayList<>();
    made.interval(lines);
    made.bend(lines);
    result.budget().ifPresent(budget -> made.budget(budget, lines));
    return lines;
  }

  private void interval(List<String> lines) {
    if (result.borrowed().isEmpty()) {
      if (result.standardError().isPresent()) {
        lines.add("Interval of the fit: this series' own residuals; no pool of ten series to ask.");
      }
      return;
    }
    Borrowed pool = result.borrowed().get();
    double df = pool.series().variance().df();
    lines.add(
        "Interval of the fit by the pool of "
            + pool.lender()
            + ", "
            + pool.lent().series()
            + " series: "
            + range(pool.lower95(), pool.upper95())
            + unit
            + " ("
            + (Double.isFinite(df) ? n(df) : "very many")
            + " degrees of freedom); by its own residuals: "
            + range(result.lower95(), result.upper95())
            + unit
            + "; reported: "
            + (pool.isReported() ? "the pool's." : "its own, as the method asks."));
  }

  private void bend(List<String> lines) {
    List<String> parts = new ArrayList<>();
    if (evidence.bendP().isPresent() && evidence.bentValue().isPresent()) {
      parts.add(
          "bent-line result "
              + n(evidence.bentValue().getAsDouble())
              + unit
              + " (probability of such a bend on a straight line "
              + n(evidence.bendP().getAsDouble())
              + ")");
    }
    if (result.allowance().isPresent()) {
      parts.add(
          evidence.bendAllowance().isPresent()
              ? "a bend may have added up to " + n(evidence.bendAllowance().getAsDouble()) + unit
              : "what a bend may have added is not bounded");
    }
    if (evidence.driftExposure().isPresent()) {
      parts.add(
          "1 % drift over the run would move the result by "
              + String.format(Locale.ROOT, "%+.1f", 100 * evidence.driftExposure().getAsDouble())
              + " %");
    }
    if (!parts.isEmpty()) {
      String line = String.join("; ", parts) + ".";
      lines.add(line.substring(0, 1).toUpperCase(Locale.ROOT) + line.substring(1));
    }
  }

  private void budget(Budget budget, List<String> lines) {
    String shares =
        budget.shares().stream()
            .filter(share -> share.percent() >= 0.5)
            .map(
                share ->
                    share.contribution().name()
                        + String.format(Locale.ROOT, " %.0f %%", share.percent()))
            .collect(Collectors.joining(", "));
    lines.add(
        "Uncertainty: u = "
            + n(budget.standardUncertainty())
            + unit
            + ", k = "
            + n(budget.coverageFactor())
            + ", U = "
            + n(budget.expandedUncertainty())
            + unit
            + "; from "
            + (budget.others().isEmpty() ? "the fit alone: no tolerance is declared" : shares)
            + "."
            + cheapest(budget));
  }

  private String cheapest(Budget budget) {
    if (budget.others().isEmpty()) {
      return "";
    }
    return budget
        .cheapestImprovement()
        .map(
            better ->
                " Halving the uncertainty of the "
                    + better.what()
                    + " would bring U to "
                    + n(better.expandedUncertainty())
                    + unit
                    + ".")
        .orElse("");
  }

  private static String range(OptionalDouble lower, OptionalDouble upper) {
    return lower.isPresent() && upper.isPresent()
        ? n(lower.getAsDouble()) + " to " + n(upper.getAsDouble())
        : "unbounded";
  }

  private static String n(double value) {
    return Numbers.rounded(value, 3);
  }
}
