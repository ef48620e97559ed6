package org.spikewright.mapping;

import java.util.ArrayList;
import java.util.Collection;
import java.util.List;
import java.util.Optional;
import java.util.stream.Collectors;
import org.spikewright.mapping.MappedFile.Unmappable;
import org.spikewright.table.Cell;
import org.spikewright.table.Row;
import org.spikewright.table.Source;

/** Looks for the header of one table below its preamble. */
final class HeaderSearch {
  /** A preamble is not longer than this. */
  private static final int ROWS_LOOKED_AT = 1000;

  private static final int NAMES_SHOWN = 40;

  private final TableRules table;
  private final HeaderRule rule;
  private final Collection<String> needed;
  private final String mapping;
  private final long mostRows;
  private long looked;
  private Optional<Row> above = Optional.empty();
  private Optional<Header> best = Optional.empty();

  /** Looks for the first header, below a preamble. */
  HeaderSearch(Mapping mapping) {
    this(mapping, ROWS_LOOKED_AT);
  }

  private HeaderSearch(Mapping mapping, long mostRows) {
    this.table = mapping.table();
    this.rule = table.header();
    this.needed = mapping.neededHeaders();
    this.mapping = mapping.name();
    this.mostRows = mostRows;
  }

  /** Looks for a further header, however far below. */
  static HeaderSearch again(Mapping mapping) {
    return new HeaderSearch(mapping, Long.MAX_VALUE);
  }

  /** What the search came to. */
  sealed interface Found {
    /** The header; all mapped columns are there, once. */
    record At(Header header) implements Found {}

    /** The header is there, but does not fit. */
    record Wrong(Unmappable why) implements Found {}

    /** Not yet. */
    record NotYet() implements Found {}
  }

  /** Looks at the next row. */
  Found next(Row row) {
    if (row.isBlank()) {
      return new Found.NotYet();
    }
    if (++looked > mostRows) {
      return new Found.Wrong(notFound(row.source()));
    }
    Optional<Row> upper = table.headerRows() == 1 ? Optional.empty() : above;
    Header header = upper.map(over -> Header.of(over, row)).orElseGet(() -> Header.of(row));
    boolean complete = table.headerRows() == 1 || upper.isPresent();
    if (complete && isHeader(header, upper.orElse(row))) {
      return fitting(header);
    }
    above = Optional.of(row);
    // With two rows the lower one may stand far below an upper one at the declared place.
    if (rule instanceof HeaderRule.AtRow at && upper.orElse(row).number() > at.number()) {
      return new Found.Wrong(notFound(row.source()));
    }
    if (best.isEmpty() || lacks(header) < lacks(best.get())) {
      best = Optional.of(header);
    }
    return new Found.NotYet();
  }

  /** The upper row of a header of two that was found. */
  Optional<Row> above() {
    return table.headerRows() == 1 ? Optional.empty() : above;
  }

  /** Whether a row within a table is worth being looked at as another header. */
  boolean mayBegin(Row row) {
    if (table.headerRows() > 1 || rule instanceof HeaderRule.AtRow) {
      return false;
    }
    Optional<String> telling =
        rule instanceof HeaderRule.HoldsCell holds
            ? Optional.of(holds.words())
            : needed.stream().findFirst();
    for (Cell cell : row.cells()) {
      if (cell instanceof Cell.Text text
          && (telling.isEmpty() || text.text().strip().equals(telling.get().strip()))) {
        return true;
      }
    }
    return false;
  }

  private int lacks(Header header) {
    return missing(header).size();
  }

  /** Names that are not there, and the pattern of the signals' columns if none matches it. */
  private List<String> missing(Header header) {
    List<String> missing = new ArrayList<>(header.missing(needed));
    table
        .layout()
        .pattern()
        .filter(pattern -> TableView.matching(pattern, header).isEmpty())
        .ifPresent(pattern -> missing.add(pattern.pattern()));
    return missing;
  }

  /** Whether a row, the upper one of two, is the header. */
  private boolean isHeader(Header header, Row row) {
    if (rule instanceof HeaderRule.HoldsCell cell) {
      boolean holds =
          header.find(cell.words()).isPresent() || Header.of(row).find(cell.words()).isPresent();
      // Of two rows joined, the upper one may be a line above the header.
      return holds && (table.headerRows() == 1 || missing(header).isEmpty());
    }
    if (rule instanceof HeaderRule.AtRow at) {
      return row.number() == at.number();
    }
    return missing(header).isEmpty();
  }

  private Found fitting(Header header) {
    String place = header.row().position().within();
    List<String> missing = missing(header);
    if (!missing.isEmpty()) {
      return new Found.Wrong(
          new Unmappable(place, lacking(header, missing), expected(), advice(header, missing)));
    }
    List<String> doubled = header.doubled(needed);
    if (!doubled.isEmpty()) {
      return new Found.Wrong(
          new Unmappable(
              place,
              "more than one column " + quoted(doubled),
              "each mapped column once",
              "give the columns different headers in the export, or map another one"));
    }
    return new Found.At(header);
  }

  /** Why the table has no header, where its rows have come to an end. */
  Unmappable notFound(Source source) {
    String sheet = source.sheet().map(name -> "sheet " + name).orElse("the file");
    if (rule instanceof HeaderRule.HoldsCell cell) {
      return new Unmappable(
          sheet,
          "no row holds the cell '" + cell.words() + "'",
          "a header with that cell",
          "correct header under [table] in mapping '" + mapping + "'");
    }
    if (rule instanceof HeaderRule.AtRow at) {
      return new Unmappable(
          sheet,
          "nothing in row " + at.number(),
          "the header there",
          "correct header under [table] in mapping '" + mapping + "'");
    }
    if (best.isEmpty()) {
      return new Unmappable(
          sheet, "no rows", expected(), "export again, or take the file away if it is empty");
    }
    List<String> missing = missing(best.get());
    return new Unmappable(
        best.get().row().position().within(),
        lacking(best.get(), missing),
        expected(),
        advice(best.get(), missing));
  }

  private static String lacking(Header header, List<String> missing) {
    String shown =
        header.names().stream()
            .limit(NAMES_SHOWN)
            .map(Said::briefly)
            .collect(Collectors.joining(", "));
    return "no column " + quoted(missing) + "; this row has: " + shown;
  }

  private String expected() {
    return "a header with " + quoted(List.copyOf(needed));
  }

  private String advice(Header header, List<String> missing) {
    String meant =
        missing.stream()
            .flatMap(
                name ->
                    Spelling.nearest(name, header.names()).stream()
                        .map(near -> "'" + near + "' for '" + name + "'"))
            .collect(Collectors.joining(", "));
    String correct = "correct the headers in mapping '" + mapping + "', or the export";
    return meant.isEmpty() ? correct : correct + "; perhaps " + meant;
  }

  private static String quoted(Collection<String> names) {
    return names.stream().map(name -> "'" + name + "'").collect(Collectors.joining(", "));
  }
}
