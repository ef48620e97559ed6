package org.spikewright.analysis;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.PriorityQueue;
import java.util.TreeMap;
import org.spikewright.fit.BendTest;
import org.spikewright.fit.PoolEvidence;
import org.spikewright.fit.PoolOptions;
import org.spikewright.fit.PooledSeries;
import org.spikewright.fit.Weighting;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.Criterion;
import org.spikewright.judgement.Limit;
import org.spikewright.judgement.SeriesResult;
import org.spikewright.reading.Calculation;
import org.spikewright.reading.MethodFacts;
import org.spikewright.reading.Role;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.SeriesKey;

/**
 * Collects what the series of a lab day say of their pools. A pool holds at most {@link #LARGEST}
 * series: of more, those whose keys have the least hash stay, so that the same set stays whatever
 * the order.
 */
final class Pools {
  /** So many series know their noise as well as more would, in little room. */
  static final int LARGEST = 2000;

  /** How many series of a pool later nights remember. */
  static final int REMEMBERED = 40;

  private static final int LEAST_FLASKS = 3;

  private static final Comparator<Member> BY_HASH =
      Comparator.comparingInt(Member::hash).thenComparing(Member::key);

  private final Map<PoolKey, Pool> pools = new TreeMap<>();

  private record Member(int hash, SeriesKey key, PooledSeries series) {}

  private static final class Pool {
    private final PriorityQueue<Member> members = new PriorityQueue<>(BY_HASH.reversed());
    private MethodFacts method;

    /** Of several methods that share a pool the first says how it is looked at. */
    void add(Member member, MethodFacts its) {
      method = method == null ? its : method;
      members.add(member);
      if (members.size() > LARGEST) {
        members.remove();
      }
    }

    /** By key. */
    List<PooledSeries> series() {
      return members.stream()
          .sorted(Comparator.comparing(Member::key))
          .map(Member::series)
          .toList();
    }

    /** So many of them, evenly by key, so that how samples are called does not choose. */
    List<PooledSeries> some(int most) {
      List<PooledSeries> all = series();
      if (all.size() <= most) {
        return all;
      }
      List<PooledSeries> some = new ArrayList<>(most);
      for (int i = 0; i < most; i++) {
        some.add(all.get((int) ((long) i * all.size() / most)));
      }
      return some;
    }
  }

  /** Takes a fitted series; one that has no part in pools is passed over. */
  void add(AdditionSeries series, SeriesResult result) {
    if (result.flasks().size() < LEAST_FLASKS || series.role() == Role.BLANK) {
      return;
    }
    SeriesKey key = series.key();
    pools
        .computeIfAbsent(PoolKey.of(series), pool -> new Pool())
        .add(new Member(hash(key), key, result.pooled()), series.method());
  }

  /** Spreads the keys; the hash of a text is the same on every machine. */
  private static int hash(SeriesKey key) {
    int hash = key.subject().sample().text().hashCode();
    hash = 31 * hash + key.batch().hashCode();
    hash = 31 * hash + key.preparation().hashCode();
    hash = 31 * hash + key.ordinal();
    hash *= 0x9E3779B9;
    return hash ^ (hash >>> 15);
  }

  /** What they come to, together with what is remembered. */
  NightEvidence evidence(CriteriaBook book, Recall recall) {
    Map<PoolKey, PoolEvidence> own = new TreeMap<>();
    Map<String, List<PooledSeries>> tonight = new TreeMap<>();
    Map<String, List<PooledSeries>> before = new TreeMap<>();
    pools.forEach(
        (key, pool) -> {
          List<PooledSeries> series = pool.series();
          List<PooledSeries> remembered = recall.memory().of(key);
          own.put(key, PoolEvidence.of(series, remembered, options(pool.method, book)));
          join(tonight, key.instrument(), series);
          join(before, key.instrument(), remembered);
        });
    Map<String, PoolEvidence> instruments = new TreeMap<>();
    // Only where a pool is too small to speak for itself is its instrument asked.
    own.forEach(
        (key, evidence) -> {
          if (evidence.lent().isEmpty()) {
            instruments.computeIfAbsent(
                key.instrument(), name -> PoolEvidence.of(tonight.get(name), before.get(name)));
          }
        });
    return new NightEvidence(own, instruments, recall.memory().nights(), recall.inProgress());
  }

  private static void join(
      Map<String, List<PooledSeries>> all, String name, List<PooledSeries> more) {
    List<PooledSeries> list = all.computeIfAbsent(name, key -> new ArrayList<>());
    list.addAll(more.subList(0, Math.min(more.size(), LARGEST - Math.min(LARGEST, list.size()))));
  }

  private static PoolOptions options(MethodFacts method, CriteriaBook book) {
    Calculation calculation = method.calculation();
    Limit rate = book.of(method.name()).of(Criterion.NIGHT_FALSE_ALARMS);
    return new PoolOptions(
        calculation.weights() == Calculation.Weights.POOL ? Weighting.BY_NOISE : Weighting.EQUAL,
        calculation.bend() == Calculation.Bend.SATURATION
            ? BendTest.Side.SATURATION
            : BendTest.Side.EITHER,
        rate.value());
  }

  /** What later nights remember, by pool. */
  Map<PoolKey, List<PooledSeries>> toRemember() {
    Map<PoolKey, List<PooledSeries>> remembered = new TreeMap<>();
    pools.forEach((key, pool) -> remembered.put(key, pool.some(REMEMBERED)));
    return remembered;
  }
}
