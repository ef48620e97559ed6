package org.spikewright.app;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Clock;
import java.util.ArrayList;
import java.util.List;
import org.spikewright.config.ConfigFault;
import org.spikewright.config.MappingFolder;
import org.spikewright.config.Settings;
import org.spikewright.intake.Archive;
import org.spikewright.ledger.Ledger;
import org.spikewright.ledger.Opening;
import org.spikewright.workbook.XlsxWriter;

/**
 * What a running laboratory needs, opened and checked: configuration, mappings, folders, ledger.
 *
 * @param settings the configuration
 * @param mappings every mapping, in order or not
 * @param archive where files go
 * @param ledger ours until it is closed
 * @param clock by which deliveries arrive and revisions are made
 */
record Station(
    Settings settings, MappingFolder mappings, Archive archive, Ledger ledger, Clock clock)
    implements AutoCloseable {

  /** What came of opening. */
  sealed interface Attempt {
    record Opened(Station station) implements Attempt {}

    /**
     * It cannot start.
     *
     * @param exitCode as documented
     * @param problems all of them, each with file and line where it has one
     */
    record Refused(int exitCode, List<String> problems) implements Attempt {}
  }

  /** Checks everything, then takes the ledger; every problem found is reported, not the first. */
  static Attempt open(Settings settings, Clock clock) {
    List<String> problems = new ArrayList<>();
    MappingFolder mappings =
        MappingFolder.load(settings.mappings(), settings.calendar().zone(), settings.shelf());
    if (!Files.isDirectory(settings.watch())) {
      problems.add(
          "the watched folder "
              + settings.watch()
              + " is not there; make it, or correct watch under [folders]");
    }
    makeFolder(settings.summaries(), problems);
    makeFolder(settings.ledger().getParent(), problems);
    if (!problems.isEmpty() || !Files.isDirectory(settings.mappings())) {
      // A faulty mapping alone keeps nothing from starting; beside other problems it is one more.
      mappings.faults().forEach(fault -> problems.add(fault.toString()));
    }
    return problems.isEmpty()
        ? open(settings, mappings, clock)
        : new Attempt.Refused(ExitCode.CONFIGURATION, problems);
  }

  private static Attempt open(Settings settings, MappingFolder mappings, Clock clock) {
    Archive archive = new Archive(settings.watch());
    try {
      Opening opening =
          Ledger.open(
              settings.ledger(), settings.calendar(), settings.longestPause(), archive.hasFiles());
      if (opening instanceof Opening.Opened opened) {
        sweep(settings, opened.ledger());
        return new Attempt.Opened(new Station(settings, mappings, archive, opened.ledger(), clock));
      }
      return opening instanceof Opening.OwnedByAnother other
          ? new Attempt.Refused(
              ExitCode.OTHER_OWNER,
              List.of(
                  "the ledger "
                      + settings.ledger()
                      + " belongs to "
                      + other.holder()
                      + "; stop that one first"))
          : refused((Opening.Refused) opening);
    } catch (IOException trouble) {
      return new Attempt.Refused(ExitCode.FAULT, List.of("cannot start: " + trouble));
    }
  }

  private static void sweep(Settings settings, Ledger ledger) throws IOException {
    try {
      XlsxWriter.sweep(temporaryFolder(settings));
    } catch (IOException trouble) {
      ledger.close();
      throw trouble;
    }
  }

  private static Attempt refused(Opening.Refused refused) {
    return new Attempt.Refused(ExitCode.FAULT, List.of(refused.found() + "; " + refused.advice()));
  }

  private static void makeFolder(Path folder, List<String> problems) {
    try {
      Files.createDirectories(folder);
    } catch (IOException trouble) {
      String why = Files.exists(folder) ? "a file of that name is there" : trouble.toString();
      problems.add("the folder " + folder + " cannot be made: " + why);
    }
  }

  /** The faults of mappings that are not in order. */
  List<ConfigFault> faultyMappings() {
    return mappings.faults();
  }

  /** Where the workbook engine may put temporary files: beside the ledger, on a local disk. */
  Path temporaryFolder() {
    return temporaryFolder(settings);
  }

  private static Path temporaryFolder(Settings settings) {
    return settings.ledger().resolveSibling("temporary");
  }

  @Override
  public void close() {
    ledger.close();
  }
}
