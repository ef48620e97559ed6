package org.spikewright.app;

import java.io.PrintWriter;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Callable;
import org.spikewright.config.ConfigFault;
import org.spikewright.config.Loaded;
import org.spikewright.config.Settings;
import org.spikewright.judgement.PlanWords;
import org.spikewright.judgement.Planner;
import org.spikewright.judgement.RepeatCaps;
import org.spikewright.judgement.RepeatPlan;
import org.spikewright.judgement.RepeatPlan.Portion;
import org.spikewright.judgement.RepeatPlan.Prepared;
import org.spikewright.judgement.RepeatPlan.Refused;
import org.spikewright.quantity.Numbers;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Spec;

/** {@code plan}: the additions for a sample that is not measured yet. */
@Command(
    name = "plan",
    mixinStandardHelpOptions = true,
    description =
        "Plans the additions for a sample not yet measured: volumes, order of measurement, and the"
            + " uncertainty to expect. Exits with 1 when no plan keeps to the caps.",
    footer = {
      "",
      "Example: spikewright plan --expected \"12 µg/L\" --aliquot \"10 mL\" --final \"50 mL\""
          + " --stock \"10 mg/L\"",
      "With --start for --final: additions to one vessel. An aliquot in g: everything is weighed.",
      "Without an aliquot: additions stated as concentrations."
    })
final class PlanCommand implements Callable<Integer> {
  /** Volumes are arithmetic; a person decides. */
  private static final String CAUTION =
      "Volumes are arithmetic, not a procedure: qualified staff decide, by the laboratory's own"
          + " method and rules.";

  private static final Path USUAL_FILE = Path.of("spikewright.toml");

  @Mixin private PlanOptions options;
  @Spec private CommandSpec spec;

  @Option(
      names = "--conf",
      paramLabel = "FILE",
      description =
          "The configuration whose [repeat] section holds (default: spikewright.toml in the current"
              + " folder, else the common defaults).")
  private Optional<Path> conf = Optional.empty();

  @Override
  public Integer call() {
    Optional<Path> file =
        conf.or(() -> Optional.of(USUAL_FILE).filter(usual -> Files.isRegularFile(usual)));
    if (file.isEmpty()) {
      return plan(RepeatCaps.DEFAULTS);
    }
    Loaded<Settings> loaded = Settings.load(file.get());
    return loaded instanceof Loaded.Good<Settings> good
        ? plan(good.value().criteria().repeat())
        : faults(((Loaded.Faulty<Settings>) loaded).faults());
  }

  private int faults(List<ConfigFault> faults) {
    return problems(faults.stream().map(ConfigFault::toString).toList());
  }

  private int problems(List<String> problems) {
    return Faults.report(ExitCode.CONFIGURATION, problems, spec.commandLine().getErr());
  }

  private int plan(RepeatCaps caps) {
    PlanRequest request = new PlanRequest(options, caps);
    if (request.ask().isEmpty()) {
      return problems(request.faults());
    }
    RepeatPlan plan = Planner.plan(request.ask().get());
    if (plan instanceof Refused refused) {
      return Faults.report(
          ExitCode.REFUSED,
          List.of("No plan (" + refused.cap() + "). " + refused.found(), refused.help()),
          spec.commandLine().getErr());
    }
    print((Prepared) plan, spec.commandLine().getOut());
    return ExitCode.DONE;
  }

  private static void print(Prepared plan, PrintWriter out) {
    PlanWords.preparation(plan).forEach(out::println);
    out.println();
    table(plan).print(out);
    out.println();
    out.println("Measure in the order " + PlanWords.order(plan) + ".");
    out.println("Replicates of each flask: " + plan.replicates() + ".");
    out.println(
        "Top addition: "
            + Numbers.rounded(plan.topOverNative(), 3)
            + " times what is expected after dilution ("
            + Numbers.rounded(plan.nativeConcentration(), 3)
            + " "
            + plan.unit()
            + ").");
    out.println(
        "Expected uncertainty of the fit: "
            + PlanWords.percent(plan.forecast().relativeUncertainty())
            + " (95 %, "
            + Numbers.plain(plan.forecast().df())
            + " degrees of freedom); a drift of 1 % moves the result by "
            + PlanWords.percent(plan.driftEffect())
            + ".");
    plan.remarks().forEach(out::println);
    out.println(CAUTION);
    out.flush();
  }

  private static TextTable table(Prepared plan) {
    boolean signals = plan.portions().get(0).signal().isPresent();
    boolean pipettes = plan.stock().isPresent();
    List<String> header = new ArrayList<>(List.of("flask", "add", "concentration added"));
    header.addAll(pipettes ? List.of("pipette") : List.of());
    header.addAll(signals ? List.of("signal") : List.of());
    TextTable table = new TextTable(header.toArray(String[]::new));
    for (Portion portion : plan.portions()) {
      List<String> cells =
          new ArrayList<>(
              List.of(
                  String.valueOf(portion.number()),
                  PlanWords.amount(plan, portion),
                  Numbers.rounded(portion.x(), 4) + " " + plan.unit()));
      cells.addAll(pipettes ? List.of(portion.pipette()) : List.of());
      cells.addAll(signals ? List.of(Numbers.rounded(portion.signal().orElse(0), 3)) : List.of());
      table.add(cells.toArray(String[]::new));
    }
    return table;
  }
}
