package org.spikewright.app;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.file.Path;
import java.time.Clock;
import java.time.Instant;
import java.time.ZoneOffset;
import java.util.ArrayList;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Random;
import java.util.Set;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.testkit.Exports;
import org.spikewright.testkit.Laboratory;

/** The order, splitting and repetition of deliveries change no result. */
class OrderTest {
  private static final long SEED = 11;

  /** All arrive on one lab day, since that is the lab day of readings without a time. */
  private static final Clock CLOCK =
      Clock.fixed(Instant.parse("2026-03-05T12:00:00Z"), ZoneOffset.UTC);

  /**
   * A reading that came before is not recorded again, so that these two name the files that brought
   * it first.
   */
  private static final Set<String> BY_FIRST_DELIVERY = Set.of("batch", "source_files");

  private static final int PERMUTATIONS = 8;

  @TempDir Path folder;

  /** Split series, a cumulative export, a repeat under another name, an export without times. */
  private static Map<String, String> deliveries() {
    List<String> one = Exports.rows("BW-1", 5);
    List<String> two = Exports.rows("BW-2", 7);
    List<String> three = Exports.rows("BW-3", 3);
    Map<String, String> files = new LinkedHashMap<>();
    files.put("bench/first-half.csv", Exports.text(join(one.subList(0, 4), two.subList(0, 5))));
    files.put("bench/second-half.csv", Exports.text(join(one.subList(4, 8), two.subList(5, 8))));
    files.put("bench/cumulative.csv", Exports.text(join(one, two.subList(0, 6), three)));
    files.put("bench/repeated.csv", files.get("bench/second-half.csv"));
    files.put("plain/untimed.csv", Exports.text(join(one)).replace("BW-", "P-"));
    files.put("plain/untimed-again.csv", Exports.text(join(one, two)).replace("BW-", "P-"));
    return files;
  }

  @SafeVarargs
  private static List<String> join(List<String>... parts) {
    List<String> all = new ArrayList<>();
    for (List<String> part : parts) {
      all.addAll(part);
    }
    return all;
  }

  @Test
  void everyOrderAndSplittingGivesTheSameResults() {
    Laboratory atOnce = new Laboratory(folder.resolve("at-once"));
    deliveries().forEach(atOnce::drop);
    Stations.once(atOnce, CLOCK);
    String expected = InProcess.results(atOnce.conf());
    assertThat(Results.column(expected, "sample"))
        .containsExactlyInAnyOrder("BW-1", "BW-2", "BW-3", "P-1", "P-2");
    assertThat(Results.column(expected, "readings")).containsOnly("8");
    Random random = new Random(SEED);
    for (int i = 0; i < PERMUTATIONS; i++) {
      List<String> order = new ArrayList<>(deliveries().keySet());
      Collections.shuffle(order, random);
      Laboratory lab = new Laboratory(folder.resolve("order-" + i));
      for (String name : order) {
        lab.drop(name, deliveries().get(name));
        if (random.nextInt(3) > 0) {
          Stations.once(lab, CLOCK);
        }
      }
      Stations.once(lab, CLOCK);
      assertThat(Results.without(InProcess.results(lab.conf()), BY_FIRST_DELIVERY))
          .as("seed %d, order %s", SEED, order)
          .isEqualTo(Results.without(expected, BY_FIRST_DELIVERY));
    }
  }
}
