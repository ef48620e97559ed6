package org.spikewright.config;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import org.spikewright.mapping.Fact;
import org.spikewright.mapping.Fact.Kind;
import org.spikewright.reading.Role;

/** The keys that a mapping may have, section by section. */
final class MappingKeys {
  private MappingKeys() {}

  /** Facts that hold for one row only and cannot be fixed; the instrument has a key of its own. */
  private static final List<Fact> NEVER_FIXED =
      List.of(
          Fact.SIGNAL,
          Fact.SIGNAL_SD,
          Fact.INTERNAL_STANDARD,
          Fact.MEASURED_AT,
          Fact.FLASK,
          Fact.INSTRUMENT,
          Fact.RESULT_UNIT,
          Fact.CALIBRATION_CONCENTRATION);

  static final List<String> METHOD_IN_FIXED =
      List.of(
          "design",
          "additions",
          "addition_terms",
          "flasks",
          "role",
          "signal_unit",
          "internal_standard_given");

  /** By section; the file itself is the section with the empty name. */
  static final Map<String, List<String>> KEYS =
      Map.ofEntries(
          Map.entry(
              "",
              List.of(
                  "name",
                  "instrument",
                  "files",
                  "table",
                  "layout",
                  "columns",
                  "fixed",
                  "label",
                  "block",
                  "sheet",
                  "file",
                  "words",
                  "skip",
                  "roles",
                  "units",
                  "result",
                  "method")),
          Map.entry(
              "table",
              List.of(
                  "separator",
                  "decimal",
                  "thousands",
                  "quote",
                  "encoding",
                  "header",
                  "header_rows",
                  "units_row",
                  "footer",
                  "tables",
                  "carry_down",
                  "sheet",
                  "extra_cells")),
          Map.entry(
              "layout", and(List.of("kind", "columns", "pattern", "beside"), words(inText()))),
          Map.entry("columns", words(Arrays.asList(Fact.values()))),
          Map.entry("fixed", fixed()),
          Map.entry("label", and(List.of("column", "pattern"), words(inText()))),
          Map.entry("block", and(List.of("pattern"), words(inText()))),
          Map.entry("sheet", and(List.of("pattern"), words(inText()))),
          Map.entry("file", and(List.of("pattern"), words(inText()))),
          Map.entry("words", List.of("over_range", "below_range", "missing")),
          Map.entry("roles", roles()),
          Map.entry("units", List.of("ppm", "ppb", "ppt", "ratio")),
          Map.entry("result", List.of("unit")),
          Map.entry(
              "method",
              List.of(
                  "trusted_signal",
                  "reporting_limit",
                  "target_uncertainty",
                  "unit",
                  "charge",
                  "slope",
                  "temperature",
                  "interval",
                  "weights",
                  "bend",
                  "correct_drift",
                  "working_range",
                  "bend_allowance",
                  "blank_due")));

  /** The facts that {@code [fixed]} may hold. */
  static List<Fact> fixable() {
    return Arrays.stream(Fact.values()).filter(fact -> !NEVER_FIXED.contains(fact)).toList();
  }

  /** The facts that a label or a file name may hold. */
  static List<Fact> inText() {
    return Arrays.stream(Fact.values())
        .filter(fact -> fact.kind() != Kind.SIGNAL && fact.kind() != Kind.SPREAD)
        .toList();
  }

  /** The keys of a column or a group, by what the fact is. */
  static List<String> placeKeys(Fact fact, String place) {
    if (fact.kind() == Kind.AMOUNT || fact == Fact.SIGNAL_SD) {
      return List.of(place, "unit");
    }
    return fact.kind() == Kind.TIME ? List.of(place, "format", "zone") : List.of(place);
  }

  /** The facts that a column beside another may hold. */
  static List<Fact> beside() {
    return Arrays.stream(Fact.values()).filter(fact -> fact != Fact.SIGNAL).toList();
  }

  /** The words of facts. */
  static List<String> words(List<Fact> facts) {
    return facts.stream().map(Fact::word).toList();
  }

  /** The key of a role under {@code [roles]}. */
  static String key(Role role) {
    return role.word().replace(' ', '_');
  }

  private static List<String> roles() {
    return and(List.of("column"), Arrays.stream(Role.values()).map(MappingKeys::key).toList());
  }

  private static List<String> fixed() {
    return and(METHOD_IN_FIXED, words(fixable()));
  }

  private static List<String> and(List<String> some, List<String> more) {
    List<String> all = new ArrayList<>(some);
    all.addAll(more);
    return List.copyOf(all);
  }
}
