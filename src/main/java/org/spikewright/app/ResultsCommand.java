package org.spikewright.app;

import java.io.BufferedOutputStream;
import java.io.IOException;
import java.io.OutputStream;
import java.io.PrintStream;
import java.time.LocalDate;
import java.util.Iterator;
import java.util.List;
import java.util.concurrent.Callable;
import java.util.stream.Stream;
import java.util.stream.StreamSupport;
import org.spikewright.config.Settings;
import org.spikewright.ledger.Ledger;
import org.spikewright.ledger.LedgerView;
import org.spikewright.ledger.Opening;
import org.spikewright.ledger.ResultOrder;
import org.spikewright.summary.CsvPlan;
import org.spikewright.summary.ResultRow;
import org.spikewright.workbook.CsvWriter;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Spec;

/** {@code results}: the newest results of every lab day, as CSV. */
@Command(
    name = "results",
    mixinStandardHelpOptions = true,
    description = "Prints the newest results of every lab day as CSV (UTF-8); changes nothing.",
    footer = {"", "Example: spikewright results --conf spikewright.toml > results.csv"})
final class ResultsCommand implements Callable<Integer> {
  @Mixin private ConfOption conf;
  @Spec private CommandSpec spec;

  @Override
  public Integer call() {
    return conf.with(this::print);
  }

  private int print(Settings settings) {
    Opening.ToRead opening = Ledger.openReadOnly(settings.ledger(), settings.longestPause());
    if (opening instanceof Opening.Refused refused) {
      return Faults.report(
          ExitCode.FAULT,
          List.of(refused.found() + "; " + refused.advice()),
          spec.commandLine().getErr());
    }
    // Bytes, past the encoding of the console; its owner closes it.
    PrintStream console = System.out;
    try (LedgerView view = ((Opening.Viewed) opening).view()) {
      OutputStream out = new BufferedOutputStream(console, 1 << 16);
      CsvWriter.print(CsvPlan.results(newest(view)), out);
      out.flush();
      if (console.checkError()) {
        return Faults.report(
            ExitCode.FAULT,
            List.of("the results could not be printed to their end"),
            spec.commandLine().getErr());
      }
      return ExitCode.DONE;
    } catch (IOException trouble) {
      return Faults.report(trouble, spec.commandLine().getErr());
    }
  }

  private static Iterable<ResultRow> newest(LedgerView view) {
    return () -> rows(view).iterator();
  }

  private static Stream<ResultRow> rows(LedgerView view) {
    return view.summarisedDays().stream().flatMap(day -> rows(view, day));
  }

  private static Stream<ResultRow> rows(LedgerView view, LocalDate day) {
    int revision = view.newest(day).orElseThrow().revision();
    Iterator<ResultRow> rows = view.results(day, revision, ResultOrder.BY_KEY).iterator();
    Iterable<ResultRow> once = () -> rows;
    return StreamSupport.stream(once.spliterator(), false);
  }
}
