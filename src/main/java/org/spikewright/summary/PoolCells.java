package org.spikewright.summary;

import java.util.ArrayList;
import java.util.List;
import org.spikewright.fit.Lent;
import org.spikewright.fit.NativeEstimate;
import org.spikewright.fit.Variance;
import org.spikewright.judgement.Borrowed;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.series.ToResult;

/**
 * The interval by the pool, stored and live: from what the pool lends (s_0 in B, d_0 in C) and the
 * series' own scatter to the moderated standard deviation, its degrees of freedom, t and Fieller's
 * interval.
 */
final class PoolCells {
  private final SeriesResult result;
  private final WorksheetLine line;
  private final LiveFormulas at;
  private final Borrowed pool;
  private final Lent lent;
  private final int stored;

  private PoolCells(SeriesResult result, WorksheetLine line, LiveFormulas at, Borrowed pool) {
    this.result = result;
    this.line = line;
    this.at = at;
    this.pool = pool;
    this.lent = pool.lent();
    this.stored = at.stored() + LiveCells.HEIGHT;
  }

  /** The quantities, from the second column on. */
  static List<LiveCells.Quantity> of(
      SeriesResult result, WorksheetLine line, LiveFormulas at, Borrowed pool) {
    return new PoolCells(result, line, at, pool).quantities();
  }

  private List<LiveCells.Quantity> quantities() {
    List<LiveCells.Quantity> all = new ArrayList<>(scatter());
    all.addAll(interval());
    return all;
  }

  private boolean isKnown() {
    return lent.line().df() == Double.POSITIVE_INFINITY;
  }

  private List<LiveCells.Quantity> scatter() {
    double lentSd = lentSd();
    double lentDf = lent.line().df();
    Variance variance = pool.series().variance();
    LiveCells.Size size = new LiveCells.Size(line.topSignal() / 1000, at.topSignal() + "/1000");
    String digits = Formats.significant(variance.sd(), 6);
    return List.of(
        given("Pool's s_0", lentSd, digits),
        given("Pool's d_0", lentDf, Formats.significant(lentDf, 4)),
        new LiveCells.Quantity(
            "Sd by pool",
            FlaskLine.finite(variance.sd()),
            moderatedSd(),
            moderated(),
            size,
            digits),
        new LiveCells.Quantity(
            "df by pool",
            FlaskLine.finite(variance.df()),
            lentDf + line.n() - 2,
            "C" + stored + "+" + ownDf(),
            new LiveCells.Size(1, "1"),
            Formats.significant(variance.df(), 4)));
  }

  /** A number that the night lends and no cell can give. */
  private static LiveCells.Quantity given(String title, double value, String format) {
    return new LiveCells.Quantity(
        title, FlaskLine.finite(value), Double.NaN, "", new LiveCells.Size(1, "1"), format);
  }

  private String ownDf() {
    return at.live('J') + "-2";
  }

  private String moderated() {
    if (isKnown() || line.n() == 2) {
      return "B" + stored;
    }
    String sum = "C" + stored + "*B" + stored + "^2+(" + ownDf() + ")*" + at.live('D') + "^2";
    return "SQRT((" + sum + ")/(C" + stored + "+" + ownDf() + "))";
  }

  private double moderatedSd() {
    double lentSd = lentSd();
    if (isKnown() || line.n() == 2) {
      return lentSd;
    }
    double lentDf = lent.line().df();
    double df = line.n() - 2;
    double own = line.residualSd() * line.residualSd();
    return Math.sqrt((lentDf * lentSd * lentSd + df * own) / (lentDf + df));
  }

  private List<LiveCells.Quantity> interval() {
    NativeEstimate estimate = pool.series().estimate().orElseThrow();
    ToResult scale = result.series().toResult();
    double t = estimate.t().orElse(Double.NaN);
    WorksheetLine.Spread live = line.spread(moderatedSd(), t, scale);
    LiveFormulas.Spread cells =
        new LiveFormulas.Spread("D" + (stored + 1), "F" + stored, "G" + (stored + 1));
    LiveCells.Size size = new LiveCells.Size(scale.length(line.topX()), at.topOnSample());
    String shown = Formats.significant(pool.standardError().orElse(0), 3);
    return List.of(
        new LiveCells.Quantity(
            "t (95 %)", FlaskLine.finite(t), t, t(), LiveCells.LOOSE, Formats.significant(t, 6)),
        new LiveCells.Quantity(
            "g",
            estimate.g(),
            live.g(),
            at.g(cells),
            new LiveCells.Size(1, "1"),
            Formats.significant(estimate.g(), 6)),
        new LiveCells.Quantity(
            "Standard error",
            pool.standardError(),
            live.standardError(),
            at.standardError(cells),
            size,
            shown),
        new LiveCells.Quantity(
            "Lower 95 %", pool.lower95(), live.lower95(), at.end(cells, '-'), size, shown),
        new LiveCells.Quantity(
            "Upper 95 %", pool.upper95(), live.upper95(), at.end(cells, '+'), size, shown));
  }

  /** The pool's s_0 on the scale of this series. */
  private double lentSd() {
    return Math.sqrt(
        lent.line().variance()
            * lent.noise().scale(pool.series().line(), result.pooled().factor()));
  }

  /** TINV knows whole degrees of freedom only; the beta function behind it takes any. */
  private String t() {
    if (isKnown()) {
      return "NORMSINV(0.975)";
    }
    String df = "E" + (stored + 1);
    String beta = "BETAINV(0.95,0.5," + df + "/2)";
    return "SQRT(" + df + "*" + beta + "/(1-" + beta + "))";
  }
}
