package org.spikewright.config;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.analysis.ControlBook;
import org.spikewright.reading.Shelf;

/** Reads the tables beside the configuration, each with the faults of its own file. */
final class TablesReader {
  private final Map<String, Faults> faults = new LinkedHashMap<>();

  /** The text of a table's file, which is there. */
  Optional<TomlText> text(String table, Path file) {
    Faults own = new Faults(file.toString());
    faults.put(table, own);
    return TomlText.read(file, own);
  }

  /** The stocks and the glassware; where a fault was found, some of it is missing. */
  Shelf shelf(SettingsText text) {
    return new Shelf(
        text.table(SettingsText.STOCKS)
            .map(table -> StocksFile.read(table, faultsOf(SettingsText.STOCKS, table)))
            .orElse(Map.of()),
        text.table(SettingsText.GLASSWARE)
            .map(table -> GlasswareFile.read(table, faultsOf(SettingsText.GLASSWARE, table)))
            .orElse(Map.of()));
  }

  /** What the laboratory knows of its controls; likewise. */
  ControlBook controls(SettingsText text) {
    return text.table(SettingsText.CONTROLS)
        .map(
            table -> {
              Faults own = faultsOf(SettingsText.CONTROLS, table);
              return ControlsSection.book(
                  Section.of(table.parse(own), "", At.START, ControlsSection.KEYS.get(""), own));
            })
        .orElse(ControlBook.EMPTY);
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
