package org.spikewright.app;

import java.io.PrintWriter;
import java.time.Duration;
import java.util.concurrent.Callable;
import org.spikewright.ledger.Arrived;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Spec;

/** {@code once}: one round and a summary. */
@Command(
    name = "once",
    mixinStandardHelpOptions = true,
    description = "Takes in what lies in the watched folder, writes the summaries and ends.",
    footer = {"", "Example: spikewright once --settle 0s --conf spikewright.toml"})
final class OnceCommand implements Callable<Integer> {
  @Mixin private ConfOption conf;
  @Spec private CommandSpec spec;

  @Option(
      names = "--settle",
      paramLabel = "TIME",
      converter = DurationText.class,
      description =
          "How long a file must hold still, such as 10s; 0s takes the folder as it stands"
              + " (default: the configuration's).")
  private Duration settle = Duration.ofSeconds(-1);

  @Option(names = "--strict", description = "Exit with 1 when a file or a row was refused.")
  private boolean strict;

  @Override
  public Integer call() {
    return conf.withStation(this::run);
  }

  private int run(Station station) {
    Duration wait = settle.isNegative() ? station.settings().settle() : settle;
    Stop stop = new Stop();
    ShutdownHook hook = ShutdownHook.of(stop);
    try {
      Once.Report report = new Once(station, wait, stop).run();
      print(report, spec.commandLine().getOut());
      return exitCode(report);
    } catch (Exception trouble) {
      return Faults.report(trouble, spec.commandLine().getErr());
    } finally {
      station.close();
      hook.over();
    }
  }

  private int exitCode(Once.Report report) {
    if (!report.failing().isEmpty()) {
      return ExitCode.FAULT;
    }
    boolean refused =
        !report.waiting().isEmpty() || report.received().stream().anyMatch(OnceCommand::isRefused);
    return strict && refused ? ExitCode.REFUSED : ExitCode.DONE;
  }

  private static boolean isRefused(Arrived arrived) {
    return arrived.outcome() == Arrived.Result.REFUSED || arrived.tally().rejections() > 0;
  }

  /** What happened, for whoever started it. */
  static void print(Once.Report report, PrintWriter out) {
    for (Arrived arrived : report.received()) {
      out.println(
          switch (arrived.outcome()) {
            case READ ->
                "read     "
                    + arrived.name()
                    + ": "
                    + arrived.tally().readings()
                    + " readings, "
                    + arrived.tally().rejections()
                    + " rows refused";
            case REFUSED -> "refused  " + arrived.name() + ": " + Refusal.oneLine(arrived.reason());
            case KNOWN -> "known    " + arrived.name() + ": " + Refusal.oneLine(arrived.reason());
          });
    }
    report
        .summaries()
        .forEach(
            issued ->
                out.println(
                    "summary  "
                        + issued.workbook()
                        + ": "
                        + issued.record().results()
                        + " results of lab day "
                        + issued.record().labDay()));
    report.waiting().forEach(out::println);
    report.failing().forEach(out::println);
    if (report.stopped()) {
      out.println("stopped before the end; what is left is done the next time");
    } else if (report.summaries().isEmpty()) {
      out.println("nothing new: no summary is owed");
    }
    if (report.unsettled()) {
      out.println("a file is still being written and was left for the next time");
    }
    out.flush();
  }
}
