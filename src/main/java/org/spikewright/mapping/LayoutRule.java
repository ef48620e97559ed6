package org.spikewright.mapping;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.regex.Pattern;

/**
 * Which columns hold signals. In a wide layout each of several does, and its header says what tells
 * it from the others.
 *
 * @param kind what the headers of the signals' columns say
 * @param headers these columns, where they are listed
 * @param pattern which the headers of these columns match as a whole, where they are found so
 * @param beside other columns that belong to each of these, by the fact they hold
 */
public record LayoutRule(
    Kind kind, List<String> headers, Optional<Pattern> pattern, Map<Fact, Beside> beside) {

  /** One column of signals. */
  public static final LayoutRule LONG =
      new LayoutRule(Kind.LONG, List.of(), Optional.empty(), Map.of());

  /** Copies its collections. */
  public LayoutRule {
    headers = List.copyOf(headers);
    beside = Map.copyOf(beside);
  }

  /** What the headers of the signals' columns say. */
  public enum Kind {
    /** Nothing: one row is one reading. */
    LONG("long", List.of()),
    /** Which replicate. */
    BY_REPLICATE("wide by replicate", List.of(Fact.REPLICATE)),
    /** Which analyte. */
    BY_ANALYTE("wide by analyte", List.of(Fact.ANALYTE)),
    /** Which flask, by its label or by what was added to it. */
    BY_FLASK("wide by flask", List.of(Fact.FLASK, Fact.ADDITION_VOLUME, Fact.ADDITION));

    private final String word;
    private final List<Fact> told;

    Kind(String word, List<Fact> told) {
      this.word = word;
      this.told = told;
    }

    /** The words used in mappings. */
    public String word() {
      return word;
    }

    /** Facts of which a header has to tell one; the first is what listed headers tell. */
    public List<Fact> told() {
      return told;
    }
  }

  /**
   * A column that belongs to a signal's column.
   *
   * @param template its header, with the groups of the pattern in braces: {@code {analyte} sd}
   * @param form how its cells are written
   */
  public record Beside(String template, Form form) {}

  /** Whether a row holds several readings. */
  public boolean isWide() {
    return kind != Kind.LONG;
  }
}
