package org.spikewright.app;

import java.nio.file.Path;
import java.time.Clock;
import org.spikewright.config.Loaded;
import org.spikewright.config.Settings;
import org.spikewright.testkit.Laboratory;

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
}
