package org.spikewright.config;

import java.nio.file.Files;
import java.nio.file.InvalidPathException;
import java.nio.file.Path;
import java.time.DateTimeException;
import java.time.Duration;
import java.time.LocalTime;
import java.time.ZoneId;
import java.time.ZoneOffset;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.spikewright.analysis.ControlBook;
import org.spikewright.judgement.CriteriaBook;
import org.spikewright.judgement.RepeatCaps;
import org.spikewright.reading.LabCalendar;
import org.spikewright.reading.Shelf;

/** Reads the configuration file. */
final class SettingsFile {

  /**
   * The keys of each section, for the reader and for whoever tests that all are refused rightly.
   */
  static final Map<String, List<String>> KEYS =
      Map.of(
          "", List.of("folders", "laboratory", "schedule", "series", "criteria", "repeat"),
          "folders",
              List.of(
                  "watch",
                  "mappings",
                  "summaries",
                  "ledger",
                  "leave",
                  "stocks",
                  "glassware",
                  "controls"),
          "laboratory", List.of("name", "zone", "day_begins"),
          "schedule", List.of("nightly", "look_every", "settle"),
          "series", List.of("longest_pause", "wait_for_flasks"),
          "criteria", CriteriaSection.KEYS,
          "repeat", RepeatSection.KEYS);

  private final Path file;
  private final Faults faults;
  private final Section root;
  private final Optional<Section> folders;

  private SettingsFile(Path file, Section root, Faults faults) {
    this.file = file;
    this.root = root;
    this.faults = faults;
    this.folders = root.section("folders", KEYS.get("folders"));
  }

  static Loaded<Settings> load(Path file) {
    Faults faults = new Faults(file.toString());
    Optional<TomlText> text = TomlText.read(file, faults);
    if (text.isEmpty()) {
      return new Loaded.Faulty<>(file, faults.inOrder());
    }
    SettingsFile reader = of(file, text.get(), faults);
    TablesReader tables = new TablesReader();
    Map<String, TomlText> texts = new HashMap<>();
    for (String name : SettingsText.TABLES) {
      reader.table(name, tables).ifPresent(table -> texts.put(name, table));
    }
    return reader.loaded(new SettingsText(text.get(), texts), tables);
  }

  static Loaded<Settings> read(Path file, String text) {
    SettingsText parts = SettingsText.of(text);
    SettingsFile reader = of(file, parts.main(), new Faults(file.toString()));
    SettingsText.TABLES.forEach(reader::tableFile);
    return reader.loaded(parts, new TablesReader());
  }

  private static SettingsFile of(Path file, TomlText text, Faults faults) {
    SettingsText.refuseMarks(text, faults);
    Section root = Section.of(text.parse(faults), "", At.START, KEYS.get(""), faults);
    return new SettingsFile(file, root, faults);
  }

  private Loaded<Settings> loaded(SettingsText text, TablesReader reader) {
    Settings settings = settings(text.joined(), reader.shelf(text), reader.controls(text));
    List<ConfigFault> all = new ArrayList<>(faults.inOrder());
    all.addAll(reader.faults());
    return all.isEmpty() ? new Loaded.Good<>(settings) : new Loaded.Faulty<>(file, all);
  }

  /** The table that a key names, which must be there, or the one of its usual name if it is. */
  private Optional<TomlText> table(String key, TablesReader reader) {
    Optional<Path> path = tableFile(key);
    if (path.isPresent() && !Files.isRegularFile(path.get())) {
      if (folders.isPresent() && folders.get().has(key)) {
        String found = key + " '" + folders.get().value(key).orElse("") + "', which is not there";
        folders.get().fault(key, found, "a file, or no " + key + " in [folders]");
      }
      return Optional.empty();
    }
    return path.flatMap(there -> reader.text(key, there));
  }

  /** Where a table lies or would lie; empty after a fault. */
  private Optional<Path> tableFile(String key) {
    if (folders.isEmpty() || !folders.get().has(key)) {
      return Optional.of(base().resolve(key + ".toml"));
    }
    String expected = "a file, relative to this file's folder";
    try {
      return folders.get().text(key, expected).map(this::resolved);
    } catch (InvalidPathException e) {
      folders.get().fault(key, "'" + e.getInput() + "'", expected);
      return Optional.empty();
    }
  }

  /** The settings; where a fault was found, some of its values only stand in. */
  private Settings settings(TomlText text, Shelf shelf, ControlBook controls) {
    Path watch = path("watch");
    Path mappings = path("mappings");
    Path summaries = path("summaries");
    Path ledger = path("ledger");
    for (String key : List.of("mappings", "summaries", "ledger")) {
      folders.ifPresent(section -> refuseInside(section, key, watch));
    }
    Optional<Section> laboratory = root.section("laboratory", KEYS.get("laboratory"));
    Optional<Section> schedule = root.section("schedule", KEYS.get("schedule"));
    Optional<Section> series = root.section("series", KEYS.get("series"));
    return new Settings(
        watch,
        mappings,
        summaries,
        ledger,
        folders.flatMap(section -> section.yesOrNo("leave")).orElse(false),
        laboratory.flatMap(section -> section.anyText("name", "a name")).orElse(""),
        new LabCalendar(zone(laboratory), time(laboratory, "day_begins", LocalTime.of(6, 0))),
        time(schedule, "nightly", LocalTime.of(6, 30)),
        duration(schedule, "look_every", Duration.ofSeconds(5), Duration.ofMillis(10)),
        duration(schedule, "settle", Duration.ofSeconds(10), Duration.ZERO),
        duration(series, "longest_pause", Duration.ofHours(4), Duration.ofSeconds(1)),
        duration(series, "wait_for_flasks", Duration.ofHours(12), Duration.ZERO),
        root.section("criteria", KEYS.get("criteria"))
            .map(CriteriaSection::book)
            .orElseGet(CriteriaBook::defaults)
            .with(
                root.section("repeat", KEYS.get("repeat"))
                    .map(RepeatSection::caps)
                    .orElse(RepeatCaps.DEFAULTS)),
        shelf,
        controls,
        text.sha256(),
        text.text());
  }

  private Path path(String key) {
    String expected = "a path, relative to this file's folder";
    if (folders.isEmpty() || !folders.get().has(key)) {
      faults.missing(folders.map(Section::at).orElse(At.START), "[folders]", key, expected);
      return base();
    }
    try {
      return folders.get().text(key, expected).map(this::resolved).orElse(base());
    } catch (InvalidPathException e) {
      folders.get().fault(key, "'" + e.getInput() + "'", expected);
      return base();
    }
  }

  private Path base() {
    Path folder = file.toAbsolutePath().getParent();
    return folder == null ? file.toAbsolutePath() : folder;
  }

  private Path resolved(String path) {
    return base().resolve(path).normalize();
  }

  private void refuseInside(Section folders, String key, Path watch) {
    Optional<String> text = folders.value(key).map(Object::toString);
    boolean both =
        folders.value("watch").isPresent() && folders.value(key).orElse(0) instanceof String;
    if (both && resolved(text.get()).startsWith(watch)) {
      folders.fault(
          key,
          key + " '" + text.get() + "' inside the watched folder",
          "a place outside it, where nothing takes it for an export");
    }
  }

  private ZoneId zone(Optional<Section> laboratory) {
    String expected = "the laboratory's time zone, such as \"Europe/Lisbon\"";
    if (laboratory.isEmpty() || !laboratory.get().has("zone")) {
      faults.missing(
          laboratory.map(Section::at).orElse(At.START), "[laboratory]", "zone", expected);
      return ZoneOffset.UTC;
    }
    return laboratory.flatMap(section -> Zones.zone(section, "zone")).orElse(ZoneOffset.UTC);
  }

  private static LocalTime time(Optional<Section> section, String key, LocalTime otherwise) {
    String expected = "a local time such as \"06:30\"";
    if (section.isEmpty() || section.get().value(key).isEmpty()) {
      return otherwise;
    }
    if (section.get().value(key).get() instanceof LocalTime time) {
      return time;
    }
    Optional<String> text = section.get().text(key, expected);
    try {
      return text.map(LocalTime::parse).orElse(otherwise);
    } catch (DateTimeException e) {
      section.get().fault(key, "'" + text.get() + "' for " + section.get().named(key), expected);
      return otherwise;
    }
  }

  private static Duration duration(
      Optional<Section> section, String key, Duration otherwise, Duration least) {
    Optional<String> text = section.flatMap(inner -> inner.text(key, Durations.EXPECTED));
    if (text.isEmpty()) {
      return otherwise;
    }
    Optional<Duration> duration = Durations.parse(text.get());
    if (duration.isEmpty() || duration.get().compareTo(least) < 0) {
      section
          .get()
          .fault(
              key,
              "'" + text.get() + "' for " + section.get().named(key),
              duration.isEmpty() ? Durations.EXPECTED : "at least " + least.toMillis() + " ms");
    }
    return duration.orElse(otherwise);
  }
}
