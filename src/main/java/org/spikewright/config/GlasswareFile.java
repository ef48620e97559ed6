package org.spikewright.config;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.mapping.AmountReader;
import org.spikewright.mapping.Fact;
import org.spikewright.mapping.Notation;
import org.spikewright.mapping.Understood;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Numbers;
import org.spikewright.quantity.PlusMinus;
import org.spikewright.quantity.Quantity;
import org.spikewright.quantity.Unit;
import org.spikewright.reading.Tool;
import org.spikewright.reading.Tool.Kind;
import org.spikewright.reading.Tool.Point;

/**
 * Reads the table of glassware: {@code ["flask 100 A"]} and below it what it holds and how well. A
 * tool has one {@code volume}, or a good {@code range} with the same errors all over it, or {@code
 * points} between which its errors go linearly.
 */
final class GlasswareFile {
  static final List<String> KEYS =
      List.of(
          "kind", "volume", "range", "points", "systematic", "random", "means", "k", "standard");

  static final List<String> POINT_KEYS = List.of("at", "systematic", "random");

  private static final List<String> SIZES = List.of("volume", "range", "points");
  private static final Map<String, Kind> KINDS = Section.words(Kind.values(), Kind::word);

  private final Section section;
  private final Kind kind;

  private GlasswareFile(Section section, Kind kind) {
    this.section = section;
    this.kind = kind;
  }

  static Map<String, Tool> read(TomlText text, Faults faults) {
    Section root = Section.open(text.parse(faults), "", At.START, faults);
    Map<String, Tool> tools = new LinkedHashMap<>();
    for (String key : root.keys()) {
      Optional<Section> section = root.section(key, KEYS);
      String name = ShelfNames.checked(root, key, tools.keySet());
      if (section.isEmpty()) {
        continue;
      }
      if (!section.get().has("kind")) {
        section.get().missing("kind", "one of " + Section.quoted(KINDS.keySet()));
      }
      // Without a kind the rest is read all the same, so that all faults are told at once.
      Kind kind = section.get().oneOf("kind", KINDS).orElse(Kind.PISTON_PIPETTE);
      new GlasswareFile(section.get(), kind).tool(name).ifPresent(tool -> tools.put(name, tool));
    }
    return tools;
  }

  private Optional<Tool> tool(String name) {
    List<String> sizes = SIZES.stream().filter(section::has).toList();
    if (sizes.size() != 1) {
      sizesFault(sizes);
    }
    refuseForKind();
    List<Point> points = new ArrayList<>();
    Optional<Unit> unit = Optional.empty();
    if (section.has("volume")) {
      unit = volume(points);
    } else if (section.has("range")) {
      unit = range(points);
    } else if (section.has("points")) {
      unit = points(points);
    } else {
      errorsAt(section, 1, kind == Kind.BALANCE ? Unit.of("g") : Unit.of("mL"), true);
    }
    PlusMinus means = ShelfNames.means(section);
    String standard =
        section.text("standard", "where the numbers come from").map(String::strip).orElse("");
    boolean ranges = !section.has("volume");
    return unit.isPresent() && points.size() >= (ranges ? 2 : 1) && rise(points)
        ? Optional.of(new Tool(name, kind, unit.get(), points, ranges, means, standard))
        : Optional.empty();
  }

  private void sizesFault(List<String> sizes) {
    String expected = "one of volume, range, points";
    if (sizes.isEmpty()) {
      boolean explained =
          SIZES.stream().anyMatch(key -> section.faults().isExplained(section.name(), key));
      if (!explained) {
        section.faults().add(section.at(), "no volume in " + section.name(), expected);
      }
    } else {
      section.fault(sizes.get(1), sizes.get(1) + " beside " + sizes.get(0), expected);
    }
  }

  private void refuseForKind() {
    boolean oneVolume = kind == Kind.FLASK || kind == Kind.PIPETTE;
    boolean adjustable = kind == Kind.BURETTE || kind == Kind.BALANCE;
    for (String key : SIZES) {
      if (section.has(key) && (key.equals("volume") ? adjustable : oneVolume)) {
        section.fault(
            key,
            key + " for a " + kind.word(),
            oneVolume ? "volume: it has one" : "range, or points");
      }
    }
    if (section.has("points")) {
      for (String key : List.of("systematic", "random")) {
        if (section.has(key)) {
          section.fault(key, key + " beside points", "it in each of the points");
        }
      }
    }
  }

  private boolean rise(List<Point> points) {
    for (int i = 1; i < points.size(); i++) {
      if (!(points.get(i).size() > points.get(i - 1).size())) {
        String key = section.has("points") ? "points" : "range";
        section.fault(
            key,
            "sizes that do not rise for " + section.named(key),
            "each larger than the one before");
        return false;
      }
    }
    return true;
  }

  private Optional<Unit> volume(List<Point> points) {
    String expected = expected("\"100 mL ± 0.10 mL\"");
    Optional<Measured> volume =
        section.text("volume", expected).flatMap(text -> amount(section, "volume", text, expected));
    if (volume.isEmpty()) {
      errorsAt(section, 1, Unit.of("mL"), false);
      return Optional.empty();
    }
    Quantity size = volume.get().quantity();
    boolean declared = volume.get().tolerance().isPresent();
    if (declared && section.has("systematic")) {
      section.fault("systematic", "systematic beside ± in volume", "one of the two");
    }
    Optional<Point> errors = errorsAt(section, size.value(), size.unit(), declared);
    errors
        .map(
            point ->
                new Point(
                    size.value(),
                    volume.get().tolerance().orElse(point.systematic()),
                    point.random()))
        .ifPresent(points::add);
    return Optional.of(size.unit());
  }

  private Optional<Unit> range(List<Point> points) {
    String expected = "two sizes, such as " + example("\"20 µL to 200 µL\"", "\"0.1 g to 200 g\"");
    Optional<String> text = section.text("range", expected);
    int between = text.map(words -> words.indexOf(" to ")).orElse(-1);
    if (between < 0) {
      text.ifPresent(words -> section.fault("range", "'" + words + "' for range", expected));
      errorsAt(section, 1, kind == Kind.BALANCE ? Unit.of("g") : Unit.of("mL"), false);
      return Optional.empty();
    }
    Optional<Measured> lowest =
        amount(section, "range", text.get().substring(0, between), expected);
    Optional<Measured> highest =
        amount(section, "range", text.get().substring(between + 4), expected);
    if (lowest.isEmpty() || highest.isEmpty()) {
      return Optional.empty();
    }
    Unit unit = highest.get().quantity().unit();
    double top = highest.get().quantity().value();
    // A fault of the errors is told once; what differs between the two ends is only their size.
    Optional<Point> upper = errorsAt(section, top, unit, false);
    double bottom = in(lowest.get(), unit);
    upper.flatMap(any -> errorsAt(section, bottom, unit, false)).ifPresent(points::add);
    upper.ifPresent(points::add);
    return Optional.of(unit);
  }

  private Optional<Unit> points(List<Point> points) {
    String expected = "a size, such as " + example("\"20 µL\"", "\"100 mg\"");
    Optional<Unit> unit = Optional.empty();
    List<Section> sections = section.sections("points", POINT_KEYS);
    if (sections.size() < 2) {
      section.fault("points", "fewer than two points", "two or more, with sizes that rise");
    }
    for (Section point : sections) {
      if (!point.has("at")) {
        point.missing("at", expected);
      }
      Optional<Measured> at =
          point.text("at", expected).flatMap(text -> amount(point, "at", text, expected));
      if (at.isPresent()) {
        Unit own = unit.orElse(at.get().quantity().unit());
        errorsAt(point, in(at.get(), own), own, false).ifPresent(points::add);
        unit = Optional.of(own);
      }
    }
    return unit;
  }

  /** The errors that a table states, at a size. */
  private Optional<Point> errorsAt(Section where, double size, Unit unit, boolean declared) {
    String expected =
        "an error such as "
            + example("\"1.6 µL\"", "\"0.2 mg\"")
            + ", or a share such as \"0.8 %\"";
    boolean missing = !where.has("systematic") && !declared;
    if (missing) {
      where.missing("systematic", expected);
    }
    OptionalDouble systematic = error(where, "systematic", expected, new Quantity(size, unit));
    OptionalDouble random = error(where, "random", expected, new Quantity(size, unit));
    return !missing && systematic.isPresent() && random.isPresent()
        ? Optional.of(new Point(size, systematic.getAsDouble(), random.getAsDouble()))
        : Optional.empty();
  }

  /** In the unit of the size; 0 where none is stated, empty after a fault. */
  private OptionalDouble error(Section where, String key, String expected, Quantity of) {
    if (!where.has(key)) {
      return OptionalDouble.of(0);
    }
    Optional<String> text = where.text(key, expected);
    if (text.isEmpty()) {
      return OptionalDouble.empty();
    }
    AmountReader amounts = new AmountReader(Notation.PLAIN);
    if (amounts.read(Fact.DRY_MASS, text.get(), Optional.empty())
        instanceof Understood.Value<Measured> share) {
      return OptionalDouble.of(share.value().quantity().value() * of.value());
    }
    Optional<Measured> absolute = amount(where, key, text.get(), expected);
    return absolute.isPresent()
        ? OptionalDouble.of(in(absolute.get(), of.unit()))
        : OptionalDouble.empty();
  }

  /** In another unit, without the last digits that the conversion brings: 1 mL is 1000 µL. */
  private static double in(Measured value, Unit unit) {
    return Double.parseDouble(Numbers.rounded(value.in(unit), 12));
  }

  /** A volume, or a mass for a balance, above 0. */
  private Optional<Measured> amount(Section where, String key, String text, String expected) {
    // A test portion may be either.
    if (new AmountReader(Notation.PLAIN).read(Fact.TEST_PORTION, text, Optional.empty())
            instanceof Understood.Value<Measured> value
        && value.value().quantity().unit().dimension() == kind.dimension()
        && (key.equals("volume") || value.value().tolerance().isEmpty())) {
      return Optional.of(value.value());
    }
    where.fault(key, "'" + text.strip() + "' for " + where.named(key), expected);
    return Optional.empty();
  }

  private String expected(String volume) {
    return kind.dimension().words() + " above 0, such as " + volume;
  }

  private String example(String volume, String mass) {
    return kind == Kind.BALANCE ? mass : volume;
  }
}
