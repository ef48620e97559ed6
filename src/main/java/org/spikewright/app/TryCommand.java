package org.spikewright.app;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Callable;
import org.spikewright.config.ConfigFault;
import org.spikewright.config.Loaded;
import org.spikewright.config.MappingFile;
import org.spikewright.config.MappingFolder;
import org.spikewright.config.Settings;
import org.spikewright.mapping.Mapping;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** {@code try}: an export read by a mapping, nothing written. */
@Command(
    name = "try",
    mixinStandardHelpOptions = true,
    description =
        "Reads an export by a mapping, writes nothing, and shows what was understood. Exits with 0"
            + " when it is fit for use, 1 when not.",
    footer = {
      "",
      "Examples: spikewright try --conf spikewright.toml inbox/furnace/run7.csv",
      "          spikewright try --mapping furnace.toml run7.csv"
    })
final class TryCommand implements Callable<Integer> {
  @Mixin private ConfOption conf;
  @Spec private CommandSpec spec;

  @Parameters(paramLabel = "EXPORT", description = "The file to read.")
  private Path export = Path.of("");

  @Option(
      names = "--mapping",
      paramLabel = "FILE",
      description = "The mapping to read it by (default: the one that claims the file's name).")
  private Optional<Path> mapping = Optional.empty();

  @Override
  public Integer call() {
    return conf.with(this::read);
  }

  private int read(Settings settings) {
    if (!Files.isRegularFile(export)) {
      return problem("there is no file " + export);
    }
    String name = nameInside(settings.watch());
    if (mapping.isPresent()) {
      Loaded<Mapping> loaded =
          MappingFile.load(mapping.get(), settings.calendar().zone(), settings.shelf());
      return loaded instanceof Loaded.Good<Mapping> good
          ? dryRun(good.value(), name, settings)
          : faults(((Loaded.Faulty<Mapping>) loaded).faults());
    }
    MappingFolder folder =
        MappingFolder.load(settings.mappings(), settings.calendar().zone(), settings.shelf());
    List<Mapping> claimants = folder.good().stream().filter(m -> m.claims(name)).toList();
    if (claimants.size() == 1) {
      return dryRun(claimants.get(0), name, settings);
    }
    folder.faults().forEach(fault -> spec.commandLine().getErr().println(fault));
    Refusal refusal =
        claimants.isEmpty() ? Refusal.unclaimed(folder.good()) : Refusal.claimedByMany(claimants);
    spec.commandLine().getErr().println(name + ": " + refusal.words());
    return problem("Name the mapping with --mapping to try the file all the same.");
  }

  /** The name by which the watched folder would know the export; elsewhere its bare name. */
  private String nameInside(Path watch) {
    Path file = export.toAbsolutePath().normalize();
    Path inside = file.startsWith(watch) ? watch.relativize(file) : file.getFileName();
    return inside.toString().replace('\\', '/');
  }

  private int dryRun(Mapping chosen, String name, Settings settings) {
    boolean fit = new DryRun(chosen, settings, spec.commandLine().getOut()).show(export, name);
    return fit ? ExitCode.DONE : ExitCode.REFUSED;
  }

  private int faults(List<ConfigFault> faults) {
    return Faults.report(
        ExitCode.CONFIGURATION,
        faults.stream().map(ConfigFault::toString).toList(),
        spec.commandLine().getErr());
  }

  private int problem(String text) {
    return Faults.report(ExitCode.REFUSED, List.of(text), spec.commandLine().getErr());
  }
}
