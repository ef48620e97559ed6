package org.spikewright.summary;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import java.util.stream.Collectors;
import org.spikewright.analysis.PoolKey;
import org.spikewright.judgement.FlagKind;
import org.spikewright.judgement.Verdict;
import org.spikewright.reading.Design;
import org.spikewright.reading.Subject;
import org.spikewright.series.SeriesKey;

/**
 * What one walk over the results counts.
 *
 * @param verdicts series by verdict, all verdicts present
 * @param instruments by instrument, then by verdict
 * @param analytes by analyte, then by verdict
 * @param flags series by flag, only those that occur
 * @param tested series with a statistical flag
 * @param pooled series whose reported interval rests on a pool
 * @param oddSlopes series with an odd slope, by pool
 * @param first the results that need a person first, at most {@link #FIRST}
 * @param plotted the first series that has a line and stands on the Series sheet
 */
record Counts(
    Map<Verdict, Integer> verdicts,
    Map<String, Map<Verdict, Integer>> instruments,
    Map<String, Map<Verdict, Integer>> analytes,
    Map<FlagKind, Integer> flags,
    int tested,
    int pooled,
    Map<PoolKey, Integer> oddSlopes,
    List<ResultRow> first,
    Optional<SeriesKey> plotted) {

  /** How many results the Overview names. */
  static final int FIRST = 15;

  private static final Map<String, FlagKind> KINDS =
      Arrays.stream(FlagKind.values()).collect(Collectors.toMap(FlagKind::shortName, kind -> kind));

  static Counts of(Night night) {
    Map<Verdict, Integer> verdicts = zeros();
    Map<String, Map<Verdict, Integer>> instruments = new TreeMap<>();
    Map<String, Map<Verdict, Integer>> analytes = new TreeMap<>();
    Map<FlagKind, Integer> flags = new EnumMap<>(FlagKind.class);
    int tested = 0;
    int pooled = 0;
    Map<PoolKey, Integer> oddSlopes = new TreeMap<>();
    List<ResultRow> first = new ArrayList<>();
    SeriesKey plotted = null;
    for (ResultRow row : night.results()) {
      Verdict verdict = row.verdict();
      verdicts.merge(verdict, 1, Integer::sum);
      add(instruments, row.key().subject().instrument(), verdict);
      add(analytes, row.key().subject().analyte(), verdict);
      tested += count(row, flags) ? 1 : 0;
      pooled += row.intervalBasis().equals("pool") ? 1 : 0;
      if (row.flags().contains(FlagKind.ODD_SLOPE.shortName())) {
        pool(row).ifPresent(pool -> oddSlopes.merge(pool, 1, Integer::sum));
      }
      if (first.size() < FIRST && (verdict == Verdict.REPEAT || verdict == Verdict.REVIEW)) {
        first.add(row);
      }
      if (plotted == null && row.slope().isPresent() && SeriesIndex.holds(night, verdict)) {
        plotted = row.key();
      }
    }
    return new Counts(
        verdicts,
        instruments,
        analytes,
        flags,
        tested,
        pooled,
        oddSlopes,
        first,
        Optional.ofNullable(plotted));
  }

  private static Optional<PoolKey> pool(ResultRow row) {
    Subject subject = row.key().subject();
    return Arrays.stream(Design.values())
        .filter(design -> design.word().equals(row.design()))
        .findFirst()
        .map(
            design -> new PoolKey(subject.instrument(), subject.analyte(), subject.line(), design));
  }

  /** Counts a row's flags, each kind once; whether a statistical one is among them. */
  private static boolean count(ResultRow row, Map<FlagKind, Integer> flags) {
    boolean tested = false;
    for (String name : row.flags().stream().distinct().toList()) {
      FlagKind kind = KINDS.get(name);
      if (kind != null) {
        flags.merge(kind, 1, Integer::sum);
        tested |= Words.isTested(kind);
      }
    }
    return tested;
  }

  private static void add(Map<String, Map<Verdict, Integer>> counts, String name, Verdict verdict) {
    counts.computeIfAbsent(name, key -> zeros()).merge(verdict, 1, Integer::sum);
  }

  static Map<Verdict, Integer> zeros() {
    Map<Verdict, Integer> zeros = new EnumMap<>(Verdict.class);
    for (Verdict verdict : Verdict.values()) {
      zeros.put(verdict, 0);
    }
    return zeros;
  }
}
