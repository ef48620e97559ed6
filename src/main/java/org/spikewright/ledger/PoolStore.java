package org.spikewright.ledger;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import org.spikewright.analysis.Memory;
import org.spikewright.analysis.NightEvidence;
import org.spikewright.analysis.PoolKey;
import org.spikewright.analysis.Recall;
import org.spikewright.fit.PoolEvidence;
import org.spikewright.fit.PooledSeries;
import org.spikewright.reading.Design;

/**
 * What the pools of closed lab days came to, and what later ones remember of them. An instrument's
 * pool stands under its name alone.
 */
final class PoolStore {
  private final Sql sql;

  private record Stored(PoolKey key, String evidence, String remembered) {}

  private record Look(long day, long nth, int nights) {}

  /** A text that holds series; a record, so that it is written like all others. */
  record Series(List<PooledSeries> series) {}

  PoolStore(Sql sql) {
    this.sql = sql;
  }

  Recall recall(LocalDate day, boolean inProgress) {
    return new Recall(memory(day), evidence(day), inProgress);
  }

  private Optional<NightEvidence> evidence(LocalDate day) {
    Optional<Look> look =
        sql.first(
            "SELECT day, nth, nights FROM day_pools WHERE day = ? ORDER BY nth DESC LIMIT 1",
            row -> new Look(row.getLong(1), row.getLong(2), row.getInt(3)),
            day.toEpochDay());
    return look.map(
        newest -> {
          Map<PoolKey, PoolEvidence> pools = new TreeMap<>();
          Map<String, PoolEvidence> instruments = new TreeMap<>();
          for (Stored stored : pools(newest.day(), newest.nth())) {
            PoolEvidence evidence = RecordText.decode(PoolEvidence.class, stored.evidence());
            if (stored.key().analyte().isEmpty()) {
              instruments.put(stored.key().instrument(), evidence);
            } else {
              pools.put(stored.key(), evidence);
            }
          }
          return new NightEvidence(pools, instruments, newest.nights(), false);
        });
  }

  private Memory memory(LocalDate day) {
    List<Look> looks =
        sql.list(
            "SELECT day, MAX(nth) FROM day_pools WHERE day < ? GROUP BY day ORDER BY day DESC"
                + " LIMIT "
                + Memory.NIGHTS,
            row -> new Look(row.getLong(1), row.getLong(2), 0),
            day.toEpochDay());
    Map<PoolKey, List<PooledSeries>> remembered = new TreeMap<>();
    for (int i = looks.size() - 1; i >= 0; i--) {
      for (Stored stored : pools(looks.get(i).day(), looks.get(i).nth())) {
        if (!stored.remembered().isEmpty()) {
          remembered
              .computeIfAbsent(stored.key(), key -> new ArrayList<>())
              .addAll(RecordText.decode(Series.class, stored.remembered()).series());
        }
      }
    }
    return new Memory(remembered, looks.size());
  }

  private List<Stored> pools(long day, long nth) {
    return sql.list(
        "SELECT n.text, p.evidence, p.remembered FROM day_pool p JOIN name n ON n.id = p.pool"
            + " WHERE p.day = ? AND p.nth = ?",
        row -> new Stored(key(Sql.text(row, 1)), row.getString(2), row.getString(3)),
        day,
        nth);
  }

  /** Stores what a closed day's pools came to; {@link IllegalStateException} the second time. */
  void store(
      LocalDate day,
      String program,
      NightEvidence evidence,
      Map<PoolKey, List<PooledSeries>> toRemember,
      Ids ids) {
    sql.run(
        "INSERT INTO day_pools (day, nth, program, nights) VALUES (?, 1, ?, ?)",
        day.toEpochDay(),
        program,
        evidence.nights());
    evidence
        .pools()
        .forEach(
            (key, pool) -> {
              List<PooledSeries> series = toRemember.getOrDefault(key, List.of());
              String remembered = RecordText.encode(new Series(series));
              add(day, ids.name(text(key)), RecordText.encode(pool), remembered);
            });
    evidence
        .instruments()
        .forEach(
            (name, pool) -> {
              String key = text(new PoolKey(name, "", "", Design.MADE_UP));
              add(day, ids.name(key), RecordText.encode(pool), "");
            });
  }

  private void add(LocalDate day, long pool, String evidence, String remembered) {
    sql.run(
        "INSERT INTO day_pool (day, nth, pool, evidence, remembered) VALUES (?, 1, ?, ?, ?)",
        day.toEpochDay(),
        pool,
        evidence,
        remembered);
  }

  private static String text(PoolKey key) {
    return new Fields.Writer()
        .add(key.instrument())
        .add(key.analyte())
        .add(key.line())
        .add(key.design().name())
        .toString();
  }

  private static PoolKey key(String text) {
    Fields.Reader in = new Fields.Reader(text);
    return new PoolKey(in.text(), in.text(), in.text(), Design.valueOf(in.text()));
  }
}
