package org.spikewright.config;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import org.spikewright.analysis.ControlBook;
import org.spikewright.analysis.ControlRule;
import org.spikewright.analysis.ControlRule.Certified;
import org.spikewright.analysis.ControlRule.Kind;
import org.spikewright.analysis.ControlRule.Limits;
import org.spikewright.analysis.ControlRule.Parent;
import org.spikewright.analysis.ControlRule.Range;
import org.spikewright.mapping.AmountReader;
import org.spikewright.mapping.Fact;
import org.spikewright.mapping.Glob;
import org.spikewright.mapping.Notation;
import org.spikewright.mapping.PerAnalyte;
import org.spikewright.mapping.Understood;
import org.spikewright.quantity.Dimension;
import org.spikewright.quantity.Measured;
import org.spikewright.quantity.Quantity;
import org.spikewright.reading.SampleId;
import org.tomlj.TomlArray;

/** Reads {@code controls.toml}: what the laboratory knows of its controls. */
final class ControlsSection {
  /** The keys of the file, and of each control. */
  static final Map<String, List<String>> KEYS =
      Map.of(
          "", List.of("control"),
          "control",
              List.of(
                  "name",
                  "kind",
                  "sample",
                  "instrument",
                  "analytes",
                  "reference",
                  "added",
                  "coverage",
                  "of",
                  "suffix",
                  "recovery",
                  "z",
                  "sd",
                  "en",
                  "difference",
                  "most"));

  private static final String CONCENTRATION = "a concentration above 0, such as \"12.0 µg/L\"";
  private static final String WITH_UNCERTAINTY =
      "a concentration above 0 with its expanded uncertainty, such as \"12.0 µg/L ± 0.3 µg/L\"";

  /** What a certificate's ± covers where it does not say: about 95 %. */
  private static final double COVERAGE = 2;

  /** Which keys go with which kinds; the others go with all. */
  private static final Map<String, List<Kind>> ONLY_WITH =
      Map.ofEntries(
          Map.entry("reference", List.of(Kind.CONTROL_SAMPLE, Kind.REFERENCE_MATERIAL)),
          Map.entry("added", List.of(Kind.SPIKED_CONTROL)),
          Map.entry(
              "coverage",
              List.of(Kind.CONTROL_SAMPLE, Kind.REFERENCE_MATERIAL, Kind.SPIKED_CONTROL)),
          Map.entry("of", List.of(Kind.SPIKED_CONTROL, Kind.DUPLICATE)),
          Map.entry("suffix", List.of(Kind.SPIKED_CONTROL, Kind.DUPLICATE)),
          Map.entry(
              "recovery",
              List.of(Kind.CONTROL_SAMPLE, Kind.REFERENCE_MATERIAL, Kind.SPIKED_CONTROL)),
          Map.entry("z", List.of(Kind.CONTROL_SAMPLE, Kind.REFERENCE_MATERIAL)),
          Map.entry("sd", List.of(Kind.CONTROL_SAMPLE, Kind.REFERENCE_MATERIAL)),
          Map.entry("en", List.of(Kind.CONTROL_SAMPLE, Kind.REFERENCE_MATERIAL)),
          Map.entry("difference", List.of(Kind.DUPLICATE)),
          Map.entry("most", List.of(Kind.BLANK)));

  private final Section section;

  private ControlsSection(Section section) {
    this.section = section;
  }

  static ControlBook book(Section root) {
    List<ControlRule> rules = new ArrayList<>();
    for (Section section : root.sections("control", KEYS.get("control"))) {
      new ControlsSection(section).rule().ifPresent(rules::add);
    }
    return new ControlBook(rules);
  }

  private Optional<ControlRule> rule() {
    Optional<Kind> kind = section.oneOf("kind", Section.words(Kind.values(), Kind::word));
    if (!section.has("kind")) {
      section.missing(
          "kind", "one of " + Section.quoted(Section.words(Kind.values(), Kind::word).keySet()));
    }
    kind.ifPresent(this::refuseMisplaced);
    Optional<Parent> parent = kind.filter(Kind::hasParent).flatMap(this::parent);
    Optional<String> sample = sample(kind);
    String key = kind.equals(Optional.of(Kind.SPIKED_CONTROL)) ? "added" : "reference";
    boolean known = kind.map(Kind::hasReference).orElse(false);
    PerAnalyte<Certified> reference = known ? references(key) : PerAnalyte.none();
    Limits limits = limits(kind);
    if (kind.isEmpty() || sample.isEmpty()) {
      return Optional.empty();
    }
    return Optional.of(
        new ControlRule(
            section.text("name", "a name for its chart").orElse(sample.get()),
            kind.get(),
            new Glob(sample.get()),
            section.text("instrument", "an instrument's name"),
            section.texts("analytes", "an analyte or a list of analytes"),
            reference,
            parent,
            limits));
  }

  private void refuseMisplaced(Kind kind) {
    ONLY_WITH.forEach(
        (key, kinds) -> {
          if (section.has(key) && !kinds.contains(kind)) {
            section.fault(
                key,
                key + " with kind \"" + kind.word() + "\"",
                "it only with " + Section.quoted(kinds.stream().map(Kind::word).toList()));
          }
        });
  }

  /** Where only a suffix tells, every sample that ends in it is meant. */
  private Optional<String> sample(Optional<Kind> kind) {
    String expected = "a sample ID, or a pattern of them: * stands for any characters";
    if (!section.has("sample") && section.has("suffix")) {
      return section.text("suffix", "the end of sample IDs").map(suffix -> "*" + suffix);
    }
    if (!section.has("sample") && kind.isPresent()) {
      section.missing("sample", expected);
    }
    return section.text("sample", expected).map(String::strip);
  }

  private Optional<Parent> parent(Kind kind) {
    if (section.has("of") && section.has("suffix")) {
      section.fault("suffix", "suffix beside of", "one of the two");
      return Optional.empty();
    }
    if (!section.has("of") && !section.has("suffix")) {
      section.missing(
          "of",
          "the ID of the sample it belongs to; or suffix: its own ID without that is the sample's");
      return Optional.empty();
    }
    return section.has("of")
        ? section
            .text("of", "the ID of the sample it belongs to")
            .map(id -> new Parent.Named(new SampleId(id)))
        : section
            .text("suffix", "the end of its ID, which the other sample's ID does not have")
            .map(suffix -> new Parent.WithoutSuffix(suffix.strip()));
  }

  private PerAnalyte<Certified> references(String key) {
    if (!section.has(key)) {
      section.missing(
          key, WITH_UNCERTAINTY + "; one for all, or a table with one for each analyte");
      return PerAnalyte.none();
    }
    double coverage = number("coverage", COVERAGE, new Range(1, 5)).orElse(COVERAGE);
    return FixedSection.perAnalyte(
        section,
        key,
        (where, name) ->
            amount(where, name, WITH_UNCERTAINTY)
                .map(
                    measured ->
                        new Certified(
                            measured.quantity(),
                            measured.tolerance().isPresent()
                                ? OptionalDouble.of(measured.tolerance().getAsDouble() / coverage)
                                : OptionalDouble.empty())));
  }

  private Limits limits(Optional<Kind> kind) {
    OptionalDouble z = number("z", Double.NaN, new Range(0.1, 100));
    boolean counts = kind.map(ONLY_WITH.get("z")::contains).orElse(false);
    if (counts && section.has("z") && !section.has("sd")) {
      section.missing("sd", CONCENTRATION + ": the standard deviation that z counts in");
    }
    return new Limits(
        recovery(),
        z,
        quantities("sd"),
        number("en", Double.NaN, new Range(0.1, 100)),
        number("difference", Double.NaN, new Range(0.001, 10)),
        quantities("most"));
  }

  private PerAnalyte<Quantity> quantities(String key) {
    return section.has(key)
        ? FixedSection.perAnalyte(
            section,
            key,
            (where, name) -> amount(where, name, CONCENTRATION).map(Measured::quantity))
        : PerAnalyte.none();
  }

  private Optional<Measured> amount(Section where, String key, String expected) {
    Optional<String> text = where.text(key, expected);
    if (text.isEmpty()) {
      return Optional.empty();
    }
    // A method blank is read like any concentration that may have a tolerance.
    Understood<Measured> read =
        new AmountReader(Notation.PLAIN).read(Fact.METHOD_BLANK, text.get(), Optional.empty());
    if (read instanceof Understood.Value<Measured> value
        && value.value().quantity().value() > 0
        && value.value().quantity().unit().dimension() != Dimension.NUMBER) {
      return Optional.of(value.value());
    }
    where.fault(key, "'" + text.get() + "' for " + where.named(key), expected);
    return Optional.empty();
  }

  private OptionalDouble number(String key, double otherwise, Range range) {
    String expected = "a number from " + range.lower() + " to " + range.upper();
    Optional<Double> number = section.number(key, expected);
    if (number.isEmpty()) {
      return Double.isNaN(otherwise) ? OptionalDouble.empty() : OptionalDouble.of(otherwise);
    }
    if (!range.holds(number.get())) {
      section.fault(key, number.get() + " for " + section.named(key), expected);
    }
    return OptionalDouble.of(number.get());
  }

  private Optional<Range> recovery() {
    Optional<Object> value = section.value("recovery");
    if (value.isEmpty()) {
      return Optional.empty();
    }
    if (value.get() instanceof TomlArray array
        && array.size() == 2
        && array.get(0) instanceof Number lower
        && array.get(1) instanceof Number upper
        && lower.doubleValue() >= 0
        && upper.doubleValue() > lower.doubleValue()
        && upper.doubleValue() <= 10) {
      return Optional.of(new Range(lower.doubleValue(), upper.doubleValue()));
    }
    section.fault(
        "recovery",
        "this for " + section.named("recovery"),
        "the least and the largest recovery, such as [0.85, 1.15]");
    return Optional.empty();
  }
}
