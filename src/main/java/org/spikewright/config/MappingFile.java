package org.spikewright.config;

import java.nio.file.Path;
import java.time.ZoneId;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.mapping.Fact;
import org.spikewright.mapping.Mapping;
import org.spikewright.mapping.MethodRule;
import org.spikewright.mapping.Notation;
import org.spikewright.mapping.PathPattern;
import org.spikewright.mapping.Places;
import org.spikewright.mapping.RowRules;

/** Reads one mapping. */
public final class MappingFile {
  private MappingFile() {}

  /**
   * Reads a mapping file.
   *
   * @param defaultZone of times without an offset, where the mapping names no zone
   */
  public static Loaded<Mapping> load(Path file, ZoneId defaultZone) {
    Faults faults = new Faults(shown(file));
    Optional<TomlText> text = TomlText.read(file, faults);
    return text.isPresent()
        ? read(file, text.get(), defaultZone, faults)
        : new Loaded.Faulty<>(file, faults.inOrder());
  }

  /**
   * Reads a mapping's text.
   *
   * @param file where it stands or would stand, for messages
   */
  public static Loaded<Mapping> read(Path file, String text, ZoneId defaultZone) {
    return read(file, TomlText.of(text), defaultZone, new Faults(shown(file)));
  }

  private static String shown(Path file) {
    Path name = file.getFileName();
    return name == null ? file.toString() : name.toString();
  }

  private static Loaded<Mapping> read(Path file, TomlText text, ZoneId defaultZone, Faults faults) {
    Section root = Section.of(text.parse(faults), "", At.START, MappingKeys.KEYS.get(""), faults);
    Mapping mapping = mapping(root, text, defaultZone);
    return faults.isEmpty()
        ? new Loaded.Good<>(mapping)
        : new Loaded.Faulty<>(file, faults.inOrder());
  }

  /** The mapping; where a fault was found, some of its values only stand in. */
  private static Mapping mapping(Section root, TomlText text, ZoneId defaultZone) {
    String name = required(root, "name", "the mapping's name");
    TableSection table = TableSection.read(root.section("table", MappingKeys.KEYS.get("table")));
    Notation notation =
        UnitsSection.read(root.section("units", MappingKeys.KEYS.get("units")), table.numbers());
    Named named = new Named();
    Optional<Section> fixed = root.section("fixed", MappingKeys.KEYS.get("fixed"));
    PlacesSection reader = new PlacesSection(notation, defaultZone, named);
    LayoutSection.Layout layout = LayoutSection.read(root, reader, named);
    Places places = places(root, fixed, reader, notation, named, layout.groups());
    RowRules rows = RowsSection.rules(root, fixed, table.extraCells());
    MethodRule method = new MethodSection(root, fixed, notation).rule(name);
    new MappingCheck(root, named, method, places).check();
    return new Mapping(
        name,
        root.text("instrument", "the instrument's name").map(String::strip).orElse(name),
        text.sha256(),
        text.text(),
        files(root),
        table.shapeFor(
            Mapping.neededHeaders(places, rows, layout.rule()), layout.rule(), places.sheetName()),
        table.rules(layout.rule(), root, places),
        notation,
        places,
        RowsSection.words(root.section("words", MappingKeys.KEYS.get("words"))),
        rows,
        method);
  }

  private static String required(Section root, String key, String expected) {
    if (!root.has(key)) {
      root.missing(key, expected);
    }
    return root.text(key, expected).map(String::strip).orElse("");
  }

  private static Places places(
      Section root,
      Optional<Section> fixed,
      PlacesSection reader,
      Notation notation,
      Named named,
      Map<Fact, Places.Group> headers) {
    Optional<Section> columns = root.section("columns", MappingKeys.KEYS.get("columns"));
    Optional<FixedSection> fixedReader =
        fixed.map(section -> new FixedSection(section, notation, named));
    return new Places(
        columns.map(reader::columns).orElse(Map.of()),
        reader.labels(root.sections("label", MappingKeys.KEYS.get("label"))),
        headers,
        reader.name(root.section("block", MappingKeys.KEYS.get("block"))),
        reader.name(root.section("sheet", MappingKeys.KEYS.get("sheet"))),
        reader.name(root.section("file", MappingKeys.KEYS.get("file"))),
        fixedReader.map(FixedSection::names).orElse(Map.of()),
        fixedReader.map(FixedSection::amounts).orElse(Map.of()));
  }

  private static List<PathPattern> files(Section root) {
    String expected =
        "names inside the watched folder, such as \"furnace/*.csv\", folders parted by /";
    if (!root.has("files")) {
      root.missing("files", expected);
    }
    List<String> patterns = root.texts("files", expected);
    for (String pattern : patterns) {
      boolean outside =
          pattern.isBlank()
              || pattern.startsWith("/")
              || pattern.contains("\\")
              || List.of(pattern.split("/")).contains("..");
      if (outside) {
        root.fault("files", "'" + pattern + "' for files", expected);
      }
    }
    return patterns.stream().map(pattern -> new PathPattern(pattern.strip())).toList();
  }
}
