package org.spikewright.app;

import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;

/** {@code watch}: the daemon. */
@Command(
    name = "watch",
    mixinStandardHelpOptions = true,
    description = "Runs until it is stopped: looks into the watched folder, writes the summaries.",
    footer = {"", "Example: spikewright watch --conf spikewright.toml"})
final class WatchCommand implements Callable<Integer> {
  @Mixin private ConfOption conf;

  @Override
  public Integer call() {
    return conf.withStation(
        station -> {
          try {
            new Daemon(station).run();
          } catch (InterruptedException interrupted) {
            Thread.currentThread().interrupt();
          }
          return ExitCode.DONE;
        });
  }
}
