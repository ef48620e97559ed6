package org.spikewright.app;

import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import org.spikewright.config.Settings;
import org.spikewright.ledger.RevisionRecord;
import org.spikewright.mapping.Mapping;
import org.spikewright.summary.Setting;

/** The program's and the configuration's part of the Settings sheet. */
final class SettingsLines {
  private static final String FILE = "configuration file";

  private SettingsLines() {}

  static List<Setting> of(Settings settings, List<Mapping> mappings, RevisionRecord revision) {
    List<Setting> lines = new ArrayList<>();
    lines.add(new Setting("Program", "Spikewright", revision.programVersion(), "this program"));
    lines.add(new Setting("Configuration", "Content hash", revision.settingsSha256(), "SHA-256"));
    lines.add(new Setting("Configuration", "Laboratory", settings.laboratory(), FILE));
    lines.add(new Setting("Configuration", "Zone", settings.calendar().zone().getId(), FILE));
    lines.add(
        new Setting(
            "Configuration", "Lab day begins", settings.calendar().cutOff().toString(), FILE));
    lines.add(new Setting("Configuration", "Nightly summary", settings.nightly().toString(), FILE));
    lines.add(
        new Setting(
            "Configuration", "Longest pause in a series", words(settings.longestPause()), FILE));
    lines.add(
        new Setting(
            "Configuration", "Wait for missing flasks", words(settings.waitForFlasks()), FILE));
    named(lines, "Named stocks", settings.shelf().stocks().size(), "table of stocks");
    named(lines, "Named glassware", settings.shelf().glassware().size(), "table of glassware");
    for (Mapping mapping : mappings) {
      lines.add(new Setting("Mapping", mapping.name(), mapping.sha256(), "SHA-256 of its text"));
    }
    return lines;
  }

  private static void named(List<Setting> lines, String what, int count, String where) {
    if (count > 0) {
      lines.add(new Setting("Configuration", what, Integer.toString(count), where));
    }
  }

  private static String words(Duration duration) {
    return duration.toMinutes() % 60 == 0
        ? duration.toHours() + " h"
        : duration.toMinutes() + " min";
  }
}
