package org.spikewright.summary;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Function;
import java.util.function.ToDoubleFunction;
import org.spikewright.analysis.Memory;
import org.spikewright.analysis.NightEvidence;
import org.spikewright.analysis.PoolKey;
import org.spikewright.fit.NightDrift;
import org.spikewright.fit.NoiseFunction;
import org.spikewright.fit.NoiseHistory;
import org.spikewright.fit.PoolEvidence;
import org.spikewright.fit.SensitivitySpread;
import org.spikewright.fit.SharedBend;
import org.spikewright.fit.VariancePrior;

/** What the night knows and one line does not: two tables with a line for each pool. */
final class NoiseSheet {
  static final String NAME = "Noise";

  private static final String SHARE = "0.00%";

  private static final int CHART_ROWS = 22;

  private static final List<ColumnPlan> COLUMNS = columns();

  private static final String[] LENDING = {
    "Pool",
    "Series tonight",
    "Series remembered",
    "Flask noise: constant",
    "Flask noise: proportional",
    "Reading noise: constant",
    "Reading noise: proportional",
    "Usual signal",
    "Flask noise there",
    "Prior d_0",
    "Prior s_0 there",
    "What makes the noise",
    "Weights",
    "What it lends"
  };

  private static final String[] TOGETHER = {
    "Pool",
    "Series with a bend to tell",
    "Shared bend per signal",
    "its p",
    "takes 5 % above",
    "Sensitivities' spread",
    "Odd slopes",
    "Drift an hour",
    "its p",
    "Noise over its history",
    "its p",
    "Shared bend",
    "Levels of addition",
    "Drift; history"
  };

  private final Night night;
  private final NightEvidence evidence;
  private final Counts counts;
  private final SeriesIndex index;
  private final List<List<CellPlan>> rows = new ArrayList<>();

  private NoiseSheet(Night night, Counts counts, SeriesIndex index) {
    this.night = night;
    this.evidence = night.evidence();
    this.counts = counts;
    this.index = index;
  }

  private static List<ColumnPlan> columns() {
    List<ColumnPlan> columns = new ArrayList<>();
    columns.add(ColumnPlan.text("", 30));
    for (int i = 0; i < 10; i++) {
      columns.add(ColumnPlan.number("", 12));
    }
    for (int i = 0; i < 3; i++) {
      columns.add(ColumnPlan.text("", 34));
    }
    return List.copyOf(columns);
  }

  static SheetPlan of(Night night, Counts counts, SeriesIndex index) {
    return new NoiseSheet(night, counts, index).plan();
  }

  /** The row of a pool's line in the first table, from 1. */
  static int rowOf(Night night, PoolKey pool) {
    int place = List.copyOf(night.evidence().pools().keySet()).indexOf(pool);
    return head(night).size() + 2 + place + 1;
  }

  private SheetPlan plan() {
    rows.addAll(head(night));
    if (evidence.pools().isEmpty()) {
      line("No pool: no series of three flasks or more.", Look.PLAIN);
      return sheet();
    }
    table("The noise, and what it lends to each series", LENDING);
    pools().forEach(words -> rows.add(lending(words)));
    evidence.instruments().forEach((name, all) -> rows.add(instrument(name, all)));
    rows.add(List.of());
    table("What the night's series show together", TOGETHER);
    pools().forEach(words -> rows.add(together(words)));
    rows.add(List.of());
    Optional<PoolKey> largest = NoiseData.largest(night, index);
    return largest.isEmpty() ? sheet() : sheet().with(List.of(chart(largest.get())), List.of());
  }

  private SheetPlan sheet() {
    return new SheetPlan(NAME, COLUMNS, List.of(), List.copyOf(rows), SheetPlan.Layout.PAGE);
  }

  private ChartPlan chart(PoolKey pool) {
    int top = rows.size();
    return NoiseData.chart(night, index, pool, new ChartPlan.Box(0, top, 11, top + CHART_ROWS));
  }

  private List<PoolWords> pools() {
    return of(night, index);
  }

  /** The pools of a night, in order. */
  static List<PoolWords> of(Night night, SeriesIndex index) {
    List<PoolWords> words = new ArrayList<>();
    for (Map.Entry<PoolKey, PoolEvidence> pool : night.evidence().pools().entrySet()) {
      words.add(new PoolWords(pool.getKey(), pool.getValue(), index.pools()));
    }
    return words;
  }

  private static List<List<CellPlan>> head(Night night) {
    NightEvidence evidence = night.evidence();
    List<List<CellPlan>> head = new ArrayList<>();
    head.add(
        List.of(CellPlan.text("Noise: what the night knows and one line does not", Look.TITLE)));
    head.add(List.of(CellPlan.text(memory(evidence), Look.STRONG)));
    if (evidence.isProvisional()) {
      head.add(
          List.of(
              CellPlan.text(
                  "The pools are provisional: the day is in progress, and the first summary after"
                      + " its close makes them anew.",
                  Look.STRONG)));
    }
    for (String sentence : EXPLANATIONS) {
      head.add(List.of(CellPlan.text(sentence, Look.FAINT)));
    }
    head.add(List.of());
    return head;
  }

  private static final List<String> EXPLANATIONS =
      List.of(
          "A pool is one instrument, analyte, line and way of adding. With ten series or more,"
              + " tonight's and remembered ones, it lends its noise to each of them.",
          "Noise function: sd² = constant² + (proportional · signal)², of flasks about their lines"
              + " and of readings within a flask. The usual signal is the pool's median flask.",
          "Prior: the variance s_0² that the pool expects of a series, worth d_0 degrees of freedom"
              + " beside the series' own; the larger d_0, the more alike the series.",
          "Shared bend, levels and drift are tested over tonight's series together, each at its own"
              + " rate of false alarms (Settings); p is how often chance alone does as much.",
          "Sensitivities' spread: robust standard deviation of the slopes. A series far outside it"
              + " has an odd slope: the wrong stock hides in its own straight line.");

  private static String memory(NightEvidence evidence) {
    return switch (evidence.nights()) {
      case 0 -> "A cold start: no earlier night is remembered, tonight speaks alone.";
      case 1 -> "One earlier night is remembered (of at most " + Memory.NIGHTS + ").";
      default ->
          evidence.nights() + " earlier nights are remembered (of at most " + Memory.NIGHTS + ").";
    };
  }

  private void table(String title, String[] headers) {
    line(title, Look.HEADING);
    List<CellPlan> header = new ArrayList<>();
    for (int i = 0; i < headers.length; i++) {
      boolean number = COLUMNS.get(i).kind() == ColumnPlan.Kind.NUMBER;
      header.add(CellPlan.text(headers[i], number ? Look.HEADER_RIGHT : Look.HEADER));
    }
    rows.add(header);
  }

  private void line(String text, Look look) {
    rows.add(List.of(CellPlan.text(text, look)));
  }

  private List<CellPlan> lending(PoolWords words) {
    PoolEvidence pool = words.pool();
    List<CellPlan> cells = new ArrayList<>();
    cells.add(CellPlan.text(words.key().shown(), Look.WRAPPED));
    cells.add(CellPlan.count(pool.tonight()));
    cells.add(CellPlan.count(pool.remembered()));
    noise(cells, pool.flaskNoise());
    noise(cells, pool.readingNoise());
    OptionalDouble signal = index.pools().signal(words.key());
    cells.add(CellPlan.number(signal, Formats.significant(signal, 3)));
    cells.add(CellPlan.number(words.relativeNoise(), SHARE));
    cells.add(degrees(pool.line()));
    cells.add(CellPlan.number(words.relativePrior(), SHARE));
    cells.add(CellPlan.text(words.dominates(), Look.WRAPPED));
    cells.add(CellPlan.text(words.weights(), Look.WRAPPED));
    cells.add(CellPlan.text(words.lends(evidence), Look.WRAPPED));
    return cells;
  }

  private static void noise(List<CellPlan> cells, Optional<NoiseFunction> noise) {
    cells.add(significant(number(noise, NoiseFunction::constant), 3));
    cells.add(CellPlan.number(number(noise, NoiseFunction::proportional), SHARE));
  }

  private static CellPlan degrees(Optional<VariancePrior> prior) {
    if (prior.isEmpty()) {
      return CellPlan.EMPTY;
    }
    double df = prior.get().df();
    return Double.isFinite(df)
        ? CellPlan.number(df, Formats.significant(df, 2))
        : CellPlan.text("very many", Look.FAINT_RIGHT);
  }

  private static List<CellPlan> instrument(String name, PoolEvidence all) {
    List<CellPlan> cells = new ArrayList<>();
    cells.add(CellPlan.text(name + ", all its pools", Look.WRAPPED));
    cells.add(CellPlan.count(all.tonight()));
    cells.add(CellPlan.count(all.remembered()));
    for (int i = 0; i < 6; i++) {
      cells.add(CellPlan.EMPTY);
    }
    cells.add(degrees(all.relativeLine()));
    cells.add(
        CellPlan.number(number(all.relativeLine(), prior -> Math.sqrt(prior.variance())), SHARE));
    cells.add(CellPlan.EMPTY);
    cells.add(CellPlan.EMPTY);
    cells.add(
        CellPlan.text(
            all.lentByInstrument().isPresent()
                ? "lends the noise relative to the signal, and nothing else, to its small pools"
                : "too small as well",
            Look.WRAPPED));
    return cells;
  }

  private List<CellPlan> together(PoolWords words) {
    PoolEvidence pool = words.pool();
    Optional<SharedBend> bend = pool.bend().filter(found -> words.isEnough());
    List<CellPlan> cells = new ArrayList<>();
    cells.add(CellPlan.text(words.key().shown(), Look.WRAPPED));
    cells.add(CellPlan.number(number(bend, SharedBend::series), Formats.WHOLE));
    cells.add(significant(number(bend, SharedBend::coefficient), 2));
    cells.add(significant(number(bend, SharedBend::p), 2));
    OptionalDouble above =
        pool.sharedBend()
            .map(found -> found.signalWhereItTakes(PoolWords.TAKEN))
            .orElse(OptionalDouble.empty());
    cells.add(significant(above, 3));
    cells.add(CellPlan.number(number(pool.sensitivity(), SensitivitySpread::spread), SHARE));
    cells.add(CellPlan.count(counts.oddSlopes().getOrDefault(words.key(), 0)));
    cells.add(CellPlan.number(number(pool.drift(), NightDrift::perHour), SHARE));
    cells.add(significant(number(pool.drift(), NightDrift::p), 2));
    cells.add(significant(number(pool.history(), NoiseHistory::ratio), 3));
    cells.add(significant(number(pool.history(), NoiseHistory::p), 2));
    cells.add(CellPlan.text(words.bend(), Look.WRAPPED));
    cells.add(CellPlan.text(words.levels(), Look.WRAPPED));
    cells.add(CellPlan.text(words.drift() + "; " + words.history(), Look.WRAPPED));
    return cells;
  }

  private static CellPlan significant(OptionalDouble value, int digits) {
    return CellPlan.number(value, Formats.significant(value, digits));
  }

  private static <T> OptionalDouble number(Optional<T> source, ToDoubleFunction<T> part) {
    Function<T, OptionalDouble> finite = value -> FlaskLine.finite(part.applyAsDouble(value) + 0.0);
    return source.map(finite).orElse(OptionalDouble.empty());
  }
}
