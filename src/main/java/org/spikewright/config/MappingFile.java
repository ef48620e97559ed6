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
import org.spikewright.mapping.PerAnalyte;
import org.spikewright.mapping.Places;
import org.spikewright.mapping.RowRules;
import org.spikewright.reading.Shelf;

/** Reads one mapping. */
public final class MappingFile {
  private MappingFile() {}

  /** Reads a mapping file of a laboratory where neither stocks nor glassware have names. */
  public static Loaded<Mapping> load(Path file, ZoneId defaultZone) {
    return load(file, defaultZone, Shelf.EMPTY);
  }

  /**
   * Reads a mapping file.
   *
   * @param defaultZone of times without an offset, where the mapping names no zone
   * @param shelf the stocks and the glassware that it may name
   */
  public static Loaded<Mapping> load(Path file, ZoneId defaultZone, Shelf shelf) {
    Faults faults = new Faults(shown(file));
    Optional<TomlText> text = TomlText.read(file, faults);
    return text.isPresent()
        ? read(file, text.get(), new Around(defaultZone, shelf), faults)
        : new Loaded.Faulty<>(file, faults.inOrder());
  }

  /** What a mapping is read against. */
  private record Around(ZoneId zone, Shelf shelf) {}

  /** As {@link #read(Path, String, ZoneId, Shelf)} where nothing on the shelf has a name. */
  public static Loaded<Mapping> read(Path file, String text, ZoneId defaultZone) {
    return read(file, text, defaultZone, Shelf.EMPTY);
  }

  /**
   * Reads a mapping's text.
   *
   * @param file where it stands or would stand, for messages
   * @param shelf the stocks and the glassware that it may name
   */
  public static Loaded<Mapping> read(Path file, String text, ZoneId defaultZone, Shelf shelf) {
    Around around = new Around(defaultZone, shelf);
    return read(file, TomlText.of(text), around, new Faults(shown(file)));
  }

  private static String shown(Path file) {
    Path name = file.getFileName();
    return name == null ? file.toString() : name.toString();
  }

  private static Loaded<Mapping> read(Path file, TomlText text, Around around, Faults faults) {
    Section root = Section.of(text.parse(faults), "", At.START, MappingKeys.KEYS.get(""), faults);
    Mapping mapping = mapping(root, text, around);
    return faults.isEmpty()
        ? new Loaded.Good<>(mapping)
        : new Loaded.Faulty<>(file, faults.inOrder());
  }

  /** The mapping; where a fault was found, some of its values only stand in. */
  private static Mapping mapping(Section root, TomlText text, Around around) {
    String name = required(root, "name", "the mapping's name");
    TableSection table = TableSection.read(root.section("table", MappingKeys.KEYS.get("table")));
    Notation notation =
        UnitsSection.read(root.section("units", MappingKeys.KEYS.get("units")), table.numbers());
    Named named = new Named();
    Optional<Section> fixed = root.section("fixed", MappingKeys.KEYS.get("fixed"));
    PlacesSection reader = new PlacesSection(notation, around.zone(), named);
    LayoutSection.Layout layout = LayoutSection.read(root, reader, named);
    Optional<FixedSection> fixedReader =
        fixed.map(section -> new FixedSection(section, notation, named, around.shelf().stocks()));
    Places places = places(root, fixedReader, reader, layout.groups());
    RowRules rows = RowsSection.rules(root, fixed, table.extraCells());
    MethodRule method = new MethodSection(root, fixed, notation).rule(name);
    new MappingCheck(root, named, method, places).check();
    new ToolCheck(root, named, places, around.shelf().glassware()).check();
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
        method,
        around.shelf());
  }

  private static String required(Section root, String key, String expected) {
    if (!root.has(key)) {
      root.missing(key, expected);
    }
    return root.text(key, expected).map(String::strip).orElse("");
  }

  private static Places places(
      Section root,
      Optional<FixedSection> fixed,
      PlacesSection reader,
      Map<Fact, Places.Group> headers) {
    Optional<Section> columns = root.section("columns", MappingKeys.KEYS.get("columns"));
    return new Places(
        columns.map(reader::columns).orElse(Map.of()),
        reader.labels(root.sections("label", MappingKeys.KEYS.get("label"))),
        headers,
        reader.name(root.section("block", MappingKeys.KEYS.get("block"))),
        reader.name(root.section("sheet", MappingKeys.KEYS.get("sheet"))),
        reader.name(root.section("file", MappingKeys.KEYS.get("file"))),
        fixed.map(FixedSection::names).orElse(Map.of()),
        fixed.map(FixedSection::amounts).orElse(Map.of()),
        fixed.map(FixedSection::stocks).orElse(PerAnalyte.none()));
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
