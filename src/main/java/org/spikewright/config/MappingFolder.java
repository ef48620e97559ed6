package org.spikewright.config;

import java.io.IOException;
import java.nio.file.DirectoryStream;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.ZoneId;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.mapping.Mapping;
import org.spikewright.reading.Shelf;
import org.tomlj.Toml;

/**
 * The folder of mappings.
 *
 * @param loaded one for each {@code *.toml} file, sorted by file name
 */
public record MappingFolder(List<Loaded<Mapping>> loaded) {

  /** Copies the list. */
  public MappingFolder {
    loaded = List.copyOf(loaded);
  }

  /** Reads the mappings of a laboratory where neither stocks nor glassware have names. */
  public static MappingFolder load(Path folder, ZoneId defaultZone) {
    return load(folder, defaultZone, Shelf.EMPTY);
  }

  /**
   * Reads every mapping of a folder. A name that an earlier file bears makes the later one faulty;
   * a folder that cannot be listed is itself a faulty entry.
   *
   * @param defaultZone of times without an offset, where a mapping names no zone
   * @param shelf the stocks and the glassware that mappings may name
   */
  public static MappingFolder load(Path folder, ZoneId defaultZone, Shelf shelf) {
    List<Path> files = new ArrayList<>();
    try (DirectoryStream<Path> entries = Files.newDirectoryStream(folder)) {
      entries.forEach(files::add);
    } catch (IOException | java.nio.file.DirectoryIteratorException e) {
      ConfigFault fault =
          new ConfigFault(
              folder.toString(),
              1,
              1,
              "a folder that cannot be listed (" + e + ")",
              "the folder of mappings",
              Optional.empty());
      return new MappingFolder(List.of(new Loaded.Faulty<>(folder, List.of(fault))));
    }
    Map<String, Path> names = new HashMap<>();
    List<Loaded<Mapping>> loaded =
        files.stream()
            .filter(MappingFolder::isMapping)
            .sorted(Comparator.comparing(file -> file.getFileName().toString()))
            .map(file -> unlessTaken(file, MappingFile.load(file, defaultZone, shelf), names))
            .toList();
    return new MappingFolder(loaded);
  }

  private static boolean isMapping(Path file) {
    String name = file.getFileName().toString();
    return name.endsWith(".toml") && !name.startsWith(".") && !Files.isDirectory(file);
  }

  private static Loaded<Mapping> unlessTaken(
      Path file, Loaded<Mapping> loaded, Map<String, Path> names) {
    if (!(loaded instanceof Loaded.Good<Mapping> good)) {
      return loaded;
    }
    Path first = names.putIfAbsent(good.value().name(), file);
    if (first == null) {
      return loaded;
    }
    Faults faults = new Faults(file.getFileName().toString());
    At at = At.of(Toml.parse(good.value().text()).inputPositionOf("name"));
    faults.add(
        at,
        "the name '" + good.value().name() + "', which " + first.getFileName() + " has already",
        "another name");
    return new Loaded.Faulty<>(file, faults.inOrder());
  }

  /** The mappings that are in order. */
  public List<Mapping> good() {
    List<Mapping> good = new ArrayList<>();
    for (Loaded<Mapping> each : loaded) {
      if (each instanceof Loaded.Good<Mapping> value) {
        good.add(value.value());
      }
    }
    return good;
  }

  /** The faults of all others. */
  public List<ConfigFault> faults() {
    List<ConfigFault> faults = new ArrayList<>();
    for (Loaded<Mapping> each : loaded) {
      if (each instanceof Loaded.Faulty<Mapping> faulty) {
        faults.addAll(faulty.faults());
      }
    }
    return faults;
  }
}
