package org.spikewright.config;

import java.nio.charset.Charset;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.regex.Pattern;
import org.spikewright.mapping.Fact;
import org.spikewright.mapping.Glob;
import org.spikewright.mapping.HeaderRule;
import org.spikewright.mapping.LayoutRule;
import org.spikewright.mapping.Places;
import org.spikewright.mapping.RowRules.ExtraCells;
import org.spikewright.mapping.Spelling;
import org.spikewright.mapping.TableRules;
import org.spikewright.mapping.TableRules.Tables;
import org.spikewright.quantity.NumberGrammar;
import org.spikewright.table.HeaderCells;
import org.spikewright.table.SheetRule;
import org.spikewright.table.TableShape;
import org.spikewright.table.TableShape.EmptyRows;

/**
 * Reads {@code [table]}: how a file is cut into cells, and how the table lies in it.
 *
 * @param section empty where the mapping has none
 * @param numbers the grammar of numbers in text
 * @param headerRows how many rows make up the header
 * @param ends words that end the table
 */
record TableSection(
    Optional<Section> section, NumberGrammar numbers, int headerRows, List<Glob> ends) {
  private static final String SHEETS =
      "the name of a sheet (* stands for any characters), its number from 1, or a list of names";

  static TableSection read(Optional<Section> section) {
    return new TableSection(
        section,
        section.map(TableSection::numbers).orElse(NumberGrammar.POINT),
        section.map(TableSection::headerRows).orElse(1),
        section.map(TableSection::ends).orElse(List.of()));
  }

  /** What becomes of rows with more cells than the header. */
  ExtraCells extraCells() {
    return section
        .flatMap(
            table ->
                table.oneOf("extra_cells", Section.words(ExtraCells.values(), ExtraCells::word)))
        .orElse(ExtraCells.REFUSE);
  }

  /** How a file is cut into cells. */
  TableShape shapeFor(Set<String> neededHeaders, LayoutRule layout, List<Places.Named> sheetNames) {
    Optional<Character> separator = section.flatMap(table -> character(table, "separator"));
    char quote = section.flatMap(table -> character(table, "quote")).orElse('"');
    if (separator.isPresent() && separator.get() == quote) {
      section.get().fault("separator", "the same character as quote", "another one");
    }
    List<SheetRule> sheets = new ArrayList<>(section.map(TableSection::sheets).orElse(List.of()));
    if (sheets.isEmpty()) {
      sheetNames.forEach(
          name -> sheets.add(new SheetRule.Matching(name.pattern(), name.pattern().pattern())));
    }
    return new TableShape(
        separator,
        quote,
        section.flatMap(TableSection::encoding),
        sheets,
        new HeaderCells(List.copyOf(neededHeaders), layout.pattern().stream().toList(), headerRows),
        ends.stream().anyMatch(end -> end.pattern().isEmpty())
            ? EmptyRows.HANDED_ON
            : EmptyRows.PASSED_OVER);
  }

  /** How the table lies in the file. */
  TableRules rules(LayoutRule layout, Section root, Places places) {
    boolean units = section.flatMap(table -> table.yesOrNo("units_row")).orElse(false);
    HeaderRule header = section.map(TableSection::header).orElseGet(HeaderRule.AllHeaders::new);
    Tables tables =
        section
            .flatMap(table -> table.oneOf("tables", Section.words(Tables.values(), Tables::word)))
            .orElse(Tables.ONE);
    if (tables == Tables.ALL && header instanceof HeaderRule.AtRow) {
      section
          .get()
          .fault(
              "tables",
              "tables = \"all\" with header = a row number",
              "a cell of the header, or no header: further tables are found by it");
    }
    if (tables == Tables.ALL && headerRows > 1 && ends.isEmpty()) {
      section
          .get()
          .fault(
              "tables",
              "tables = \"all\" with header_rows = 2 and without footer",
              "footer, the cell with which each table ends; \"\" is an empty row");
    }
    return new TableRules(
        header,
        headerRows,
        units ? TableRules.UnitsRow.BELOW_HEADER : TableRules.UnitsRow.NONE,
        ends,
        tables,
        section.map(table -> carryDown(table, root, places)).orElse(List.of()),
        layout,
        section.filter(table -> table.has("decimal")).isPresent()
            ? TableRules.Marks.DECLARED
            : TableRules.Marks.WORKED_OUT);
  }

  private static List<Glob> ends(Section section) {
    return section.texts("footer", "a cell of the row that ends the table, or several").stream()
        .map(text -> new Glob(text.strip()))
        .toList();
  }

  private static int headerRows(Section section) {
    Optional<Long> rows = section.wholeNumber("header_rows", "1 or 2");
    if (rows.isPresent() && rows.get() != 1 && rows.get() != 2) {
      section.fault("header_rows", rows.get() + " for header_rows in [table]", "1 or 2");
    }
    return rows.isPresent() && rows.get() == 2 ? 2 : 1;
  }

  private static List<Fact> carryDown(Section section, Section root, Places places) {
    String expected = "words of [columns], such as [\"sample\"]";
    List<String> possible =
        places.columns().keySet().stream()
            .filter(TableSection::mayCarryDown)
            .map(Fact::word)
            .sorted()
            .toList();
    List<Fact> facts = new ArrayList<>();
    for (String word : section.texts("carry_down", expected)) {
      Optional<Fact> fact = Fact.of(word);
      if (possible.contains(word)) {
        facts.add(fact.get());
      } else if (fact.isEmpty() || !root.has("columns", word) || !mayCarryDown(fact.get())) {
        section
            .faults()
            .add(
                section.at("carry_down"),
                "'" + word + "' for carry_down in [table]",
                possible.isEmpty() ? expected : "one of " + Section.quoted(possible),
                Spelling.nearest(word, possible));
      }
    }
    return facts;
  }

  /** What the instrument said in one row it did not say in the next. */
  private static boolean mayCarryDown(Fact fact) {
    return fact.kind() != Fact.Kind.SIGNAL && fact != Fact.SIGNAL_SD;
  }

  private static List<SheetRule> sheets(Section section) {
    Optional<Object> value = section.value("sheet");
    if (value.isPresent() && value.get() instanceof Long number) {
      if (!(number >= 1 && number <= 10_000)) {
        section.fault("sheet", "number " + number + " for sheet in [table]", SHEETS);
        return List.of();
      }
      return List.of(new SheetRule.Numbered(number.intValue()));
    }
    List<SheetRule> rules = new ArrayList<>();
    for (String name : section.texts("sheet", SHEETS)) {
      // No spreadsheet program allows these in a sheet's name.
      boolean pattern = name.indexOf('*') >= 0 || name.indexOf('?') >= 0;
      rules.add(
          pattern
              ? new SheetRule.Matching(Pattern.compile(regex(name)), name)
              : new SheetRule.Named(name));
    }
    return rules;
  }

  private static String regex(String glob) {
    StringBuilder regex = new StringBuilder();
    for (char c : glob.toCharArray()) {
      regex.append(c == '*' ? ".*" : c == '?' ? "." : Pattern.quote(String.valueOf(c)));
    }
    return regex.toString();
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

  /** Without a declared mark, the decimal point stands in until the file tells. */
  private static NumberGrammar numbers(Section section) {
    Optional<Character> decimal = character(section, "decimal");
    Optional<Character> thousands = character(section, "thousands");
    char mark = decimal.orElse(thousands.isPresent() && thousands.get() == '.' ? ',' : '.');
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
