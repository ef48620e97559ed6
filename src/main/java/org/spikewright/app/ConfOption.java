package org.spikewright.app;

import java.nio.file.Path;
import java.time.Clock;
import java.util.function.ToIntFunction;
import org.spikewright.config.ConfigFault;
import org.spikewright.config.Loaded;
import org.spikewright.config.Settings;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Spec;
import picocli.CommandLine.Spec.Target;

/** The option that every command has. */
final class ConfOption {
  @Option(
      names = "--conf",
      paramLabel = "FILE",
      defaultValue = "spikewright.toml",
      description = "The configuration (default: ${DEFAULT-VALUE} in the current folder).")
  private Path file;

  @Spec(Target.MIXEE)
  private CommandSpec command;

  /** Reads the configuration and goes on with it, or reports all its faults. */
  int with(ToIntFunction<Settings> body) {
    Loaded<Settings> loaded = Settings.load(file);
    if (loaded instanceof Loaded.Good<Settings> good) {
      return body.applyAsInt(good.value());
    }
    Loaded.Faulty<Settings> faulty = (Loaded.Faulty<Settings>) loaded;
    return Faults.report(
        ExitCode.CONFIGURATION,
        faulty.faults().stream().map(ConfigFault::toString).toList(),
        command.commandLine().getErr());
  }

  /** Opens the station and goes on with it, or reports why it cannot be opened. */
  int withStation(ToIntFunction<Station> body) {
    return with(settings -> withStation(settings, Clock.systemUTC(), body));
  }

  int withStation(Settings settings, Clock clock, ToIntFunction<Station> body) {
    Station.Attempt attempt = Station.open(settings, clock);
    if (attempt instanceof Station.Attempt.Refused refused) {
      return Faults.report(refused.exitCode(), refused.problems(), command.commandLine().getErr());
    }
    try (Station station = ((Station.Attempt.Opened) attempt).station()) {
      station
          .faultyMappings()
          .forEach(
              fault ->
                  command
                      .commandLine()
                      .getErr()
                      .println(
                          "mapping not used until it is corrected and the program started again: "
                              + fault));
      command.commandLine().getErr().flush();
      return body.applyAsInt(station);
    }
  }
}
