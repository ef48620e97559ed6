package org.spikewright.app;

import java.nio.file.Path;
import java.time.Clock;
import java.time.Duration;
import org.spikewright.config.Loaded;
import org.spikewright.config.Settings;
import org.spikewright.testkit.Laboratory;
import org.spikewright.workbook.WriteFault;

/** Opens the stations of test laboratories. */
final class Stations {
  private Stations() {}

  static Station open(Laboratory lab, Clock clock) {
    if (!(Settings.load(Path.of(lab.conf())) instanceof Loaded.Good<Settings> good)) {
      throw new AssertionError("the configuration is faulty");
    }
    Station.Attempt attempt = Station.open(good.value(), clock);
    if (!(attempt instanceof Station.Attempt.Opened opened)) {
      throw new AssertionError(attempt.toString());
    }
    return opened.station();
  }

  /** Takes in the folder as it stands and makes the summaries, by a clock of the test's choice. */
  static Once.Report once(Laboratory lab, Clock clock) {
    try (Station station = open(lab, clock)) {
      return new Once(station, Duration.ZERO, new Stop()).run();
    } catch (WriteFault | InterruptedException trouble) {
      throw new AssertionError(trouble);
    }
  }
}
