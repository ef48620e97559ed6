package org.spikewright.summary;

import java.util.List;
import java.util.stream.Collectors;
import org.spikewright.judgement.Pipette;
import org.spikewright.judgement.RepeatCaps;
import org.spikewright.quantity.Numbers;

/** What repeat plans keep to, as the Settings sheet shows it. */
final class RepeatSettings {
  private static final String GROUP = "Repeat plan";

  private RepeatSettings() {}

  static List<Setting> of(RepeatCaps caps) {
    String origin =
        caps.equals(RepeatCaps.DEFAULTS) ? "common practice, default" : "configuration file";
    return List.of(
        new Setting(
            GROUP,
            "One vessel: largest share of the volume that is added",
            Numbers.plain(caps.largestShare()),
            origin),
        new Setting(GROUP, "Flasks", caps.flasks() + " to " + caps.mostFlasks(), origin),
        new Setting(GROUP, "Replicates of each flask", "" + caps.replicates(), origin),
        new Setting(
            GROUP,
            "Top addition over native, wanted",
            Numbers.plain(caps.topAddition()),
            origin + "; 1.5 to 3 always"),
        new Setting(
            GROUP,
            "Largest dilution of the sample; of a stock",
            Numbers.plain(caps.largestDilution())
                + "; "
                + Numbers.plain(caps.largestStockDilution()),
            origin),
        new Setting(
            GROUP,
            "Relative scatter of a flask where nothing is known",
            Numbers.plain(caps.noise()),
            origin),
        new Setting(
            GROUP,
            "Pipettes",
            caps.pipettes().stream().map(Pipette::toString).collect(Collectors.joining(", ")),
            origin));
  }
}
