package org.spikewright.demo;

import java.math.BigDecimal;
import java.math.RoundingMode;
import java.time.LocalDateTime;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Random;
import java.util.stream.IntStream;

/**
 * Measures planned series: noise, times, and whatever is the matter. Each series draws from a
 * generator of its own, so that changing one leaves the others as they were.
 */
final class Measurement {
  /**
   * {@link Random} is specified to the bit, so that every machine writes the same night. The fourth
   * seed tried: the first in which no clean series raises a false alarm, which two series in a
   * hundred do, and in which the noisy one is found.
   */
  private static final long SEED = 20260307L;

  /** Relative standard deviation from reading to reading of one flask. */
  private static final double READING_SD = 0.004;

  /** How many times as much as usual the flasks of a noisy series scatter. */
  private static final double NOISY = 6;

  /** The bottle of half the strength that was taken for the stock. */
  private static final double WRONG_STOCK = 0.5;

  /** Flask 3 was measured as flask 4, and the other way round. */
  private static final int SWAPPED = 3;

  /** What is left of the odd flask. */
  private static final double ODD_FLASK = 0.89;

  static final int ODD_FLASK_NUMBER = 4;

  /** The furnace says a word instead of a number above this peak area. */
  private static final double FURNACE_RANGE = 0.6;

  static final String OVER_RANGE_WORD = "OVER";
  static final String UNDECLARED_WORD = "#####";

  /** Concentration in the flask, in µg/L, at which saturation halves the signal. */
  private static final double HALF_SIGNAL = 340;

  private final int secondsPerReading;
  private LocalDateTime clock;

  Measurement(LocalDateTime start, int secondsPerReading) {
    this.clock = start;
    this.secondsPerReading = secondsPerReading;
  }

  /** Measures series one after the other. */
  List<ReadingRow> measure(List<SeriesPlan> plans) {
    List<ReadingRow> rows = new ArrayList<>();
    for (SeriesPlan plan : plans) {
      measure(plan, rows);
    }
    return rows;
  }

  /** The time now, moving on to the next reading. */
  LocalDateTime tick(Random random) {
    LocalDateTime now = clock;
    clock = clock.plusSeconds(secondsPerReading + random.nextInt(7) - 3);
    return now;
  }

  /** The generator of a series or other named thing. */
  static Random random(String name) {
    long mixed = (SEED + name.hashCode()) * 0x9E3779B97F4A7C15L;
    return new Random(mixed ^ (mixed >>> 32));
  }

  private void measure(SeriesPlan plan, List<ReadingRow> rows) {
    Random random = random(plan.recipe().analyte() + " " + plan.sample());
    double suppression = 0.86 + 0.02 * random.nextGaussian();
    double flaskSd = plan.recipe().flaskSd() * (plan.scenario() == Scenario.NOISY ? NOISY : 1);
    for (int flask : order(plan, random)) {
      double level =
          plan.recipe().sensitivity()
                  * suppression
                  * response(plan, flask)
                  * (1 + flaskSd * random.nextGaussian())
              + plan.recipe().floor() * random.nextGaussian();
      for (int replicate = 1; replicate <= plan.recipe().readings(); replicate++) {
        double signal =
            level * (1 + READING_SD * random.nextGaussian())
                + plan.recipe().floor() * random.nextGaussian();
        rows.add(
            new ReadingRow(
                plan, flask, replicate, said(plan, flask, replicate, signal), tick(random)));
      }
    }
  }

  /** In one vessel upwards; flasks in an order that hides no drift. */
  private static List<Integer> order(SeriesPlan plan, Random random) {
    int first = plan.scenario() == Scenario.NO_UNSPIKED_FLASK ? 2 : 1;
    List<Integer> flasks =
        new ArrayList<>(IntStream.rangeClosed(first, plan.flasks()).boxed().toList());
    if (!plan.recipe().growing()) {
      Collections.shuffle(flasks, random);
    }
    return flasks;
  }

  private static double response(SeriesPlan plan, int flask) {
    double concentration = plan.inFlask(flask);
    return switch (plan.scenario()) {
      case BENT -> concentration / (1 + concentration / HALF_SIGNAL);
      case ODD_FLASK -> flask == ODD_FLASK_NUMBER ? concentration * ODD_FLASK : concentration;
      case WRONG_STOCK -> plan.inFlask(flask, WRONG_STOCK);
      case SWAPPED ->
          flask == SWAPPED || flask == SWAPPED + 1
              ? plan.inFlask(2 * SWAPPED + 1 - flask)
              : concentration;
      default -> concentration;
    };
  }

  private static String said(SeriesPlan plan, int flask, int replicate, double signal) {
    if (plan.recipe().instrument().equals("furnace") && signal > FURNACE_RANGE) {
      return OVER_RANGE_WORD;
    }
    if (plan.scenario() == Scenario.REFUSED_ROW && flask == 3 && replicate == 2) {
      return UNDECLARED_WORD;
    }
    return BigDecimal.valueOf(signal)
        .setScale(plan.recipe().decimals(), RoundingMode.HALF_EVEN)
        .toPlainString();
  }
}
