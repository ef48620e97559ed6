package org.spikewright.config;

import java.nio.charset.Charset;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import org.spikewright.mapping.HeaderRule;
import org.spikewright.mapping.RowRules.ExtraCells;
import org.spikewright.quantity.NumberGrammar;
import org.spikewright.table.TableShape;

/**
 * Reads {@code [table]}: how a file is cut into cells.
 *
 * @param shape without the words of the header
 * @param header how it is found
 * @param numbers the grammar of numbers in text
 * @param extraCells what becomes of rows with more cells than the header
 */
record TableSection(
    TableShape shape, HeaderRule header, NumberGrammar numbers, ExtraCells extraCells) {

  static TableSection read(Optional<Section> section) {
    return section.map(TableSection::read).orElseGet(TableSection::plain);
  }

  private static TableSection plain() {
    TableShape shape =
        new TableShape(Optional.empty(), '"', Optional.empty(), List.of(), List.of());
    return new TableSection(
        shape, new HeaderRule.AllHeaders(), NumberGrammar.POINT, ExtraCells.REFUSE);
  }

  private static TableSection read(Section section) {
    Optional<Character> separator = character(section, "separator");
    char quote = character(section, "quote").orElse('"');
    if (separator.isPresent() && separator.get() == quote) {
      section.fault("separator", "the same character as quote", "another one");
    }
    TableShape shape =
        new TableShape(
            separator,
            quote,
            encoding(section),
            section.texts("sheet", "the name of a sheet, or a list of names"),
            List.of());
    return new TableSection(
        shape,
        header(section),
        numbers(section),
        section
            .oneOf("extra_cells", Section.words(ExtraCells.values(), ExtraCells::word))
            .orElse(ExtraCells.REFUSE));
  }

  /** The shape with the words that the header row must hold. */
  TableShape shapeFor(Set<String> neededHeaders) {
    return new TableShape(
        shape.separator(),
        shape.quote(),
        shape.encoding(),
        shape.sheets(),
        List.copyOf(neededHeaders));
  }

  private static Optional<Character> character(Section section, String key) {
    String expected = "one character" + (key.equals("separator") ? ", or \"tab\"" : "");
    Optional<String> text = section.anyText(key, expected);
    if (text.isEmpty()) {
      return Optional.empty();
    }
    if (text.get().equals("tab")) {
      return Optional.of('\t');
    }
    if (text.get().length() != 1 || text.get().charAt(0) < ' ' && !text.get().equals("\t")) {
      section.fault(key, "'" + text.get() + "' for " + section.named(key), expected);
      return Optional.empty();
    }
    return Optional.of(text.get().charAt(0));
  }

  private static Optional<Charset> encoding(Section section) {
    String expected = "an encoding such as \"UTF-8\", \"windows-1252\" or \"ISO-8859-15\"";
    Optional<String> text = section.text("encoding", expected);
    try {
      return text.map(Charset::forName);
    } catch (IllegalArgumentException e) {
      section.fault("encoding", "'" + text.get() + "' for encoding in [table]", expected);
      return Optional.empty();
    }
  }

  private static HeaderRule header(Section section) {
    String expected = "a cell of the header, or the header's row counted from 1";
    Optional<Object> value = section.value("header");
    if (value.isPresent() && value.get() instanceof Long number) {
      if (number < 1) {
        section.fault("header", "row " + number, expected);
      }
      return new HeaderRule.AtRow(number);
    }
    return section
        .text("header", expected)
        .<HeaderRule>map(HeaderRule.HoldsCell::new)
        .orElseGet(HeaderRule.AllHeaders::new);
  }

  private static NumberGrammar numbers(Section section) {
    Optional<Character> decimal = character(section, "decimal");
    Optional<Character> thousands = character(section, "thousands");
    char mark = decimal.orElse('.');
    if (mark != '.' && mark != ',') {
      section.fault("decimal", "'" + mark + "' for decimal in [table]", "\".\" or \",\"");
      return NumberGrammar.POINT;
    }
    boolean odd =
        thousands.isPresent()
            && (thousands.get() == mark
                || Character.isLetterOrDigit(thousands.get())
                || "+-".indexOf(thousands.get()) >= 0);
    if (odd) {
      section.fault(
          "thousands",
          "'" + thousands.get() + "' for thousands in [table], beside decimal '" + mark + "'",
          "a mark that cannot be taken for a part of the number");
      return new NumberGrammar(mark, Optional.empty());
    }
    return new NumberGrammar(mark, thousands);
  }
}
