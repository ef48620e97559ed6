package org.spikewright.config;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.reading.Shelf;

/** Reads the tables of stocks and glassware, each with the faults of its own file. */
final class ShelfReader {
  static final String STOCKS = "stocks";
  static final String GLASSWARE = "glassware";

  private final Map<String, Faults> faults = new LinkedHashMap<>();

  /** The text of a table's file, which is there. */
  Optional<TomlText> text(String table, Path file) {
    Faults own = new Faults(file.toString());
    faults.put(table, own);
    return TomlText.read(file, own);
  }

  /** What the tables hold; where a fault was found, some of it is missing. */
  Shelf read(SettingsText text) {
    return new Shelf(
        text.stocks()
            .map(table -> StocksFile.read(table, faultsOf(STOCKS, table)))
            .orElse(Map.of()),
        text.glassware()
            .map(table -> GlasswareFile.read(table, faultsOf(GLASSWARE, table)))
            .orElse(Map.of()));
  }

  private Faults faultsOf(String table, TomlText text) {
    Faults own = faults.computeIfAbsent(table, name -> new Faults(name + ".toml"));
    SettingsText.refuseMarks(text, own);
    return own;
  }

  /** All faults, file by file. */
  List<ConfigFault> faults() {
    List<ConfigFault> all = new ArrayList<>();
    faults.values().forEach(own -> all.addAll(own.inOrder()));
    return all;
  }
}
