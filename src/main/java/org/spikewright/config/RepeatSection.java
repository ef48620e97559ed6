package org.spikewright.config;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.spikewright.judgement.Pipette;
import org.spikewright.judgement.RepeatCaps;

/** Reads {@code [repeat]}: what a repeat plan must keep to. */
final class RepeatSection {
  static final List<String> KEYS =
      List.of(
          "largest_share_of_volume",
          "flasks",
          "most_flasks",
          "replicates",
          "top_addition",
          "largest_dilution",
          "largest_stock_dilution",
          "noise",
          "pipettes");

  private static final int MOST_COUNT = 100;
  private static final double MOST_DILUTION = 1e6;

  private final Section section;

  private RepeatSection(Section section) {
    this.section = section;
  }

  static RepeatCaps caps(Section section) {
    return new RepeatSection(section).caps();
  }

  private RepeatCaps caps() {
    RepeatCaps all = RepeatCaps.DEFAULTS;
    int flasks = count("flasks", RepeatCaps.FEWEST_FLASKS, all.flasks());
    int most = count("most_flasks", RepeatCaps.FEWEST_FLASKS, Math.max(flasks, all.mostFlasks()));
    if (most < flasks) {
      section.fault(
          "most_flasks",
          "most_flasks of " + most + " below flasks of " + flasks,
          "at least as many as flasks");
    }
    return new RepeatCaps(
        number("largest_share_of_volume", 0.001, 1, all.largestShare()),
        flasks,
        Math.max(flasks, most),
        count("replicates", 1, all.replicates()),
        number("top_addition", RepeatCaps.LEAST_TOP, RepeatCaps.MOST_TOP, all.topAddition()),
        number("largest_dilution", 1, MOST_DILUTION, all.largestDilution()),
        number("largest_stock_dilution", 1, MOST_DILUTION, all.largestStockDilution()),
        number("noise", 1e-6, 0.5, all.noise()),
        pipettes().orElse(all.pipettes()));
  }

  private int count(String key, int least, int otherwise) {
    String expected = "a whole number from " + least + " to " + MOST_COUNT;
    Optional<Long> count = section.wholeNumber(key, expected);
    if (count.isPresent() && !(count.get() >= least && count.get() <= MOST_COUNT)) {
      section.fault(key, count.get() + " for " + section.named(key), expected);
      return otherwise;
    }
    return count.map(Long::intValue).orElse(otherwise);
  }

  private double number(String key, double least, double most, double otherwise) {
    String expected = "a number from " + least + " to " + most;
    Optional<Double> number = section.number(key, expected);
    if (number.isPresent() && !(number.get() >= least && number.get() <= most)) {
      section.fault(key, number.get() + " for " + section.named(key), expected);
      return otherwise;
    }
    return number.orElse(otherwise);
  }

  private Optional<List<Pipette>> pipettes() {
    List<Pipette> pipettes = new ArrayList<>();
    for (String text : section.texts("pipettes", Pipette.EXPECTED)) {
      Optional<Pipette> pipette = Pipette.parse(text);
      if (pipette.isEmpty()) {
        section.fault(
            "pipettes", "'" + text + "' for " + section.named("pipettes"), Pipette.EXPECTED);
      }
      pipette.ifPresent(pipettes::add);
    }
    return pipettes.isEmpty() ? Optional.empty() : Optional.of(pipettes);
  }
}
