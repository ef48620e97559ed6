package org.spikewright.app;

import java.io.PrintWriter;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;
import picocli.CommandLine;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Spec;

/** The command line. */
@Command(
    name = "spikewright",
    mixinStandardHelpOptions = true,
    versionProvider = Main.VersionText.class,
    description =
        "Reads instrument exports from a watched folder, evaluates standard-addition series and"
            + " writes a summary workbook every night.",
    subcommands = {
      WatchCommand.class,
      OnceCommand.class,
      TryCommand.class,
      ResultsCommand.class,
      PlanCommand.class,
      DemoCommand.class
    },
    footer = {
      "",
      "Exit codes: 0 done, also when input was refused (the summary says so); 1 refused input",
      "(try, once --strict) or no plan (plan); 2 configuration; 3 fault; 4 another process owns the ledger."
    })
public final class Main implements Runnable {
  private static final Logger LOG = LoggerFactory.getLogger(Main.class);

  @Spec private CommandSpec spec;

  /** For the command line alone. */
  public Main() {}

  /** Runs a command and ends the process with its exit code. */
  public static void main(String[] args) {
    endWhenBroken();
    int code = run(args);
    if (code != ExitCode.DONE) {
      System.exit(code);
    }
  }

  /**
   * After an error of the virtual machine, such as memory used up, nothing in the process is to be
   * trusted: it ends at once, as after a power cut, and whoever started it may start it again.
   */
  static void endWhenBroken() {
    Thread.setDefaultUncaughtExceptionHandler(
        (thread, fault) -> {
          try {
            LOG.error("the program cannot go on: {}", fault.toString(), fault);
          } finally {
            boolean isMain = "main".equals(thread.getName());
            if (isMain || fault instanceof VirtualMachineError) {
              Runtime.getRuntime().halt(ExitCode.FAULT);
            }
          }
        });
  }

  /** Runs a command and returns its exit code. */
  static int run(String... args) {
    return new CommandLine(new Main())
        .setExecutionExceptionHandler(
            (trouble, commandLine, parsed) -> Faults.report(trouble, commandLine.getErr()))
        .execute(args);
  }

  /** Without a command: what there is. */
  @Override
  public void run() {
    PrintWriter out = spec.commandLine().getOut();
    spec.commandLine().usage(out);
  }

  /** {@code --version}. */
  static final class VersionText implements CommandLine.IVersionProvider {
    @Override
    public String[] getVersion() {
      return new String[] {"spikewright " + Version.NUMBER};
    }
  }
}
