package org.spikewright.app;

import java.io.IOException;
import java.io.PrintWriter;
import java.nio.file.FileVisitResult;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.SimpleFileVisitor;
import java.nio.file.StandardCopyOption;
import java.nio.file.attribute.BasicFileAttributes;
import java.time.Clock;
import java.time.Duration;
import java.time.Instant;
import java.util.List;
import java.util.concurrent.Callable;
import java.util.stream.Stream;
import org.spikewright.config.ConfigFault;
import org.spikewright.config.Loaded;
import org.spikewright.config.Settings;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Spec;

/** {@code demo}: the main job on a copy of the example folder. */
@Command(
    name = "demo",
    mixinStandardHelpOptions = true,
    description =
        "Copies watch-folder-example to target/demo, runs one round and a summary there, and says"
            + " where the workbook lies.",
    footer = {"", "Example: spikewright demo"})
final class DemoCommand implements Callable<Integer> {
  /**
   * The demo's night ends just before its lab day does, whatever today is, so that exports and
   * refusals belong to one lab day and one workbook.
   */
  private static final Instant DEMO_NOW = Instant.parse("2026-03-05T03:45:00Z");

  /** Lies in every copy: a folder without it is never replaced. */
  private static final String MARK = "made-by-demo.txt";

  @Mixin private ConfOption conf;
  @Spec private CommandSpec spec;

  @Option(
      names = "--from",
      paramLabel = "FOLDER",
      defaultValue = "watch-folder-example",
      description = "The example folder (default: ${DEFAULT-VALUE}).")
  private Path example;

  @Option(
      names = "--to",
      paramLabel = "FOLDER",
      defaultValue = "target/demo",
      description = "Where the copy goes; what is there is replaced (default: ${DEFAULT-VALUE}).")
  private Path copy;

  @Override
  public Integer call() throws IOException {
    if (!Files.isRegularFile(example.resolve("spikewright.toml"))) {
      return problems(
          List.of("no example in " + example + "; run the demo from the project's folder"));
    }
    if (within(example, copy) || within(copy, example)) {
      return problems(List.of("the copy " + copy + " must lie apart from the example " + example));
    }
    if (Files.exists(copy) && !Files.isRegularFile(copy.resolve(MARK))) {
      return problems(List.of(copy + " is there and is no demo; it is left as it is"));
    }
    remove(copy);
    Files.createDirectories(copy);
    Files.writeString(copy.resolve(MARK), "Made by the demo, which replaces this folder.\n");
    copy(example, copy);
    Loaded<Settings> loaded = Settings.load(copy.resolve("spikewright.toml"));
    return loaded instanceof Loaded.Good<Settings> good
        ? conf.withStation(
            good.value(), Clock.fixed(DEMO_NOW, good.value().calendar().zone()), this::run)
        : problems(
            ((Loaded.Faulty<Settings>) loaded)
                .faults().stream().map(ConfigFault::toString).toList());
  }

  private static boolean within(Path inner, Path outer) {
    return inner.toAbsolutePath().normalize().startsWith(outer.toAbsolutePath().normalize());
  }

  private int problems(List<String> problems) {
    return Faults.report(ExitCode.CONFIGURATION, problems, spec.commandLine().getErr());
  }

  private int run(Station station) {
    PrintWriter out = spec.commandLine().getOut();
    try {
      Once.Report report = new Once(station, Duration.ZERO, new Stop()).run();
      out.println(station.settings().laboratory() + ", an imaginary laboratory");
      OnceCommand.print(report, out);
      report.summaries().forEach(issued -> describe(issued, out));
      out.println("Refused files and their reasons: " + copy.resolve("inbox").resolve("rejected"));
      out.flush();
      return ExitCode.DONE;
    } catch (Exception trouble) {
      return Faults.report(trouble, spec.commandLine().getErr());
    }
  }

  private static void describe(NightlySummary.Issued issued, PrintWriter out) {
    out.println();
    out.println("The workbook: " + issued.workbook());
    out.println("  Overview      the night in one screen");
    out.println("  Results       one row a result, those that need a person first");
    out.println("  To repeat     which series need work at the bench, and what to prepare");
    out.println("  Series        every flask, with live formulas beside the stored numbers");
    out.println("  Plot          one series, chosen from a list");
    out.println("  Noise         what the night's series say together: scatter, bends, levels off");
    out.println("  Controls      controls, blanks and drift checks, and the batches they speak of");
    out.println("  Files, Refused rows, Settings");
  }

  private static void remove(Path folder) throws IOException {
    if (!Files.exists(folder)) {
      return;
    }
    Files.walkFileTree(
        folder,
        new SimpleFileVisitor<>() {
          @Override
          public FileVisitResult visitFile(Path file, BasicFileAttributes attributes)
              throws IOException {
            Files.delete(file);
            return FileVisitResult.CONTINUE;
          }

          @Override
          public FileVisitResult postVisitDirectory(Path visited, IOException trouble)
              throws IOException {
            Files.delete(visited);
            return FileVisitResult.CONTINUE;
          }
        });
  }

  private static void copy(Path from, Path to) throws IOException {
    try (Stream<Path> files = Files.walk(from)) {
      for (Path file : (Iterable<Path>) files::iterator) {
        Path target = to.resolve(from.relativize(file));
        if (Files.isDirectory(file)) {
          Files.createDirectories(target);
        } else {
          Files.createDirectories(target.getParent());
          Files.copy(file, target, StandardCopyOption.COPY_ATTRIBUTES);
        }
      }
    }
  }
}
